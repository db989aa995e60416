import { useFormContext, useWatch } from 'react-hook-form';
import { View } from 'react-native';
import { Note } from '@/components/note';
import { Text } from '@/components/text';
import { useQuotes } from '@/features/bookings/office-api';
import type { TypedSomebody } from '@/features/bookings/somebody-draft';
import { useSettled } from '@/hooks/use-settled';
import { money } from '@/lib/format';

/** What the whole party pays and until when it fishes, with every reason against it. */
export function SomebodyCost({ start }: { start: string | null }) {
  const { control } = useFormContext<TypedSomebody>();
  const typed = useWatch({ control });
  const settled = useSettled(typed);
  const { lakeId = '', day = '' } = settled;
  const wishes = (settled.tickets ?? [])
    .filter(({ ticketTypeId }) => ticketTypeId)
    .map(({ ticketTypeId = '', rods, people }) => ({
      ticketTypeId,
      lakeId,
      day,
      start,
      rods: Math.max(1, Number(rods) || 1),
      people: Math.max(1, Number(people) || 1),
    }));
  const answers = useQuotes(wishes);
  const quotes = answers.flatMap(({ data }) => (data?.quote ? [data.quote] : []));
  const faults = [...new Set(answers.flatMap(({ data }) => (data?.fault ? [data.fault] : [])))];
  const reasons = [...new Set(quotes.flatMap((quote) => quote.reasons.map(({ words }) => words)))];
  const [first] = quotes;
  return (
    <View role="status">
      {first && quotes.length === wishes.length ? (
        <>
          <Text size="lead" weight="semibold">
            {`To pay ${money(
              quotes.reduce((sum, { grossPence }) => sum + grossPence, 0),
              first.currency,
            )}`}
          </Text>
          <Text>{first.words}</Text>
        </>
      ) : null}
      {[...faults, ...reasons].map((words) => (
        <Note key={words} kind="caution">
          {words}
        </Note>
      ))}
    </View>
  );
}
