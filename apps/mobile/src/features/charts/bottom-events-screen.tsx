import { useState } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { BottomEventView } from '@mereward/shared/surveys/bottom-event-contract';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { List, Row } from '@/components/list';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { MEASURE_PX } from '@/constants/layout';
import { EVENT_ENDS } from '@/features/charts/event-draft';
import { useLake } from '@/features/lakes/api';
import { useBottomEvents, useTakeBackEvent } from '@/features/surveys/bottom-api';

/** What happened to a lake's bottom since it was surveyed: works, floods, seasons. */
export function BottomEventsScreen() {
  const { lakeId } = useLocalSearchParams<{ lakeId: string }>();
  const lake = useLake(lakeId);
  const events = useBottomEvents(lakeId);
  const name = lake.data?.details.name;
  return (
    <Page
      title="What changed the bottom"
      over={name}
      back={{ label: name ?? 'The lake', href: `/office/lakes/${lakeId}` }}
    >
      <Text style={{ maxWidth: MEASURE_PX }}>
        Casts from before an event no longer count for what it ended, there and from the next chart on. A
        published chart says at once that the bottom changed since it was surveyed.
      </Text>
      <Loaded query={events} waiting="Reading what happened…">
        {(value) => (
          <>
            {value.may.record ? (
              <LinkButton label="Record an event" kind="main" href={`/office/lakes/${lakeId}/events/new`} />
            ) : null}
            {value.events.length === 0 ? (
              <Empty title="Nothing is recorded">
                {value.may.record
                  ? 'Record weed cut, a snag taken out, dredging, leaf fall or a flood when it happens.'
                  : 'The owner, a manager or the head bailiff records works and floods here.'}
              </Empty>
            ) : (
              <List label="Events, newest first">
                {value.events.map((event) => (
                  <EventRow key={event.id} event={event} lakeId={lakeId} may={value.may.record} />
                ))}
              </List>
            )}
          </>
        )}
      </Loaded>
    </Page>
  );
}

const endsWords = ({ ends, note, by }: BottomEventView): string => {
  const named = EVENT_ENDS.filter(({ key }) => ends.includes(key)).map(({ label }) => label);
  return [`Ends ${named.join(', ')}`, note, `by ${by}`].filter((words) => words !== '').join(' · ');
};

function EventRow({ event, lakeId, may }: { event: BottomEventView; lakeId: string; may: boolean }) {
  const [asking, setAsking] = useState(false);
  const takeBack = useTakeBackEvent(lakeId);
  return (
    <>
      <Row
        title={event.words}
        note={endsWords(event)}
        end={may ? <Button label="Take back" kind="quiet" onPress={() => setAsking(true)} /> : null}
      />
      <ProblemNote problem={takeBack.error} />
      <Confirm
        open={asking}
        title="Take this event back?"
        words={`${event.words}. Casts from before it count again from the next chart on, and the published chart no longer names it.`}
        act="Take it back"
        danger
        busy={takeBack.isPending}
        onAct={() => takeBack.mutate(event.id, { onSettled: () => setAsking(false) })}
        onClose={() => setAsking(false)}
      />
    </>
  );
}
