import type { Point } from '../geometry/point';
import { endedBy, type BottomEnding } from './bottom-ending';
import type { Feels } from './bottom-agreement';
import type { Confirmed } from './bottom-refinement';
import type { ConfirmedBy } from './confirmed-contract';
import type { Cover, Substrate } from './contract';

/** A bottom that somebody made certain of, in the lake's plane. */
export type ConfirmedPlace = Point & {
  id: string;
  castId: string | null; // the very cast it was confirmed at
  sigmaM: number;
  substrate: Substrate | null;
  cover: Cover | null;
  method: ConfirmedBy;
  day: string;
};

/** A cast as it may have felt such a place. */
export type FeltCast = Point & { id: string; sigmaM: number; day: string; feels: Feels };

/** A cast is paired when it lies this near, or within one σ of both places taken together when that is more. */
export const PAIR_WITHIN_M = 2;
const PAIR_AT_MOST_M = 6;
/** Weed and litter come and go, so what lies on the bottom was the same only about the same time. */
const SAME_COVER_DAYS = 60;
const SAME_SUBSTRATE_DAYS = 730;
const DAY_MS = 86_400_000;

/** The reach of a confirmed bottom in words. All of it common practice, no published source. */
export const PAIR_WORDS = `A cast counts when it lies within ${PAIR_WITHIN_M} m of the confirmed place, or within one σ of both places together when that is more, ${PAIR_AT_MOST_M} m at most; for what lies on the bottom also within ${SAME_COVER_DAYS} days, for the bottom itself within two years; and when no works or flood lie between.`;

/** Distance within which a cast may be taken to have felt the confirmed place, metres. */
export const pairReachM = (placeSigmaM: number, castSigmaM: number): number =>
  Math.min(PAIR_AT_MOST_M, Math.max(PAIR_WITHIN_M, Math.hypot(placeSigmaM, castSigmaM)));

/** Each cast with the nearest confirmed place in reach: what it felt over a bottom that is known. A cast counts once. */
export function confirmedPairs(
  places: readonly ConfirmedPlace[],
  casts: readonly FeltCast[],
  endings: readonly BottomEnding[],
): { substrate: Confirmed<Substrate>[]; cover: Confirmed<Cover>[] } {
  const pairs = { substrate: [] as Confirmed<Substrate>[], cover: [] as Confirmed<Cover>[] };
  for (const cast of casts) {
    const substrate = nearest(places, cast, { what: 'substrate', endings })?.substrate;
    if (substrate) pairs.substrate.push({ bottom: substrate, feels: cast.feels });
    const cover = nearest(places, cast, { what: 'cover', endings })?.cover;
    if (cover) pairs.cover.push({ bottom: cover, feels: cast.feels });
  }
  return pairs;
}

type Sought = { what: 'substrate' | 'cover'; endings: readonly BottomEnding[] };

function nearest(
  places: readonly ConfirmedPlace[],
  cast: FeltCast,
  sought: Sought,
): ConfirmedPlace | undefined {
  const away = (place: ConfirmedPlace): number =>
    place.castId === cast.id ? 0 : Math.hypot(place.xM - cast.xM, place.yM - cast.yM);
  return places
    .filter((place) => place[sought.what] !== null && sameTime(place, cast, sought.what))
    .filter((place) => away(place) <= pairReachM(place.sigmaM, cast.sigmaM))
    .filter((place) => !eventBetween(place, cast, sought))
    .sort((a, b) => away(a) - away(b) || (a.id < b.id ? -1 : 1))[0];
}

function sameTime(place: ConfirmedPlace, cast: FeltCast, what: Sought['what']): boolean {
  const apart = Math.abs(Date.parse(place.day) - Date.parse(cast.day)) / DAY_MS;
  return apart <= (what === 'cover' ? SAME_COVER_DAYS : SAME_SUBSTRATE_DAYS);
}

/** Something happened after the one was seen and no later than the other. */
function eventBetween(place: ConfirmedPlace, cast: FeltCast, { what, endings }: Sought): boolean {
  const [first, second] = place.day < cast.day ? [place, cast] : [cast, place];
  const between = endings.filter(({ happenedOn }) => happenedOn <= second.day);
  return endedBy(between, what, { xM: first.xM, yM: first.yM, day: first.day }) !== null;
}
