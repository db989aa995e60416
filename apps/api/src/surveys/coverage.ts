import type { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { pointAlong, toPlane, type Point } from '@mereward/shared/geometry/plane';
import { insideOutline } from '@mereward/shared/geometry/polygon';
import { arcWidthDeg } from '@mereward/shared/lakes/peg-rules';
import type { PegDetails } from '@mereward/shared/lakes/contract';
import { bearingDifferenceDeg } from '@mereward/shared/geometry/geodesic';
import type { ArcCoverage } from '@mereward/shared/surveys/contract';
import type { VisitSite } from './reduce-visit';

const SECTOR_DEG = 10;
const RING_WRAPS = 2;
/** Two throws that come down nearer than this went for the same place. */
const SAME_PLACE_M = 2;

type Reduced = Pick<SurveyCast, 'pegId' | 'lineId' | 'reduced'>;

/**
 * How much of each peg's arc the casts cover: the share of its 10° sectors × 2-wrap rings on the water that a cast
 * came down in, and the share of casts that went for a place again. Common practice, no published source.
 */
export function coverageOf(site: VisitSite, casts: readonly Reduced[]): ArcCoverage[] {
  const pegIds = [...new Set(casts.map((cast) => cast.pegId))].sort();
  return pegIds.flatMap((pegId) => {
    const peg = site.pegs.get(pegId);
    const own = casts.filter((cast) => cast.pegId === pegId);
    return peg ? [{ pegId, ...pegCoverage(site, peg.details, own), casts: own.length }] : [];
  });
}

function pegCoverage(
  site: VisitSite,
  peg: PegDetails,
  casts: readonly Reduced[],
): { share: number; repeatsShare: number } {
  const landed = casts.flatMap(({ reduced, lineId }) =>
    reduced.ok ? [{ ...reduced.sounding, lineId }] : [],
  );
  const ringM = RING_WRAPS * site.visit.kit.stickSpacingM;
  const cells = cellsOnWater(site, peg, ringM);
  const hit = new Set(landed.map(({ bearingDeg, rangeM }) => cellOf(peg, { bearingDeg, rangeM, ringM })));
  const covered = cells.filter((cell) => hit.has(cell)).length;
  const repeats = landed.filter((cast, i) =>
    landed.some((other, k) => k < i && other.lineId !== cast.lineId && away(cast, other) <= SAME_PLACE_M),
  );
  return {
    share: cells.length > 0 ? covered / cells.length : 0,
    repeatsShare: landed.length > 0 ? repeats.length / landed.length : 0,
  };
}

const away = (a: Point, b: Point): number => Math.hypot(a.xM - b.xM, a.yM - b.yM);

type Polar = { bearingDeg: number; rangeM: number; ringM: number };

const cellOf = ({ arcFromDeg }: PegDetails, { bearingDeg, rangeM, ringM }: Polar): string => {
  const rightDeg = bearingDifferenceDeg(arcFromDeg, bearingDeg);
  return `${Math.floor((rightDeg < 0 ? rightDeg + 360 : rightDeg) / SECTOR_DEG)} ${Math.floor(rangeM / ringM)}`;
};

/** The cells of a peg's arc whose middle lies on water within its longest cast. */
function cellsOnWater({ lake, origin, outline }: VisitSite, peg: PegDetails, ringM: number): string[] {
  const stance = toPlane(origin, peg.origin);
  const longestM = Math.min(peg.longestCastM ?? Infinity, lake.details.longestCastM);
  const sectors = Math.max(1, Math.round(arcWidthDeg(peg) / SECTOR_DEG));
  const cells: string[] = [];
  for (let sector = 0; sector < sectors; sector++)
    for (let ring = 1; (ring + 0.5) * ringM <= longestM; ring++) {
      const middleDeg = peg.arcFromDeg + (sector + 0.5) * SECTOR_DEG;
      if (insideOutline(outline, pointAlong(stance, middleDeg, (ring + 0.5) * ringM)))
        cells.push(`${sector} ${ring}`);
    }
  return cells;
}
