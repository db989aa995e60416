import type { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { pointAlong, toPlane } from '@mereward/shared/geometry/plane';
import { insideOutline } from '@mereward/shared/geometry/polygon';
import type { PegDetails } from '@mereward/shared/lakes/contract';
import type { ArcCoverage } from '@mereward/shared/surveys/contract';
import { lineAWrapM } from '@mereward/shared/surveys/line-out';
import { arcCoverage, type PegArc } from '@mereward/shared/surveys/peg-arc';
import type { VisitSite } from './reduce-visit';

type Cast = Pick<SurveyCast, 'pegId' | 'lineId' | 'reduced'>;

/** How much of each peg's arc the casts cover, and how many of them went for a place again. */
export function coverageOf(site: VisitSite, casts: readonly Cast[]): ArcCoverage[] {
  const pegIds = [...new Set(casts.map((cast) => cast.pegId))].sort();
  return pegIds.flatMap((pegId) => {
    const peg = site.pegs.get(pegId);
    const own = casts.filter((cast) => cast.pegId === pegId);
    const landed = own.flatMap(({ reduced, lineId }) =>
      reduced.ok ? [{ ...reduced.sounding, lineId }] : [],
    );
    return peg ? [{ pegId, ...arcCoverage(arcOf(site, peg.details), landed), casts: own.length }] : [];
  });
}

function arcOf({ lake, origin, outline, visit }: VisitSite, peg: PegDetails): PegArc {
  const stance = toPlane(origin, peg.origin);
  return {
    arcFromDeg: peg.arcFromDeg,
    arcToDeg: peg.arcToDeg,
    longestCastM: Math.min(peg.longestCastM ?? Infinity, lake.details.longestCastM),
    lineAWrapM: lineAWrapM(visit.kit),
    isWater: ({ bearingDeg, rangeM }) => insideOutline(outline, pointAlong(stance, bearingDeg, rangeM)),
  };
}
