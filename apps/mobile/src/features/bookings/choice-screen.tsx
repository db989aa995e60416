import { useState } from 'react';
import type { ChoiceView, Choose, PlaceOffered } from '@mereward/shared/bookings/choosing-contract';
import { useLocalSearchParams } from 'expo-router';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { ticketTimes } from '@/features/bookings/ticket-words';
import { useChoice, useChoose } from '@/features/bookings/choices-api';
import { money } from '@/lib/format';
import { dayAndTime } from '@/lib/format-time';

/** After a closure: another date, another lake, or the money back. Open to whoever holds the letter's link. */
export function ChoiceScreen() {
  const { token } = useLocalSearchParams<{ token: string }>();
  const choice = useChoice(token);
  return (
    <Page title="Your ticket and the closure" {...(choice.data ? { over: choice.data.fisheryName } : {})}>
      <Loaded query={choice} waiting="Reading what can be chosen…">
        {(view) => <Choosing token={token} view={view} />}
      </Loaded>
    </Page>
  );
}

type Asking = { words: string; act: string; choose: Choose };

function Choosing({ token, view }: { token: string; view: ChoiceView }) {
  const choose = useChoose(token);
  const [asking, setAsking] = useState<Asking | null>(null);
  const { moveLake, currency, chosen } = view;
  const pegs = view.pegs.length === 0 ? '' : `peg ${view.pegs.join(', ')}, `;
  return (
    <>
      <Note kind="danger" title={view.closedWords}>
        {view.reasonWords}
      </Note>
      <Text>{`Your ticket ${view.bookingCode}: ${view.ticketName}, ${pegs}${view.lakeName}, ${ticketTimes(view)}.`}</Text>
      {chosen ? (
        <Note kind="fine" title={chosen.by === 'angler' ? 'You have chosen' : 'It is settled'} live>
          <Text>{chosen.words}</Text>
          <LinkButton label="My tickets" href="/tickets/mine" />
        </Note>
      ) : (
        <>
          <Text weight="semibold">
            {`Choose by ${dayAndTime(view.chooseUntil, view.zone)}. If you don’t, ${endWords(view)}.`}
          </Text>
          <ProblemNote problem={choose.error} />
          <Days
            title="Another date"
            days={view.moveDate}
            onChoose={(place) =>
              setAsking({
                words: `Your ticket moves to ${place.words}. The price stays.`,
                act: 'Move it',
                choose: { choice: 'move_date', day: place.day },
              })
            }
          />
          {moveLake ? (
            <Days
              title={moveLake.lakeName}
              note={`${moveLake.ticketName}, ${money(moveLake.grossPence, currency)}; ${money(moveLake.backPence, currency)} goes back.`}
              days={moveLake.days}
              onChoose={(place) =>
                setAsking({
                  words: `You fish ${moveLake.lakeName}, ${place.words}; ${money(moveLake.backPence, currency)} goes back.`,
                  act: 'Move it there',
                  choose: { choice: 'move_lake', day: place.day },
                })
              }
            />
          ) : null}
          <Ending view={view} onChoose={setAsking} />
          <Confirm
            open={asking !== null}
            title="Is that your choice?"
            words={`${asking?.words ?? ''} It can’t be changed here afterwards.`}
            act={asking?.act ?? ''}
            busy={choose.isPending}
            onClose={() => setAsking(null)}
            onAct={() => {
              if (asking) choose.mutate(asking.choose, { onSettled: () => setAsking(null) });
            }}
          />
        </>
      )}
    </>
  );
}

const endWords = ({ refundPence, currency }: ChoiceView): string =>
  refundPence === 0 ? 'the ticket ends' : `${money(refundPence, currency)} goes back`;

/** The ticket ends: with its money back, where any was paid. */
function Ending({ view, onChoose }: { view: ChoiceView; onChoose: (asking: Asking) => void }) {
  const { refundPence, currency } = view;
  const back = money(refundPence, currency);
  const paid = refundPence > 0;
  return (
    <Section title={paid ? 'The money back' : 'End the ticket'}>
      <Text>{paid ? `${back} goes back the way it was paid.` : 'Nothing was paid for it.'}</Text>
      <Button
        label={paid ? `Take ${back} back` : 'End the ticket'}
        onPress={() =>
          onChoose({
            words: `The ticket ends${paid ? ` and ${back} goes back` : ''}.`,
            act: paid ? 'Take the money back' : 'End the ticket',
            choose: { choice: 'refund' },
          })
        }
      />
    </Section>
  );
}

type DaysProps = {
  title: string;
  note?: string | undefined;
  days: readonly PlaceOffered[];
  onChoose: (place: PlaceOffered) => void;
};

function Days({ title, note, days, onChoose }: DaysProps) {
  return (
    <Section title={title} note={note}>
      {days.length === 0 ? (
        <Text tone="inkSoft">No day is left on which all of it finds a place.</Text>
      ) : (
        <List label={title}>
          {days.map((place) => (
            <Row
              key={`${place.day} ${place.from}`}
              title={place.words}
              note={`${String(place.free)} ${place.free === 1 ? 'peg' : 'pegs'} free`}
              onPress={() => onChoose(place)}
            />
          ))}
        </List>
      )}
    </Section>
  );
}
