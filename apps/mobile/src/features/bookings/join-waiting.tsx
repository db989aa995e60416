import { useState } from 'react';
import type { FreePeg } from '@mereward/shared/bookings/availability-contract';
import type { WaitingWish } from '@mereward/shared/bookings/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { LinkButton } from '@/components/link-button';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { findAddress, type FindChoice } from '@/features/bookings/find-choice';
import { useJoinWaiting, useMyWaiting } from '@/features/bookings/waiting-api';
import { placeWords } from '@/features/bookings/waiting-words';
import { dayName } from '@/lib/format-time';
import { newId } from '@/lib/new-id';
import { useSession } from '@/lib/session';

type Props = {
  lakeId: string;
  lakeName: string;
  peg: FreePeg;
  day: string;
  wish: Omit<WaitingWish, 'pegIds'>;
  choice: FindChoice;
};

/** To wait for this peg, or for any of the lake, on a day that is full. */
export function JoinWaiting({ lakeId, lakeName, peg, day, wish, choice }: Props) {
  const { account } = useSession();
  const join = useJoinWaiting(lakeId);
  const mine = useMyWaiting(account !== null);
  const [id] = useState(newId);
  const standing = mine.data?.waiting.find((each) => each.lakeId === lakeId && each.day === day);
  if (standing)
    return (
      <Note title={`You wait for ${dayName(day)} on ${lakeName}`}>
        <Text>{placeWords(standing)}</Text>
        <LinkButton label="My tickets" href="/tickets/mine" />
      </Note>
    );
  if (account === null)
    return (
      <LinkButton
        label="Sign in to wait for it"
        href={`/sign-in?next=${encodeURIComponent(findAddress(choice))}`}
      />
    );
  const wait = (pegIds: string[]): void => join.mutate({ id, day, wish: { ...wish, pegIds } });
  return (
    <View style={{ gap: space.small }}>
      <Text weight="semibold">{`Wait for ${dayName(day)}`}</Text>
      <Text tone="inkSoft">
        When one comes free it is offered to you by letter, first come first served, and kept for half an hour
        or so; never at night.
      </Text>
      <ProblemNote problem={join.error} />
      <Button label={`Wait for peg ${peg.number}`} busy={join.isPending} onPress={() => wait([peg.pegId])} />
      <Button label={`Wait for any peg of ${lakeName}`} kind="quiet" onPress={() => wait([])} />
    </View>
  );
}
