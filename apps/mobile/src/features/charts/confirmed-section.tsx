import { useState } from 'react';
import type { ConfirmedBottomView } from '@mereward/shared/surveys/confirmed-contract';
import { dayWords } from '@mereward/shared/time/civil-day';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { List, Row } from '@/components/list';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { useTakeBackConfirmed } from '@/features/surveys/bottom-api';
import { classWords, wayWords } from '@/features/surveys/bottom-class-words';
import { positionText } from '@/lib/position-text';

type Props = { lakeId: string; confirmed: readonly ConfirmedBottomView[] };

/** The confirmed bottoms of a lake, newest first, each to be taken back by whoever may. */
export function ConfirmedSection({ lakeId, confirmed }: Props) {
  const [asked, setAsked] = useState<ConfirmedBottomView | null>(null);
  const takeBack = useTakeBackConfirmed(lakeId);
  return (
    <Section title="Confirmed so far">
      <ProblemNote problem={takeBack.error} />
      {confirmed.length === 0 ? (
        <Text tone="inkSoft">None on this lake yet.</Text>
      ) : (
        <List label="Confirmed bottoms">
          {confirmed.map((each) => (
            <Row
              key={each.id}
              title={confirmedWords(each)}
              note={noteOf(each)}
              end={
                each.may.takeBack ? (
                  <Button label="Take back" kind="quiet" bank onPress={() => setAsked(each)} />
                ) : null
              }
            />
          ))}
        </List>
      )}
      <Confirm
        open={asked !== null}
        title="Take this confirmation back?"
        words={`${asked ? confirmedWords(asked) : ''}. It no longer counts in charts built from now on, nor for the table of feels.`}
        act="Take it back"
        danger
        busy={takeBack.isPending}
        onAct={() => asked && takeBack.mutate(asked.id, { onSettled: () => setAsked(null) })}
        onClose={() => setAsked(null)}
      />
    </Section>
  );
}

function confirmedWords({ substrate, cover, method }: ConfirmedBottomView): string {
  const seen = [substrate, cover].filter((name) => name !== null).map(classWords);
  const words = `${seen.join(', ')} by ${wayWords(method)}`;
  return words.charAt(0).toUpperCase() + words.slice(1);
}

const noteOf = ({ day, by, note, endedBy, castId, position }: ConfirmedBottomView): string =>
  [
    dayWords(day),
    by,
    castId ? 'at a cast' : positionText(position),
    note,
    endedBy ? `no longer counts: ${endedBy}` : '',
  ]
    .filter((words) => words !== '')
    .join(' · ');
