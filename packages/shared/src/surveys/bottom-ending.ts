import type { Point } from '../geometry/point';
import { insideOutline, type Outline } from '../geometry/polygon';
import { dayWords } from '../time/civil-day';
import type { BottomEventKind, EventEnds } from './bottom-event-contract';

/** An event as evidence is held against it: its area in the lake's plane, null for the whole lake. */
export type BottomEnding = {
  id: string;
  kind: BottomEventKind;
  area: Outline | null;
  happenedOn: string; // civil day
  ends: readonly EventEnds[];
};

export const EVENT_WORDS: Readonly<Record<BottomEventKind, string>> = {
  weed_cut: 'Weed was cut',
  snag_removed: 'A snag was taken out',
  dredged: 'The bed was dredged',
  leaf_fall: 'The leaves fell',
  flood: 'The water was in flood',
  drawdown: 'The water was drawn down',
  other: 'The bottom changed',
};

/** What each kind of event commonly ends. Common practice, no published source; whoever records one may say otherwise. */
export const EVENT_USUALLY_ENDS: Readonly<Record<BottomEventKind, readonly EventEnds[]>> = {
  weed_cut: ['cover'],
  snag_removed: ['cover'],
  dredged: ['cover', 'substrate', 'depth'],
  leaf_fall: ['cover'],
  flood: ['cover', 'substrate'],
  drawdown: ['cover'],
  other: ['cover'],
};

/** "Weed was cut in part of the lake on 4 May 2028" */
export function eventWords({
  kind,
  area,
  happenedOn,
}: {
  kind: BottomEventKind;
  area: unknown;
  happenedOn: string;
}): string {
  const where = area === null ? '' : ' in part of the lake';
  return `${EVENT_WORDS[kind]}${where} on ${dayWords(happenedOn)}`;
}

/**
 * The latest event that ended what was known of `what` at a place on a day, or null. Evidence of the event's own day
 * counts as seen after it: a cast over the work is made when the work is done.
 */
export function endedBy<Ending extends BottomEnding>(
  endings: readonly Ending[],
  what: EventEnds,
  seen: Point & { day: string },
): Ending | null {
  let latest: Ending | null = null;
  for (const ending of endings) {
    if (!ending.ends.includes(what) || seen.day >= ending.happenedOn) continue;
    if (ending.area && !insideOutline(ending.area, seen)) continue;
    if (!latest || ending.happenedOn > latest.happenedOn) latest = ending;
  }
  return latest;
}
