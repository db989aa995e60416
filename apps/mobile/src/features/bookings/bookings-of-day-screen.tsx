import { useState } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import { bookingCodeWords } from '@mereward/shared/bookings/booking-code';
import { addDays } from '@mereward/shared/time/zoned';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Empty } from '@/components/empty';
import { Field } from '@/components/field';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Select } from '@/components/select';
import { StatusShape } from '@/components/status-shape';
import { Table } from '@/components/table';
import { space } from '@/constants/layout';
import { CodeSearch } from '@/features/bookings/code-search';
import { useBookingsOfDay } from '@/features/bookings/office-api';
import {
  passes,
  pegsOf,
  STAFF_LOOKS,
  STATE_FILTERS,
  type StateFilter,
} from '@/features/bookings/office-booking-words';
import { paidWords } from '@/features/bookings/paid-words';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { useFishery } from '@/features/fisheries/office-api';
import { clockTime, dayName } from '@/lib/format-time';
import { civilTime } from '@/lib/zoned-time';

const READERS = ['owner', 'manager', 'office', 'head_bailiff'] as const;
const DAY = /^\d{4}-\d\d-\d\d$/;
const EVERY_LAKE = 'every';

/** The bookings that run on a day: found by code or name, filtered, saved as CSV. */
export function BookingsOfDayScreen() {
  const fisheries = useChosenFishery(READERS);
  return (
    <Page title="Bookings" width="wide" back={{ label: 'Office', href: '/office' }}>
      <ChosenFishery
        {...fisheries}
        none={
          <Empty title="Not yours to see" action={<LinkButton label="To the office" href="/office" />}>
            The office and the head bailiff see everybody’s bookings.
          </Empty>
        }
      >
        {(fisheryId) => <Bookings fisheryId={fisheryId} />}
      </ChosenFishery>
    </Page>
  );
}

function Bookings({ fisheryId }: { fisheryId: string }) {
  const router = useRouter();
  const { day: asked } = useLocalSearchParams<{ day?: string }>();
  const about = useFishery(fisheryId);
  const [nowMs] = useState(() => Date.now());
  const today = about.data ? civilTime(nowMs, about.data.details.zone).slice(0, 10) : '';
  const day = asked && DAY.test(asked) ? asked : today;
  const goTo = (to: string): void => router.setParams({ day: to });
  return (
    <>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.page, alignItems: 'flex-end' }}>
        <View style={{ flexGrow: 1 }}>
          <CodeSearch fisheryId={fisheryId} onFound={({ id }) => router.push(`/office/bookings/${id}`)} />
        </View>
        <LinkButton
          label="Book for somebody"
          kind="main"
          href={`/office/bookings/new?fisheryId=${fisheryId}&day=${day}`}
        />
      </View>
      {day === '' ? null : (
        <Section title={dayName(day)}>
          <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, alignItems: 'flex-end' }}>
            <View style={{ flexBasis: 170 }}>
              <Field
                label="Day"
                picker="date"
                value={day}
                onChange={(to) => {
                  if (DAY.test(to)) goTo(to);
                }}
              />
            </View>
            <Button label="Day before" onPress={() => goTo(addDays(day, -1))} />
            <Button label="Today" onPress={() => goTo(today)} />
            <Button label="Day after" onPress={() => goTo(addDays(day, 1))} />
          </View>
          <DayTable fisheryId={fisheryId} day={day} />
        </Section>
      )}
    </>
  );
}

function DayTable({ fisheryId, day }: { fisheryId: string; day: string }) {
  const bookings = useBookingsOfDay(fisheryId, day);
  const [filter, setFilter] = useState<StateFilter>('all');
  const [lake, setLake] = useState(EVERY_LAKE);
  return (
    <Loaded
      query={bookings}
      waiting="Reading the bookings…"
      empty={{
        when: (list) => list.bookings.length === 0,
        show: <Empty title="Nothing is booked">{`Nobody has a ticket for ${dayName(day)}.`}</Empty>,
      }}
    >
      {(list) => {
        const lakes = [...new Set(list.bookings.flatMap(({ lakeName }) => lakeName ?? []))].sort();
        const rows = list.bookings.filter(
          (booking) => passes(booking, filter) && (lake === EVERY_LAKE || booking.lakeName === lake),
        );
        return (
          <>
            <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.medium }}>
              <View style={{ flexBasis: 220 }}>
                <Select label="Which" choices={STATE_FILTERS} value={filter} onChange={setFilter} />
              </View>
              {lakes.length > 1 ? (
                <View style={{ flexBasis: 220 }}>
                  <Select
                    label="Lake"
                    choices={[
                      { key: EVERY_LAKE, label: 'Every lake' },
                      ...lakes.map((name) => ({ key: name, label: name })),
                    ]}
                    value={lake}
                    onChange={setLake}
                  />
                </View>
              ) : null}
            </View>
            <Table
              caption={`Bookings of ${dayName(day)}`}
              csvName={`bookings-${day}`}
              filter
              rows={rows}
              rowKey={({ id }) => id}
              href={({ id }) => `/office/bookings/${id}`}
              columns={[
                { key: 'holder', head: 'Holder', value: ({ holder }) => holder },
                { key: 'code', head: 'Code', value: ({ code }) => bookingCodeWords(code) },
                { key: 'peg', head: 'Peg', value: pegsOf },
                { key: 'lake', head: 'Lake', value: ({ lakeName }) => lakeName },
                { key: 'ticket', head: 'Ticket', value: ({ ticketName }) => ticketName },
                {
                  key: 'from',
                  head: 'From',
                  value: ({ from }) => from,
                  show: ({ from, zone }) => timeOn(from, zone, day),
                },
                {
                  key: 'until',
                  head: 'Until',
                  value: ({ until }) => until,
                  show: ({ until, zone }) => timeOn(until, zone, day),
                },
                { key: 'people', head: 'People', value: ({ people }) => people, figures: true },
                { key: 'rods', head: 'Rods', value: ({ rods }) => rods, figures: true },
                {
                  key: 'state',
                  head: 'State',
                  value: ({ status, notYet }) =>
                    STAFF_LOOKS[status].word + (notYet.length > 0 ? ', not good yet' : ''),
                  show: ({ status, notYet }) => (
                    <View>
                      <StatusShape {...STAFF_LOOKS[status]} size="small" />
                      {notYet.length > 0 ? (
                        <StatusShape shape="diamond" tone="amber" word="not good yet" size="small" />
                      ) : null}
                    </View>
                  ),
                },
                { key: 'money', head: 'Money', value: paidShort },
              ]}
            />
          </>
        );
      }}
    </Loaded>
  );
}

const paidShort = (
  booking: Parameters<typeof paidWords>[0] | Omit<Parameters<typeof paidWords>[0], 'refundedPence'>,
): string => paidWords({ refundedPence: 0, ...booking });

/** The clock time where it is that day's, else with its day in front. */
function timeOn(at: string, zone: string, day: string): string {
  const civil = civilTime(Date.parse(at), zone).slice(0, 10);
  return civil === day
    ? clockTime(at, zone)
    : `${dayName(civil).split(' ').slice(0, 3).join(' ')}, ${clockTime(at, zone)}`;
}
