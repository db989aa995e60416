import type { LogListItem } from '@mereward/shared/surveys/log-contract';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { useLogs } from '@/features/surveys/log-api';
import { logStateWords } from '@/features/surveys/log-words';
import { dayAndTime } from '@/lib/format-time';

/** The logs of soundings brought to a visit, and the way to bring one. */
export function LogsSection({ visitId, zone }: { visitId: string; zone: string }) {
  const logs = useLogs(visitId);
  const bring = logs.data?.may.bring ? (
    <LinkButton label="Bring in a log" href={`/bank/surveys/${visitId}/logs/new`} bank />
  ) : null;
  if (logs.data?.logs.length === 0 && !logs.data.may.bring) return null;
  return (
    <Section title="Logs of soundings" end={bring}>
      <Loaded query={logs} waiting="Reading the logs…">
        {({ logs: all }) =>
          all.length === 0 ? (
            <Text tone="inkSoft">
              What an echo sounder on a boat recorded, as NMEA 0183, GPX, GeoJSON or a table.
            </Text>
          ) : (
            <List label="Logs">
              {all.map((log) => (
                <LogRow key={log.id} log={log} zone={zone} />
              ))}
            </List>
          )
        }
      </Loaded>
    </Section>
  );
}

const LogRow = ({ log, zone }: { log: LogListItem; zone: string }) => (
  <Row
    title={log.filenames.join(', ')}
    note={`${log.importedBy}, ${dayAndTime(log.importedAt, zone)}`}
    end={logStateWords(log)}
    href={`/bank/surveys/${log.visitId}/logs/${log.id}`}
  />
);
