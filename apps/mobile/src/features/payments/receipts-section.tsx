import { useState } from 'react';
import type { ReceiptListItem } from '@mereward/shared/payments/takings-contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Section } from '@/components/section';
import { Sheet } from '@/components/sheet';
import { Table } from '@/components/table';
import { useReceipts, type Period } from '@/features/payments/api';
import { METHOD_WORDS } from '@/features/payments/method-words';
import { ReceiptFacts } from '@/features/payments/receipt-facts';
import { money } from '@/lib/format';
import { dayName } from '@/lib/format-time';

type Props = { fisheryId: string; period: Period };

/** Receipts and credit notes of a period; one opened is a short VAT invoice. */
export function ReceiptsSection({ fisheryId, period }: Props) {
  const receipts = useReceipts(fisheryId, period);
  const [open, setOpen] = useState<ReceiptListItem | null>(null);
  return (
    <Section title="Receipts">
      <Loaded
        query={receipts}
        waiting="Reading the receipts…"
        empty={{
          when: (list) => list.receipts.length === 0,
          show: <Empty title="No receipt">None was written on these days.</Empty>,
        }}
      >
        {(list) => (
          <Table
            caption="Receipts"
            csvName={`receipts-${period.from}-${period.until}`}
            rows={list.receipts}
            rowKey={({ id }) => id}
            columns={[
              { key: 'number', head: 'Number', value: ({ number }) => number },
              {
                key: 'kind',
                head: 'What',
                value: ({ kind }) => (kind === 'receipt' ? 'Receipt' : 'Credit note'),
              },
              {
                key: 'taxPoint',
                head: 'Tax point',
                value: ({ taxPoint }) => taxPoint,
                show: ({ taxPoint }) => dayName(taxPoint),
              },
              { key: 'holder', head: 'Holder', value: ({ holder }) => holder },
              { key: 'method', head: 'Paid by', value: ({ told }) => METHOD_WORDS[told.method] },
              {
                key: 'gross',
                head: 'In all',
                value: ({ told }) => told.grossPence / 100,
                show: ({ told }) => money(told.grossPence, told.currency),
                figures: true,
              },
              {
                key: 'open',
                head: 'Open',
                value: () => '',
                show: (receipt) => (
                  <Button
                    label="Open"
                    kind="quiet"
                    spoken={`Open ${receipt.kind === 'receipt' ? 'receipt' : 'credit note'} ${receipt.number}`}
                    onPress={() => setOpen(receipt)}
                  />
                ),
              },
            ]}
          />
        )}
      </Loaded>
      <Sheet
        open={open !== null}
        onClose={() => setOpen(null)}
        title={open?.kind === 'credit_note' ? 'Credit note' : 'Receipt'}
      >
        {open ? (
          <>
            <ReceiptFacts receipt={open} />
            <View style={{ alignItems: 'flex-start' }}>
              <LinkButton label="The booking" href={`/office/bookings/${open.bookingId}`} />
            </View>
          </>
        ) : null}
      </Sheet>
    </Section>
  );
}
