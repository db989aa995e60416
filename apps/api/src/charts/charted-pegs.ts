import { Lake } from '@mereward/db/entities/lakes/lake';
import { Substrate } from '@mereward/shared/surveys/contract';
import type { Ctx } from '../ctx';
import { watersOf } from '../lakes/peg-waters';
import { chartContent } from './chart-layers';
import { chartedLately } from './charted-waters';
import { sightOnChart } from './layers';

/** What lies in a peg’s water by the published chart, metres below datum; `bottoms` the commonest first. */
export type ChartedPeg = { shallowestM: number; deepestM: number; bottoms: Substrate[] };

/** A lake’s pegs with what this reader may see of their waters: none without a published chart, or where depths are kept. */
export async function chartedPegs(ctx: Ctx, lakeId: string): Promise<Map<string, ChartedPeg>> {
  const { tx } = ctx;
  const charts: { id: string }[] = await tx.query(
    `SELECT id FROM chart WHERE lake_id = $1 AND status = 'published'`,
    [lakeId],
  );
  const [chart] = charts;
  if (!chart) return new Map();
  const lake = await tx.findOneByOrFail(Lake, { id: lakeId });
  const { sees } = await sightOnChart(ctx, lake);
  const content = sees.depth ? await chartContent(tx, chart.id) : null;
  if (!content) return new Map();
  const found = await watersOf(tx, lake);
  const charted = chartedLately(content, found);
  return new Map(
    found.pegs.flatMap(({ id }, i): [string, ChartedPeg][] => {
      const { rangeM, bottoms } = charted[i] ?? {};
      return rangeM ? [[id, { ...rangeM, bottoms: sees.bottom ? commonest(bottoms ?? null) : [] }]] : [];
    }),
  );
}

const commonest = (shares: Readonly<Record<string, number>> | null): Substrate[] =>
  Substrate.options
    .filter((kind) => (shares?.[kind] ?? 0) > 0)
    .sort((one, other) => (shares?.[other] ?? 0) - (shares?.[one] ?? 0));
