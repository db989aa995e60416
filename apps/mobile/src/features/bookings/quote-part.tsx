import { View } from 'react-native';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useQuote, type QuoteWish } from '@/features/bookings/free-api';
import { PriceLines } from '@/features/bookings/price-lines';

/** The price line by line, and what stands in the way of this reader's having it. */
export function QuotePart({ wish }: { wish: QuoteWish }) {
  const quote = useQuote(wish);
  return (
    <Loaded query={quote} waiting="Reckoning the price…">
      {({ quote: told, fault }) =>
        told === null ? (
          <Note kind="caution">{fault}</Note>
        ) : (
          <View style={{ gap: space.small }}>
            <PriceLines lines={told.lines} grossPence={told.grossPence} currency={told.currency} />
            {told.reasons.length > 0 ? (
              <Note kind="caution" title="Not to be had as it stands">
                {told.reasons.map(({ code, words }) => (
                  <Text key={code}>{words}</Text>
                ))}
              </Note>
            ) : null}
          </View>
        )
      }
    </Loaded>
  );
}
