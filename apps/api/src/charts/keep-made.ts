import type { EntityManager } from 'typeorm';
import { sourceDigest, type BuildSource } from './build-source';
import type { MadeChart } from './make-chart';

type Made = { chartId: string; source: BuildSource; chart: MadeChart };

/** Writes a built chart into its draft's row; a row that is no draft any more is left alone. */
export async function keepMade(tx: EntityManager, { chartId, source, chart }: Made): Promise<void> {
  await tx.query(
    `UPDATE chart SET built = $2, frame = $3, depth = $4, sigma = $5, substrate = $6, cover = $7, datum_m = $8,
            surveyed_from = $9, surveyed_to = $10, input_sha256 = $11, built_at = clock_timestamp()
      WHERE id = $1 AND status = 'draft'`,
    [
      chartId,
      JSON.stringify(chart.built),
      JSON.stringify(chart.frame),
      Buffer.from(chart.depth),
      Buffer.from(chart.sigma),
      Buffer.from(chart.substrate),
      Buffer.from(chart.cover),
      source.lake.datumM,
      chart.surveyedFrom,
      chart.surveyedTo,
      sourceDigest(source),
    ],
  );
}
