import type { PegDetails } from './contract';

/** Nearer than this to an overhead line nobody fishes without an assessment: the power networks' own guidance. */
export const OVERHEAD_LIMIT_M = 30;

export type OverheadLine = PegDetails['overheadLine'];

/** Is the line, as far as is known, nearer than nobody may fish without an assessment? */
export const isUnderLine = ({ kind, distanceM }: OverheadLine): boolean =>
  kind === 'present' && (distanceM === null || distanceM < OVERHEAD_LIMIT_M);
