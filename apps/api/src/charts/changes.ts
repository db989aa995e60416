import { Chart } from '@mereward/db/entities/charts/chart';
import { chartChanges, type ChartChange } from '@mereward/shared/charts/chart-changes';
import type { ChangesAsked, ChartChanges } from '@mereward/shared/charts/chart-answers';
import { In, type EntityManager } from 'typeorm';
import { figure } from '@mereward/shared/units/length-words';
import type { Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { chartContent, layersOf, type ChartContent } from './chart-layers';
import { chartToRead, LIGHT, type LightChart } from './find-chart';
import { sightOnChart, type Sight } from './layers';
import { soundedBed } from './sounded-bed';
import { chartNamed } from './tellings';

/** What really changed since an earlier version, within the layers this reader sees. */
export async function changesSince(
  ctx: Ctx,
  chartId: string,
  { since }: ChangesAsked,
): Promise<ChartChanges> {
  const { tx } = ctx;
  const { chart, lake } = await chartToRead(ctx, chartId);
  const sight = await sightOnChart(ctx, lake);
  const before = await earlierCharts(tx, chart);
  const then = since === undefined ? before[0] : before.find(({ id }) => id === since);
  if (since !== undefined && !then) throw notFound('earlier chart of this lake');
  const told = {
    chart: chartNamed(chart),
    since: then ? chartNamed(then) : null,
    earlier: before.flatMap(({ id, version }) => (version === null ? [] : [{ id, version }])),
  };
  const nothing = (whyNot: string): ChartChanges => ({
    ...told,
    comparedM2: null,
    areas: null,
    whyNot,
    words: whyNot,
  });
  if (!sight.sees.depth && !sight.sees.bottom) return nothing(sight.notes.depth ?? sight.notes.bottom ?? '');
  if (!then) return nothing('There is no earlier version of this chart to hold it against.');
  const contents = [await chartContent(tx, chart.id), await chartContent(tx, then.id)] as const;
  const [now, earlier] = contents;
  if (!now || !earlier || (chart.status === 'withdrawn' && !sight.staff))
    return nothing(now && earlier ? 'This chart was withdrawn.' : 'This chart is not built yet.');
  const shiftM = await datumShiftM(tx, chart, then);
  const { comparedM2, areas } = comparedLately([now, earlier], { shiftM, sight });
  return { ...told, comparedM2, areas, whyNot: null, words: wordsOf(comparedM2, areas.length, then) };
}

/** Published before this one and not withdrawn, newest first. A draft is held against all that were. */
async function earlierCharts(tx: EntityManager, chart: LightChart): Promise<LightChart[]> {
  const charts = await tx.find(Chart, {
    where: { lakeId: chart.lakeId, status: In(['published', 'superseded']) },
    select: LIGHT,
  });
  const turn = ({ version }: LightChart): number => {
    const [year = 0, number = 0] = (version ?? `${Infinity}`).split('.').map(Number);
    return year * 1e6 + number; // "2027.10" comes after "2027.9"
  };
  const own = turn(chart);
  return charts.filter((each) => turn(each) < own).sort((a, b) => turn(b) - turn(a));
}

/** How much deeper the earlier depths read at this chart's datum, metres: a datum that lies higher has more water over it. */
async function datumShiftM(tx: EntityManager, now: LightChart, then: LightChart): Promise<number> {
  const [board] = await tx.query<{ rises: boolean }[]>(
    `SELECT (details ->> 'higherNumberHigherWater')::boolean AS rises FROM gauge_board WHERE lake_id = $1 AND is_datum_board`,
    [now.lakeId],
  );
  return (board?.rises === false ? -1 : 1) * (now.datumM - then.datumM);
}

type Asked = { shiftM: number; sight: Sight };

/** Comparisons made lately: two frozen charts always compare alike. */
const lately = new WeakMap<ChartContent, Map<string, { earlier: ChartContent; change: ChartChange }>>();

function comparedLately(
  [now, earlier]: readonly [ChartContent, ChartContent],
  { shiftM, sight: { sees } }: Asked,
): ChartChange {
  const known = lately.get(now) ?? new Map<string, { earlier: ChartContent; change: ChartChange }>();
  const key = `${sees.depth ? 'depth' : ''} ${sees.bottom ? 'bottom' : ''} ${shiftM}`;
  const kept = known.get(key);
  if (kept?.earlier === earlier) return kept.change;
  const change = chartChanges(
    { layers: layersOf(now), bed: soundedBed(now.built, earlier.built) },
    { layers: layersOf(earlier), bed: soundedBed(earlier.built), shiftM },
    sees,
  );
  lately.set(now, known.set(key, { earlier, change }));
  return change;
}

function wordsOf(comparedM2: number, count: number, then: LightChart): string {
  const both = `${figure(comparedM2)} m² were surveyed both now and for chart ${then.version ?? ''}`;
  if (comparedM2 === 0) return 'No water was surveyed both times, so nothing can be compared.';
  if (count === 0) return `${both}. Nothing there differs by more than the soundings of both could be wrong.`;
  const places = count === 1 ? 'One area differs' : `${count} areas differ`;
  return `${both}. ${places} by more than the soundings of both could be wrong (1.96 σ); elsewhere no change can be told.`;
}
