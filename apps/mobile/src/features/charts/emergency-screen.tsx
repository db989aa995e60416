import type { PegPageView } from '@mereward/shared/charts/contract';
import type { FisheryView } from '@mereward/shared/fisheries/contract';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { useIsRestoring, useQueryClient } from '@tanstack/react-query';
import { Linking, View } from 'react-native';
import { Button } from '@/components/button';
import { Facts } from '@/components/facts';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { Waiting } from '@/components/waiting';
import { space } from '@/constants/layout';
import { pegDetailsOf } from '@/features/charts/peg-details';
import { pegTitle } from '@/features/charts/peg-words';
import { emergencyFisheries, type EmergencyFishery } from '@/features/charts/seen-waters';
import { clockHere } from '@/lib/format-time';

/** Whom to ring, what to say and where help is met: for the waters seen on this device, with or without a signal. */
export function EmergencyScreen() {
  const restoring = useIsRestoring();
  const fisheries = useSeenFisheries();
  return (
    <Page title="Emergency card">
      <Note kind="danger" title="Ring 999 or 112">
        <Text>Say which fishery, lake and peg, and the grid reference. Stay on the line.</Text>
        <Text weight="semibold">
          Somebody in the water: reach or throw, don’t go in. Reach with a pole or branch, or throw a line.
        </Text>
        <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small, paddingTop: space.hair }}>
          <Ring number="999" kind="main" />
          <Ring number="112" />
        </View>
      </Note>
      {restoring ? <Waiting words="Reading what this device has kept…" /> : null}
      {!restoring && fisheries.length === 0 ? (
        <Text tone="inkSoft">
          No water has been opened on this device yet. Open a peg or a lake while there is a signal, and its
          gate, throw line, grid reference and duty phone stand here from then on.
        </Text>
      ) : null}
      {fisheries.map((fishery) => (
        <Fishery key={fishery.id} fishery={fishery} />
      ))}
    </Page>
  );
}

function useSeenFisheries(): readonly EmergencyFishery[] {
  const queries = useQueryClient();
  const seen = <T,>(queryKey: readonly string[], length: number) =>
    queries
      .getQueryCache()
      .findAll({
        queryKey,
        predicate: (query) => query.queryKey.length === length && query.state.data !== undefined,
      })
      .map((query) => ({ value: query.state.data as T, readAtMs: query.state.dataUpdatedAt }));
  return emergencyFisheries({
    fisheries: seen<FisheryView>(['fisheries'], 2),
    lakes: seen<LakeView>(['lakes'], 2),
    pegs: seen<PegPageView>(['charts', 'peg'], 3),
  });
}

const Ring = ({ number, kind }: { number: string; kind?: 'main' }) => (
  <Button
    label={`Ring ${number}`}
    kind={kind}
    bank
    onPress={() => void Linking.openURL(`tel:${number.replaceAll(' ', '')}`)}
  />
);

function Fishery({ fishery }: { fishery: EmergencyFishery }) {
  const { name, dutyPhone, meetingPoint, gridReference, lakes, pegs, readAtMs } = fishery;
  return (
    <Section title={name} note={`As read ${clockHere(new Date(readAtMs).toISOString())}.`}>
      {dutyPhone ? (
        <View style={{ alignItems: 'flex-start' }}>
          <Button
            label={`Duty phone ${dutyPhone}`}
            bank
            onPress={() => void Linking.openURL(`tel:${dutyPhone.replaceAll(' ', '')}`)}
          />
        </View>
      ) : null}
      <Facts
        facts={[
          { term: 'Meet the ambulance at', fact: meetingPoint },
          { term: 'Grid reference', fact: gridReference },
        ]}
      />
      {lakes.map((lake) => (
        <View key={lake.id}>
          <Text weight="semibold">{lake.name}</Text>
          <Facts
            facts={[
              { term: 'Ambulance route', fact: lake.route },
              { term: 'Phone signal', fact: lake.signal },
            ]}
          />
        </View>
      ))}
      {pegs.map((peg) => (
        <Peg key={peg.id} peg={peg} />
      ))}
    </Section>
  );
}

function Peg({ peg }: { peg: PegPageView }) {
  const emergency = pegDetailsOf(peg)?.emergency;
  if (!emergency) return null;
  return (
    <View>
      <Text weight="semibold">{`${pegTitle(peg)}, ${peg.lake.name}`}</Text>
      {emergency.sayThis ? <Text>{`Say: “${emergency.sayThis}”`}</Text> : null}
      <Facts
        facts={[
          { term: 'Grid reference', fact: emergency.gridReference },
          { term: 'Nearest throw line', fact: emergency.throwLine },
          { term: 'Gate for an ambulance', fact: emergency.ambulanceGate },
        ]}
      />
    </View>
  );
}
