import { civilDay } from '../time/civil-day';
import { overlaps, type Interval } from '../time/interval';
import { daysBetween, HOUR_MS } from '../time/zoned';

/** Nights in a stay: the midnights at the lake it goes over. One that ends at midnight goes over none. */
export function nightsIn({ from, until }: Interval, zone: string): number {
  const last = new Date(Math.max(from.getTime(), until.getTime() - 1));
  return daysBetween(civilDay(from, zone), civilDay(last, zone));
}

/**
 * Nights in a row that a stay would make with the person's others: all those joined to it, directly or through one
 * another, with less than `restHours` off the water between. Nights spent twice count once.
 */
export function nightsInARow(
  stay: Interval,
  others: readonly Interval[],
  { restHours, zone }: { restHours: number; zone: string },
): number {
  const run = [stay];
  let left = others.filter((each) => each.until > each.from);
  for (;;) {
    const joined = left.filter((each) => run.some((one) => overlaps(one, widened(each, restHours))));
    if (joined.length === 0) break;
    run.push(...joined);
    left = left.filter((each) => !joined.includes(each));
  }
  const nights = new Set(run.flatMap((each) => nightsOf(each, zone)));
  return nights.size;
}

/** Less than the rest between two stays joins them; the whole of it parts them. With no rest asked, touching ones join. */
function widened({ from, until }: Interval, restHours: number): Interval {
  const reachMs = Math.max(restHours * HOUR_MS, 1);
  return { from: new Date(from.getTime() - reachMs), until: new Date(until.getTime() + reachMs) };
}

/** Each night by the number of days since 1970 of the day it begins on. */
function nightsOf(stay: Interval, zone: string): number[] {
  const first = daysBetween('1970-01-01', civilDay(stay.from, zone));
  return Array.from({ length: nightsIn(stay, zone) }, (_, index) => first + index);
}
