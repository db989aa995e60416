import type { FreePeg, FreePegs } from '@mereward/shared/bookings/availability-contract';
import { pegTitle } from '@mereward/shared/lakes/peg-facts';
import { Pressable, View } from 'react-native';
import { Note } from '@/components/note';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { space, target } from '@/constants/layout';
import type { PickingProps } from '@/features/bookings/free-pegs-part';
import { groundWords, PEG_LOOKS, wayWords } from '@/features/bookings/peg-words';
import { themed } from '@/hooks/themed';
import { useUnits } from '@/hooks/use-units';
import { money } from '@/lib/format';
import { dayName } from '@/lib/format-time';

const useStyles = themed((c) => ({
  lakes: { flexDirection: 'row', flexWrap: 'wrap', alignItems: 'flex-start', gap: space.large },
  lake: { flexGrow: 1, flexShrink: 1, flexBasis: 320, minWidth: 0 }, // side by side where there is room
  list: { borderTopWidth: 1, borderTopColor: c.rule },
  line: { borderBottomWidth: 1, borderBottomColor: c.rule },
  row: {
    minHeight: target.bank,
    paddingVertical: space.small,
    flexDirection: 'row',
    alignItems: 'center',
    gap: space.medium,
  },
  chosen: { backgroundColor: c.floatTint },
}));

type Props = PickingProps & { free: FreePegs; freeOnly: boolean };

/** The pegs in walking order, lake by lake. */
export function FreePegList({ free, freeOnly, choice, change }: Props) {
  const styles = useStyles();
  const shown = free.pegs.filter(({ state }) => !freeOnly || state === 'free');
  const lakes = free.lakes.map((lake) => {
    const pegs = shown.filter(({ lakeId }) => lakeId === lake.id);
    return (
      <View key={lake.id} style={styles.lake}>
        <Section title={lake.name} bare end={<Text tone="inkSoft">{`${String(lake.free)} free`}</Text>}>
          {lake.closed === null ? null : (
            <Note kind="danger" title={`${lake.name} is closed`}>
              {lake.closed}
            </Note>
          )}
          {lake.whyNot === null ? null : <Note kind="caution">{lake.whyNot}</Note>}
          {pegs.length === 0 && lake.whyNot === null && lake.closed === null ? (
            <Text tone="inkSoft">
              {freeOnly && lake.free === 0
                ? 'No peg is free for these hours. Try another day above, or look at a taken peg to join its waiting list.'
                : 'No peg here is as wanted. Loosen the filters to see the others.'}
            </Text>
          ) : (
            <PegRows
              label={`Pegs of ${lake.name}`}
              pegs={pegs}
              open={choice.pegId}
              wanted={choice.party.map(({ pegId }) => pegId)}
              currency={free.currency}
              onOpen={(pegId) => change({ pegId })}
            />
          )}
        </Section>
      </View>
    );
  });
  return <View style={styles.lakes}>{lakes}</View>;
}

type RowsProps = {
  label: string;
  pegs: readonly FreePeg[];
  open: string | null;
  wanted: readonly (string | null)[];
  currency: string;
  onOpen: (pegId: string) => void;
};

export function PegRows({ label, pegs, open, wanted, currency, onOpen }: RowsProps) {
  const styles = useStyles();
  return (
    <View role="list" aria-label={label} style={styles.list}>
      {pegs.map((peg) => (
        <View key={peg.pegId} role="listitem" style={styles.line}>
          <Pressable
            role="button"
            onPress={() => onOpen(peg.pegId)}
            style={[styles.row, peg.pegId === open && styles.chosen]}
          >
            <PegLine peg={peg} chosen={wanted.includes(peg.pegId)} currency={currency} />
          </Pressable>
        </View>
      ))}
    </View>
  );
}

function PegLine({ peg, chosen, currency }: { peg: FreePeg; chosen: boolean; currency: string }) {
  const units = useUnits();
  const free = peg.state === 'free';
  const about = free
    ? [groundWords(peg.ground, units), wayWords(peg)].filter(Boolean).join(' · ')
    : peg.nextFree === null
      ? ''
      : `free again ${dayName(peg.nextFree.day)}`;
  return (
    <>
      <View style={{ flex: 1, minWidth: 0 }}>
        <Text weight="semibold" tone={free ? 'ink' : 'inkSoft'}>
          {pegTitle(peg)}
        </Text>
        {about === '' ? null : (
          <Text size="small" tone="inkSoft">
            {about}
          </Text>
        )}
      </View>
      <View style={{ alignItems: 'flex-end' }}>
        {chosen ? (
          <StatusShape shape="dot" tone="water" word="chosen" size="small" />
        ) : (
          <StatusShape {...PEG_LOOKS[peg.state]} size="small" />
        )}
        {free && peg.priceFromPence !== null ? (
          <Text weight="semibold">{money(peg.priceFromPence, currency)}</Text>
        ) : null}
      </View>
    </>
  );
}
