import { useLocalSearchParams } from 'expo-router';
import type { ChartCastList, ChartCastView } from '@mereward/shared/charts/left-out-contract';
import { Empty } from '@/components/empty';
import { Loaded } from '@/components/loaded';
import { Page } from '@/components/page';
import { StatusShape } from '@/components/status-shape';
import { Table } from '@/components/table';
import { Text } from '@/components/text';
import { MEASURE_PX } from '@/constants/layout';
import { useUnits } from '@/hooks/use-units';
import { length } from '@/lib/format';
import { useChartCasts } from './left-out-api';
import { STANDS_WORDS } from './left-out-words';
import { castPlaceWords, castTitle } from './sounding-miss-words';

/** Every cast a chart could be made of, and how each stands in it. */
export function ChartCastsScreen() {
  const { chartId } = useLocalSearchParams<{ chartId: string }>();
  const casts = useChartCasts(chartId);
  return (
    <Page
      title="Casts of this chart"
      width="wide"
      {...(casts.data ? { over: `${casts.data.lakeName}, ${casts.data.title}` } : {})}
      back={{ label: casts.data?.title ?? 'The chart', href: `/office/charts/${chartId}` }}
    >
      <Loaded
        query={casts}
        waiting="Reading the casts…"
        empty={{
          when: (list) => list.casts.length === 0,
          show: <Empty title="No cast">This chart was made from logs of soundings alone.</Empty>,
        }}
      >
        {(list) => <Casts list={list} />}
      </Loaded>
    </Page>
  );
}

function Casts({ list }: { list: ChartCastList }) {
  const units = useUnits();
  return (
    <>
      <Text tone="inkSoft" style={{ maxWidth: MEASURE_PX }}>
        {list.may.leaveOut
          ? 'Open a cast to leave it out of this chart, or to put it back.'
          : 'A draft’s casts are left out by a manager or the head bailiff; a published chart never changes.'}
      </Text>
      <Table
        caption="Casts of this chart"
        rows={list.casts}
        rowKey={({ id }) => id}
        href={({ id }) => `/office/charts/${list.chartId}/casts/${id}`}
        columns={[
          { key: 'cast', head: 'Cast', value: castTitle },
          { key: 'stands', head: 'Stands', value: standsWord, show: (cast) => <Stands cast={cast} /> },
          {
            key: 'depth',
            head: 'At datum',
            value: ({ depthM }) => depthM,
            show: ({ depthM }) => (depthM === null ? '–' : length(depthM, units, 2)),
            figures: true,
          },
          { key: 'grade', head: 'Grade', value: ({ grade }) => grade },
          { key: 'place', head: 'Place', value: (cast) => placeOf(cast, units) },
          { key: 'visit', head: 'Visit', value: ({ visitTitle }) => visitTitle },
          { key: 'why', head: 'Why', value: ({ why }) => why || null },
        ]}
      />
    </>
  );
}

const standsWord = ({ stands }: ChartCastView): string => STANDS_WORDS[stands];

export const placeOf = (
  { lineOutM, bearingDeg }: ChartCastView,
  units: Parameters<typeof castPlaceWords>[1],
): string | null =>
  lineOutM === null || bearingDeg === null ? null : castPlaceWords({ rangeM: lineOutM, bearingDeg }, units);

/** How a cast stands in a chart, as a shape and a word. */
export function Stands({ cast: { stands } }: { cast: ChartCastView }) {
  switch (stands) {
    case 'charted':
      return <StatusShape shape="triangle" tone="reed" word={STANDS_WORDS.charted} size="small" />;
    case 'left_out':
      return <StatusShape shape="cross" tone="amber" word={STANDS_WORDS.left_out} size="small" />;
    case 'not_charted':
      return <StatusShape shape="bar" tone="inkSoft" word={STANDS_WORDS.not_charted} size="small" />;
    case 'not_built':
      return <StatusShape shape="ring" tone="inkSoft" word={STANDS_WORDS.not_built} size="small" />;
  }
}
