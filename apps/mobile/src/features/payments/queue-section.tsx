import { useState } from 'react';
import type { OfficeQueueItem } from '@mereward/shared/payments/refund-contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Field } from '@/components/field';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { radius, space } from '@/constants/layout';
import { useOfficeQueue, useRefundDeed } from '@/features/payments/api';
import { METHOD_WORDS } from '@/features/payments/method-words';
import { QUEUE_LOOKS } from '@/features/payments/refund-words';
import { themed } from '@/hooks/themed';
import { money } from '@/lib/format';
import { ago } from '@/lib/format-time';

const useStyles = themed((c) => ({
  item: {
    gap: space.small,
    padding: space.page,
    borderWidth: 1,
    borderColor: c.rule,
    borderRadius: radius.control,
    backgroundColor: c.sheet,
  },
  row: { flexDirection: 'row', flexWrap: 'wrap', gap: space.small },
}));

/** Refunds and disputes that wait for somebody, the oldest first. */
export function QueueSection({ fisheryId }: { fisheryId: string }) {
  const queue = useOfficeQueue(fisheryId);
  const [nowMs] = useState(() => Date.now());
  return (
    <Section title="Waits for somebody">
      <Loaded
        query={queue}
        waiting="Looking what waits…"
        empty={{
          when: ({ items }) => items.length === 0,
          show: <Text tone="inkSoft">Nothing waits: no refund is open, none has failed.</Text>,
        }}
      >
        {({ items }) => (
          <View role="list" aria-label="What waits" style={{ gap: space.medium }}>
            {items.map((item) => (
              <Item key={`${item.kind}.${item.id}`} item={item} nowMs={nowMs} />
            ))}
          </View>
        )}
      </Loaded>
    </Section>
  );
}

function Item({ item, nowMs }: { item: OfficeQueueItem; nowMs: number }) {
  const styles = useStyles();
  return (
    <View role="listitem" style={styles.item}>
      <StatusShape {...QUEUE_LOOKS[item.kind]} />
      <Text weight="semibold">
        {`${money(item.amountPence, item.currency)}, ${METHOD_WORDS[item.method].toLowerCase()}, ${item.holder}`}
      </Text>
      <Text>{item.words}</Text>
      {item.reason === '' ? null : <Text tone="inkSoft">{`“${item.reason}”`}</Text>}
      <Text size="small" tone="inkSoft">
        {[item.askedBy ? `Asked by ${item.askedBy}` : null, ago(Date.parse(item.since), nowMs)]
          .filter((part) => part !== null)
          .join(', ')}
      </Text>
      <Acts item={item} />
    </View>
  );
}

function Acts({ item }: { item: OfficeQueueItem }) {
  const styles = useStyles();
  const { id, may, amountPence, currency, holder } = item;
  const [words, setWords] = useState('');
  const act = useRefundDeed(id);
  const which = `${money(amountPence, currency)} of ${holder}`;
  return (
    <>
      {may.decide ? (
        <Field label="A word on it, for whoever asked" value={words} onChange={setWords} optional />
      ) : null}
      <View style={styles.row}>
        {may.decide ? (
          <>
            <Button
              label="Approve"
              kind="main"
              spoken={`Approve ${which}`}
              busy={act.isPending}
              onPress={() => act.mutate({ deed: 'decision', body: { approve: true, words } })}
            />
            <Button
              label="Decline"
              spoken={`Decline ${which}`}
              busy={act.isPending}
              onPress={() => act.mutate({ deed: 'decision', body: { approve: false, words } })}
            />
          </>
        ) : null}
        {may.again ? (
          <>
            <Button
              label="Try the card again"
              busy={act.isPending}
              onPress={() => act.mutate({ deed: 'again', body: { by: 'card' } })}
            />
            <Button
              label="Give it by hand"
              busy={act.isPending}
              onPress={() => act.mutate({ deed: 'again', body: { by: 'hand' } })}
            />
          </>
        ) : null}
        {may.given ? (
          <Button
            label="It was given"
            spoken={`It was given: ${which}`}
            busy={act.isPending}
            onPress={() => act.mutate({ deed: 'given', body: undefined })}
          />
        ) : null}
        {may.seen ? (
          <Button
            label="Noted"
            spoken={`Noted: ${which}`}
            busy={act.isPending}
            onPress={() => act.mutate({ deed: 'seen', body: undefined })}
          />
        ) : null}
        <LinkButton label="The booking" href={`/office/bookings/${item.bookingId}`} kind="quiet" />
      </View>
      <ProblemNote problem={act.error} />
    </>
  );
}
