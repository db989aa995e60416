import { useMemo, useState, type ReactNode } from 'react';
import { router, useLocalSearchParams } from 'expo-router';
import type { ChartView } from '@mereward/shared/charts/contract';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { useWindowDimensions, View } from 'react-native';
import { Columns } from '@/components/columns';
import { Empty } from '@/components/empty';
import { LinkButton } from '@/components/link-button';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useLake } from '@/features/lakes/api';
import { NoticesHere } from '@/features/notices/notices-here';
import { useUnits } from '@/hooks/use-units';
import { useWide } from '@/hooks/use-wide';
import { area, length } from '@/lib/format';
import { useChart, usePegPage } from './api';
import { bareLake } from './bare-lake';
import { ChartMap } from './chart-map';
import { ChartPanel } from './chart-panel';
import { PegBrief } from './peg-brief';
import { PegList } from './peg-list';
import { spotCast } from '@mereward/shared/charts/drawing/spot-cast';

const PHONE_SHARE = 0.5;

/** A lake without a published chart: the shore and its pegs, and the words. */
function BareLake({
  lake,
  pegId,
  onPeg,
}: {
  lake: LakeView;
  pegId: string | null;
  onPeg: (pegId: string) => void;
}) {
  const { height } = useWindowDimensions();
  const wide = useWide();
  const content = useMemo(() => bareLake(lake), [lake]);
  const chosen = useMemo(() => ({ pegId, spotId: null, cast: null }), [pegId]);
  return (
    <View style={wide ? { flex: 1 } : undefined}>
      <View style={wide ? { flex: 1 } : { height: height * PHONE_SHARE }}>
        <ChartMap label={`Plan of ${lake.details.name}`} content={content} chosen={chosen} onPeg={onPeg} />
      </View>
      <Text size="small" tone="inkSoft" style={{ padding: space.page }}>
        No chart of this lake is published yet: nothing here tells depth or bottom.
      </Text>
    </View>
  );
}

function useChosen() {
  const { peg } = useLocalSearchParams<{ peg?: string }>();
  const [spotId, setSpotId] = useState<string | null>(null);
  const choose = (pegId: string): void => {
    setSpotId(null);
    router.setParams({ peg: pegId });
  };
  return { pegId: peg ?? null, spotId, setSpotId, choose };
}

type ChartPartProps = { chart: ChartView; chosen: ReturnType<typeof useChosen> };

function ChartPart({ chart, chosen }: ChartPartProps) {
  const { pegId, spotId, choose } = chosen;
  const units = useUnits();
  const page = usePegPage(pegId);
  const peg = chart.pegs.find(({ id }) => id === pegId) ?? null;
  const spots = page.data?.spots;
  const spot = spots?.find(({ id }) => id === spotId) ?? spots?.[0] ?? null;
  const cast = useMemo(
    () => (peg && spot ? spotCast(peg, spot, units.stickSpacingM) : null),
    [peg, spot, units.stickSpacingM],
  );
  return (
    <ChartPanel
      chart={chart}
      pegId={pegId}
      onPeg={choose}
      spots={spots ?? undefined}
      spotId={spot?.id ?? null}
      cast={cast}
    />
  );
}

function LakeSheet({ lake }: { lake: LakeView }) {
  const chosen = useChosen();
  const chart = useChart(lake.publishedChart?.id ?? null);
  const { pegId, spotId, setSpotId, choose } = chosen;
  const wide = useWide();
  const told = <NoticesHere fisheryId={lake.fisheryId} lakeId={lake.id} />;
  const main: ReactNode = lake.publishedChart ? (
    <Loaded query={chart} waiting="Reading the chart…">
      {(value) => <ChartPart chart={value} chosen={chosen} />}
    </Loaded>
  ) : (
    <BareLake lake={lake} pegId={pegId} onPeg={choose} />
  );
  return (
    <Columns
      main={
        wide ? (
          main
        ) : (
          <>
            <View style={{ paddingHorizontal: space.page, paddingBottom: space.medium }}>{told}</View>
            {main}
          </>
        )
      }
      list={
        lake.pegs.length ? (
          <Section bare title="Pegs">
            <PegList lake={lake} chart={chart.data ?? null} pegId={pegId} onPeg={choose} />
          </Section>
        ) : (
          <Empty title="No pegs yet">The fishery has not put any pegs on this lake.</Empty>
        )
      }
      detail={
        <View style={{ gap: space.page }}>
          {wide ? told : null}
          {pegId ? (
            <PegBrief pegId={pegId} spotId={spotId} onSpot={setSpotId} />
          ) : (
            <Text tone="inkSoft">
              Choose a peg on the chart or in the list to see what lies in front of it.
            </Text>
          )}
          {lake.publishedChart ? (
            <LinkButton
              label="The whole chart"
              href={`/water/charts/${lake.publishedChart.id}${pegId ? `?peg=${pegId}` : ''}`}
            />
          ) : null}
        </View>
      }
    />
  );
}

/** A lake: its pegs, its chart, and the peg chosen, side by side on a wide screen. */
export function LakeScreen() {
  const { lakeId } = useLocalSearchParams<{ lakeId: string }>();
  const lake = useLake(lakeId);
  const units = useUnits();
  const under = lake.data
    ? [
        area(lake.data.areaM2, units),
        `${String(lake.data.pegs.length)} pegs`,
        lake.data.levelNow &&
          `${lake.data.levelNow.boardCode} reads ${length(lake.data.levelNow.boardReadsM, units, 2)}`,
      ]
        .filter(Boolean)
        .join(' · ')
    : undefined;
  return (
    <Page
      fill
      title={lake.data?.details.name ?? 'Lake'}
      over={lake.data?.fisheryName}
      under={under}
      back={{ label: 'Water', href: '/water' }}
    >
      <Loaded query={lake} waiting="Reading the lake…">
        {(value) => <LakeSheet lake={value} />}
      </Loaded>
    </Page>
  );
}
