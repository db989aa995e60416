import { lazy, Suspense, useMemo, useState } from 'react';
import { useLocalSearchParams } from 'expo-router';
import type { PegPageView, SpotView } from '@mereward/shared/charts/contract';
import { levelLine } from '@mereward/shared/charts/depth-words';
import { layerReasons } from '@mereward/shared/charts/layer-reasons';
import type { PegDetails } from '@mereward/shared/lakes/contract';
import { statusWords } from '@mereward/shared/lakes/peg-facts';
import { View } from 'react-native';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Note } from '@/components/note';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { StatusShape } from '@/components/status-shape';
import { Text } from '@/components/text';
import { MEASURE_PX, space } from '@/constants/layout';
import { NoticesHere } from '@/features/notices/notices-here';
import { useThreeColumns, useWide } from '@/hooks/use-wide';
import { dayAndTime } from '@/lib/format-time';
import { usePegPage } from './api';
import { CardButton } from './card-button';
import { ChartCaption } from './chart-caption';
import { CountConverter } from './count-converter';
import { ExtractMap } from './extract-map';
import { pegDetailsOf } from './peg-details';
import { PegEmergency } from './peg-emergency';
import { GettingThere, ThePeg } from './peg-facts';
import { OverheadNote, PegHazards } from './peg-hazards';
import { PegPhotos } from './peg-photos';
import { ShortAddress } from './short-address';
import { PEG_STATUS, pegTitle } from './peg-words';
import { SpotDetail } from './spot-detail';
import { SpotsTable } from './spots-table';
import { TalkBack } from './talk-back';

const PegMore = lazy(async () => ({ default: (await import('./peg-more')).PegMore }));

function InFront({ page }: { page: PegPageView }) {
  const [spotId, setSpotId] = useState<string | null>(null);
  const beside = useThreeColumns();
  const spots = page.spots ?? [];
  const beyond = useMemo(() => neighbourSpots(page), [page]);
  const spot = [...spots, ...beyond].find(({ id }) => id === spotId) ?? spots[0] ?? beyond[0] ?? null;
  const water = { levelM: page.levelNow?.levelM ?? null, datumM: page.chart?.datumM ?? 0 };
  const reasons = layerReasons(page.layerNotes);
  const { levelNow } = page;
  return (
    <View style={{ gap: space.page }}>
      <View style={{ marginHorizontal: beside ? 0 : -space.page }}>
        <ExtractMap
          page={page}
          spot={spot}
          label={`The chart before ${pegTitle(page)}, looking out from it. The spots are listed below.`}
        />
      </View>
      {spot ? <SpotDetail spot={spot} page={page} /> : null}
      <TalkBack
        pegId={page.id}
        spotId={spots.some(({ id }) => id === spot?.id) ? (spot?.id ?? null) : null}
      />
      {spots.length ? (
        <Section title="Spots from this peg" bare>
          <SpotsTable spots={spots} spotId={spot?.id ?? null} onSpot={setSpotId} water={water} />
        </Section>
      ) : page.spots ? (
        <Empty title="No spots written up yet">The chart above is all there is for this peg so far.</Empty>
      ) : null}
      {beyond.length ? (
        <Section
          title="Other pegs’ spots in this peg’s water"
          note="Written up from a peg beside this one, counted here from this one."
          bare
        >
          <SpotsTable
            label="Other pegs’ spots in this peg’s water"
            spots={beyond}
            spotId={spot?.id ?? null}
            onSpot={setSpotId}
            water={water}
          />
        </Section>
      ) : null}
      <Suspense fallback={null}>
        <PegMore page={page} spot={spot} />
      </Suspense>
      {reasons.length ? (
        <Note title="Not shown to you here">
          <>
            {reasons.map((words) => (
              <Text key={words}>{words}</Text>
            ))}
          </>
        </Note>
      ) : null}
      {page.chart ? (
        <ChartCaption
          chart={page.chart}
          shownAt={levelLine(levelNow, levelNow ? dayAndTime(levelNow.at, page.fishery.zone) : '')}
        />
      ) : null}
      {page.chart ? (
        <LinkButton label="The whole chart" href={`/water/charts/${page.chart.id}?peg=${page.id}`} />
      ) : null}
    </View>
  );
}

/** Spots of pegs beside this one that lie in its water, named so. */
const neighbourSpots = ({ neighbourSpots: found }: PegPageView): SpotView[] =>
  (found ?? []).map(({ peg, spot }) => ({ ...spot, name: `${spot.name} (peg ${peg.number}’s)` }));

function Warnings({ details }: { details: PegDetails }) {
  const { status } = details;
  return (
    <>
      {status === 'open' ? null : (
        <Note kind={status === 'closed' ? 'danger' : 'caution'} title={`This peg is ${status}`}>
          {statusWords(details)}
        </Note>
      )}
      <OverheadNote details={details} />
    </>
  );
}

/** The reader's own ticket, which opens what is kept for ticket holders. */
function OwnTicket({ page: { ticket, fishery } }: { page: PegPageView }) {
  if (!ticket) return null;
  return (
    <Note kind="fine" title="Your ticket for this peg">
      {`From ${dayAndTime(ticket.from, fishery.zone)} until ${dayAndTime(ticket.until, fishery.zone)}.`}
    </Note>
  );
}

function AboutThePeg({ page, details }: { page: PegPageView; details: PegDetails | null }) {
  const notes = [details?.notesPublic, details?.notesMembers, details?.notesStaff].filter(Boolean);
  return (
    <>
      <PegPhotos photos={page.photos} title={pegTitle(page)} />
      {notes.map((words) => (
        <Text key={words} style={{ maxWidth: MEASURE_PX }}>
          {words}
        </Text>
      ))}
      {details ? (
        <>
          <PegHazards details={details} />
          <GettingThere details={details} />
          <ThePeg details={details} />
        </>
      ) : (
        <Note kind="caution">This page is older than the server: load it again to read the peg’s facts.</Note>
      )}
      <PegEmergency page={page} details={details} />
      <Section title="A count on your own sticks">
        <CountConverter />
      </Section>
      <ShortAddress url={page.shortUrl} />
    </>
  );
}

const WATER_WIDTH_PX = 580;

function PegSheet({ page }: { page: PegPageView }) {
  const details = pegDetailsOf(page);
  const beside = useThreeColumns();
  return (
    <>
      {details ? <Warnings details={details} /> : null}
      <NoticesHere fisheryId={page.fishery.id} lakeId={page.lake.id} />
      <OwnTicket page={page} />
      <View style={beside ? { flexDirection: 'row', gap: space.huge } : { gap: space.large }}>
        <View style={beside ? { flexBasis: WATER_WIDTH_PX, flexShrink: 1 } : undefined}>
          <InFront page={page} />
        </View>
        <View style={[{ gap: space.large }, beside && { flex: 1, minWidth: 0 }]}>
          <AboutThePeg page={page} details={details} />
        </View>
      </View>
    </>
  );
}

/** A peg's own page: what an angler reads the night before and at the water. */
export function PegScreen() {
  const { pegId } = useLocalSearchParams<{ pegId: string }>();
  const page = usePegPage(pegId);
  const wide = useWide();
  const { lake, fishery } = page.data ?? {};
  const details = page.data ? pegDetailsOf(page.data) : null;
  return (
    <Page
      width="wide"
      title={page.data ? pegTitle(page.data) : 'Peg'}
      over={lake && fishery ? `${lake.name} · ${fishery.name}` : undefined}
      back={
        lake
          ? { label: lake.name, href: `/water/lakes/${lake.id}?peg=${pegId}` }
          : { label: 'Water', href: '/water' }
      }
      end={details ? <StatusShape {...PEG_STATUS[details.status]} /> : undefined}
      actions={page.data ? <CardButton pegId={pegId} number={page.data.number} grow={!wide} /> : undefined}
    >
      <Loaded query={page} waiting="Reading the peg…">
        {(value) => <PegSheet page={value} />}
      </Loaded>
    </Page>
  );
}
