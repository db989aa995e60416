import { z } from 'zod';
import { geodesicBetween, type LonLat } from '../geometry/geodesic';

/**
 * One position as a phone tells it: degrees (WGS 84), the radius in metres within which the place lies in 19 of 20
 * cases, and when by the phone's own clock, ms. Source: W3C Geolocation (accuracy "at a 95 % confidence level").
 */
export type Fix = { lon: number; lat: number; accuracyM: number; atMs: number };

/** A fix less sure than this, radius in metres, is left out. Common practice, no published source. */
export const POOREST_FIX_M = 15;
/** Fixes this near to where one stands, metres, are one place: their mean is taken. */
const STANDING_M = 2;
/** Nobody goes round a bank faster, m/s: a run. */
const FASTEST_M_PER_S = 4;
/** After so long without a fix, seconds, what lies between was not seen. */
const SILENCE_S = 20;
/** A stretch nobody was seen to walk is told from this length on, metres. */
const GAP_FROM_M = 10;
/** So many fixes in a row that agree with each other and not with the walk: one has really come elsewhere. */
const AGREEING = 3;

/** A place of the walk: the mean of the fixes taken while standing there. `radiusM` holds 19 of 20. */
const Station = z.object({
  lon: z.number(),
  lat: z.number(),
  radiusM: z.number(),
  fixes: z.int(),
  /** Nobody was seen to walk from the place before to this one. */
  afterGap: z.boolean(),
});
export type Station = z.infer<typeof Station>;

const KeptFix = z.object({ lon: z.number(), lat: z.number(), accuracyM: z.number(), atMs: z.number() });

/** A walk as far as it has come. Plain content, so that a device can keep it as it grows. */
export const ShoreWalk = z.object({
  stations: z.array(Station),
  /** The phone's clock at the last fix that counted, ms; only differences of it are used. */
  lastAtMs: z.number().nullable(),
  /** Fixes too far away to have been walked to; taken when enough of them agree. */
  doubted: z.array(KeptFix),
  /** Pressed pause: the next place does not follow from the one before. */
  paused: z.boolean(),
  left: z.object({ poor: z.int(), jumped: z.int(), unreadable: z.int() }),
});
export type ShoreWalk = z.infer<typeof ShoreWalk>;

export const NEW_WALK: ShoreWalk = {
  stations: [],
  lastAtMs: null,
  doubted: [],
  paused: false,
  left: { poor: 0, jumped: 0, unreadable: 0 },
};

const isReadable = ({ lon, lat, accuracyM, atMs }: Fix): boolean =>
  [lon, lat, accuracyM, atMs].every(Number.isFinite) &&
  Math.abs(lon) <= 180 &&
  Math.abs(lat) <= 90 &&
  accuracyM > 0;

/**
 * The walk with one more fix. Poor, unreadable and impossibly far ones are counted and left out; near ones are
 * averaged into the place where one stands. The clock may be wrong or set anew on the way: no fix is taken or left
 * for its date alone.
 */
export function withFix(walk: ShoreWalk, fix: Fix): ShoreWalk {
  if (!isReadable(fix)) return leftOut(walk, 'unreadable');
  if (fix.accuracyM > POOREST_FIX_M) return leftOut(walk, 'poor');
  const last = walk.stations.at(-1);
  if (!last || walk.lastAtMs === null) return started(walk, fix, false);
  const awayM = betweenM(last, fix);
  const forS = secondsBetween(walk.lastAtMs, fix.atMs);
  if (awayM > reachM(last.radiusM, fix, forS)) return doubting(walk, fix);
  const known = walk.doubted.length > 0 ? leftOut(walk, 'jumped', walk.doubted.length) : walk;
  const unseen = (walk.paused || forS > SILENCE_S) && awayM > GAP_FROM_M;
  if (!unseen && awayM <= Math.max(STANDING_M, fix.accuracyM / 4)) return stood(known, last, fix);
  return started(known, fix, unseen);
}

/** The walk laid aside: where it goes on is not joined by a walked stretch, unless it is the same place. */
export const withPause = (walk: ShoreWalk): ShoreWalk => ({ ...walk, paused: true });

const betweenM = (a: { lon: number; lat: number }, b: { lon: number; lat: number }): number =>
  geodesicBetween([a.lon, a.lat], [b.lon, b.lat]).distanceM;

/** Between two fixes by the phone's clock; a clock that was set back says nothing, and fixes come about every second. */
const secondsBetween = (fromMs: number, toMs: number): number => (toMs > fromMs ? (toMs - fromMs) / 1000 : 1);

const reachM = (radiusM: number, fix: Fix, forS: number): number =>
  FASTEST_M_PER_S * forS + radiusM + fix.accuracyM;

const leftOut = (walk: ShoreWalk, why: keyof ShoreWalk['left'], count = 1): ShoreWalk => ({
  ...walk,
  doubted: why === 'jumped' ? [] : walk.doubted,
  left: { ...walk.left, [why]: walk.left[why] + count },
});

const placed = (fix: Fix, afterGap: boolean): Station => ({
  lon: fix.lon,
  lat: fix.lat,
  radiusM: fix.accuracyM,
  fixes: 1,
  afterGap,
});

const started = (walk: ShoreWalk, fix: Fix, afterGap: boolean): ShoreWalk => ({
  ...walk,
  stations: [...walk.stations, placed(fix, afterGap)],
  lastAtMs: fix.atMs,
  paused: false,
});

/**
 * The mean of the fixes so far and one more, each by the inverse square of its radius. The radius is not made smaller
 * by their number: successive fixes share the same error of the sky.
 */
function merged(station: Station, fix: Fix): Station {
  const { radiusM, fixes } = station;
  const weight = fixes / radiusM ** 2;
  const more = 1 / fix.accuracyM ** 2;
  const share = more / (weight + more);
  return {
    ...station,
    lon: station.lon + share * (fix.lon - station.lon),
    lat: station.lat + share * (fix.lat - station.lat),
    radiusM: Math.sqrt((fixes + 1) / (weight + more)),
    fixes: fixes + 1,
  };
}

const stood = (walk: ShoreWalk, last: Station, fix: Fix): ShoreWalk => ({
  ...walk,
  stations: [...walk.stations.slice(0, -1), merged(last, fix)],
  lastAtMs: fix.atMs,
  paused: false,
});

/** A jump is believed once several fixes in a row agree on it: then a new stretch begins there. */
function doubting(walk: ShoreWalk, fix: Fix): ShoreWalk {
  const before = walk.doubted.at(-1);
  const agrees =
    before !== undefined &&
    betweenM(before, fix) <= reachM(before.accuracyM, fix, secondsBetween(before.atMs, fix.atMs));
  const known = before && !agrees ? leftOut(walk, 'jumped', walk.doubted.length) : walk;
  const doubted = [...known.doubted, fix];
  if (doubted.length < AGREEING) return { ...known, doubted };
  return started({ ...known, doubted: [] }, fix, true);
}

/** What is to be told of a walk. Lengths in metres; radii hold 19 of 20. */
export type WalkReport = {
  walkedM: number;
  gaps: { count: number; lengthM: number };
  /** From where one stands back to the start, not walked yet. */
  toStartM: number;
  /** Root mean square of the places' radii, and the largest; null before the first. */
  radiusM: number | null;
  worstM: number | null;
  fixes: number;
};

export function walkReport({ stations }: Pick<ShoreWalk, 'stations'>): WalkReport {
  let walkedM = 0;
  const gaps = { count: 0, lengthM: 0 };
  stations.forEach((station, i) => {
    const before = stations[i - 1];
    if (!before) return;
    const awayM = betweenM(before, station);
    if (!station.afterGap) walkedM += awayM;
    else {
      gaps.count += 1;
      gaps.lengthM += awayM;
    }
  });
  const [first] = stations;
  const last = stations.at(-1);
  const squares = stations.reduce((sum, { radiusM }) => sum + radiusM ** 2, 0);
  return {
    walkedM,
    gaps,
    toStartM: first && last ? betweenM(last, first) : 0,
    radiusM: stations.length > 0 ? Math.sqrt(squares / stations.length) : null,
    worstM: stations.length > 0 ? Math.max(...stations.map(({ radiusM }) => radiusM)) : null,
    fixes: stations.reduce((sum, { fixes }) => sum + fixes, 0),
  };
}

/**
 * σ in each direction of a place known to lie within a radius in 19 of 20 cases: the radius of a circular normal
 * distribution's 95 % circle is σ·√(−2 ln 0.05).
 */
export const sigmaOfRadiusM = (radiusM: number): number => radiusM / Math.sqrt(-2 * Math.log(0.05));

export const stationPlace = ({ lon, lat }: Station): LonLat => [lon, lat];
