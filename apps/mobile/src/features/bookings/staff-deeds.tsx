import { useState } from 'react';
import type { BookingView } from '@mereward/shared/bookings/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Confirm } from '@/components/confirm';
import { Heading } from '@/components/heading';
import { Kept } from '@/components/kept';
import { LinkButton } from '@/components/link-button';
import { ProblemNote } from '@/components/problem-note';
import { space } from '@/constants/layout';
import { AskRefund } from '@/features/bookings/ask-refund';
import { CancelFor } from '@/features/bookings/cancel-for';
import { useStaffDeed, type StaffDeed } from '@/features/bookings/office-api';
import { TakeMoney } from '@/features/bookings/take-money';

type Asked = 'money' | 'refund' | 'cancel';

const SURE: Readonly<Record<StaffDeed, { title: string; words: string; act: string; done: string } | null>> =
  {
    'check-in': null,
    finish: {
      title: 'Have they gone home?',
      words: 'The rest of the peg’s time is free for others from now on. Nothing goes back for it.',
      act: 'They have gone home',
      done: 'Over: the peg is free.',
    },
    'no-show': {
      title: 'Did nobody come?',
      words: 'It is written down that nobody came. The peg stays theirs until you let it go to others.',
      act: 'Nobody came',
      done: 'Written down: nobody came.',
    },
    'let-go': {
      title: 'Let the peg go to others?',
      words: 'Whoever comes late has no peg then. Nothing goes back unless you give it.',
      act: 'Let it go',
      done: 'The peg is free for others.',
    },
  };

type Props = {
  booking: BookingView;
  /** Opened at once: a booking just made is paid next. */
  first?: Asked | undefined;
  bank?: boolean | undefined;
};

/** What staff may do with a booking, each where it may be done. */
export function StaffDeeds({ booking, first, bank }: Props) {
  const { may } = booking;
  const [open, setOpen] = useState<Asked | null>(
    first === 'money' && !may.takeMoney ? null : (first ?? null),
  );
  const [sure, setSure] = useState<StaffDeed | null>(null);
  const [kept, setKept] = useState<string | null>(null);
  const deed = useStaffDeed(booking.id);
  const act = (which: StaffDeed, done: string): void =>
    deed.mutate(which, { onSuccess: () => setKept(done), onSettled: () => setSure(null) });
  const turn = (which: Asked): void => {
    setKept(null);
    setOpen(open === which ? null : which);
  };
  const done = (words: string): void => {
    setOpen(null);
    setKept(words);
  };
  const asked = sure ? SURE[sure] : null;
  return (
    <View style={{ gap: space.medium }}>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        {may.checkIn ? (
          <Button
            label="Check in"
            kind="main"
            bank={bank}
            busy={deed.isPending}
            onPress={() => act('check-in', 'They are on the bank.')}
          />
        ) : null}
        {may.takeMoney ? <Button label="Take money" bank={bank} onPress={() => turn('money')} /> : null}
        {may.move ? (
          <LinkButton label="Move" bank={bank} href={`/tickets/bookings/${booking.id}/move`} />
        ) : null}
        {may.finish ? <Button label="Gone home" bank={bank} onPress={() => setSure('finish')} /> : null}
        {may.noShow ? <Button label="Nobody came" bank={bank} onPress={() => setSure('no-show')} /> : null}
        {may.letGo ? <Button label="Let the peg go" bank={bank} onPress={() => setSure('let-go')} /> : null}
        {may.refund ? <Button label="Give money back" bank={bank} onPress={() => turn('refund')} /> : null}
        {may.cancel ? <Button label="Cancel" bank={bank} onPress={() => turn('cancel')} /> : null}
      </View>
      <Kept words={kept} />
      <ProblemNote problem={deed.error} />
      {open === 'money' && may.takeMoney ? (
        <>
          <Heading level={3}>Take money</Heading>
          <TakeMoney
            key={booking.version}
            booking={booking}
            onDone={() => done('Paid, and the receipt is written.')}
          />
        </>
      ) : null}
      {open === 'refund' && may.refund ? (
        <>
          <Heading level={3}>Give money back</Heading>
          <AskRefund key={booking.version} booking={booking} onDone={done} />
        </>
      ) : null}
      {open === 'cancel' && may.cancel ? (
        <>
          <Heading level={3}>Cancel the booking</Heading>
          <CancelFor booking={booking} onDone={() => done('Cancelled.')} onLeave={() => setOpen(null)} />
        </>
      ) : null}
      {sure && asked ? (
        <Confirm
          open
          title={asked.title}
          words={asked.words}
          act={asked.act}
          busy={deed.isPending}
          onClose={() => setSure(null)}
          onAct={() => act(sure, asked.done)}
        />
      ) : null}
    </View>
  );
}
