import type { Href } from 'expo-router';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { problemWords } from '@/components/problem-words';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { themed } from '@/hooks/themed';
import { clockHere } from '@/lib/format-time';
import { waitAgain } from '@/lib/outbox';
import type { OutboxEntry } from '@/lib/outbox-event';
import { heldBy } from '@/lib/outbox-order';
import { sendWaiting } from '@/lib/outbox-sender';
import { Problem } from '@mereward/shared/problems/problem';

const useStyles = themed((c) => ({
  entry: {
    gap: space.small,
    padding: space.medium,
    borderWidth: 1,
    borderColor: c.rule,
    borderRadius: 8,
    backgroundColor: c.sheet,
  },
  head: { flexDirection: 'row', flexWrap: 'wrap', alignItems: 'center', columnGap: space.medium },
  acts: { flexDirection: 'row', flexWrap: 'wrap', gap: space.small },
}));

type Acts = { onTakeAway: () => void; onMove: () => void };
type Props = Acts & { entry: OutboxEntry; entries: readonly OutboxEntry[] };

/** One thing of the queue: what it is, when it was made, how it stands, and what can be done about a refusal. */
export function WaitingEntry({ entry, entries, ...acts }: Props) {
  const styles = useStyles();
  const behind = heldBy(entries, entry);
  return (
    <View role="listitem" style={styles.entry}>
      <View style={styles.head}>
        <Text weight="semibold" style={{ flexGrow: 1 }}>
          {entry.title}
        </Text>
        {entry.state === 'refused' ? (
          <StatusShape shape="cross" tone="brick" word="refused" size="small" />
        ) : (
          <StatusShape shape="ring" tone="amber" word="waiting to be sent" size="small" />
        )}
      </View>
      <Text size="small" tone="inkSoft">
        {`${entry.note} · made ${clockHere(entry.at)}`}
      </Text>
      {behind ? (
        <Text
          size="small"
          tone="amber"
        >{`Stands behind “${behind.title}”, which was refused: put that right first.`}</Text>
      ) : null}
      {entry.state === 'refused' ? <Refused entry={entry} {...acts} /> : null}
    </View>
  );
}

function Refused({ entry, onTakeAway, onMove }: Acts & { entry: OutboxEntry }) {
  const styles = useStyles();
  const { refusal, again, seq } = entry;
  const said = refusal
    ? problemWords(
        new Problem(
          refusal.kind,
          refusal.title,
          refusal.detail === undefined ? {} : { detail: refusal.detail },
        ),
      )
    : null;
  return (
    <>
      <Note kind="danger" title={said?.title ?? 'The server refused it'}>
        {said ? <Text size="small">{said.whatToDo}</Text> : null}
        {refusal?.errors?.map(({ pointer, detail }) => (
          <Text key={pointer + detail} size="small">
            {detail}
          </Text>
        ))}
      </Note>
      <View style={styles.acts}>
        {again ? (
          <LinkButton
            label="Open it again"
            href={`${again.href}${again.href.includes('?') ? '&' : '?'}again=${String(seq)}` as Href}
            kind="main"
            bank
          />
        ) : null}
        {entry.kind === 'keep-cast' ? <Button label="Move to another visit" bank onPress={onMove} /> : null}
        <Button label="Try once more" bank onPress={() => void waitAgain(seq).then(sendWaiting)} />
        <Button label="Take it away" kind="danger" bank onPress={onTakeAway} />
      </View>
    </>
  );
}
