import type { PegDetails } from '../lakes/contract';
import type { Cover, Substrate } from '../surveys/contract';

/** Rings of a peg's water whose depths are compared, metres from the stance. */
export const PROFILE_BANDS_M = [0, 12, 25, 45, 250] as const;

/** What a peg's water is like, from the chart; null where this reader may not see it or nothing is surveyed. */
export type PegProfile = {
  depthsM: (number | null)[] | null; // mean depth at datum in each band; null: not surveyed
  bottoms: Partial<Record<Substrate, number>> | null; // shares of the surveyed water, summing to 1
  covers: Partial<Record<Cover, number>> | null;
  details: Pick<PegDetails, 'access' | 'stepFree' | 'platform' | 'people'>;
};

export type Likeness = { likeness: number; alike: string[]; differs: string[] };

/** How one thing compares: 0…1, its weight, and how it is told of when it is alike or not. */
type Part = { likeness: number; weight: number; words: { alike: string; differs: string } };

/** Weights, and what counts as alike. Common practice, no published source: the water first, then how one gets there. */
const WEIGHT = { bottom: 3, depth: 3, cover: 2, stepFree: 2, steps: 1, walk: 1, barrow: 1 } as const;
const ALIKE = 0.75;
const DIFFERS = 0.5;
/** Depths that differ by this much on average are alike by e⁻¹. */
const DEPTH_SCALE_M = 0.7;

/**
 * How alike two pegs are for whoever must change from `mine` to `other`: a weighted mean over what is known of both. Bottoms
 * and covers by the share they have in common, depths by the mean difference ring by ring, access fact by fact.
 */
export function pegLikeness(mine: PegProfile, other: PegProfile): Likeness {
  const parts = [
    bottomPart(mine, other),
    depthPart(mine, other),
    coverPart(mine, other),
    ...accessParts(mine.details, other.details),
  ].filter((part) => part !== null);
  const weight = parts.reduce((sum, part) => sum + part.weight, 0);
  const sum = parts.reduce((total, part) => total + part.weight * part.likeness, 0);
  return {
    likeness: weight > 0 ? sum / weight : 0,
    alike: parts.filter((part) => part.likeness >= ALIKE).map(({ words }) => words.alike),
    differs: parts.filter((part) => part.likeness < DIFFERS).map(({ words }) => words.differs),
  };
}

type Shares = Partial<Record<string, number>>;

const inCommon = (a: Shares, b: Shares): number =>
  Object.keys(a).reduce((sum, kind) => sum + Math.min(a[kind] ?? 0, b[kind] ?? 0), 0);

function commonest(shares: Shares): { kind: string; share: number } {
  const [first = ['nothing', 0]] = Object.entries(shares).sort(
    ([a, x = 0], [b, y = 0]) => y - x || (a < b ? -1 : 1),
  );
  return { kind: first[0], share: first[1] ?? 0 };
}

const percent = (share: number): string => `${Math.round(100 * share)} %`;

function bottomPart({ bottoms: a }: PegProfile, { bottoms: b }: PegProfile): Part | null {
  if (!a || !b) return null;
  const [mine, theirs] = [commonest(a), commonest(b)];
  const same = `Mostly ${theirs.kind} too (${percent(theirs.share)}, here ${percent(mine.share)}).`;
  const alike = mine.kind === theirs.kind ? same : `Its bottom is mixed much as here.`;
  const differs = `Mostly ${theirs.kind} (${percent(theirs.share)}); here mostly ${mine.kind}.`;
  return { likeness: inCommon(a, b), weight: WEIGHT.bottom, words: { alike, differs } };
}

const COVER_WORDS: Readonly<Record<string, string>> = {
  clear: 'clear',
  low_weed: 'low weed',
  tall_weed: 'tall weed',
  leaf_litter: 'leaf litter',
  snag: 'snags',
};

function coverPart({ covers: a }: PegProfile, { covers: b }: PegProfile): Part | null {
  if (!a || !b) return null;
  const [mine, theirs] = [commonest(a), commonest(b)].map(({ kind }) => COVER_WORDS[kind] ?? kind);
  const words = {
    alike: mine === theirs ? `Mostly ${theirs} too.` : 'Weed and litter much as here.',
    differs: `Mostly ${theirs}; here mostly ${mine}.`,
  };
  return { likeness: inCommon(a, b), weight: WEIGHT.cover, words };
}

function depthPart({ depthsM: a }: PegProfile, { depthsM: b }: PegProfile): Part | null {
  const pairs = (a ?? []).flatMap((mine, band) => {
    const theirs = b?.[band] ?? null;
    return mine === null || theirs === null ? [] : [{ mine, theirs }];
  });
  if (pairs.length === 0) return null;
  const meanM = pairs.reduce((sum, { mine, theirs }) => sum + Math.abs(theirs - mine), 0) / pairs.length;
  const byM = pairs.reduce((sum, { mine, theirs }) => sum + theirs - mine, 0) / pairs.length;
  const size = `${Math.abs(byM).toFixed(1)} m`;
  const words = {
    alike: `As deep, ring for ring, to ${Math.max(0.1, meanM).toFixed(1)} m.`,
    differs:
      Math.abs(byM) < 0.3
        ? 'Deep and shallow lie elsewhere.'
        : `${size} ${byM > 0 ? 'deeper' : 'shallower'} on average.`,
  };
  return { likeness: Math.exp(-meanM / DEPTH_SCALE_M), weight: WEIGHT.depth, words };
}

const STEP_FREE_WORDS: Readonly<Record<PegDetails['stepFree']['kind'], string>> = {
  measured_suitable: 'step-free, measured',
  assisted: 'step-free with a helper',
  not_suitable: 'not step-free',
  unknown: 'step-free not known',
};

type Access = PegProfile['details'];

function accessParts(mine: Access, theirs: Access): (Part | null)[] {
  return [
    stepFreePart(mine, theirs),
    stepsPart(mine, theirs),
    walkPart(mine, theirs),
    barrowPart(mine, theirs),
  ];
}

function stepFreePart({ stepFree: a }: Access, { stepFree: b }: Access): Part | null {
  if (a.kind === 'unknown' || b.kind === 'unknown') return null;
  const words = {
    alike: `Also ${STEP_FREE_WORDS[b.kind]}.`,
    differs: `${capital(STEP_FREE_WORDS[b.kind])}; this peg is ${STEP_FREE_WORDS[a.kind]}.`,
  };
  return { likeness: a.kind === b.kind ? 1 : 0, weight: WEIGHT.stepFree, words };
}

function stepsPart({ access: { steps: a } }: Access, { access: { steps: b } }: Access): Part | null {
  if (a === null || b === null) return null;
  const count = (steps: number) => (steps === 0 ? 'no steps' : steps === 1 ? '1 step' : `${steps} steps`);
  const words = {
    alike: `${capital(count(b))}, as near as makes no odds.`,
    differs: `${capital(count(b))}; this peg has ${count(a)}.`,
  };
  return {
    likeness: Math.exp(-Math.abs(a - b) / 4),
    weight: WEIGHT.steps,
    words: a === b ? { ...words, alike: `${capital(count(b))} too.` } : words,
  };
}

function walkPart(
  { access: { fromParkingM: a } }: Access,
  { access: { fromParkingM: b } }: Access,
): Part | null {
  if (a === null || b === null) return null;
  const words = {
    alike: `${b} m from parking, here ${a} m.`,
    differs: `${b} m from parking; this peg ${a} m.`,
  };
  return { likeness: Math.exp(-Math.abs(a - b) / 150), weight: WEIGHT.walk, words };
}

function barrowPart({ access: { barrow: a } }: Access, { access: { barrow: b } }: Access): Part | null {
  if (a === 'unknown' || b === 'unknown') return null;
  const may = b === 'yes' ? 'A barrow can be taken' : 'No barrow';
  return {
    likeness: a === b ? 1 : 0,
    weight: WEIGHT.barrow,
    words: { alike: `${may}, as here.`, differs: `${may}.` },
  };
}

const capital = (words: string): string => words.charAt(0).toUpperCase() + words.slice(1);
