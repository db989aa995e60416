import { useMemo } from 'react';
import { useLocalSearchParams, useRouter } from 'expo-router';
import { outlineSourceWords } from '@mereward/shared/lakes/outline-source';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { View } from 'react-native';
import { Facts } from '@/components/facts';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { space } from '@/constants/layout';
import { bareLake } from '@/features/charts/bare-lake';
import { ChartMap } from '@/features/charts/chart-map';
import { useLake } from '@/features/lakes/api';
import { AUDIENCES, LAYERS, LAKE_KINDS } from '@/features/lakes/lake-fields';
import { BoardsSection, MarksSection, PlacesSection } from '@/features/lakes/lake-parts';
import { PegsSection } from '@/features/lakes/pegs-section';
import { useUnits } from '@/hooks/use-units';
import { area, figure } from '@/lib/format';

/** One lake in the office: what it is, its pegs, boards and marks, each to be changed. */
export function OfficeLakeScreen() {
  const { lakeId } = useLocalSearchParams<{ lakeId: string }>();
  const lake = useLake(lakeId);
  return (
    <Page
      title={lake.data?.details.name ?? 'Lake'}
      {...(lake.data ? { over: lake.data.fisheryName } : {})}
      width="wide"
      back={{ label: 'Lakes', href: '/office/lakes' }}
    >
      <Loaded query={lake} waiting="Reading the lake…">
        {(value) => <Lake lake={value} />}
      </Loaded>
    </Page>
  );
}

function Lake({ lake }: { lake: LakeView }) {
  return (
    <>
      <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.large }}>
        <View style={{ flexGrow: 2, flexBasis: 340, minWidth: 0 }}>
          <LakeMap lake={lake} />
        </View>
        <View style={{ flexGrow: 1, flexBasis: 320, gap: space.medium }}>
          <LakeFacts lake={lake} />
          <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
            {lake.may.change ? (
              <>
                <LinkButton label="Details and audiences" href={`/office/lakes/${lake.id}/details`} />
                <LinkButton label="Outline" href={`/office/lakes/${lake.id}/outline`} />
              </>
            ) : null}
            <LinkButton label="Pegs’ waters" href={`/office/lakes/${lake.id}/waters`} />
            <LinkButton label="What changed the bottom" href={`/office/lakes/${lake.id}/events`} />
            <LinkButton label="As visitors see it" href={`/water/lakes/${lake.id}`} />
          </View>
        </View>
      </View>
      <PegsSection lake={lake} />
      <BoardsSection lake={lake} />
      <MarksSection lake={lake} />
      <PlacesSection lake={lake} />
    </>
  );
}

const NOTHING_CHOSEN = { pegId: null, spotId: null, cast: null };

function LakeMap({ lake }: { lake: LakeView }) {
  const router = useRouter();
  const content = useMemo(() => bareLake(lake), [lake]);
  return (
    <View style={{ height: 380 }}>
      <ChartMap
        label={`${lake.details.name} with its pegs and marks`}
        content={content}
        chosen={NOTHING_CHOSEN}
        onPeg={(pegId) => router.push(`/office/lakes/${lake.id}/pegs/${pegId}`)}
      />
    </View>
  );
}

function LakeFacts({ lake }: { lake: LakeView }) {
  const units = useUnits();
  const { details, levelNow, publishedChart } = lake;
  const kind = LAKE_KINDS.find(({ key }) => key === details.kind)?.label ?? '';
  const seen = LAYERS.map(({ name, label }) => {
    const who = AUDIENCES.find(({ key }) => key === details.audiences[name])?.label ?? '';
    return `${label}: ${who.toLowerCase()}`;
  });
  return (
    <Section title="The lake" bare>
      <Facts
        facts={[
          { term: 'Water', fact: area(lake.areaM2, units) },
          {
            term: 'Outline',
            fact: outlineSourceWords(details.outlineFrom) ?? 'nobody said how it was found',
          },
          { term: 'Kind', fact: kind },
          { term: 'Nights', fact: details.nights ? 'yes' : 'days only' },
          { term: 'Chart datum', fact: `${figure(details.datumM, 2)} m` },
          {
            term: 'Level now',
            fact: levelNow
              ? `${figure(levelNow.boardReadsM, 2)} m on ${levelNow.boardCode}`
              : 'nobody has read a board yet',
          },
          { term: 'Chart', fact: publishedChart ? publishedChart.version : 'none published yet' },
          { term: 'Who sees', fact: seen.join(' · ') },
        ]}
      />
    </Section>
  );
}
