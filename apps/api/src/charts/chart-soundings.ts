import { fromPlane, type LonLat } from '@mereward/shared/geometry/plane';
import { csvText } from '@mereward/shared/writing/csv-cells';
import { createHash } from 'node:crypto';
import type { Ctx } from '../ctx';
import type { Built, BuiltLog } from './built';
import { chartCasts, type CastsTable, type ChartCasts } from './chart-casts';
import { fileName } from './file-name';

/** A merged sounding of a log as the chart froze it; metres, `number` counted from 1 in the log's own order. */
export type MergedSounding = {
  number: number;
  xM: number;
  yM: number;
  position: LonLat;
  depthM: number; // below datum
  sigmaM: number;
  grade: string;
};

export const mergedSoundings = (origin: LonLat, { points, grades }: BuiltLog): MergedSounding[] =>
  Array.from(grades, (grade, i) => {
    const [xM = 0, yM = 0, depthM = 0, sigmaM = 0] = points.slice(4 * i, 4 * i + 4);
    return { number: i + 1, xM, yM, position: fromPlane(origin, { xM, yM }), depthM, sigmaM, grade };
  });

const COLUMNS = [
  'visit_id',
  'log_id',
  'number',
  'lat',
  'lon',
  'east_m',
  'north_m',
  'depth_at_datum_m',
  'sigma_m',
  'grade',
];

/** Every merged sounding of a chart's logs as a table with its digest, grade D too. */
export async function chartSoundingsCsv(ctx: Ctx, chartId: string): Promise<CastsTable> {
  return soundingsTable(await chartCasts(ctx, chartId));
}

export function soundingsTable({
  built,
  lake,
  chart,
}: Pick<ChartCasts, 'lake' | 'chart'> & { built: Pick<Built, 'logs' | 'origin'> }): CastsTable {
  const rows = built.logs.flatMap((log) =>
    mergedSoundings(built.origin, log).map(
      ({ number, xM, yM, position: [lon, lat], depthM, sigmaM, grade }) => [
        ...[log.visitId, log.id, number, lat.toFixed(7), lon.toFixed(7)],
        ...[xM.toFixed(2), yM.toFixed(2), depthM.toFixed(3), sigmaM.toFixed(3), grade],
      ],
    ),
  );
  const text = `\uFEFF${csvText([COLUMNS, ...rows])}`;
  return {
    filename: `${fileName(lake.name, 'soundings', chart.version ?? 'draft')}.csv`,
    text,
    sha256: createHash('sha256').update(text).digest('hex'),
  };
}
