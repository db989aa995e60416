import type { ReceiptView } from '@mereward/shared/payments/contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Facts } from '@/components/facts';
import { ProblemNote } from '@/components/problem-note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { METHOD_WORDS } from '@/features/payments/method-words';
import { printReceipt } from '@/features/payments/print-receipt';
import { money } from '@/lib/format';
import { dayName } from '@/lib/format-time';
import { useMutation } from '@tanstack/react-query';

/** A receipt or credit note as it was printed: a short VAT invoice where the seller is registered. */
export function ReceiptFacts({ receipt }: { receipt: ReceiptView }) {
  const { told, taxPoint, kind, number } = receipt;
  const { seller, currency } = told;
  const print = useMutation({ mutationFn: () => printReceipt(receipt.id, number) });
  return (
    <View style={{ gap: space.small }}>
      <Text weight="semibold">{seller.name}</Text>
      {seller.address === '' ? null : <Text>{seller.address}</Text>}
      <Facts
        facts={[
          { term: kind === 'receipt' ? 'Receipt' : 'Credit note', fact: number },
          { term: 'Tax point', fact: dayName(taxPoint) },
          { term: 'VAT number', fact: seller.vatNumber },
          { term: 'For', fact: told.description },
          ...told.lines.map(({ words, grossPence }) => ({ term: words, fact: money(grossPence, currency) })),
          ...told.vat.map(({ rateBp, grossPence, vatPence, netPence }) => ({
            term: `VAT at ${String(rateBp / 100)} %`,
            fact: `${money(vatPence, currency)} in ${money(grossPence, currency)}, net ${money(netPence, currency)}`,
          })),
          { term: 'In all', fact: money(told.grossPence, currency) },
          { term: kind === 'receipt' ? 'Paid by' : 'Given back by', fact: METHOD_WORDS[told.method] },
        ]}
      />
      <View style={{ alignItems: 'flex-start' }}>
        <Button label="Save to print" busy={print.isPending} onPress={() => print.mutate()} />
      </View>
      <ProblemNote problem={print.error} />
    </View>
  );
}
