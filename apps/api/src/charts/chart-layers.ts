import { Chart } from '@mereward/db/entities/charts/chart';
import { decodeClasses, decodeDepth, decodeSigma } from '@mereward/shared/charts/chart-encoding';
import type { ChartLayers } from '@mereward/shared/charts/chart-reading';
import type { GridFrame } from '@mereward/shared/charts/contract';
import type { EntityManager } from 'typeorm';
import { Built } from './built';

/** A built chart's own content, as its row keeps it. */
export type ChartContent = {
  built: Built;
  frame: GridFrame;
  depth: Buffer;
  sigma: Buffer;
  substrate: Buffer;
  cover: Buffer;
};

/** The content of a chart, or null while it isn't built. */
export async function chartContent(tx: EntityManager, chartId: string): Promise<ChartContent | null> {
  const row = await tx.findOne(Chart, {
    where: { id: chartId },
    select: { id: true, built: true, frame: true, depth: true, sigma: true, substrate: true, cover: true },
  });
  if (!row || row.built === null || !row.frame || !row.depth || !row.sigma || !row.substrate || !row.cover)
    return null;
  const { frame, depth, sigma, substrate, cover } = row;
  return { built: Built.parse(row.built), frame, depth, sigma, substrate, cover };
}

/** The grids to read places from. */
export const layersOf = ({ frame, depth, sigma, substrate, cover }: ChartContent): ChartLayers => ({
  depth: decodeDepth(depth, frame),
  sigma: decodeSigma(sigma, frame),
  substrate: decodeClasses(substrate, frame),
  cover: decodeClasses(cover, frame),
});
