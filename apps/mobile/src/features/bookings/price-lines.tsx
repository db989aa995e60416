import type { PriceLineView } from '@mereward/shared/tickets/contract';
import { View } from 'react-native';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { themed } from '@/hooks/themed';
import { money } from '@/lib/format';

const useStyles = themed((c) => ({
  line: { flexDirection: 'row', gap: space.medium, paddingVertical: space.hair },
  total: { borderTopWidth: 1, borderTopColor: c.rule, paddingTop: space.small },
  words: { flex: 1, minWidth: 0 },
}));

type Props = {
  lines: readonly PriceLineView[];
  grossPence: number;
  currency: string;
  /** What stands before the sum: "To pay". */
  total?: string | undefined;
};

/** A price line by line, VAT included and said, and its sum. */
export function PriceLines({ lines, grossPence, currency, total = 'Total' }: Props) {
  const styles = useStyles();
  return (
    <View role="list" aria-label="Price">
      {lines.map((line, i) => (
        <View key={`${String(i)} ${line.words}`} role="listitem" style={styles.line}>
          <Text style={styles.words}>
            {line.count === 1 ? line.words : `${String(line.count)} × ${line.words}`}
          </Text>
          <Text>{money(line.grossPence, currency)}</Text>
        </View>
      ))}
      <View role="listitem" style={[styles.line, styles.total]}>
        <Text weight="semibold" style={styles.words}>
          {total}
        </Text>
        <Text weight="semibold">{money(grossPence, currency)}</Text>
      </View>
      <Text size="small" tone="inkSoft">
        {vatWords(lines, currency)}
      </Text>
    </View>
  );
}

/** "£4.67 VAT at 20 % is in it."; nothing to say gives the plain sentence. */
export function vatWords(lines: readonly PriceLineView[], currency: string): string {
  const rates = [...new Set(lines.filter(({ vatPence }) => vatPence > 0).map(({ vatRateBp }) => vatRateBp))];
  if (rates.length === 0) return 'No VAT is charged on it.';
  const parts = rates.map((rate) => {
    const pence = lines
      .filter(({ vatRateBp }) => vatRateBp === rate)
      .reduce((sum, { vatPence }) => sum + vatPence, 0);
    return `${money(pence, currency)} VAT at ${String(rate / 100)} %`;
  });
  return `${parts.join(' and ')} ${parts.length === 1 ? 'is' : 'are'} in it.`;
}
