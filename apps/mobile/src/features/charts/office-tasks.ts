import type { ChartListItem } from '@mereward/shared/charts/contract';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { ago } from '@/lib/format-time';

/** Something in the office that wants doing, and where it is done. */
export type OfficeTask = { key: string; title: string; note: string; href: `/${string}` };

const READ_EVERY_DAYS = 14; // older than this, a depth "today" says little: common practice, no published source
const DAY_MS = 86_400_000;

type Known = { lake: LakeView; charts: readonly ChartListItem[]; nowMs: number };

/** What a lake and its charts want next, the most pressing first. Only what this reader may do themselves. */
export function officeTasks({ lake, charts, nowMs }: Known): OfficeTask[] {
  const { id, details, may } = lake;
  const { name } = details;
  const tasks: OfficeTask[] = [];
  const say = (key: string, title: string, note: string, href: OfficeTask['href']): void => {
    tasks.push({ key: `${id}.${key}`, title, note, href });
  };
  for (const chart of charts) {
    const href = `/office/charts/${chart.id}` as const;
    if (chart.status === 'submitted' && may.approveCharts)
      say(
        chart.id,
        `${chart.title} of ${name} waits for approval`,
        `Submitted by ${chart.submittedBy ?? 'somebody'}`,
        href,
      );
    if (chart.status === 'draft' && may.buildCharts)
      say(chart.id, `${chart.title} of ${name} is a draft`, 'Look it over and submit it', href);
  }
  if (lake.pegs.length === 0 && may.changePegs)
    say('pegs', `${name} has no pegs`, 'Place the first', `/office/lakes/${id}/pegs/new`);
  if (!lake.boards.some((board) => board.details.isDatumBoard) && may.changePegs)
    say(
      'board',
      `${name} has no datum board`,
      'Without one, no depth can be told for today',
      `/office/lakes/${id}/boards/new`,
    );
  tasks.push(...levelTasks(lake, nowMs));
  if (lake.marks.length === 0 && may.changePegs)
    say('marks', `${name} has no far-bank marks`, 'Casts are aimed at them', `/office/lakes/${id}/marks/new`);
  if (charts.length === 0 && lake.pegs.length > 0 && may.buildCharts)
    say(
      'chart',
      `${name} has no chart`,
      'Survey it from the bank, then draft one',
      `/office/charts/new?lakeId=${id}`,
    );
  return tasks;
}

function levelTasks({ id, boards, details, levelNow, may }: LakeView, nowMs: number): OfficeTask[] {
  const board = boards.find((each) => each.details.isDatumBoard);
  if (!board || !may.recordLevel) return [];
  const task = { key: `${id}.level`, href: `/office/lakes/${id}/boards/${board.id}` } as const;
  if (!levelNow)
    return [{ ...task, title: `Read ${board.details.code} on ${details.name}`, note: 'Nobody has yet' }];
  const readMs = Date.parse(levelNow.at);
  if (nowMs - readMs <= READ_EVERY_DAYS * DAY_MS) return [];
  return [
    {
      ...task,
      title: `Read ${board.details.code} on ${details.name}`,
      note: `Last read ${ago(readMs, nowMs)}`,
    },
  ];
}
