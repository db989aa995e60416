import { useMemo, useRef, useState } from 'react';
import type { Line, Mark } from '@mereward/shared/charts/drawing/mark';
import { palettes, type Palette } from '@mereward/shared/charts/drawing/palette';
import type { View as MapView } from '@mereward/shared/charts/drawing/view';
import { grownView, zoomedView } from '@mereward/shared/charts/drawing/view-moves';
import { distanceBetweenM, type Point } from '@mereward/shared/geometry/point';
import { View, type LayoutChangeEvent } from 'react-native';
import { Button } from '@/components/button';
import { radius, space } from '@/constants/layout';
import { fixedLayer, svgOf } from '@/features/charts/map-layers';
import { MapSurface } from '@/features/charts/map-surface';
import { OVERSCAN } from '@/features/charts/map-surface-props';
import type { Backdrop } from '@/features/charts/picture-backdrop';
import { ZOOM_STEP } from '@/features/charts/use-map-keys';
import { useMapView } from '@/features/charts/use-map-view';
import { useTheme } from '@/hooks/use-theme';
import { useUnits } from '@/hooks/use-units';

/** Something on the canvas that can be taken hold of. */
export type Handle = Point & { id: string };
export type Draw = (pen: { palette: Palette; view: MapView }) => readonly Mark[];

const FINGER_PX = 22;
const SLIP_PX = 6; // a press that slips less is a tap

type Held = { handle: Handle; from: Point; slipped: boolean };

type Props = {
  /** What it is for, to a screen reader: "Outline of Far Ostle". */
  label: string;
  /** What the view shows all of at first. Changing it does not move a view the reader has chosen. */
  frame: readonly Line[];
  /** What stands still while something is moved. Keep both drawings the same function while nothing changes. */
  under: Draw;
  over: Draw;
  handles: readonly Handle[];
  onTap?: ((place: Point, reachM: number) => void) | undefined;
  onPick?: ((id: string) => void) | undefined;
  /** `begins` is true for the first step of each drag. */
  onMove: (id: string, place: Point, begins: boolean) => void;
  /** Handles are in use from this scale on; farther off a drag pans. */
  handlesFromPxPerM?: number | undefined;
  /** The reader asked for all of it again. */
  onFit?: (() => void) | undefined;
  heightPx?: number | undefined;
  /** A picture under the drawing. */
  backdrop?: Backdrop | undefined;
  /** The plane is no ground but a picture's own pixels: no scale bar and no north. */
  groundless?: boolean | undefined;
};

/** A sheet of the lake's plane to draw on: tap to place, drag a handle to move it, drag elsewhere to pan, pinch or wheel to scale. */
export function LakeCanvas({ label, frame, under, over, handles, heightPx = 440, ...deeds }: Props) {
  const { handlesFromPxPerM = 0, groundless = false } = deeds;
  const { name, colours } = useTheme();
  const units = useUnits();
  const palette = palettes[name];
  const [size, setSize] = useState({ widthPx: 0, heightPx: 0 });
  const { view, limits, onView, fit: fitFrame } = useMapView(frame, size);
  const held = useRef<Held | null>(null);
  const below = useMemo(() => (view ? drawn('under', under, { palette, view }) : ''), [under, palette, view]);
  const above = useMemo(() => (view ? drawn('over', over, { palette, view }) : ''), [over, palette, view]);
  const layers = useMemo(() => [below, above], [below, above]);
  const fixed = useMemo(
    () => (view && !groundless ? fixedLayer({ view, palette, unit: units.length }, units.stickSpacingM) : ''),
    [view, palette, units, groundless],
  );
  const measure = ({ nativeEvent: { layout } }: LayoutChangeEvent): void =>
    setSize({ widthPx: Math.round(layout.width), heightPx: Math.round(layout.height) });
  const reachM = view ? FINGER_PX / view.pxPerM : 0;
  const fit = (): void => {
    deeds.onFit?.();
    fitFrame();
  };
  const grab = (place: Point): boolean => {
    const near = view && view.pxPerM >= handlesFromPxPerM ? nearest(handles, place, reachM) : null;
    held.current = near && { handle: near, from: place, slipped: false };
    return near !== null;
  };
  const drag = (place: Point, done: boolean): void => {
    const now = held.current;
    if (!now || !view) return;
    if (done) held.current = null;
    const begins = !now.slipped && distanceBetweenM(now.from, place) * view.pxPerM > SLIP_PX;
    now.slipped ||= begins;
    if (now.slipped) deeds.onMove(now.handle.id, carried(now, place), begins);
    else if (done) deeds.onPick?.(now.handle.id);
  };
  return (
    <View
      style={{
        height: heightPx,
        overflow: 'hidden',
        borderWidth: 1,
        borderColor: colours.rule,
        borderRadius: radius.control,
      }}
      onLayout={measure}
    >
      {view ? (
        <MapSurface
          layers={layers}
          fixed={fixed}
          backdrop={deeds.backdrop}
          view={view}
          limits={limits}
          label={label}
          onView={onView}
          onFit={fit}
          onTap={(place) => deeds.onTap?.(place, reachM)}
          grabs={grab}
          onDrag={drag}
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
          <Button label="All" spoken="Show all of it" onPress={fit} />
        </View>
      ) : null}
    </View>
  );
}

/** A handle moves by as much as the finger does, wherever on it the finger came down. */
const carried = ({ handle, from }: Held, to: Point): Point => ({
  xM: handle.xM + to.xM - from.xM,
  yM: handle.yM + to.yM - from.yM,
});

function drawn(idPrefix: string, draw: Draw, { palette, view }: { palette: Palette; view: MapView }): string {
  const grown = grownView(view, OVERSCAN);
  return svgOf(grown, draw({ palette, view: grown }), idPrefix);
}

function nearest(handles: readonly Handle[], place: Point, reachM: number): Handle | null {
  let best: Handle | null = null;
  let bestM = reachM;
  for (const handle of handles) {
    const awayM = distanceBetweenM(handle, place);
    if (awayM > bestM) continue;
    best = handle;
    bestM = awayM;
  }
  return best;
}
