import { useState } from 'react';
import type { TakingsKey, TakingsSumView, TakingsView } from '@mereward/shared/payments/takings-contract';
import { View } from 'react-native';
import { Figure } from '@/components/figure';
import { Empty } from '@/components/empty';
import { Loaded } from '@/components/loaded';
import { Section } from '@/components/section';
import { Select } from '@/components/select';
import { Table } from '@/components/table';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useTakings, type Period } from '@/features/payments/api';
import { money } from '@/lib/format';

const KEYS = [
  { key: 'day', label: 'Day' },
  { key: 'month', label: 'Month' },
  { key: 'lake', label: 'Lake' },
  { key: 'ticketType', label: 'Kind of ticket' },
  { key: 'method', label: 'How it was paid' },
  { key: 'vatRate', label: 'Rate of VAT' },
] as const satisfies readonly { key: TakingsKey; label: string }[];

type Props = { fisheryId: string; period: Period };

/** Takings of a period by one key, with the totals they add up to. */
export function TakingsSection({ fisheryId, period }: Props) {
  const [by, setBy] = useState<TakingsKey>('day');
  const takings = useTakings(fisheryId, period, by);
  return (
    <Section title="Takings" note="By the day the money was taken or given back, whatever day it was for.">
      <View style={{ maxWidth: 260 }}>
        <Select label="Added up by" choices={KEYS} value={by} onChange={setBy} />
      </View>
      <Loaded
        query={takings}
        waiting="Adding up…"
        empty={{
          when: ({ sums }) => sums.length === 0,
          show: <Empty title="Nothing taken">No money was taken or given back on these days.</Empty>,
        }}
      >
        {(view) => (
          <>
            <Totals takings={view} />
            <SumsTable
              takings={view}
              head={KEYS.find(({ key }) => key === by)?.label ?? 'By'}
              period={period}
            />
          </>
        )}
      </Loaded>
    </Section>
  );
}

/** A sum of a table's column against the total the server told: they must be one figure. */
export const addsUp = ({ sums, total }: Pick<TakingsView, 'sums' | 'total'>): boolean =>
  (['soldPence', 'refundedPence', 'keptPence', 'vatPence', 'netPence'] as const).every(
    (column) => sums.reduce((sum, row) => sum + row[column], 0) === total[column],
  );

function Totals({ takings }: { takings: TakingsView }) {
  const { total, currency } = takings;
  return (
    <>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.wide }}>
        <Figure
          figure={money(total.keptPence, currency)}
          caption={`kept, of ${money(total.soldPence, currency)} sold`}
        />
        <Figure figure={money(total.refundedPence, currency)} caption="given back" />
        <Figure figure={money(total.vatPence, currency)} caption="VAT in it" />
        <Figure figure={money(total.netPence, currency)} caption="net of VAT" />
      </View>
      <Text size="small" tone={addsUp(takings) ? 'inkSoft' : 'brick'}>
        {addsUp(takings)
          ? 'The rows add up to these figures.'
          : 'The rows do not add up to these figures: read the page again, and tell whoever keeps Mereward if it stays so.'}
      </Text>
    </>
  );
}

type TableProps = { takings: TakingsView; head: string; period: Period };

function SumsTable({ takings: { sums, currency }, head, period }: TableProps) {
  const column = (
    key: 'soldPence' | 'refundedPence' | 'keptPence' | 'vatPence' | 'netPence',
    title: string,
  ) => ({
    key,
    head: title,
    value: (row: TakingsSumView) => row[key] / 100,
    show: (row: TakingsSumView) => money(row[key], currency),
    figures: true,
  });
  return (
    <Table
      caption={`Takings by ${head.toLowerCase()}`}
      csvName={`takings-${period.from}-${period.until}`}
      rows={sums}
      rowKey={({ key }) => key}
      columns={[
        { key: 'words', head, value: ({ words }) => words },
        { key: 'sales', head: 'Sales', value: ({ sales }) => sales, figures: true },
        column('soldPence', 'Sold'),
        column('refundedPence', 'Given back'),
        column('keptPence', 'Kept'),
        column('vatPence', 'VAT'),
        column('netPence', 'Net'),
      ]}
    />
  );
}
