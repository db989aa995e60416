import type { Closure as ClosureRow } from '@mereward/db/entities/closures/closure';
import type { Closure } from '@mereward/shared/closures/closure-effect';

/** A kept closure as the rules look at it. */
export const closureOf = ({ details, liftedAt }: Pick<ClosureRow, 'details' | 'liftedAt'>): Closure => ({
  scope: details.scope,
  reason: details.reason,
  effect: details.effect,
  from: new Date(details.from),
  until: details.until === null ? null : new Date(details.until),
  liftedAt,
});

/** A half-open range as PostgreSQL reads it; null has no end. */
export const rangeOf = (from: Date | string, until: Date | string | null): string =>
  `[${new Date(from).toISOString()},${until === null ? '' : new Date(until).toISOString()})`;
