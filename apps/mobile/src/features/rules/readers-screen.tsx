import { Empty } from '@/components/empty';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { PaperButtons } from '@/components/paper-buttons';
import { StatusShape } from '@/components/status-shape';
import { Table } from '@/components/table';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { useReaders } from '@/features/rules/api';
import { readingWords, versionWords } from '@/features/rules/rule-words';
import { dayAndTime } from '@/lib/format-time';

/** Who of those still to come has read the rules, which version, when and how. */
export function RuleReadersScreen() {
  const fishery = useChosenFishery(['owner', 'manager', 'office', 'head_bailiff', 'bailiff']);
  return (
    <Page title="Who has read the rules" width="wide" back={{ label: 'Rules', href: '/office/rules' }}>
      <ChosenFishery {...fishery} none={<Empty title="No fishery">This is for its staff.</Empty>}>
        {(fisheryId) => <Readers fisheryId={fisheryId} />}
      </ChosenFishery>
    </Page>
  );
}

function Readers({ fisheryId }: { fisheryId: string }) {
  const readers = useReaders(fisheryId);
  return (
    <Loaded
      query={readers}
      waiting="Reading who has read…"
      empty={{
        when: ({ readers: all }) => all.length === 0,
        show: (
          <Empty title="No booking to come">Those who come are listed here with what they have read.</Empty>
        ),
      }}
    >
      {({ readers: all }) => (
        <Table
          caption="Bookings to come and the rules"
          csvName="rules-read"
          rows={all}
          rowKey={({ bookingId }) => bookingId}
          columns={[
            { key: 'holder', head: 'Holder', value: ({ holder }) => holder },
            { key: 'code', head: 'Booking', value: ({ code }) => code },
            {
              key: 'from',
              head: 'Comes',
              value: ({ from }) => from,
              show: ({ from, zone }) => dayAndTime(from, zone),
            },
            {
              key: 'needed',
              head: 'State',
              value: ({ needed }) => (needed ? 'still to read' : 'read'),
              show: ({ needed }) =>
                needed ? (
                  <StatusShape shape="diamond" tone="amber" word="still to read" size="small" />
                ) : (
                  <StatusShape shape="triangle" tone="reed" word="read" size="small" />
                ),
            },
            {
              key: 'version',
              head: 'Last read',
              value: ({ reading }) => (reading ? versionWords(reading.version) : null),
            },
            { key: 'how', head: 'How', value: ({ reading }) => (reading ? readingWords(reading) : null) },
            {
              key: 'at',
              head: 'When',
              value: ({ reading }) => reading?.deviceAt ?? null,
              show: ({ reading, zone }) => (reading ? dayAndTime(reading.deviceAt, zone) : null),
            },
            {
              key: 'proof',
              head: 'On paper',
              value: () => null,
              show: ({ reading, code }) =>
                reading ? (
                  <PaperButtons
                    papers={[
                      {
                        label: 'What was accepted',
                        path: `/rule-readings/${reading.id}/proof.pdf`,
                        name: `rules-accepted-${code}.pdf`,
                      },
                    ]}
                  />
                ) : null,
            },
          ]}
        />
      )}
    </Loaded>
  );
}
