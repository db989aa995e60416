import type { BookingView } from '@mereward/shared/bookings/contract';
import type { ReceiptView } from '@mereward/shared/payments/contract';
import { View } from 'react-native';
import { Disclosure } from '@/components/disclosure';
import { Facts } from '@/components/facts';
import { Text } from '@/components/text';
import { money } from '@/lib/format';
import { dayName } from '@/lib/format-time';

/** Receipts and credit notes of a booking, as they were printed. */
export function ReceiptsPart({ booking: { receipts } }: { booking: BookingView }) {
  if (receipts.length === 0) return null;
  return (
    <View>
      {receipts.map((receipt) => (
        <Disclosure
          key={receipt.id}
          title={`${receipt.kind === 'receipt' ? 'Receipt' : 'Credit note'} ${receipt.number}, ${money(receipt.told.grossPence, receipt.told.currency)}`}
        >
          <Receipt receipt={receipt} />
        </Disclosure>
      ))}
    </View>
  );
}

function Receipt({ receipt: { told, taxPoint } }: { receipt: ReceiptView }) {
  const { seller, currency } = told;
  return (
    <>
      <Text weight="semibold">{seller.name}</Text>
      {seller.address === '' ? null : <Text>{seller.address}</Text>}
      <Facts
        facts={[
          { term: 'VAT number', fact: seller.vatNumber },
          { term: 'Date', fact: dayName(taxPoint) },
          { term: 'For', fact: told.description },
          ...told.lines.map(({ words, grossPence }) => ({ term: words, fact: money(grossPence, currency) })),
          ...told.vat.map(({ rateBp, grossPence, vatPence, netPence }) => ({
            term: `VAT at ${String(rateBp / 100)} %`,
            fact: `${money(vatPence, currency)} in ${money(grossPence, currency)}; net ${money(netPence, currency)}`,
          })),
          { term: 'In all', fact: money(told.grossPence, currency) },
        ]}
      />
    </>
  );
}
