import type { Bottom } from './contract';
import { REPEAT_WITHIN_M } from './peg-arc';

/** A cast that landed and was read, for holding against others of the same place. Metres. */
export type ReadCast = {
  lineId: string;
  xM: number;
  yM: number;
  depthM: number;
  sigmaM: number;
  bottom: Bottom;
};

export type RepeatAgreement = {
  pairs: number; // of casts from different throws within REPEAT_WITHIN_M of one another
  meanDifferenceM: number | null; // of their depths, without sign
  withinShare: number | null; // of the pairs whose depths differ by no more than 1.96 of their joint σ
  bottomPairs: number; // of the pairs, those with a bottom called by both
  bottomShare: number | null; // of these, those that called the same
};

/** How far casts that came down at one place say the same of it: depth by depth, and bottom by bottom. */
export function repeatAgreement(casts: readonly ReadCast[]): RepeatAgreement {
  const sorted = [...casts].sort((a, b) => a.xM - b.xM);
  const differences: { apartM: number; sigmaM: number }[] = [];
  const bottoms: boolean[] = [];
  sorted.forEach((one, i) => {
    for (let j = i + 1; j < sorted.length; j++) {
      const other = sorted[j]!;
      if (other.xM - one.xM > REPEAT_WITHIN_M) break;
      if (other.lineId === one.lineId || Math.hypot(other.xM - one.xM, other.yM - one.yM) > REPEAT_WITHIN_M)
        continue;
      differences.push({
        apartM: Math.abs(other.depthM - one.depthM),
        sigmaM: Math.hypot(one.sigmaM, other.sigmaM),
      });
      if (one.bottom !== 'unknown' && other.bottom !== 'unknown') bottoms.push(one.bottom === other.bottom);
    }
  });
  const pairs = differences.length;
  const share = (count: number, of: number): number | null => (of === 0 ? null : count / of);
  const sum = differences.reduce((total, { apartM }) => total + apartM, 0);
  return {
    pairs,
    meanDifferenceM: share(sum, pairs),
    withinShare: share(differences.filter(({ apartM, sigmaM }) => apartM <= 1.96 * sigmaM).length, pairs),
    bottomPairs: bottoms.length,
    bottomShare: share(bottoms.filter(Boolean).length, bottoms.length),
  };
}
