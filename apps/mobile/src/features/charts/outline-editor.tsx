import { useCallback, useDeferredValue, useMemo, useState, type ReactNode } from 'react';
import type { OutlineSource } from '@mereward/shared/lakes/outline-source';
import { toPlane, type LonLat, type Point } from '@mereward/shared/geometry/plane';
import { View } from 'react-native';
import { Button } from '@/components/button';
import { FieldError } from '@/components/field-frame';
import { space } from '@/constants/layout';
import { waterTint } from '@/features/charts/lake-backdrop';
import { LakeCanvas, type Draw } from '@/features/charts/lake-canvas';
import { OutlineFound } from '@/features/charts/outline-found';
import { OutlineImport } from '@/features/charts/outline-import';
import { OutlinePoints } from '@/features/charts/outline-points';
import {
  frameOf,
  placeOf,
  planeSketch,
  pointsFromPxPerM,
  sideNear,
  workMarks,
  closedMarks,
} from '@/features/charts/outline-drawing';
import type { Backdrop } from '@/features/charts/picture-backdrop';
import { OutlineWalk } from '@/features/charts/outline-walk';
import { useSketch } from '@/features/charts/use-sketch';
import { frameWithWalk, planeWalk, walkMarks } from '@/features/charts/walk-drawing';
import {
  addPlace,
  closeRing,
  insertPlace,
  mayClose,
  movePlace,
  openRingOf,
  readSketch,
  removePlace,
  removeRing,
  ringName,
  startIsland,
  startShore,
  type Sketch,
} from '@/features/lakes/outline-sketch';
import { useShoreWalk } from '@/features/lakes/use-shore-walk';
import { positionText } from '@/lib/position-text';
import { useWide } from '@/hooks/use-wide';

type Props = {
  sketch: Sketch;
  onChange: (sketch: Sketch) => void;
  /** The middle of the sheet drawn on. */
  origin: LonLat;
  /** Pegs and marks that stand already. */
  under: Draw;
  error?: string | undefined;
  /** Names what is drawn among what this device keeps: a walk round it goes on after a reload. */
  keptAs: string;
  /** Told how the shore was found, when the editor knows: walked round with the phone. */
  onSource: (source: OutlineSource) => void;
  /** A picture to trace over, and what is chosen about it. */
  backdrop?: Backdrop | undefined;
  beside?: ReactNode;
};

/** While one walks, a finger that slips on the canvas changes nothing. */
const NO_HANDLES: readonly [] = [];

const idOf = (ring: number, index: number): string => `${String(ring)}.${String(index)}`;
const spotOf = (id: string) => {
  const [ring = 0, index = 0] = id.split('.').map(Number);
  return { ring, index };
};

/** Draws a lake's shore and islands: by tapping, by typing each point, or from a file. */
export function OutlineEditor({ sketch, onChange, origin, under, error, keptAs, ...rest }: Props) {
  const { backdrop, beside, onSource } = rest;
  const wide = useWide();
  const deed = useSketch(sketch, onChange);
  const { chosen } = deed;
  const rings = useMemo(() => planeSketch(sketch, origin), [sketch, origin]);
  const sheet = positionText(origin);
  const [{ on, frame }, setFramed] = useState(() => ({ on: sheet, frame: frameOf(rings) }));
  if (on !== sheet) setFramed({ on: sheet, frame: frameOf(rings) }); // the sheet was moved: show all of it again
  const setFrame = (next: typeof frame): void => setFramed({ on: sheet, frame: next });
  const settled = useDeferredValue(sketch);
  const reading = useMemo(() => readSketch(settled), [settled]);
  const faults = useMemo(
    () =>
      (reading?.findings ?? []).flatMap(({ at, kind }) =>
        at && kind === 'refused' ? [toPlane(origin, at)] : [],
      ),
    [reading, origin],
  );
  const fromPxPerM = useMemo(() => pointsFromPxPerM(rings), [rings]);
  const walking = useShoreWalk(keptAs);
  const walked = useMemo(
    () => (walking.walk ? planeWalk(walking.walk, origin) : null),
    [walking.walk, origin],
  );
  const shown = useMemo(
    () => (walked ? frameWithWalk(frame, walked, rings.length === 0) : frame),
    [frame, walked, rings.length],
  );
  const over = useCallback<Draw>(
    ({ palette, view }) => [
      ...workMarks(rings, { palette, chosen, faults, showPoints: view.pxPerM >= fromPxPerM }),
      ...(walked ? walkMarks(walked, palette) : []),
    ],
    [rings, chosen, faults, fromPxPerM, walked],
  );
  const overPicture = backdrop !== undefined;
  const water = useCallback<Draw>(
    (pen) => [...closedMarks(rings, pen.palette, overPicture ? null : waterTint(pen.palette)), ...under(pen)],
    [rings, under, overPicture],
  );
  const handles = rings.flatMap(({ points }, ring) =>
    points.map((point, index) => ({ ...point, id: idOf(ring, index) })),
  );
  const open = openRingOf(sketch);

  const tap = (point: Point, reachM: number): void => {
    if (sketch.rings.length === 0 || open !== null) {
      deed.change(addPlace(sketch, placeOf(origin, point)));
      return;
    }
    const side = sideNear(rings, point, reachM);
    if (!side) deed.setChosen(null);
    else
      deed.change(insertPlace(sketch, side, placeOf(origin, side.at)), {
        ring: side.ring,
        index: side.index + 1,
      });
  };
  const pick = (id: string): void => {
    const spot = spotOf(id);
    if (spot.ring === open && spot.index === 0 && mayClose(sketch)) deed.change(closeRing(sketch));
    else deed.setChosen(spot);
  };
  const replace = (next: Sketch): void => {
    deed.change(next);
    setFrame(frameOf(planeSketch(next, origin)));
  };
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.large }}>
      <View style={{ flexGrow: 3, flexBasis: 340, minWidth: 0, maxWidth: '100%' }}>
        <LakeCanvas
          key={sheet}
          label="Outline of the lake, to draw on"
          frame={shown}
          under={water}
          over={over}
          handles={walking.walk ? NO_HANDLES : handles}
          backdrop={backdrop}
          handlesFromPxPerM={fromPxPerM}
          onTap={walking.walk ? undefined : tap}
          onPick={pick}
          onMove={(id, point, begins) =>
            deed.drag(movePlace(sketch, spotOf(id), placeOf(origin, point)), begins)
          }
          onFit={() => setFrame(frameOf(rings))}
          heightPx={wide ? 560 : 420}
        />
      </View>
      <View style={{ flexGrow: 1, flexBasis: 320, gap: space.medium, minWidth: 0 }}>
        {walking.walk ? null : <SketchButtons sketch={sketch} deed={deed} />}
        <OutlineWalk walking={walking} sketch={sketch} onRing={replace} onSource={onSource} />
        {walking.walk ? null : (
          <>
            <OutlineFound sketch={settled} reading={reading} crowded={fromPxPerM > 0 && open === null} />
            {error ? <FieldError id="outline" words={error} /> : null}
            {beside}
            <OutlineImport onRead={replace} replaces={sketch.rings.length > 0} />
            <OutlinePoints sketch={sketch} onChange={deed.change} chosen={chosen} />
          </>
        )}
      </View>
    </View>
  );
}

type ButtonsProps = { sketch: Sketch; deed: ReturnType<typeof useSketch> };

function SketchButtons({ sketch, deed }: ButtonsProps) {
  const { chosen } = deed;
  const open = openRingOf(sketch);
  return (
    <View style={{ flexDirection: 'row', flexWrap: 'wrap', gap: space.small }}>
      <Button label="Undo" disabled={!deed.mayUndo} onPress={deed.undo} />
      {open !== null ? (
        <Button
          label="Close the ring"
          disabled={!mayClose(sketch)}
          onPress={() => deed.change(closeRing(sketch))}
        />
      ) : null}
      {open === null && sketch.rings.length > 0 ? (
        <>
          <Button label="Add an island" onPress={() => deed.change(startIsland(sketch))} />
          <Button label="Draw the shore anew" onPress={() => deed.change(startShore(sketch))} />
        </>
      ) : null}
      {chosen ? (
        <Button label="Take this point out" onPress={() => deed.change(removePlace(sketch, chosen))} />
      ) : null}
      {chosen && chosen.ring > 0 ? (
        <Button
          label={`Take ${ringName(chosen.ring)} away`}
          kind="danger"
          onPress={() => deed.change(removeRing(sketch, chosen.ring))}
        />
      ) : null}
    </View>
  );
}
