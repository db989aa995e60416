import { Spot } from '@mereward/db/entities/charts/spot';
import { GaugeBoard } from '@mereward/db/entities/lakes/gauge-board';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import type { ChartView } from '@mereward/shared/charts/contract';
import { toPlane } from '@mereward/shared/geometry/plane';
import { In } from 'typeorm';
import type { Ctx } from '../ctx';
import { lakeWaters } from '../lakes/peg-waters';
import { chartContent } from './chart-layers';
import { chartView } from './chart-view';
import { fileName } from './file-name';
import { chartGeojson, type Ellipse, type MapPlaces, type MapSpot } from './geojson';
import type { FeatureCollection } from './geojson-feature';
import { sightOf } from './layers';

/** A chart's layers and what stands on its lake's map, within what this reader may see. */
export async function chartLayersFile(
  ctx: Ctx,
  chartId: string,
): Promise<{ filename: string; collection: FeatureCollection }> {
  const view = await chartView(ctx, chartId);
  const lake = await ctx.tx.findOneByOrFail(Lake, { id: view.lakeId });
  const pegs = await ctx.tx.find(Peg, {
    where: { lakeId: lake.id },
    order: { walkingOrder: 'ASC', number: 'ASC' },
  });
  const boards = await ctx.tx.find(GaugeBoard, { where: { lakeId: lake.id }, order: { code: 'ASC' } });
  const places: MapPlaces = {
    pegs: pegs.map(({ id, details }) => ({
      id,
      details,
      reachM: Math.min(details.longestCastM ?? Infinity, lake.details.longestCastM),
    })),
    boards,
    waters: (await lakeWaters(ctx, lake.id)).pegs,
    spots: await spotsFor(ctx, lake, { pegs, view }),
    audiences: lake.details.audiences,
    ellipses: await ellipsesOf(ctx, view),
  };
  return {
    filename: `${fileName(view.lakeName, view.version ?? 'draft')}.geojson`,
    collection: chartGeojson(view, places),
  };
}

/**
 * The lake's spots for a reader who sees those of every peg. A ticket opens the spots of one peg on that peg's own page,
 * and none here. Beside wraps an exact place would tell a depth: without depths it is given to the metre.
 */
async function spotsFor(
  ctx: Ctx,
  lake: Lake,
  { pegs, view }: { pegs: readonly Peg[]; view: ChartView },
): Promise<MapSpot[] | null> {
  const { sees } = sightOf(ctx, lake, false);
  if (!sees.spots) return null;
  const numbers = new Map(pegs.map(({ id, number }) => [id, number]));
  const spots = await ctx.tx.find(Spot, {
    where: { pegId: In([...numbers.keys()]) },
    order: { createdAt: 'ASC', id: 'ASC' },
  });
  const told = (lengthM: number): number => (sees.depth ? lengthM : Math.round(lengthM));
  return spots.map(({ id, pegId, details: { name, position, usableRadiusM } }) => {
    const { xM, yM } = toPlane(view.origin, position);
    return { id, name, peg: numbers.get(pegId) ?? '', usableRadiusM, xM: told(xM), yM: told(yM) };
  });
}

/** How well the place of each cast that this reader sees is known. */
async function ellipsesOf({ tx }: Ctx, view: ChartView): Promise<ReadonlyMap<string, Ellipse>> {
  const seen = new Set((view.soundings ?? []).map(({ id }) => id));
  const content = seen.size === 0 ? null : await chartContent(tx, view.id);
  const kept = [...(content?.built.soundings ?? []), ...(content?.built.reports ?? [])];
  return new Map(kept.flatMap(({ id, ellipse }) => (seen.has(id) ? [[id, ellipse] as const] : [])));
}
