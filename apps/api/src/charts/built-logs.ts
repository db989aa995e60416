import type { ChartLogView, SurveyedBy } from '@mereward/shared/charts/chart-log-view';
import type { ChartView } from '@mereward/shared/charts/contract';
import { shownOf } from '@mereward/shared/charts/log-thinning';
import { Grade } from '@mereward/shared/surveys/contract';
import type { Built, BuiltLog } from './built';
import { idOf } from './chart-logs';

type ShownSounding = NonNullable<ChartView['soundings']>[number];

/** More than so many hide one another on any screen, and weigh on a phone. Casts are not thinned. */
const MOST_SHOWN = 1500;

/** The merged soundings of a chart's logs that are sent to a reader: spread evenly, each as it went into the chart. */
export function logSoundings(logs: readonly BuiltLog[], staff: boolean): ShownSounding[] {
  const all = logs.flatMap(soundingsIn).filter(({ grade }) => staff || grade !== 'D');
  return shownOf(all, MOST_SHOWN);
}

function soundingsIn({ id, points, grades }: BuiltLog): ShownSounding[] {
  return Array.from(grades, (letter, i) => ({
    id: idOf(id, i),
    xM: points[4 * i] ?? 0,
    yM: points[4 * i + 1] ?? 0,
    depthM: points[4 * i + 2] ?? 0,
    sigmaM: points[4 * i + 3] ?? 0,
    bottom: 'unknown',
    grade: Grade.parse(letter),
    ofLog: true,
  }));
}

export function surveyedBy({ logs, soundings }: Pick<Built, 'logs' | 'soundings'>): SurveyedBy {
  if (logs.length === 0) return 'casts';
  return soundings.length > 0 ? 'both' : 'logs';
}

/** What the chart took from each log. */
export function logViews({
  logs,
  visits,
  quality,
}: Pick<Built, 'logs' | 'visits' | 'quality'>): ChartLogView[] {
  const titleOf = new Map(visits.map(({ id, title }) => [id, title]));
  return logs.map(({ points, grades, ...log }) => ({
    ...log,
    visitTitle: titleOf.get(log.visitId) ?? '',
    cells: points.length / 4,
    contoured: grades.replace(/[CD]/g, '').length,
    flagged: quality.flagged.filter((id) => id.startsWith(`${log.id}:`)).length,
  }));
}
