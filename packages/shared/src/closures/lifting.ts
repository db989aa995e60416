import { civilDay } from '../time/civil-day';
import type { LiftCondition } from './contract';

/** Oxygen read at dawn on a lake, mg/l. */
export type DawnReading = { at: Date; oxygenMgL: number };

export type LiftFacts = {
  ticked: ReadonlySet<string>; // ids of the conditions a person has ticked
  dawns: readonly DawnReading[]; // since it was closed, of the lake concerned
  zone: string;
};

/**
 * What still stands against lifting a closure, in words; none when it may be lifted. Oxygen counts by the latest dawns,
 * a day each, all of them good: one bad dawn begins the count anew, and the lowest reading of a day is the day’s. An
 * owner may lift it all the same with a reason; that is theirs to answer for.
 */
export function whyNotLift(
  conditions: readonly LiftCondition[],
  { ticked, dawns, zone }: LiftFacts,
): string[] {
  return conditions.flatMap((condition) => {
    if (condition.kind === 'tick') return ticked.has(condition.id) ? [] : [condition.words];
    const good = goodDawns(dawns, condition.leastMgL, zone);
    if (good >= condition.dawns) return [];
    const wanted = condition.dawns === 1 ? 'one dawn reading' : `${condition.dawns} dawn readings running`;
    return [`${wanted} of ${condition.leastMgL.toFixed(1)} mg/l or more: so far ${good}`];
  });
}

/** How many of the latest days, going back one by one without a gap, had oxygen enough at dawn. */
function goodDawns(dawns: readonly DawnReading[], leastMgL: number, zone: string): number {
  const lowest = new Map<string, number>();
  for (const { at, oxygenMgL } of dawns) {
    const day = civilDay(at, zone);
    lowest.set(day, Math.min(lowest.get(day) ?? Number.POSITIVE_INFINITY, oxygenMgL));
  }
  const days = [...lowest.keys()].sort().reverse();
  let good = 0;
  for (const [index, day] of days.entries()) {
    const next = days[index - 1];
    if (next !== undefined && Date.parse(next) - Date.parse(day) !== 86_400_000) break;
    if ((lowest.get(day) ?? 0) < leastMgL) break;
    good += 1;
  }
  return good;
}
