import { useState } from 'react';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { BringInSection, LINK_PART } from '@/features/surveys/bring-in-section';
import { HandOverSection } from '@/features/surveys/hand-over-section';
import { MoveCastSheet } from '@/features/surveys/move-cast-sheet';
import { WaitingEntry } from '@/features/surveys/waiting-entry';
import { space } from '@/constants/layout';
import { useNoSignal } from '@/hooks/use-no-signal';
import { clockHere } from '@/lib/format-time';
import { linkPart } from '@/lib/link-part';
import { takeAway, useOutbox } from '@/lib/outbox';
import type { OutboxEntry } from '@/lib/outbox-event';
import { sendWaiting } from '@/lib/outbox-sender';
import { outboxSignal } from '@/lib/outbox-signal';
import { othersWords } from '@/lib/outbox-words';
import { useSession } from '@/lib/session';

/** What has still to be sent from this device: each with its words, its time and how it stands. */
export function WaitingScreen() {
  const { account } = useSession();
  const { entries, others, locked } = useOutbox();
  const [sending, setSending] = useState(false);
  const [leaving, setLeaving] = useState<OutboxEntry | null>(null);
  const [handed] = useState(() => linkPart(LINK_PART) !== null); // held until somebody is signed in to look at it
  const [moving, setMoving] = useState<OutboxEntry | null>(null);
  const open = entries.filter(({ state }) => state !== 'sent');
  const send = async (): Promise<void> => {
    setSending(true);
    await sendWaiting();
    setSending(false);
  };
  return (
    <Page
      title="Waiting to be sent"
      actions={
        open.some(({ state }) => state === 'waiting') ? (
          <Button
            label="Send now"
            kind="main"
            bank
            grow
            busy={sending}
            busyLabel="Sending…"
            onPress={() => void send()}
          />
        ) : null
      }
    >
      <Signal />
      {open.length > 0 ? (
        <View role="list" aria-label="Waiting to be sent" style={{ gap: space.medium }}>
          {open.map((entry) => (
            <WaitingEntry
              key={entry.seq}
              entry={entry}
              entries={entries}
              onTakeAway={() => setLeaving(entry)}
              onMove={() => setMoving(entry)}
            />
          ))}
        </View>
      ) : null}
      {locked > 0 ? (
        <Note kind="caution" title={`${String(locked)} of yours can’t be opened yet`}>
          They are sealed on this phone. They open and are sent as soon as there is a signal here.
        </Note>
      ) : null}
      {open.length + locked + others === 0 ? (
        <Empty title="Nothing waits" action={<LinkButton label="To the bank" href="/bank" bank />}>
          What is kept without a signal stands here until it is sent.
        </Empty>
      ) : null}
      {others > 0 ? (
        <Section title={account ? 'Somebody else’s' : 'Sealed'} bare={open.length === 0}>
          <Text>{`${account ? othersWords(others) : sealedWords(others)}. Whoever made ${others === 1 ? 'it' : 'them'} signs in here to send ${others === 1 ? 'it' : 'them'}; nobody else can read ${others === 1 ? 'it' : 'them'}.`}</Text>
          {account ? null : (
            <View style={{ alignItems: 'flex-start' }}>
              <LinkButton label="Sign in" href="/sign-in?next=/waiting" kind="main" />
            </View>
          )}
        </Section>
      ) : null}
      {account && open.length > 0 ? <HandOverSection account={account} entries={open} /> : null}
      {!account && handed ? (
        <Note title="Sign in to see what the other phone shows">
          <Text>Whoever made it signs in here, then brings it in.</Text>
          <View style={{ alignItems: 'flex-start' }}>
            <LinkButton label="Sign in and look" href="/sign-in?next=/waiting" kind="main" bank />
          </View>
        </Note>
      ) : null}
      {account ? <BringInSection accountId={account.id} entries={entries} /> : null}
      {moving ? <MoveCastSheet entry={moving} entries={entries} onClose={() => setMoving(null)} /> : null}
      <Confirm
        open={leaving !== null}
        title={`Take away “${leaving?.title ?? ''}”?`}
        words="It is taken off this phone for good and will not be sent. Nobody can bring it back."
        act="Take it away"
        danger
        onAct={() => {
          if (leaving) void takeAway(leaving.seq).then(sendWaiting);
          setLeaving(null);
        }}
        onClose={() => setLeaving(null)}
      />
    </Page>
  );
}

const sealedWords = (others: number): string =>
  others === 1 ? '1 thing waits sealed on this phone' : `${String(others)} things wait sealed on this phone`;

function Signal() {
  const noSignal = useNoSignal();
  const lastSent = outboxSignal.useLastSent();
  const last =
    lastSent === '' ? 'Nothing has been sent from this phone yet.' : `Last sent ${clockHere(lastSent)}.`;
  return (
    <Text tone="inkSoft">
      {noSignal
        ? `No answer from the server now. It is tried again by itself, and what stands here outlives a reload and a sign-out. ${last}`
        : `Sent by itself, oldest first, as soon as there is a signal. ${last}`}
    </Text>
  );
}
