import type { BoardSpan } from '@mereward/shared/bookings/availability-contract';
import { sunTimes } from '@mereward/shared/time/sun';
import { addDays, instantOf, startOfDay } from '@mereward/shared/time/zoned';

/** A column of the board: a day, or two hours of the one day that is looked at. Instants in ms, half-open. */
export type BoardCell = { key: string; day: string; clock: string | null; fromMs: number; untilMs: number };

export const ZOOMS = [
  { key: 'day', label: 'Day', days: 1 },
  { key: 'week', label: 'Week', days: 7 },
  { key: 'fortnight', label: 'Fortnight', days: 14 },
] as const;
export type Zoom = (typeof ZOOMS)[number]['key'];
export const daysOf = (zoom: Zoom): number => ZOOMS.find(({ key }) => key === zoom)?.days ?? 7;

const CELL_HOURS = 2;

/** The board's columns. A day on which the clock is moved is as wide as any other. */
export function boardCells(from: string, zoom: Zoom, zone: string): BoardCell[] {
  const ends =
    zoom === 'day'
      ? Array.from({ length: 24 / CELL_HOURS }, (_, at) => `${String(at * CELL_HOURS).padStart(2, '0')}:00`)
      : [null];
  const starts = Array.from({ length: daysOf(zoom) }, (_, at) => addDays(from, at)).flatMap((day) =>
    ends.map((clock) => ({
      day,
      clock,
      at: clock ? instantOf(`${day}T${clock}`, zone).at : startOfDay(day, zone),
    })),
  );
  const end = startOfDay(addDays(from, daysOf(zoom)), zone);
  return starts.map(({ day, clock, at }, index) => ({
    key: `${day}T${clock ?? ''}`,
    day,
    clock,
    fromMs: at.getTime(),
    untilMs: (starts[index + 1]?.at ?? end).getTime(),
  }));
}

/** Where an instant lies, counted in columns from the left edge, cut off at the board's edges. */
export function placeOf(atMs: number, cells: readonly BoardCell[]): number {
  const index = cells.findIndex(({ untilMs }) => atMs < untilMs);
  const cell = cells[index];
  if (!cell) return cells.length;
  return index + Math.max(0, (atMs - cell.fromMs) / (cell.untilMs - cell.fromMs));
}

/** A span as it is drawn: from and to in columns, and the lane it lies in where spans lie over one another. */
export type PlacedSpan = { span: BoardSpan; at: number; to: number; fishingTo: number; lane: number };

/** Places a peg's spans on the board; those wholly outside are left out. Spans are in order of their start. */
export function placedSpans(spans: readonly BoardSpan[], cells: readonly BoardCell[]): PlacedSpan[] {
  const laneEnds: number[] = [];
  const [first, last] = [cells[0]?.fromMs ?? 0, cells.at(-1)?.untilMs ?? 0];
  return spans.flatMap((span) => {
    const [fromMs, untilMs] = [Date.parse(span.from), span.until ? Date.parse(span.until) : Infinity];
    if (fromMs >= last || untilMs <= first) return [];
    const free = laneEnds.findIndex((end) => end <= fromMs);
    const lane = free === -1 ? laneEnds.length : free;
    laneEnds[lane] = untilMs;
    const to = placeOf(untilMs, cells);
    const fishingTo = span.fishingUntil ? placeOf(Date.parse(span.fishingUntil), cells) : to;
    return [{ span, at: placeOf(fromMs, cells), to, fishingTo, lane }];
  });
}

/** The spans of a peg that lie over a column. */
export const spansIn = <S extends Pick<BoardSpan, 'from' | 'until'>>(
  spans: readonly S[],
  { fromMs, untilMs }: Pick<BoardCell, 'fromMs' | 'untilMs'>,
): S[] =>
  spans.filter(
    ({ from, until }) => Date.parse(from) < untilMs && (until === null || Date.parse(until) > fromMs),
  );

/** The dark parts of a column, sunset to sunrise, as shares of its width from 0 to 1. */
export function darkParts(
  { day, fromMs, untilMs }: BoardCell,
  place: readonly [number, number],
  zone: string,
): [number, number][] {
  const share = (at: Date): number => Math.min(1, Math.max(0, (at.getTime() - fromMs) / (untilMs - fromMs)));
  const sun = sunTimes(day, place, zone);
  if (sun.state === 'always_up') return [];
  if (sun.state === 'never_up') return [[0, 1]];
  const rise = sun.sunrise ? share(sun.sunrise) : 0;
  const set = sun.sunset ? share(sun.sunset) : 1;
  const parts: [number, number][] =
    rise <= set
      ? [
          [0, rise],
          [set, 1],
        ]
      : [[set, rise]];
  return parts.filter(([start, end]) => end > start);
}
