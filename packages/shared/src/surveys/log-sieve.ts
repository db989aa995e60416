import { insideOutline, type Outline } from '../geometry/polygon';
import { distanceToShoreM } from '../geometry/shore-distance';
import { toPlane, type LonLat } from '../geometry/plane';
import { DEEPEST_M } from './error-budget';
import type { LeftOutReason, LogOptions } from './log-contract';
import type { LogPoint } from './log-point';

/** Where and when a log must lie: the lake's water, the visit's days. Instants in Unix time. */
export type LogGround = {
  origin: LonLat;
  outline: Outline; // in the plane of the origin
  startedMs: number;
  endedMs: number | null;
  nowMs: number;
};

/** Clocks of instruments are set by hand, and to another zone: a day out is common. */
const CLOCK_OUT_MS = 86_400_000;

/**
 * A spike: a depth that stands out from the middle one of its five neighbours along the track, itself among them, by more
 * than this and this share. Neighbours lie within `NEAR_M`; with fewer than five nobody can say. Common practice, no
 * published source.
 */
const SPIKE_M = 0.5;
const SPIKE_SHARE = 0.25;
const WINDOW = 2; // to either side
const NEAR_M = 15;

/** One letter a point: why it is left out, or null when it is kept. */
export function sieveLog(
  points: readonly LogPoint[],
  options: LogOptions,
  ground: LogGround,
): (LeftOutReason | null)[] {
  const places = points.map(({ lon, lat }) => toPlane(ground.origin, [lon, lat]));
  const reasons = points.map((point, i): LeftOutReason | null => {
    const place = places[i];
    if (!(point.depthM > 0)) return 'not_deep';
    if (point.depthM > DEEPEST_M) return 'too_deep';
    if (options.level === 'by_hour' && isOtherDay(point.atMs, ground)) return 'other_day';
    return place && isOutside(place, ground.outline, options.outsideM) ? 'outside' : null;
  });
  const good = [...points.keys()].filter((i) => reasons[i] === null);
  good.forEach((i, at) => {
    const point = points[i];
    const here = places[i];
    if (!point || !here) return;
    const near: number[] = [];
    for (let k = at - WINDOW; k <= at + WINDOW; k++) {
      const j = good[k];
      const other = j === undefined ? undefined : points[j];
      const there = j === undefined ? undefined : places[j];
      if (!other || !there || other.file !== point.file) continue;
      if (Math.hypot(there.xM - here.xM, there.yM - here.yM) <= NEAR_M) near.push(other.depthM);
    }
    if (near.length === 2 * WINDOW + 1 && isSpike(point.depthM, near)) reasons[i] = 'spike';
  });
  return reasons;
}

function isOtherDay(atMs: number | null, { startedMs, endedMs, nowMs }: LogGround): boolean {
  if (atMs === null) return false;
  const lastMs = Math.min(endedMs ?? Infinity, nowMs) + CLOCK_OUT_MS;
  return atMs < startedMs - CLOCK_OUT_MS || atMs > lastMs;
}

function isOutside(place: { xM: number; yM: number }, outline: Outline, outsideM: number): boolean {
  return !insideOutline(outline, place) && distanceToShoreM(outline, place) > outsideM;
}

function isSpike(depthM: number, near: readonly number[]): boolean {
  const middle = [...near].sort((a, b) => a - b)[WINDOW] ?? depthM;
  const byM = Math.abs(depthM - middle);
  return byM > SPIKE_M && byM > SPIKE_SHARE * middle;
}

/** What is said of those left out for one reason. */
export function leftOutWords(reason: LeftOutReason, count: number, options: LogOptions): string {
  const [they, lie] = count === 1 ? ['1 sounding', 'lies'] : [`${count} soundings`, 'lie'];
  switch (reason) {
    case 'no_fix':
      return `${they}: no two fixes within ${options.gapS} s round the time of the depth.`;
    case 'outside':
      return `${they} ${lie} more than ${options.outsideM} m outside the outline of the water.`;
    case 'not_deep':
      return `${they}: the depth is nought or less.`;
    case 'too_deep':
      return `${they}: deeper than ${DEEPEST_M} m, which is taken for a false echo.`;
    case 'spike':
      return `${they}: stands out from its neighbours along the track by more than ${SPIKE_M} m and a quarter of the depth.`;
    case 'other_day':
      return `${they}: the time is more than a day from the visit. If the receiver’s day is wrong, take the level at the visit’s start for all.`;
  }
}
