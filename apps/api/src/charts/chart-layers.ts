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

/**
 * Content read lately, by chart and the instant it was built: a published chart never changes, and its peg pages are
 * asked for far more often than it is drawn anew. Each takes some megabytes, so a few are kept.
 */
const lately = new Map<string, ChartContent>();
const MOST_KEPT = 6;

/** The content of a chart, or null while it isn't built. */
export async function chartContent(tx: EntityManager, chartId: string): Promise<ChartContent | null> {
  const [row] = await tx.query<{ builtAt: string | null }[]>(
    `SELECT extract(epoch FROM built_at)::text || encode(input_sha256, 'hex') AS "builtAt" FROM chart WHERE id = $1`,
    [chartId],
  );
  if (!row?.builtAt) return null;
  const key = `${chartId} ${row.builtAt}`;
  const content = lately.get(key) ?? (await readContent(tx, chartId));
  if (!content) return null;
  lately.delete(key); // set again as the newest of all
  lately.set(key, content);
  for (const oldest of lately.keys()) if (lately.size > MOST_KEPT) lately.delete(oldest);
  return content;
}

async function readContent(tx: EntityManager, chartId: string): Promise<ChartContent | null> {
  const row = await tx.findOne(Chart, {
    where: { id: chartId },
    select: { id: true, built: true, frame: true, depth: true, sigma: true, substrate: true, cover: true },
  });
  if (!row || row.built === null || !row.frame) return null;
  const { frame, depth, sigma, substrate, cover } = row;
  if (!depth || !sigma || !substrate || !cover) return null;
  return { built: Built.parse(row.built), frame, depth, sigma, substrate, cover };
}

const decoded = new WeakMap<ChartContent, ChartLayers>();

/** The grids to read places from. */
export function layersOf(content: ChartContent): ChartLayers {
  const known = decoded.get(content);
  if (known) return known;
  const { frame, depth, sigma, substrate, cover } = content;
  const layers: ChartLayers = {
    depth: decodeDepth(depth, frame),
    sigma: decodeSigma(sigma, frame),
    substrate: decodeClasses(substrate, frame),
    cover: decodeClasses(cover, frame),
  };
  decoded.set(content, layers);
  return layers;
}
