import type { Box } from './line-thinning';

type Side = { inside: (x: number, y: number) => boolean; share: (a: Place, b: Place) => number };
type Place = readonly [x: number, y: number];

/** The part of a ring (x, y, x, y … not repeating its first point) inside a box. Source: Sutherland & Hodgman 1974. */
export function clipRing(ring: readonly number[], box: Box): number[] {
  let places = pairs(ring);
  for (const side of sidesOf(box)) places = cut(places, side);
  return places.length < 3 ? [] : places.flat();
}

function pairs(ring: readonly number[]): Place[] {
  const places: Place[] = [];
  for (let i = 0; i + 1 < ring.length; i += 2) places.push([ring[i] ?? 0, ring[i + 1] ?? 0]);
  return places;
}

function sidesOf({ westM, eastM, southM, northM }: Box): Side[] {
  const across = (at: number) => (a: Place, b: Place) => (at - a[0]) / (b[0] - a[0]);
  const up = (at: number) => (a: Place, b: Place) => (at - a[1]) / (b[1] - a[1]);
  return [
    { inside: (x) => x >= westM, share: across(westM) },
    { inside: (x) => x <= eastM, share: across(eastM) },
    { inside: (_, y) => y >= southM, share: up(southM) },
    { inside: (_, y) => y <= northM, share: up(northM) },
  ];
}

function cut(places: readonly Place[], { inside, share }: Side): Place[] {
  const kept: Place[] = [];
  let before = places.at(-1);
  for (const place of places) {
    if (before && inside(...before) !== inside(...place)) {
      const t = share(before, place);
      kept.push([before[0] + t * (place[0] - before[0]), before[1] + t * (place[1] - before[1])]);
    }
    if (inside(...place)) kept.push(place);
    before = place;
  }
  return kept;
}
