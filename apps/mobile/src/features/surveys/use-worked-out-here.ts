import { useMemo } from 'react';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import { pointAlong, toPlane } from '@mereward/shared/geometry/plane';
import { insideOutline } from '@mereward/shared/geometry/polygon';
import type { LakeView, PegView } from '@mereward/shared/lakes/contract';
import { reduceCast } from '@mereward/shared/surveys/cast-reduction';
import type { ArcCoverage, VisitWithCasts } from '@mereward/shared/surveys/contract';
import { lineAWrapM } from '@mereward/shared/surveys/line-out';
import { arcCoverage } from '@mereward/shared/surveys/peg-arc';
import { useQueryClient } from '@tanstack/react-query';
import { lakeKeys } from '@/features/lakes/api';
import { castSiteOf, reducingOf, type Surroundings } from '@/features/surveys/cast-site-of';
import type { WorkedOutHere } from '@/features/surveys/shown-visit';
import { surveyKeys } from '@/features/surveys/survey-keys';

type Of = Pick<VisitWithCasts, 'visit' | 'casts' | 'reducing'>;

/** Reductions and coverage from what this device has read of the lake and its pegs, by the functions the server uses. */
export function useWorkedOutHere(): WorkedOutHere {
  const queries = useQueryClient();
  return useMemo(() => {
    const around = (pegId: string, of: Of): Surroundings | null => {
      const { visit } = of;
      const lake = queries.getQueryData<LakeView>(lakeKeys.one(visit.lakeId));
      const peg = queries.getQueryData<PegView>(surveyKeys.peg(pegId));
      return lake && peg ? { lake, peg, visit, reducing: reducingOf(of) } : null;
    };
    return {
      reduce: (cast, of) => {
        const { visit, casts } = of;
        const surroundings = around(cast.pegId, of);
        if (!surroundings) return null;
        const others = casts.filter(({ id, pegId }) => pegId === cast.pegId && id !== cast.id);
        const earlier = others.map(({ observation }) => observation);
        return reduceCast(cast.observation, visit.kit, castSiteOf(surroundings, { ...cast, earlier }));
      },
      cover: (pegId, of) => {
        const surroundings = around(pegId, of);
        return surroundings ? coverageOf(surroundings, of.casts) : null;
      },
    };
  }, [queries]);
}

function coverageOf({ lake, peg, visit }: Surroundings, casts: VisitWithCasts['casts']): ArcCoverage {
  const outline = outlineInPlane(lake.origin, lake.details.outline);
  const stance = toPlane(lake.origin, peg.details.origin);
  const { arcFromDeg, arcToDeg, longestCastM } = peg.details;
  const own = casts.filter(({ pegId }) => pegId === peg.id);
  const landed = own.flatMap(({ reduced, lineId }) => (reduced.ok ? [{ ...reduced.sounding, lineId }] : []));
  const arc = {
    arcFromDeg,
    arcToDeg,
    longestCastM: Math.min(longestCastM ?? Infinity, lake.details.longestCastM),
    lineAWrapM: lineAWrapM(visit.kit),
    isWater: ({ bearingDeg, rangeM }: { bearingDeg: number; rangeM: number }) =>
      insideOutline(outline, pointAlong(stance, bearingDeg, rangeM)),
  };
  return { pegId: peg.id, ...arcCoverage(arc, landed), casts: own.length };
}
