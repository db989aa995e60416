import { useState } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { DisagreementView } from '@mereward/shared/charts/disagreement';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Text } from '@/components/text';
import { MEASURE_PX } from '@/constants/layout';
import { useLake } from '@/features/lakes/api';
import { useSession } from '@/lib/session';
import { usePegPage } from './api';
import { DisagreeForm } from './disagree-form';
import { ToldHere } from './told-here';

type Params = { pegId: string; spot?: string; lon?: string; lat?: string };

/** "It isn't like that": tells the fishery what was found, and shows what became of what was told before. */
export function DisagreeScreen() {
  const { pegId, spot, lon, lat } = useLocalSearchParams<Params>();
  const { account } = useSession();
  const page = usePegPage(pegId);
  const number = page.data?.number ?? '';
  return (
    <Page
      title="It isn’t like that"
      over={page.data ? `Peg ${number}, ${page.data.lake.name}` : undefined}
      back={{ label: number ? `Peg ${number}` : 'The peg', href: `/water/pegs/${pegId}` }}
    >
      {account ? (
        <Loaded query={page} waiting="Reading the peg…">
          {(value) => (
            <Telling pegId={pegId} lakeId={value.lake.id} spotId={spot ?? null} place={placeOf(lon, lat)} />
          )}
        </Loaded>
      ) : (
        <Empty
          title="Tell the fishery"
          action={
            <LinkButton
              label="Sign in"
              href={`/sign-in?next=${encodeURIComponent(`/water/pegs/${pegId}/disagree`)}`}
              kind="main"
            />
          }
        >
          Sign in to tell what you found. It is for those with a ticket for this peg, members and staff.
        </Empty>
      )}
    </Page>
  );
}

function placeOf(lon: string | undefined, lat: string | undefined): [number, number] | null {
  const place: [number, number] = [Number(lon), Number(lat)];
  return lon !== undefined && lat !== undefined && place.every(Number.isFinite) ? place : null;
}

type Props = { pegId: string; lakeId: string; spotId: string | null; place: [number, number] | null };

function Telling({ pegId, lakeId, spotId, place }: Props) {
  const page = usePegPage(pegId);
  const lake = useLake(lakeId);
  const [sent, setSent] = useState<DisagreementView | null>(null);
  return (
    <>
      {sent ? (
        <Note kind="fine" title="Sent" live>
          <Text>
            The fishery looks at it beside its own casts. The chart stays as it is until then; what becomes of
            it is said here.
          </Text>
        </Note>
      ) : (
        <Text tone="inkSoft" style={{ maxWidth: MEASURE_PX }}>
          Tell what you found. The office or the head bailiff holds it against the casts there; the published
          chart is not changed by it.
        </Text>
      )}
      {sent ? (
        <LinkButton label="Back to the peg" href={`/water/pegs/${pegId}`} />
      ) : (
        <Loaded query={lake} waiting="Reading the marks…">
          {(theLake) =>
            page.data ? (
              <DisagreeForm page={page.data} lake={theLake} spotId={spotId} place={place} onSent={setSent} />
            ) : null
          }
        </Loaded>
      )}
      <ToldHere pegId={pegId} />
    </>
  );
}
