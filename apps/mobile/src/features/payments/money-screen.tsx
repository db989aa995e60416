import { useState } from 'react';
import type { FisheryView } from '@mereward/shared/fisheries/contract';
import { useMutation } from '@tanstack/react-query';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Empty } from '@/components/empty';
import { Field } from '@/components/field';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { ProblemNote } from '@/components/problem-note';
import { space } from '@/constants/layout';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { useFishery } from '@/features/fisheries/office-api';
import { OFFICE_ROLES } from '@/features/fisheries/use-my-fisheries';
import type { Period } from '@/features/payments/api';
import { LedgerSection } from '@/features/payments/ledger-section';
import { periodFault, periodOf, PERIODS } from '@/features/payments/period';
import { QueueSection } from '@/features/payments/queue-section';
import { ReceiptsSection } from '@/features/payments/receipts-section';
import { saveBookings } from '@/features/payments/save-bookings';
import { TakingsSection } from '@/features/payments/takings-section';
import { civilTime } from '@/lib/zoned-time';

/** Takings, receipts, refunds that wait and the ledger. */
export function MoneyScreen() {
  const fisheries = useChosenFishery(OFFICE_ROLES);
  return (
    <Page title="Money" width="wide" back={{ label: 'Office', href: '/office' }}>
      <ChosenFishery
        {...fisheries}
        none={
          <Empty title="Not yours to see" action={<LinkButton label="To the office" href="/office" />}>
            The owner, a manager and the office see the money.
          </Empty>
        }
      >
        {(fisheryId) => <About fisheryId={fisheryId} />}
      </ChosenFishery>
    </Page>
  );
}

function About({ fisheryId }: { fisheryId: string }) {
  const fishery = useFishery(fisheryId);
  return (
    <Loaded query={fishery} waiting="Reading the fishery…">
      {(value) => <Books fishery={value} />}
    </Loaded>
  );
}

function Books({ fishery: { id, details } }: { fishery: FisheryView }) {
  const [today] = useState(() => civilTime(Date.now(), details.zone).slice(0, 10));
  const [period, setPeriod] = useState<Period>(() => periodOf('week', today));
  const save = useMutation({ mutationFn: () => saveBookings(id, period) });
  const fault = periodFault(period);
  return (
    <>
      <QueueSection fisheryId={id} />
      <View
        role="group"
        aria-label="Period"
        style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, alignItems: 'flex-end' }}
      >
        <View style={{ flexBasis: 170 }}>
          <Field
            label="From"
            picker="date"
            value={period.from}
            onChange={(from) => setPeriod({ ...period, from })}
          />
        </View>
        <View style={{ flexBasis: 170 }}>
          <Field
            label="To, included"
            picker="date"
            value={period.until}
            onChange={(until) => setPeriod({ ...period, until })}
          />
        </View>
        {PERIODS.map(({ key, label }) => (
          <Button key={key} label={label} onPress={() => setPeriod(periodOf(key, today))} />
        ))}
        {fault ? null : (
          <Button label="Bookings as CSV" busy={save.isPending} onPress={() => save.mutate()} />
        )}
      </View>
      <ProblemNote problem={save.error} />
      {fault ? (
        <Note kind="caution" live>
          {fault}
        </Note>
      ) : (
        <>
          <TakingsSection fisheryId={id} period={period} />
          <ReceiptsSection fisheryId={id} period={period} />
        </>
      )}
      <LedgerSection fisheryId={id} />
    </>
  );
}
