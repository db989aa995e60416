import type { SectionAsked, SectionPoint, SectionView } from '@mereward/shared/charts/contract';
import { sectionAlong } from '@mereward/shared/charts/section';
import { geodesicAlong } from '@mereward/shared/geometry/geodesic';
import { planeBearingDeg, toPlane } from '@mereward/shared/geometry/plane';
import { Problem } from '@mereward/shared/problems/problem';
import { windFor, type SpotKit } from '@mereward/shared/surveys/same-spot';
import type { Ctx } from '../ctx';
import { layersOf } from './chart-layers';
import { pegGround, type PegGround } from './peg-chart';
import { kitOf } from './spot-reach';
import type { OpenChart } from './spot-view';

const MOST_POINTS = 250;

type Line = { bearingDeg: number; toM: number; stepM: number }; // bearing true, from the peg's origin

/** Depth and bottom along a line from a peg, as far as this reader may see them; lengths to a centimetre. */
export function sectionPoints(
  { peg, origin, sight }: PegGround,
  { chart, layers }: OpenChart,
  line: Line,
): SectionPoint[] {
  const { sees } = sight;
  const stance = toPlane(origin, peg.details.origin);
  const end = toPlane(origin, geodesicAlong(peg.details.origin, line.bearingDeg, Math.max(line.toM, 1)));
  const along = { ...line, bearingDeg: planeBearingDeg(stance, end) };
  const { visits, soundings } = chart.content.built;
  const here = soundings.find((each) => each.pegId === peg.id)?.visitId;
  const kit = kitOf(visits.find((visit) => visit.id === here) ?? visits[0] ?? null);
  return sectionAlong(layers, stance, along).map(({ rangeM, depthM, sigmaM, bottom }) => ({
    rangeM: cm(rangeM),
    lineOutM: cm(lineTo(rangeM, kit, sees.depth ? (depthM ?? 0) : 0)), // line goes down too: it would tell the depth
    depthM: sees.depth && depthM !== null ? cm(depthM) : null,
    sigmaM: sees.depth && sigmaM !== null ? cm(sigmaM) : null,
    bottom: sees.bottom ? bottom : null,
  }));
}

/** Line that reaches a range; right under the rod there is none to wind, and the range itself stands in. */
function lineTo(rangeM: number, kit: SpotKit, depthM: number): number {
  const wound = windFor(rangeM, kit, depthM);
  return wound.ok ? wound.lineOutM : rangeM;
}

const cm = (lengthM: number): number => Math.round(lengthM * 100) / 100;

/** The section under a drawn cast from a peg. */
export async function pegSection(
  ctx: Ctx,
  pegId: string,
  { bearingDeg, toM }: SectionAsked,
): Promise<SectionView> {
  const ground = await pegGround(ctx, pegId);
  const { sees, notes } = ground.sight;
  if (!sees.depth && !sees.bottom)
    throw new Problem('forbidden', 'The depths in front of this peg are not shown to you', {
      detail: notes.depth ?? '',
    });
  if (!ground.chart) throw new Problem('not-found', 'No chart of this water is published yet');
  const open = { chart: ground.chart, layers: layersOf(ground.chart.content) };
  return {
    points: sectionPoints(ground, open, { bearingDeg, toM, stepM: Math.max(0.5, toM / MOST_POINTS) }),
  };
}
