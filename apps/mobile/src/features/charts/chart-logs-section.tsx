import type { ChartLogView } from '@mereward/shared/charts/chart-log-view';
import { List, Row } from '@/components/list';
import { Section } from '@/components/section';
import { figure, percent } from '@/lib/format';

type Props = { chartId: string; logs: readonly ChartLogView[]; mayLeaveOut: boolean };

/** What a chart took from each log of soundings: read, kept, merged, and what only stands as points. */
export function ChartLogsSection({ chartId, logs, mayLeaveOut }: Props) {
  if (logs.length === 0) return null;
  return (
    <Section
      title="From logs of soundings"
      note={`Soundings of one cell are merged, so that noise averages out. They say nothing of the bottom’s kind.${mayLeaveOut ? ' Open a log to leave a part of it out.' : ''}`}
    >
      <List label="Logs of soundings">
        {logs.map((log) => (
          <Row
            key={log.id}
            title={titleOf(log)}
            note={noteOf(log)}
            {...(mayLeaveOut ? { href: `/office/charts/${chartId}/logs/${log.id}` } : {})}
          />
        ))}
      </List>
    </Section>
  );
}

const titleOf = ({ found, filenames }: ChartLogView): string =>
  `${figure(found)} found in ${filenames.join(', ')}`;

function noteOf({ kept, outside, leftOut, cells, cellM, contoured, flagged }: ChartLogView): string {
  const parts = [
    `${figure(kept)} taken in`,
    outside > 0 ? `${figure(outside)} of them off the water` : '',
    leftOut > 0 ? `${figure(leftOut)} left out of this chart` : '',
    `merged into ${figure(cells)} cells of ${figure(cellM, cellM < 10 ? 1 : 0)} m`,
    contoured === cells
      ? 'all contoured'
      : `${percent(contoured / Math.max(1, cells))} contoured, the rest points`,
    flagged > 0 ? `${figure(flagged)} cells out of line with their neighbours` : '',
  ];
  return parts.filter(Boolean).join(' · ');
}
