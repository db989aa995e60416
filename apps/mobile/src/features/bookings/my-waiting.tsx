import type { WaitingView } from '@mereward/shared/bookings/waiting-contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { LinkButton } from '@/components/link-button';
import { ProblemNote } from '@/components/problem-note';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useLeaveWaiting, useMyWaiting, usePassOffer } from '@/features/bookings/waiting-api';
import { placeWords } from '@/features/bookings/waiting-words';
import { dayName } from '@/lib/format-time';

/** The lines the reader stands in, each with their place; nothing is shown where there is none. */
export function MyWaiting() {
  const mine = useMyWaiting(true);
  const open = (mine.data?.waiting ?? []).filter(
    ({ status }) => status === 'waiting' || status === 'offered',
  );
  if (open.length === 0) return null;
  return (
    <Section title="Waiting">
      {open.map((entry) => (
        <Entry key={entry.id} entry={entry} />
      ))}
    </Section>
  );
}

function Entry({ entry }: { entry: WaitingView }) {
  const leave = useLeaveWaiting();
  const pass = usePassOffer();
  const offered = entry.status === 'offered' && entry.bookingId !== null;
  const wished = entry.pegs.length === 0 ? 'any peg' : `peg ${entry.pegs.join(' or ')}`;
  return (
    <View style={{ gap: space.hair }}>
      <Text weight="semibold">{`${entry.lakeName}, ${dayName(entry.day)}`}</Text>
      <Text tone="inkSoft">{`${entry.ticketName}, ${wished}, ${entry.fisheryName}`}</Text>
      <Text>{placeWords(entry)}</Text>
      <ProblemNote problem={leave.error ?? pass.error} />
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        {offered ? (
          <>
            <LinkButton
              label="Take the peg"
              href={`/tickets/bookings/${entry.bookingId ?? ''}`}
              kind="main"
            />
            <Button
              label="Let it pass, keep my place"
              kind="quiet"
              busy={pass.isPending}
              onPress={() => pass.mutate(entry.id)}
            />
          </>
        ) : null}
        <Button
          label="Leave the line"
          kind="quiet"
          spoken={`Leave the line for ${entry.lakeName}, ${dayName(entry.day)}`}
          busy={leave.isPending}
          onPress={() => leave.mutate(entry.id)}
        />
      </View>
    </View>
  );
}
