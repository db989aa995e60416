import type { RecordBottomEvent } from '@mereward/shared/surveys/bottom-event-contract';
import { BottomEventKind, EventEnds } from '@mereward/shared/surveys/bottom-event-contract';
import { z } from 'zod';
import { readPosition } from '@/lib/position-text';

export const EVENT_KINDS: readonly { key: BottomEventKind; label: string }[] = [
  { key: 'weed_cut', label: 'Weed cut' },
  { key: 'snag_removed', label: 'Snag taken out' },
  { key: 'dredged', label: 'Dredged' },
  { key: 'leaf_fall', label: 'Leaf fall' },
  { key: 'flood', label: 'Flood' },
  { key: 'drawdown', label: 'Drawn down' },
  { key: 'other', label: 'Something else' },
];

export const EVENT_ENDS: readonly { key: EventEnds; label: string; note: string }[] = [
  { key: 'cover', label: 'what lay there', note: 'weed, leaves, snags' },
  { key: 'substrate', label: 'the bottom itself', note: 'silt, clay, gravel' },
  { key: 'depth', label: 'the depth', note: 'soundings are left out' },
];

const linesOf = (text: string): string[] =>
  text
    .split('\n')
    .map((line) => line.trim())
    .filter((line) => line !== '');

/** The corners typed so far that are places. */
export const cornersOf = (text: string): [number, number][] =>
  linesOf(text).flatMap((line) => {
    const place = readPosition(line);
    return place ? [place] : [];
  });

/** An event as typed; the area is one corner a line. */
export const EventDraft = z
  .object({
    id: z.string(),
    kind: BottomEventKind,
    happenedOn: z.iso.date('Give the day it happened.'),
    where: z.enum(['whole', 'area']),
    corners: z.string(),
    ends: z.array(EventEnds).min(1, 'Choose at least one: an event that ends nothing changes no chart.'),
    note: z.string().trim().max(500, 'At most 500 letters.'),
  })
  .refine(({ where, corners }) => where === 'whole' || cornersOf(corners).length >= 3, {
    path: ['corners'],
    message: 'An area takes three corners or more. Tap them on the lake.',
  })
  .refine(
    ({ where, corners }) => where === 'whole' || cornersOf(corners).length === linesOf(corners).length,
    {
      path: ['corners'],
      message: 'A line is no place. Type latitude, then longitude, in degrees, such as 52.36610, -1.14170.',
    },
  );
export type EventTyped = z.input<typeof EventDraft>;
export type EventRead = z.output<typeof EventDraft>;

/** The event as it is recorded: the ring closed. */
export function eventOf({ id, kind, happenedOn, where, corners, ends, note }: EventRead): RecordBottomEvent {
  const places = cornersOf(corners);
  const [first] = places;
  const ring = first ? [...places, first] : [];
  return {
    id,
    kind,
    happenedOn,
    ends,
    note,
    area: where === 'whole' ? null : { type: 'Polygon', coordinates: [ring] },
  };
}
