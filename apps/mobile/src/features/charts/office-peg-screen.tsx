import { useState } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { LakeView, PegView } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { Kept } from '@/components/kept';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { NewerNote } from '@/components/newer-note';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { space } from '@/constants/layout';
import { PegFieldsForm } from '@/features/charts/peg-fields-form';
import { PEG_STATUS, pegTitle } from '@/features/charts/peg-words';
import { SpotsSection } from '@/features/charts/spots-section';
import { Photos } from '@/features/files/photos';
import { useLake } from '@/features/lakes/api';
import { pegKeys, usePeg } from '@/features/lakes/office-api';
import { useHeld } from '@/hooks/use-held';

/** One peg in the office: its photos, its spots and tickets, and everything that is kept about it. */
export function OfficePegScreen() {
  const { lakeId, pegId } = useLocalSearchParams<{ lakeId: string; pegId: string }>();
  const lake = useLake(lakeId);
  const peg = usePeg(pegId);
  const details = peg.data?.details;
  return (
    <Page
      title={details ? pegTitle(details) : 'Peg'}
      {...(lake.data ? { over: lake.data.details.name } : {})}
      back={{ label: lake.data?.details.name ?? 'The lake', href: `/office/lakes/${lakeId}` }}
      {...(details ? { end: <StatusShape {...PEG_STATUS[details.status]} /> } : {})}
    >
      <Loaded query={lake} waiting="Reading the lake…">
        {(theLake) => (
          <Loaded query={peg} waiting="Reading the peg…">
            {(thePeg) => <Peg lake={theLake} now={thePeg} />}
          </Loaded>
        )}
      </Loaded>
    </Page>
  );
}

function Peg({ lake, now }: { lake: LakeView; now: PegView }) {
  const { held, hold, newer } = useHeld(now);
  const [kept, setKept] = useState(false);
  return (
    <>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
        <LinkButton label="On the board" href={`/office/board?lakeId=${lake.id}`} />
        <LinkButton
          label="Book for somebody"
          href={`/office/bookings/new?lakeId=${lake.id}&pegId=${now.id}`}
        />
        <LinkButton label="As visitors see it" href={`/water/pegs/${now.id}`} />
      </View>
      {lake.may.buildCharts ? <SpotsSection lakeId={lake.id} pegId={now.id} /> : null}
      {now.may.addPhotos ? (
        <Photos
          subject={{ kind: 'pegs', id: now.id }}
          photos={now.photos}
          alsoRead={pegKeys.one(now.id)}
          note="Dated, from the origin mark towards each far-bank mark, and of what a visitor must know before coming."
        />
      ) : null}
      {newer ? <NewerNote what="this peg" onTake={() => hold(newer)} /> : null}
      {now.may.change ? (
        <Section title="The peg">
          <PegFieldsForm
            key={held.version}
            lake={lake}
            peg={held}
            onDone={(peg) => {
              hold(peg);
              setKept(true);
            }}
            beside={<Kept words={kept ? 'The peg is kept.' : null} />}
          />
        </Section>
      ) : (
        <Note title="Not yours to change">The owner, a manager or the head bailiff changes a peg.</Note>
      )}
    </>
  );
}
