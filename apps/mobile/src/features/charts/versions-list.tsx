import type { ChartList } from '@mereward/shared/charts/contract';
import { List, Row } from '@/components/list';
import { ChartStatusShape } from './chart-status';
import { surveyedWords } from './chart-words';

type Props = { charts: ChartList['charts']; chartId: string };

/** Every version of a lake's chart that this reader may open, the one on the screen marked. */
export function VersionsList({ charts, chartId }: Props) {
  return (
    <List label="Versions of this chart">
      {charts.map(({ id, version, title, status, surveyedFrom, surveyedTo }) => (
        <Row
          key={id}
          title={version === null ? title : `Chart ${version}`}
          note={`surveyed ${surveyedWords({ surveyedFrom, surveyedTo })}`}
          end={<ChartStatusShape status={status} />}
          href={id === chartId ? undefined : `/water/charts/${id}`}
          chosen={id === chartId}
        />
      ))}
    </List>
  );
}
