import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import type { TicketTypeView } from '@mereward/shared/tickets/contract';
import { FormProvider } from 'react-hook-form';
import { View } from 'react-native';
import { DraftFormFrame } from '@/components/draft-form-frame';
import { Empty } from '@/components/empty';
import { FormSelect } from '@/components/form-controls';
import { FormField } from '@/components/form-field';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { space } from '@/constants/layout';
import { bookForSomebody, useFreeFor } from '@/features/bookings/office-api';
import { SomebodyCost } from '@/features/bookings/somebody-cost';
import {
  bookingFor,
  FIRST_TICKET,
  SomebodyDraft,
  type Somebody,
  type TypedSomebody,
} from '@/features/bookings/somebody-draft';
import { SomebodyTickets } from '@/features/bookings/somebody-tickets';
import { useFishery } from '@/features/fisheries/office-api';
import { OFFICE_ROLES, useMyFisheries } from '@/features/fisheries/use-my-fisheries';
import { startsOf } from '@/features/tickets/kind-words';
import { useTicketTypes } from '@/features/tickets/office-api';
import { useDraftForm, type DraftForm } from '@/hooks/use-draft-form';
import { newId } from '@/lib/new-id';
import { civilTime } from '@/lib/zoned-time';

type Asked = { fisheryId?: string; lakeId?: string; pegId?: string; day?: string };

/** Books for somebody at the lodge or on the phone, with or without an account. */
export function BookForSomebodyScreen() {
  const asked = useLocalSearchParams<Asked>();
  const { all, mine } = useMyFisheries(OFFICE_ROLES);
  const fishery =
    mine.find(({ id, lakes }) =>
      asked.lakeId ? lakes.some((lake) => lake.id === asked.lakeId) : id === asked.fisheryId,
    ) ?? mine[0];
  return (
    <Page
      title="Book for somebody"
      {...(fishery ? { over: fishery.name } : {})}
      back={{ label: 'Bookings', href: '/office/bookings' }}
    >
      <Loaded
        query={all}
        waiting="Reading the fishery…"
        empty={{
          when: () => fishery === undefined,
          show: <Empty title="Not yours to book">The office books for others.</Empty>,
        }}
      >
        {() => (fishery ? <Kinds key={fishery.id} fishery={fishery} asked={asked} /> : null)}
      </Loaded>
    </Page>
  );
}

type Props = { fishery: FisheryListItem; asked: Asked };

function Kinds({ fishery, asked }: Props) {
  const kinds = useTicketTypes(fishery.id);
  const about = useFishery(fishery.id);
  return (
    <Loaded
      query={kinds}
      waiting="Reading the tickets…"
      empty={{
        when: ({ ticketTypes }) => ticketTypes.length === 0,
        show: (
          <Empty
            title="Nothing is sold yet"
            action={<LinkButton label="Tickets and prices" href="/office/tickets" kind="main" />}
          >
            Put a kind of ticket on sale first.
          </Empty>
        ),
      }}
    >
      {({ ticketTypes }) => (
        <Loaded query={about} waiting="Reading the fishery…">
          {({ details }) => (
            <SomebodyForm fishery={fishery} asked={asked} kinds={ticketTypes} zone={details.zone} />
          )}
        </Loaded>
      )}
    </Loaded>
  );
}

type FormProps = Props & { kinds: readonly TicketTypeView[]; zone: string };

function SomebodyForm({ fishery, asked, kinds, zone }: FormProps) {
  const router = useRouter();
  const [id] = useState(newId);
  const [today] = useState(() => civilTime(Date.now(), zone).slice(0, 10));
  const lakeId = asked.lakeId ?? fishery.lakes[0]?.id ?? '';
  const soldAt = (lake: string) => kinds.filter(({ details }) => details.lakeIds.includes(lake));
  const form: DraftForm<TypedSomebody, Somebody> = useDraftForm({
    form: `book-for:${lakeId}:${asked.pegId ?? ''}:${asked.day ?? ''}`,
    schema: SomebodyDraft,
    start: {
      lakeId,
      day: asked.day ?? today,
      start: '',
      holder: { name: '', email: '' },
      vehicle: '',
      note: '',
      tickets: [{ ...FIRST_TICKET, ticketTypeId: soldAt(lakeId)[0]?.id ?? '', pegId: asked.pegId ?? '' }],
    },
    send: (typed) => bookForSomebody(fishery.id, bookingFor(typed, { id, starts, juniorTypes })),
    onDone: (booking) => {
      form.startAfresh();
      router.replace(`/office/bookings/${booking.id}?made=yes`);
    },
  });
  const { control } = form;
  const now = form.watch();
  const sold = soldAt(now.lakeId);
  const first = sold.find(({ id: typeId }) => typeId === now.tickets[0]?.ticketTypeId);
  const starts = first ? startsOf(first.details) : [];
  const start = starts.includes(now.start) ? now.start : (starts[0] ?? null);
  const juniorTypes = new Set(
    kinds.filter(({ details }) => details.audience === 'junior').map((kind) => kind.id),
  );
  const free = useFreeFor({
    fisheryId: fishery.id,
    lakeId: now.lakeId,
    day: now.day,
    ticketTypeId: first?.id ?? '',
    start,
  });
  return (
    <FormProvider {...form}>
      <DraftFormFrame
        form={form}
        label="Book for somebody"
        act="Book it"
        busyLabel="Booking…"
        beside={<LinkButton label="Leave it" href="/office/bookings" />}
      >
        <FormField control={control} name="holder.name" label="Name" />
        <FormField
          control={control}
          name="holder.email"
          label="E-mail"
          hint="With one they are written to, and an account of that address holds the ticket."
          keypad="email"
          optional
        />
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium }}>
          {fishery.lakes.length > 1 ? (
            <View style={{ flexGrow: 1, flexBasis: 190 }}>
              <FormSelect
                control={control}
                name="lakeId"
                label="Lake"
                choices={fishery.lakes.map((lake) => ({ key: lake.id, label: lake.name }))}
              />
            </View>
          ) : null}
          <View style={{ flexGrow: 1, flexBasis: 160 }}>
            <FormField control={control} name="day" label="Day" picker="date" />
          </View>
          {starts.length > 1 ? (
            <View style={{ flexGrow: 1, flexBasis: 120 }}>
              <FormSelect
                control={control}
                name="start"
                label="Start"
                choices={starts.map((clock) => ({ key: clock, label: clock }))}
                unset={start ?? 'Choose a start'}
              />
            </View>
          ) : null}
        </View>
        <Section title="Tickets">
          {sold.length === 0 ? (
            <Note kind="caution">
              Nothing is sold for this lake: choose another, or put a ticket on sale.
            </Note>
          ) : null}
          <SomebodyTickets kinds={sold} free={free.data} />
          {free.data?.whyNot ? <Note kind="caution">{free.data.whyNot}</Note> : null}
        </Section>
        <FormField control={control} name="vehicle" label="Vehicle’s number" optional />
        <FormField control={control} name="note" label="Note" lines={2} optional />
        <SomebodyCost start={start} />
      </DraftFormFrame>
    </FormProvider>
  );
}
