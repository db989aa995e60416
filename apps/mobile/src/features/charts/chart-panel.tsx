import { useMemo, useState, type ReactNode } from 'react';
import type { ChartView } from '@mereward/shared/charts/contract';
import type { DrawnCast } from '@mereward/shared/charts/drawing/cast-marks';
import type { Point } from '@mereward/shared/geometry/plane';
import { ScrollView, useWindowDimensions, View } from 'react-native';
import { Text } from '@/components/text';
import { space } from '@/constants/layout';
import { useWide } from '@/hooks/use-wide';
import { ChartCaption } from './chart-caption';
import { ChartKey } from './chart-key';
import { shownLayers } from './chart-layers';
import { ChartMap } from './chart-map';
import { LayerReasons, LayerToggles, useLevelWords } from './layer-toggles';
import type { Draw } from './lake-canvas';
import type { MapContent } from './map-layers';
import { sharedLetters } from './peg-words';
import { PlaceReading } from './place-reading';
import { useChartContent } from './use-chart-content';

const PHONE_SHARE = 0.56; // of the screen's height
const WIDE_LEAST_PX = 430;

type Props = {
  chart: ChartView;
  pegId: string | null;
  onPeg: (pegId: string) => void;
  spots?: MapContent['spots'] | undefined;
  spotId?: string | null | undefined;
  cast?: DrawnCast | null | undefined;
  onAim?: ((place: Point, done: boolean) => void) | undefined;
  /** What is told over the layers, what a touch means to it, and what stands under the map of it. */
  told?: { draw: Draw; onTouch: (place: Point) => void; below: ReactNode } | undefined;
  /** Stands under the reading of a touched place. */
  ofPlace?: ((place: Point) => ReactNode) | undefined;
};

/** A chart as a sheet: layers to choose above, the map, and below it key, version, dates, datum and cautions. */
export function ChartPanel({ chart, pegId, onPeg, spots, spotId = null, cast = null, ...rest }: Props) {
  const { onAim, told, ofPlace } = rest;
  const wide = useWide();
  const { height } = useWindowDimensions();
  const shown = shownLayers.use();
  const { content, layers, raisedM, isToday } = useChartContent(chart, shown, spots);
  const [place, setPlace] = useState<Point | null>(null);
  const chosen = useMemo(() => ({ pegId, spotId, cast }), [pegId, spotId, cast]);
  const levelWords = useLevelWords(chart, isToday);
  const map = (
    <ChartMap
      label={`Chart of ${chart.lakeName}`}
      content={content}
      chosen={chosen}
      onPeg={onPeg}
      told={told?.draw}
      onPlace={(touched) => {
        setPlace(touched);
        told?.onTouch(touched);
      }}
      onAim={onAim}
    />
  );
  const padded = { paddingHorizontal: space.page, gap: space.small } as const;
  const sheet = (
    <View style={{ flexGrow: 1, gap: space.small }}>
      <View style={padded}>
        <LayerToggles chart={chart} />
      </View>
      <View style={wide ? { flexGrow: 1, minHeight: WIDE_LEAST_PX } : { height: height * PHONE_SHARE }}>
        {map}
      </View>
      <View style={[padded, { paddingBottom: space.medium }]}>
        {told?.below}
        {place ? (
          <>
            <PlaceReading
              layers={layers}
              place={place}
              raisedM={raisedM}
              when={isToday ? 'today' : 'at datum'}
            />
            {ofPlace?.(place)}
          </>
        ) : (
          <Text size="small" tone="inkSoft">
            {hint(layers !== null, sharedLetters(chart.pegs.map(({ number }) => number)))}
          </Text>
        )}
        <ChartKey ground={content.ground} bottom={content.bottom} places={content.places} />
        <LayerReasons notes={chart.layerNotes} />
        <ChartCaption chart={chart} shownAt={levelWords} />
      </View>
    </View>
  );
  if (!wide) return sheet;
  return (
    <ScrollView style={{ flex: 1 }} contentContainerStyle={{ flexGrow: 1 }}>
      {sheet}
    </ScrollView>
  );
}

function hint(hasLayers: boolean, letters: string): string {
  const touch = hasLayers
    ? 'Touch the water to read it; touch a peg to choose it.'
    : 'Touch a peg to choose it.';
  return letters ? `${touch} Pegs stand here without their letters ${letters}.` : touch;
}
