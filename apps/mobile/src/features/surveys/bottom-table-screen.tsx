import { useState } from 'react';
import type { BottomTableView } from '@mereward/shared/surveys/bottom-table-contract';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { Disclosure } from '@/components/disclosure';
import { Empty } from '@/components/empty';
import { Facts } from '@/components/facts';
import { Kept } from '@/components/kept';
import { Loaded } from '@/components/loaded';
import { NewerNote } from '@/components/newer-note';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { ChosenFishery, useChosenFishery } from '@/features/fisheries/chosen-fishery';
import { useFishery } from '@/features/fisheries/office-api';
import { useBottomTable } from '@/features/surveys/bottom-api';
import { BottomHistorySection } from '@/features/surveys/bottom-history-section';
import { BottomLearningSection } from '@/features/surveys/bottom-learning-section';
import { BottomMatrix } from '@/features/surveys/bottom-matrix';
import { BottomTableForm } from '@/features/surveys/bottom-table-form';
import { versionNote, versionTitle } from '@/features/surveys/bottom-table-words';

const READERS = ['owner', 'manager', 'head_bailiff'] as const;

/** How each bottom feels through the lead: the fishery's table, to be edited, learnt, and looked back on. */
export function BottomTableScreen() {
  const fishery = useChosenFishery(READERS);
  return (
    <Page
      title="How bottoms feel"
      over={fishery.chosen?.name}
      width="wide"
      back={{ label: 'Office', href: '/office' }}
    >
      <ChosenFishery
        {...fishery}
        none={
          <Empty title="Not yours to read">
            The owner, a manager or the head bailiff reads the table of feels.
          </Empty>
        }
      >
        {(fisheryId) => <Read fisheryId={fisheryId} />}
      </ChosenFishery>
    </Page>
  );
}

function Read({ fisheryId }: { fisheryId: string }) {
  const table = useBottomTable(fisheryId);
  return (
    <Loaded query={table} waiting="Reading the table…">
      {(value) => <FeelTable fisheryId={fisheryId} table={value} />}
    </Loaded>
  );
}

function FeelTable({ fisheryId, table }: { fisheryId: string; table: BottomTableView }) {
  const fishery = useFishery(fisheryId);
  const zone = fishery.data?.details.zone ?? 'Europe/London';
  const { inForce, feel } = table;
  return (
    <>
      <Section title="In force" bare>
        {inForce.kind === 'usual' ? (
          <Note title="The built-in table">
            Common practice, no published source. Edit a copy where your water feels different, or let
            confirmed bottoms teach it.
          </Note>
        ) : null}
        <Facts
          facts={[
            { term: 'Version', fact: versionTitle(inForce) },
            { term: 'Made', fact: versionNote(inForce, zone) },
            { term: 'Source of the bottom', fact: feel.substrate.source },
            { term: 'Source of what lies on it', fact: feel.cover.source },
            {
              term: 'Covers fade by half in',
              fact: `low weed ${feel.fadeMonths.low_weed} months, tall weed ${feel.fadeMonths.tall_weed}, leaf litter ${feel.fadeMonths.leaf_litter}`,
            },
          ]}
        />
        <Disclosure title="How each bottom feels, figure by figure">
          <BottomMatrix feel={feel} map="substrate" />
        </Disclosure>
        <Disclosure title="How what lies on it feels, figure by figure">
          <BottomMatrix feel={feel} map="cover" />
        </Disclosure>
      </Section>
      {table.may.change ? <Edit fisheryId={fisheryId} table={table} /> : null}
      <BottomLearningSection key={inForce.version} fisheryId={fisheryId} mayChange={table.may.change} />
      <BottomHistorySection fisheryId={fisheryId} table={table} zone={zone} />
    </>
  );
}

/** The form stands on the version it was begun on: another's new one is offered, not slipped under. */
function Edit({ fisheryId, table }: { fisheryId: string; table: BottomTableView }) {
  const [begun, setBegun] = useState<BottomTableView | null>(null);
  const [kept, setKept] = useState(false);
  if (!begun)
    return (
      <Section
        title="Edit it"
        note="A new version is in force at once: for casts to come, and for kept ones when they are read again."
      >
        {kept ? <Kept words="The table is in force." /> : null}
        <View style={{ alignItems: 'flex-start' }}>
          <Button label="Edit a copy" onPress={() => setBegun(table)} />
        </View>
      </Section>
    );
  return (
    <Section title="Edit it">
      {begun.inForce.version === table.inForce.version ? null : (
        <NewerNote what="this table" onTake={() => setBegun(table)} />
      )}
      <BottomTableForm
        key={begun.inForce.version}
        fisheryId={fisheryId}
        table={begun}
        onKept={() => {
          setBegun(null);
          setKept(true);
        }}
      />
      <View style={{ alignItems: 'flex-start' }}>
        <Button label="Leave it" kind="quiet" onPress={() => setBegun(null)} />
      </View>
    </Section>
  );
}
