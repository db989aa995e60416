import { useEffect, useState } from 'react';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { LARGEST_BYTES, takenOver, type Taken } from '@/features/surveys/handed-over';
import { countWords } from '@/features/surveys/visit-words';
import { clockHere } from '@/lib/format-time';
import { forgetLinkPart, linkPart } from '@/lib/link-part';
import { CannotWait, keepForSending } from '@/lib/outbox';
import type { OutboxEntry, OutboxEvent } from '@/lib/outbox-event';
import { sendWaiting } from '@/lib/outbox-sender';
import { unpackedText } from '@/lib/packed-text';
import { pickTextFile } from '@/lib/pick-file';

/** What a code's address says behind its `#`. */
export const LINK_PART = 'in';

type Props = { accountId: string; entries: readonly OutboxEntry[] };

/** Brings in what waited on another phone of the same person: looked at first, then kept here and sent. */
export function BringInSection({ accountId, entries }: Props) {
  const [taken, setTaken] = useState<Taken | null>(null);
  const [brought, setBrought] = useState<number | null>(null);
  const look = (text: string): void => {
    setBrought(null);
    setTaken(takenOver(text, accountId));
  };
  useEffect(() => {
    const part = linkPart(LINK_PART);
    if (part === null) return;
    forgetLinkPart(LINK_PART);
    void unpackedText(part, LARGEST_BYTES).then((text) => setTaken(takenOver(text ?? '', accountId)));
  }, [accountId]);
  const choosing = useMutation({
    mutationFn: () => pickTextFile('.json,application/json'),
    onSuccess: (file) => {
      if (file) look(file.text);
    },
  });
  const bringing = useMutation({
    mutationFn: async (things: readonly OutboxEvent[]) => {
      for (const thing of things) await keepForSending(thing, null);
      return things.length;
    },
    onSuccess: (count) => {
      setTaken(null);
      setBrought(count);
      void sendWaiting();
    },
  });
  const here = new Set(entries.map(({ id }) => id));
  return (
    <Section
      title="From another phone"
      note="What waits on another phone of yours, saved there as a file, is brought in and sent from here."
    >
      <View style={{ alignItems: 'flex-start' }}>
        <Button
          label="Choose the file"
          bank
          busy={choosing.isPending}
          busyLabel="Opening…"
          onPress={() => choosing.mutate()}
        />
      </View>
      <ProblemNote problem={choosing.error} />
      {taken?.state === 'refused' ? (
        <Note kind="danger" title={taken.title} live>
          {taken.whatToDo}
        </Note>
      ) : null}
      {taken?.state === 'fits' ? (
        <Found
          taken={taken}
          known={taken.things.filter(({ id }) => here.has(id)).length}
          busy={bringing.isPending}
          onBringIn={() => bringing.mutate(taken.things)}
          onLeave={() => setTaken(null)}
        />
      ) : null}
      {bringing.error instanceof CannotWait ? (
        <Note kind="danger" title="This phone can’t keep things yet" live>
          Open this page where there is a signal, then bring them in again.
        </Note>
      ) : (
        <ProblemNote problem={bringing.error} />
      )}
      {brought !== null ? (
        <Note kind="fine" title={`${countWords(brought, 'thing')} brought in`} live>
          Sent from here, oldest first. What had arrived already is not kept twice.
        </Note>
      ) : null}
    </Section>
  );
}

type FoundProps = {
  taken: Extract<Taken, { state: 'fits' }>;
  known: number;
  busy: boolean;
  onBringIn: () => void;
  onLeave: () => void;
};

function Found({ taken: { things, savedAt }, known, busy, onBringIn, onLeave }: FoundProps) {
  return (
    <View style={{ gap: space.medium }}>
      <Text weight="semibold">{`${countWords(things.length, 'thing')}, saved ${clockHere(savedAt)}`}</Text>
      <View role="list" aria-label="In the file" style={{ gap: space.small }}>
        {things.map(({ id, title, note, at }) => (
          <View key={id} role="listitem">
            <Text>{title}</Text>
            <Text size="small" tone="inkSoft">
              {`${note} · made ${clockHere(at)}`}
            </Text>
          </View>
        ))}
      </View>
      {known > 0 ? (
        <Text>{`${countWords(known, 'thing')} of these ${known === 1 ? 'is' : 'are'} here already.`}</Text>
      ) : null}
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <Button label="Bring them in" kind="main" bank busy={busy} busyLabel="Keeping…" onPress={onBringIn} />
        <Button label="Leave them" bank onPress={onLeave} />
      </View>
    </View>
  );
}
