import type { CameBack, CastObservation, Cover, Drag, Drop, Substrate } from './contract';

export type FeltDrop = Exclude<Drop, 'unsure'>;
export type FeltDrag = Exclude<Drag, 'unsure'>;
export type Smell = NonNullable<CastObservation['smell']>;

/** For one class: how often each feel is met there. Each list sums to 1. */
export type Likelihoods = {
  drop: Readonly<Record<FeltDrop, number>>;
  drag: Readonly<Record<FeltDrag, number>>;
  cameBack: Readonly<Record<CameBack, number>>;
  smell: Readonly<Record<Smell, number>>;
};

/** Chances before any evidence, and the likelihoods of each class. */
export type LikelihoodTable<Class extends string> = {
  source: string;
  prior: Readonly<Record<Class, number>>;
  of: Readonly<Record<Class, Likelihoods>>;
};

const SOURCE = 'Common practice, no published source';

type DropRow = readonly [number, number, number, number, number, number];
type DragRow = readonly [number, number, number, number, number, number, number];
type BackRow = readonly [number, number, number, number, number, number, number, number, number, number];

// The rows below stand in the order of these lists.
const drop = ([
  soft_slow,
  dull,
  firm_thud,
  sharp_crack,
  stop_start,
  no_touch,
]: DropRow): Likelihoods['drop'] => ({
  soft_slow,
  dull,
  firm_thud,
  sharp_crack,
  stop_start,
  no_touch,
});

const drag = (row: DragRow): Likelihoods['drag'] => {
  const [
    smooth_slow_heavy,
    smooth_skim,
    fine_rattle,
    coarse_rattle,
    stick_free_stick,
    solid_stop,
    spongy_pull,
  ] = row;
  return {
    smooth_slow_heavy,
    smooth_skim,
    fine_rattle,
    coarse_rattle,
    stick_free_stick,
    solid_stop,
    spongy_pull,
  };
};

const back = (row: BackRow): Likelihoods['cameBack'] => {
  const [none, black_silt, grey_clay, sand, weed, leaves, twig, shell, bait_scrap, line_or_tackle] = row;
  return { none, black_silt, grey_clay, sand, weed, leaves, twig, shell, bait_scrap, line_or_tackle };
};

const smell = (bad_eggs: number): Likelihoods['smell'] => ({ none: 1 - bad_eggs, bad_eggs });

/** A knock alone can't tell gravel from hard clay, so the two share one row of landings on purpose. */
const HARD_KNOCK = drop([0.05, 0.12, 0.32, 0.38, 0.08, 0.05]);

/** What lies under the lead. A fishery may edit a copy, and confirmed spots refine it (`refineLikelihoods`). */
export const SUBSTRATE_LIKELIHOODS: LikelihoodTable<Substrate> = {
  source: SOURCE,
  prior: { silt: 0.2, clay: 0.2, sand: 0.2, gravel: 0.2, stones: 0.2 },
  of: {
    silt: {
      drop: drop([0.55, 0.2, 0.04, 0.01, 0.1, 0.1]),
      drag: drag([0.6, 0.12, 0.01, 0.01, 0.08, 0.03, 0.15]),
      cameBack: back([0.25, 0.45, 0.05, 0.01, 0.08, 0.06, 0.04, 0.02, 0.02, 0.02]),
      smell: smell(0.2),
    },
    clay: {
      drop: HARD_KNOCK,
      drag: drag([0.1, 0.65, 0.05, 0.02, 0.07, 0.06, 0.05]),
      cameBack: back([0.35, 0.03, 0.42, 0.02, 0.06, 0.03, 0.02, 0.02, 0.03, 0.02]),
      smell: smell(0.02),
    },
    sand: {
      drop: drop([0.06, 0.38, 0.35, 0.08, 0.08, 0.05]),
      drag: drag([0.08, 0.4, 0.35, 0.02, 0.06, 0.04, 0.05]),
      cameBack: back([0.35, 0.03, 0.03, 0.4, 0.05, 0.03, 0.02, 0.05, 0.02, 0.02]),
      smell: smell(0.02),
    },
    gravel: {
      drop: HARD_KNOCK,
      drag: drag([0.02, 0.08, 0.6, 0.15, 0.08, 0.04, 0.03]),
      cameBack: back([0.6, 0.03, 0.03, 0.08, 0.06, 0.03, 0.02, 0.09, 0.03, 0.03]),
      smell: smell(0.02),
    },
    stones: {
      drop: drop([0.02, 0.06, 0.3, 0.49, 0.08, 0.05]),
      drag: drag([0.02, 0.04, 0.12, 0.5, 0.12, 0.17, 0.03]),
      cameBack: back([0.66, 0.03, 0.03, 0.03, 0.07, 0.03, 0.03, 0.05, 0.03, 0.04]),
      smell: smell(0.02),
    },
  },
};

/** What lies or grows on it. */
export const COVER_LIKELIHOODS: LikelihoodTable<Cover> = {
  source: SOURCE,
  prior: { clear: 0.55, low_weed: 0.15, tall_weed: 0.1, leaf_litter: 0.12, snag: 0.08 },
  of: {
    clear: {
      drop: drop([0.17, 0.22, 0.26, 0.3, 0.03, 0.02]),
      drag: drag([0.22, 0.28, 0.28, 0.14, 0.03, 0.02, 0.03]),
      cameBack: back([0.55, 0.15, 0.1, 0.08, 0.01, 0.02, 0.01, 0.05, 0.02, 0.01]),
      smell: smell(0.03),
    },
    low_weed: {
      drop: drop([0.2, 0.2, 0.1, 0.06, 0.4, 0.04]),
      drag: drag([0.1, 0.06, 0.05, 0.02, 0.55, 0.04, 0.18]),
      cameBack: back([0.3, 0.05, 0.02, 0.02, 0.53, 0.03, 0.01, 0.02, 0.01, 0.01]),
      smell: smell(0.04),
    },
    tall_weed: {
      drop: drop([0.1, 0.06, 0.03, 0.01, 0.5, 0.3]),
      drag: drag([0.05, 0.01, 0.01, 0.01, 0.3, 0.12, 0.5]),
      cameBack: back([0.15, 0.03, 0.01, 0.01, 0.74, 0.02, 0.01, 0.01, 0.01, 0.01]),
      smell: smell(0.07),
    },
    leaf_litter: {
      drop: drop([0.45, 0.3, 0.06, 0.02, 0.12, 0.05]),
      drag: drag([0.3, 0.08, 0.03, 0.02, 0.27, 0.05, 0.25]),
      cameBack: back([0.2, 0.12, 0.02, 0.01, 0.03, 0.42, 0.16, 0.01, 0.01, 0.02]),
      smell: smell(0.15),
    },
    snag: {
      drop: drop([0.12, 0.15, 0.22, 0.2, 0.21, 0.1]),
      drag: drag([0.03, 0.02, 0.02, 0.03, 0.15, 0.7, 0.05]),
      cameBack: back([0.44, 0.05, 0.02, 0.02, 0.06, 0.04, 0.25, 0.02, 0.01, 0.09]),
      smell: smell(0.05),
    },
  },
};
