import { useMemo } from 'react';
import { router, useLocalSearchParams } from 'expo-router';
import type { ChartView } from '@mereward/shared/charts/contract';
import { Columns } from '@/components/columns';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { Section } from '@/components/section';
import { Text } from '@/components/text';
import { useChart } from './api';
import { metresToWraps } from '@mereward/shared/units/wraps';
import { useThreeColumns } from '@/hooks/use-wide';
import { useUnits } from '@/hooks/use-units';
import type { AimedCast } from './drawn-cast';
import type { SaidCast } from './chart-answers-api';
import { CastPanel } from './cast-panel';
import { CastReadBack } from './cast-read-back';
import { PlaceFromPeg } from './place-from-peg';
import { TaleLists } from './tale-lists';
import { TaleToggles } from './tale-toggles';
import { useTales } from './use-tales';
import { ChartDownloads } from './chart-downloads';
import { ChartFigures } from './chart-figures';
import { shownLayers } from './chart-layers';
import { ChartPanel } from './chart-panel';
import { PegChoice } from './peg-choice';
import { raisedNowM } from './readied-chart';
import { useLakeCharts } from './review-api';
import { useCast } from './use-cast';
import { VersionNotes } from './version-notes';
import { VersionsList } from './versions-list';

function ChartSheet({ chart, pegId }: { chart: ChartView; pegId: string | null }) {
  const versions = useLakeCharts(chart.lakeId);
  const { stickSpacingM } = useUnits();
  const { today } = shownLayers.use();
  const peg = useMemo(() => chart.pegs.find(({ id }) => id === pegId) ?? null, [chart, pegId]);
  const tool = useCast(chart, chart.depth ? peg : null);
  const said = useMemo(
    () => (tool.settled ? saidOf(tool.settled, stickSpacingM) : null),
    [tool.settled, stickSpacingM],
  );
  const nowM = raisedNowM(chart);
  const isToday = today && nowM !== null;
  const choose = (peg: string): void => router.setParams({ peg });
  const three = useThreeColumns();
  const tales = useTales(chart, pegId);
  const hasEarlier = (versions.data?.charts.length ?? 0) > 1;
  const told = {
    draw: tales.draw,
    onTouch: tales.touch,
    below: <TaleToggles chart={chart} tales={tales} hasEarlier={hasEarlier} />,
  };
  const lists = <TaleLists chart={chart} tales={tales} onPeg={choose} />;
  return (
    <Columns
      main={
        <ChartPanel
          chart={chart}
          pegId={pegId}
          onPeg={choose}
          cast={tool.cast}
          onAim={tool.drag}
          told={told}
          ofPlace={pegId ? (place) => <PlaceFromPeg chart={chart} pegId={pegId} place={place} /> : undefined}
        />
      }
      list={
        <>
          <VersionNotes chart={chart} />
          {three ? lists : null}
          {chart.figures ? <ChartFigures figures={chart.figures} /> : null}
          {versions.data && versions.data.charts.length > 1 ? (
            <Section title="Versions">
              <VersionsList charts={versions.data.charts} chartId={chart.id} />
            </Section>
          ) : null}
          <ChartDownloads chart={chart} />
        </>
      }
      detail={
        chart.depth ? (
          <>
            {three ? null : lists}
            <Section
              bare
              title="Draw a cast"
              note="Choose a peg, then drag out from it, or set bearing and wraps here."
            >
              <PegChoice pegs={chart.pegs} pegId={pegId} onPeg={choose} />
              {peg ? (
                <>
                  <CastPanel tool={tool} raisedM={isToday ? nowM : 0} when={isToday ? 'today' : 'at datum'} />
                  {said ? <CastReadBack pegId={peg.id} cast={said} /> : null}
                </>
              ) : (
                <Text tone="inkSoft">The bed along the cast appears here.</Text>
              )}
            </Section>
          </>
        ) : three ? undefined : (
          lists
        )
      }
    />
  );
}

/** A drawn cast as it is said, on the reader's own sticks. */
function saidOf({ bearingDeg, lineOutM }: AimedCast, stickSpacingM: number): SaidCast {
  const { whole, remainderM } = metresToWraps(lineOutM, stickSpacingM);
  return { wrapsWhole: whole, remainderM: Math.round(remainderM * 100) / 100, stickSpacingM, bearingDeg };
}

/** One chart of a lake, whole: layers, figures, versions, a drawn cast and its section, and the chart to take away. */
export function ChartScreen() {
  const { chartId, peg } = useLocalSearchParams<{ chartId: string; peg?: string }>();
  const chart = useChart(chartId);
  const { lakeId, lakeName, fisheryName, version, title } = chart.data ?? {};
  return (
    <Page
      fill
      title={
        chart.data
          ? version === null
            ? (title ?? '')
            : `${lakeName ?? ''}, chart ${version ?? ''}`
          : 'Chart'
      }
      over={fisheryName}
      back={
        lakeId
          ? { label: lakeName ?? 'Lake', href: `/water/lakes/${lakeId}` }
          : { label: 'Water', href: '/water' }
      }
    >
      <Loaded query={chart} waiting="Reading the chart…">
        {(loaded) => <ChartSheet chart={loaded} pegId={peg ?? null} />}
      </Loaded>
    </Page>
  );
}
