import { outlineInPlane } from '@mereward/shared/geometry/outline';
import { pointAlong, toPlane } from '@mereward/shared/geometry/plane';
import { insideOutline } from '@mereward/shared/geometry/polygon';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { facingDeg } from '@mereward/shared/lakes/peg-rules';
import type { CastView } from '@mereward/shared/surveys/contract';
import { lineAWrapM } from '@mereward/shared/surveys/line-out';
import { arcCells } from '@mereward/shared/surveys/peg-arc';
import type { ArcSketch } from '@/features/surveys/arc-sketch';
import type { Surroundings } from '@/features/surveys/cast-site-of';

export type ArcGround = Omit<ArcSketch, 'now'>;

/** A peg's water with the casts that fell in it, in the lake's plane, metres. */
export function arcGround(
  lake: LakeView,
  casts: readonly CastView[],
  { peg, visit }: Pick<Surroundings, 'peg' | 'visit'>,
): ArcGround {
  const outline = outlineInPlane(lake.origin, lake.details.outline);
  const stance = toPlane(lake.origin, peg.details.origin);
  const reachM = Math.min(peg.details.longestCastM ?? Infinity, lake.details.longestCastM);
  const soundings = casts.flatMap(({ pegId, lineId, reduced }) =>
    pegId === peg.id && reduced.ok ? [{ ...reduced.sounding, lineId }] : [],
  );
  const cells = arcCells(
    {
      arcFromDeg: peg.details.arcFromDeg,
      arcToDeg: peg.details.arcToDeg,
      longestCastM: reachM,
      lineAWrapM: lineAWrapM(visit.kit),
      isWater: ({ bearingDeg, rangeM }) => insideOutline(outline, pointAlong(stance, bearingDeg, rangeM)),
    },
    soundings,
  );
  return { outline, stance, facingDeg: facingDeg(peg.details), reachM, cells, casts: soundings };
}

/** Share of the cells of a peg's arc that a cast fell in. */
export const shareCovered = ({ cells }: Pick<ArcGround, 'cells'>): number =>
  cells.length === 0 ? 0 : cells.filter(({ casts }) => casts > 0).length / cells.length;
