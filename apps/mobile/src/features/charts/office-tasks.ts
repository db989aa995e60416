import type { ChartListItem } from '@mereward/shared/charts/contract';
import type { DisagreementForReview } from '@mereward/shared/charts/disagreement';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { ago } from '@/lib/format-time';

/** Something in the office that wants doing, and where it is done. */
export type OfficeTask = { key: string; title: string; note: string; href: `/${string}` };

const READ_EVERY_DAYS = 14; // older than this, a depth "today" says little: common practice, no published source
const DAY_MS = 86_400_000;

type Known = {
  lake: LakeView;
  charts: readonly ChartListItem[];
  reports: readonly Pick<DisagreementForReview, 'status'>[];
  nowMs: number;
};

/** What a lake and its charts want next, the most pressing first. */
export function officeTasks({ lake, charts, reports, nowMs }: Known): OfficeTask[] {
  return [
    ...charts.flatMap((chart) => chartTask(lake, chart)),
    ...reportTask(lake, reports),
    ...missingTasks(lake),
    ...levelTask(lake, nowMs),
    ...(charts.length === 0 && lake.pegs.length > 0 ? [firstChartTask(lake)] : []),
  ];
}

function chartTask({ details, may }: LakeView, chart: ChartListItem): OfficeTask[] {
  const at = { key: chart.id, href: `/office/charts/${chart.id}` } as const;
  const which = `${chart.title} of ${details.name}`;
  if (chart.status === 'submitted' && may.approveCharts) {
    const note = `Submitted by ${chart.submittedBy ?? 'somebody'}`;
    return [{ ...at, title: `${which} waits for approval`, note }];
  }
  if (chart.status === 'draft' && may.buildCharts)
    return [{ ...at, title: `${which} is a draft`, note: 'Look it over and submit it' }];
  return [];
}

function reportTask({ id, details }: LakeView, reports: Known['reports']): OfficeTask[] {
  const waiting = reports.filter(({ status }) => status === 'waiting').length;
  if (waiting === 0) return [];
  const title =
    waiting === 1
      ? `An angler found ${details.name} not as charted`
      : `${waiting} reports that ${details.name} is not as charted`;
  const note = `Hold ${waiting === 1 ? 'it' : 'them'} against the casts, then accept or decline`;
  return [{ key: `${id}.reports`, title, note, href: '/office/charts/disagreements' }];
}

function missingTasks({ id, details: { name }, pegs, boards, marks, may }: LakeView): OfficeTask[] {
  if (!may.changePegs) return [];
  const missing = [
    { part: 'pegs', is: pegs.length === 0, title: `${name} has no pegs`, note: 'Place the first' },
    {
      part: 'boards',
      is: !boards.some((board) => board.details.isDatumBoard),
      title: `${name} has no datum board`,
      note: 'Without one, no depth can be told for today',
    },
    {
      part: 'marks',
      is: marks.length === 0,
      title: `${name} has no far-bank marks`,
      note: 'Casts are aimed at them',
    },
  ];
  return missing
    .filter(({ is }) => is)
    .map(({ part, title, note }) => ({
      key: `${id}.${part}`,
      title,
      note,
      href: `/office/lakes/${id}/${part}/new`,
    }));
}

function levelTask({ id, boards, details, levelNow, may }: LakeView, nowMs: number): OfficeTask[] {
  const board = boards.find((each) => each.details.isDatumBoard);
  if (!board || !may.recordLevel) return [];
  const readMs = levelNow ? Date.parse(levelNow.at) : null;
  if (readMs !== null && nowMs - readMs <= READ_EVERY_DAYS * DAY_MS) return [];
  return [
    {
      key: `${id}.level`,
      title: `Read ${board.details.code} on ${details.name}`,
      note: readMs === null ? 'Nobody has yet' : `Last read ${ago(readMs, nowMs)}`,
      href: `/office/lakes/${id}/boards/${board.id}`,
    },
  ];
}

function firstChartTask({ id, details, may }: LakeView): OfficeTask {
  const task = { key: `${id}.chart`, title: `${details.name} has no chart` };
  return may.buildCharts
    ? { ...task, note: 'Survey it from the bank, then draft one', href: `/office/charts/new?lakeId=${id}` }
    : { ...task, note: 'A manager or the head bailiff drafts it from a survey', href: '/office/charts' };
}
