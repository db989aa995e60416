import { useMemo, useState } from 'react';
import { palettes } from '@mereward/shared/charts/drawing/palette';
import { grownView, zoomedView } from '@mereward/shared/charts/drawing/view-moves';
import { distanceBetweenM, type Point } from '@mereward/shared/geometry/point';
import { View, type LayoutChangeEvent } from 'react-native';
import { Button } from '@/components/button';
import { space } from '@/constants/layout';
import { useTheme } from '@/hooks/use-theme';
import { useChartUnits } from './use-chart-units';
import type { Draw } from './lake-canvas';
import { baseLayer, chosenLayer, fixedLayer, svgOf, type MapChosen, type MapContent } from './map-layers';
import { MapSurface } from './map-surface';
import { OVERSCAN } from './map-surface-props';
import { ZOOM_STEP } from './use-map-keys';
import { useMapView } from './use-map-view';

const FINGER_PX = 24; // reach of a tap round a peg

type Props = {
  /** "Chart of Far Ostle": names it to a screen reader. */
  label: string;
  content: MapContent;
  chosen: MapChosen;
  /** What is told over the layers: it is drawn by itself, so that showing it leaves the chart as it is drawn. */
  told?: Draw | undefined;
  onPeg: (pegId: string) => void;
  /** A tap on the water. */
  onPlace?: ((place: Point) => void) | undefined;
  /** A drag out from the chosen peg draws a cast. */
  onAim?: ((place: Point, done: boolean) => void) | undefined;
};

/** A lake's map with everything that can be done to it. It fills the box it is put in. */
export function ChartMap({ label, content, chosen, told, onPeg, onPlace, onAim }: Props) {
  const { name } = useTheme();
  const units = useChartUnits();
  const [size, setSize] = useState({ widthPx: 0, heightPx: 0 });
  const { view, limits, onView, fit, isWhole } = useMapView(content.ground.water, size);
  const palette = palettes[name];
  const unit = units.length;
  const base = useMemo(
    () => (view ? baseLayer(content, { view, palette, unit }) : ''),
    [content, view, palette, unit],
  );
  const top = useMemo(
    () => (view ? chosenLayer(content, chosen, { view, palette, unit }) : ''),
    [content, chosen, view, palette, unit],
  );
  const tales = useMemo(() => {
    if (!view || !told) return '';
    const grown = grownView(view, OVERSCAN);
    return svgOf(grown, told({ palette, view: grown }), 'told');
  }, [told, view, palette]);
  const layers = useMemo(() => [base, tales, top], [base, tales, top]);
  const fixed = useMemo(
    () => (view ? fixedLayer({ view, palette, unit }, units.stickSpacingM) : ''),
    [view, palette, unit, units.stickSpacingM],
  );
  const measure = ({ nativeEvent: { layout } }: LayoutChangeEvent): void =>
    setSize({ widthPx: Math.round(layout.width), heightPx: Math.round(layout.height) });
  const pegAt = (place: Point) => (view ? nearestWithin(content.pegs, place, FINGER_PX / view.pxPerM) : null);
  return (
    <View style={{ flex: 1, minHeight: 0, overflow: 'hidden' }} onLayout={measure}>
      {view ? (
        <MapSurface
          layers={layers}
          fixed={fixed}
          view={view}
          limits={limits}
          label={label}
          onView={onView}
          onFit={fit}
          onTap={(place) => {
            const peg = pegAt(place);
            if (peg) onPeg(peg.id);
            else onPlace?.(place);
          }}
          grabs={(place) => onAim !== undefined && chosen.pegId !== null && pegAt(place)?.id === chosen.pegId}
          onDrag={(place, done) => onAim?.(place, done)}
        />
      ) : null}
      {view ? (
        <View style={{ position: 'absolute', right: space.small, top: space.small, gap: space.small }}>
          <Button label="+" spoken="Closer" onPress={() => onView(zoomedView(view, ZOOM_STEP, limits))} />
          <Button
            label="−"
            spoken="Farther"
            onPress={() => onView(zoomedView(view, 1 / ZOOM_STEP, limits))}
          />
          {isWhole ? null : <Button label="All" spoken="Show all of the water" onPress={fit} />}
        </View>
      ) : null}
    </View>
  );
}

function nearestWithin<T extends Point>(things: readonly T[], place: Point, reachM: number): T | null {
  let best: T | null = null;
  let bestM = reachM;
  for (const thing of things) {
    const awayM = distanceBetweenM(thing, place);
    if (awayM <= bestM) {
      best = thing;
      bestM = awayM;
    }
  }
  return best;
}
