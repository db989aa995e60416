import { Cover, Substrate, type CoverShares, type Grade, type SubstrateShares } from '../surveys/contract';
import {
  chooseBandwidth,
  classWeights,
  likeliestClasses,
  type BottomEvidence,
  type BottomNodes,
  type ClassGrid,
  type ClassWeights,
} from './bottom-map';
import type { FeltPlace } from './cast-kernel';
import type { BottomQuality, BottomQualityView } from './bottom-quality-contract';
import { markSnags } from './snag-areas';

/** What one cast, or one confirmed bottom, says of the bottom at its place. */
export type FeltBottom = FeltPlace & {
  id: string;
  grade: Grade;
  substrate: SubstrateShares | null;
  cover: CoverShares | null; // may add up to less than 1 where it has faded since it was seen
  worthCasts?: number | undefined;
};

export type BottomLayers = {
  substrate: ClassGrid; // classes in the order of Substrate.options
  cover: ClassGrid; // classes in the order of Cover.options
  weights: { substrate: ClassWeights | null; cover: ClassWeights | null }; // what both were chosen from
  bottom: BottomQualityView;
};

/**
 * Both bottom maps. Grades A, B and C count, C more blurred the less surely it is placed; D does not. Contours ask for a
 * depth and so for A and B; what was felt at a place is worth something even there where no depth was read. A snag is not
 * averaged with what lies round it.
 */
export function bottomLayers(felt: readonly FeltBottom[], nodes: BottomNodes): BottomLayers {
  const counted = felt.filter(({ grade }) => grade !== 'D').sort((a, b) => (a.id < b.id ? -1 : 1));
  const substrate = layer(
    counted.flatMap((each) => evidenceOf(each, each.substrate && inOrder(Substrate.options, each.substrate))),
    nodes,
  );
  const covers = counted.flatMap((each) =>
    evidenceOf(each, each.cover && inOrder(Cover.options, each.cover)),
  );
  const cover = layer(covers, nodes);
  markSnags(cover.map, covers, nodes);
  return {
    substrate: substrate.map,
    cover: cover.map,
    weights: { substrate: substrate.weights, cover: cover.weights },
    bottom: { substrate: substrate.quality, cover: cover.quality },
  };
}

const inOrder = <Class extends string>(
  classes: readonly Class[],
  shares: Readonly<Record<Class, number>>,
): number[] => classes.map((name) => shares[name]);

function evidenceOf(
  { xM, yM, spread, track, worthCasts }: FeltBottom,
  shares: number[] | null,
): BottomEvidence[] {
  return shares === null ? [] : [{ xM, yM, spread, track, worthCasts, shares }];
}

function layer(
  evidence: readonly BottomEvidence[],
  nodes: BottomNodes,
): { map: ClassGrid; weights: ClassWeights | null; quality: BottomQuality } {
  const { bandwidthM, logScore } = chooseBandwidth(evidence);
  const weights = classWeights(evidence, nodes.frame, bandwidthM);
  const classes = evidence[0]?.shares.length ?? Substrate.options.length;
  return {
    map: likeliestClasses(weights, nodes),
    weights,
    quality: { casts: evidence.length, bandwidthM, logScore, evenLogScore: -Math.log(classes) },
  };
}
