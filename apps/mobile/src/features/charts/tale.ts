import type { ChangedArea, ChartFeature, StandOutPatch } from '@mereward/shared/charts/chart-answers';
import { distanceBetweenM, type Point } from '@mereward/shared/geometry/point';

/** Something the chart tells of one area: a feature, a patch that stands out, a change. */
export type Tale = Point & {
  key: string;
  kind: 'feature' | 'patch' | 'deeper' | 'shallower' | 'other_change';
  title: string;
  words: string;
  sign: string; // what stands on the map
  certain: boolean;
  rings: readonly (readonly number[])[];
  areaM2: number;
};

export const featureTale = ({ key, name, words, certain, ...rest }: ChartFeature): Tale => ({
  ...placed(rest),
  key,
  kind: 'feature',
  title: name,
  words: capital(words.startsWith(`${name}: `) ? words.slice(name.length + 2) : words),
  sign: name,
  certain,
});

export const patchTale = ({ rank, words, ...rest }: StandOutPatch): Tale => ({
  ...placed(rest),
  key: `patch-${String(rank)}`,
  kind: 'patch',
  title: `Patch ${String(rank)}`,
  words,
  sign: String(rank),
  certain: true,
});

export function changeTale(change: ChangedArea, index: number): Tale {
  const { kind, meanChangeM, words } = change;
  const title = CHANGE_TITLES[kind];
  return {
    ...placed(change),
    key: `change-${String(index)}`,
    kind: kind === 'deeper' || kind === 'shallower' ? kind : 'other_change',
    title,
    words,
    sign:
      meanChangeM === null
        ? title.toLowerCase()
        : `${Math.abs(meanChangeM).toFixed(1)} m ${kind === 'deeper' ? 'deeper' : 'shallower'}`,
    certain: true,
  };
}

const CHANGE_TITLES: Readonly<Record<ChangedArea['kind'], string>> = {
  shallower: 'Shallower',
  deeper: 'Deeper',
  cover_gained: 'Cover gained',
  cover_lost: 'Cover lost',
  bottom: 'Another bottom',
};

const placed = ({ xM, yM, rings, areaM2 }: Pick<Tale, 'xM' | 'yM' | 'rings' | 'areaM2'>) => ({
  xM,
  yM,
  rings,
  areaM2,
});

const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);

/** Is a place inside rings of x, y, x, y … (even-odd)? */
export function insideRings(rings: Tale['rings'], { xM, yM }: Point): boolean {
  let inside = false;
  for (const ring of rings) {
    for (let i = 0, j = ring.length - 2; i + 1 < ring.length; j = i, i += 2) {
      const [ax = 0, ay = 0, bx = 0, by = 0] = [ring[i], ring[i + 1], ring[j], ring[j + 1]];
      if (ay > yM !== by > yM && xM < ((bx - ax) * (yM - ay)) / (by - ay) + ax) inside = !inside;
    }
  }
  return inside;
}

const REACH_M = 3;

/** What is told of a touched place: of those it lies in the smallest, else the one whose middle is within reach. */
export function taleAt(tales: readonly Tale[], place: Point): Tale | null {
  const within = tales.filter(({ rings }) => insideRings(rings, place));
  if (within.length) return within.reduce((a, b) => (b.areaM2 < a.areaM2 ? b : a));
  const near = tales.filter((tale) => distanceBetweenM(tale, place) <= REACH_M);
  return near[0] ?? null;
}
