/** A stretch of time, half-open: it holds `from` and ends just before `until`. */
export type Interval = { from: Date; until: Date };

/** Do two stretches share an instant? One that ends as the other starts does not. */
export const overlaps = (a: Interval, b: Interval): boolean =>
  a.from.getTime() < b.until.getTime() && b.from.getTime() < a.until.getTime();

/** Is an instant in a stretch? */
export const holds = ({ from, until }: Interval, at: Date): boolean =>
  from.getTime() <= at.getTime() && at.getTime() < until.getTime();

/** Does a stretch lie in another altogether? */
export const within = (inner: Interval, outer: Interval): boolean =>
  outer.from.getTime() <= inner.from.getTime() && inner.until.getTime() <= outer.until.getTime();

/** Length in hours, elapsed. */
export const elapsedHours = ({ from, until }: Interval): number =>
  (until.getTime() - from.getTime()) / 3_600_000;
