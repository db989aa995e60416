import { useMemo, useState } from 'react';
import type { FisheryListItem } from '@mereward/shared/fisheries/contract';
import { useFormContext, useWatch } from 'react-hook-form';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Field } from '@/components/field';
import { Heading } from '@/components/heading';
import { Note } from '@/components/note';
import { ProblemNote } from '@/components/problem-note';
import { Select } from '@/components/select';
import { Stepper } from '@/components/stepper';
import { Text } from '@/components/text';
import { radius, space } from '@/constants/layout';
import type { HoldsTicketType } from '@/features/tickets/holds-ticket-type';
import { useDraftQuote } from '@/features/tickets/office-api';
import { eveOfClockChange, quoteDraft, saturdayFrom, startsOfKind } from '@/features/tickets/quote-draft';
import { TicketTypeDraft } from '@/features/tickets/ticket-type-draft';
import { themed } from '@/hooks/themed';
import { useSettled } from '@/hooks/use-settled';
import { money } from '@/lib/format';

const useStyles = themed((c) => ({
  sheet: {
    gap: space.medium,
    padding: space.page,
    borderWidth: 1,
    borderColor: c.rule,
    borderRadius: radius.control,
    backgroundColor: c.sheet,
  },
}));

type Props = { fishery: FisheryListItem; zone: string; today: string };

/** What the ticket in the form would cost and when it would end, for a day to try it on; asked as it is typed. */
export function TicketQuote({ fishery, zone, today }: Props) {
  const styles = useStyles();
  const { control } = useFormContext<HoldsTicketType>();
  const typed = useWatch({ control, name: 'details' });
  const [day, setDay] = useState(() => saturdayFrom(today));
  const [start, setStart] = useState('');
  const [rods, setRods] = useState<number | null>(null);
  const [lakeId, setLakeId] = useState('');
  const settled = useSettled(typed);
  const read = useMemo(() => TicketTypeDraft.safeParse(settled), [settled]);
  const details = read.data ?? null;
  const draft =
    details && day !== ''
      ? quoteDraft(details, { lakeId, day, start, rods: rods ?? details.rodsIncluded })
      : null;
  const quote = useDraftQuote(fishery.id, draft);
  const eve = useMemo(() => eveOfClockChange(today, zone), [today, zone]);
  const starts = details ? startsOfKind(details) : [];
  const lakes = fishery.lakes.filter(({ id }) => details?.lakeIds.includes(id));
  return (
    <View role="region" aria-label="Try it on a day" style={styles.sheet}>
      <Heading level={2}>Try it on a day</Heading>
      <Field label="Day" picker="date" value={day} onChange={setDay} />
      {starts.length > 1 ? (
        <Select
          label="Start"
          choices={starts.map((at) => ({ key: at, label: at }))}
          value={draft?.choice.start ?? null}
          onChange={setStart}
        />
      ) : null}
      {lakes.length > 1 ? (
        <Select
          label="Lake"
          choices={lakes.map(({ id, name }) => ({ key: id, label: name }))}
          value={draft?.lakeId ?? null}
          onChange={setLakeId}
        />
      ) : null}
      {details && details.rodsMost > 1 ? (
        <Stepper
          label="Rods"
          value={rods ?? details.rodsIncluded}
          onChange={setRods}
          min={1}
          max={details.rodsMost}
          step={1}
        />
      ) : null}
      {eve ? (
        <View style={{ alignItems: 'flex-start' }}>
          <Button label="Over the next clock change" onPress={() => setDay(eve)} />
        </View>
      ) : null}
      <View role="status" style={{ gap: space.small }}>
        {draft === null ? (
          <Text tone="inkSoft">
            Told here once the hours, a price and a lake are filled in, with a day to try.
          </Text>
        ) : (
          <Answer quote={quote} />
        )}
      </View>
    </View>
  );
}

function Answer({ quote: { data, error } }: { quote: ReturnType<typeof useDraftQuote> }) {
  if (error) return <ProblemNote problem={error} />;
  if (!data) return <Text tone="inkSoft">Working it out</Text>;
  if (!data.quote) return <Note kind="caution">{data.fault}</Note>;
  const { words, lines, currency, reasons } = data.quote;
  return (
    <>
      <Text size="lead" weight="semibold">
        {words}
      </Text>
      {lines.map((line) => (
        <View key={line.words} style={{ flexDirection: 'row', gap: space.medium }}>
          <Text size="small" style={{ flex: 1 }}>
            {line.count > 1 ? `${String(line.count)} × ${line.words}` : line.words}
          </Text>
          <Text size="small">
            {`${money(line.grossPence, currency)}, of which VAT ${money(line.vatPence, currency)}`}
          </Text>
        </View>
      ))}
      {reasons.map(({ code, words: why }) => (
        <Note key={code} kind="caution">
          {why}
        </Note>
      ))}
    </>
  );
}
