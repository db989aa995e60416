import type { CastObservation } from './contract';

/** What an observation says beside its aim and its line when nobody felt, counted by float or noted anything. */
export const NOTHING_FELT = {
  drop: null,
  dropCountS: null,
  drag: null,
  dragLengthM: null,
  cameBack: null,
  smell: null,
  pulls: null,
  pullsAgain: null,
  floatSight: null,
  note: '',
} as const satisfies Partial<CastObservation>;
