import type { LonLat } from '@mereward/shared/geometry/plane';
import { outlineFromRings, type OutlineReading } from '@mereward/shared/geometry/outline';
import type { LakePolygon } from '@mereward/shared/lakes/contract';
import { z } from 'zod';

/** One ring being drawn: its places in order, the first not repeated at the end. */
export const SketchRing = z.object({
  closed: z.boolean(),
  places: z.array(z.tuple([z.number(), z.number()])),
});
export type SketchRing = z.infer<typeof SketchRing>;

/** An outline being drawn: the shore, then the islands. The last ring may still be open. */
export const Sketch = z.object({ rings: z.array(SketchRing) });
export type Sketch = z.infer<typeof Sketch>;

type Spot = { ring: number; index: number };

export const EMPTY_SKETCH: Sketch = { rings: [] };
const FEWEST = 3;

export const ringName = (ring: number): string => (ring === 0 ? 'the shore' : `island ${String(ring)}`);

/** The ring that the next tap adds to; null when every ring is closed. */
export function openRingOf({ rings }: Sketch): number | null {
  const at = rings.findIndex(({ closed }) => !closed);
  return at < 0 ? null : at;
}

const withRing = (sketch: Sketch, at: number, ring: SketchRing): Sketch => ({
  rings: sketch.rings.map((each, i) => (i === at ? ring : each)),
});

/** Adds a place to the open ring; the first place of all begins the shore. */
export function addPlace(sketch: Sketch, place: [number, number]): Sketch {
  if (sketch.rings.length === 0) return { rings: [{ closed: false, places: [place] }] };
  const at = openRingOf(sketch);
  const ring = at === null ? undefined : sketch.rings[at];
  if (at === null || !ring) return sketch;
  return withRing(sketch, at, { ...ring, places: [...ring.places, place] });
}

export function movePlace(sketch: Sketch, { ring: at, index }: Spot, place: [number, number]): Sketch {
  const ring = sketch.rings[at];
  if (!ring) return sketch;
  return withRing(sketch, at, {
    ...ring,
    places: ring.places.map((each, i) => (i === index ? place : each)),
  });
}

/** Puts a place into a ring after another one. */
export function insertPlace(sketch: Sketch, { ring: at, index }: Spot, place: [number, number]): Sketch {
  const ring = sketch.rings[at];
  if (!ring) return sketch;
  const places = [...ring.places.slice(0, index + 1), place, ...ring.places.slice(index + 1)];
  return withRing(sketch, at, { ...ring, places });
}

/** Takes a place out. A ring left with fewer than three is open again; an empty island is gone, as is an empty shore without islands. */
export function removePlace(sketch: Sketch, { ring: at, index }: Spot): Sketch {
  const ring = sketch.rings[at];
  if (!ring) return sketch;
  const places = ring.places.filter((_, i) => i !== index);
  if (places.length === 0 && (at > 0 || sketch.rings.length === 1))
    return { rings: sketch.rings.filter((_, i) => i !== at) };
  return withRing(sketch, at, { places, closed: ring.closed && places.length >= FEWEST });
}

/** Whether the open ring has enough places to be closed. */
export function mayClose(sketch: Sketch): boolean {
  const at = openRingOf(sketch);
  return at !== null && (sketch.rings[at]?.places.length ?? 0) >= FEWEST;
}

export function closeRing(sketch: Sketch): Sketch {
  const at = openRingOf(sketch);
  const ring = at === null ? undefined : sketch.rings[at];
  return at !== null && ring && mayClose(sketch) ? withRing(sketch, at, { ...ring, closed: true }) : sketch;
}

/** Begins an island; the shore must be closed first. */
export function startIsland(sketch: Sketch): Sketch {
  if (sketch.rings.length === 0 || openRingOf(sketch) !== null) return sketch;
  return { rings: [...sketch.rings, { closed: false, places: [] }] };
}

/** Begins the shore anew; the islands stay. */
export const startShore = ({ rings }: Sketch): Sketch => ({
  rings: [{ closed: false, places: [] }, ...rings.slice(1)],
});

/** Puts a whole ring in: as the shore, in the place of the one there was, or as one more island. */
export function putRing(sketch: Sketch, of: 'shore' | 'island', places: [number, number][]): Sketch {
  const ring: SketchRing = { closed: true, places };
  const islands = sketch.rings.slice(1);
  if (of === 'shore') return { rings: [ring, ...islands] };
  return { rings: [...sketch.rings.filter(({ closed, places: drawn }) => closed || drawn.length > 0), ring] };
}

export function removeRing(sketch: Sketch, at: number): Sketch {
  return at === 0 ? EMPTY_SKETCH : { rings: sketch.rings.filter((_, i) => i !== at) };
}

/** An outline as something to draw on. */
export const sketchOf = ({ coordinates }: LakePolygon): Sketch => ({
  rings: coordinates.map((ring) => ({
    closed: true,
    places: ring.slice(0, -1).map(([lon, lat]) => [lon, lat]),
  })),
});

const closedRing = (places: readonly [number, number][]): LonLat[] => {
  const [first] = places;
  return first ? [...places, first] : [];
};

/**
 * What the drawing comes to: the outline with its area, or what is wrong with it and where. An open ring is looked
 * at as if its last place were joined to its first; with fewer than three places there is nothing to say of it yet.
 */
export function readSketch({ rings }: Sketch): OutlineReading | null {
  const drawn = rings.filter(({ closed, places }) => closed || places.length >= FEWEST);
  if ((rings[0]?.places.length ?? 0) < FEWEST) return null;
  return outlineFromRings(drawn.map(({ places }) => closedRing(places)));
}

/** A sketch as a form hands it on: closed, sound, and an outline; else the reason why not yet. */
export const FinishedSketch = Sketch.transform((sketch, context): LakePolygon => {
  const refuse = (message: string): never => {
    context.issues.push({ code: 'custom', message, input: sketch });
    return z.NEVER;
  };
  const open = openRingOf(sketch);
  if (sketch.rings.length === 0) return refuse('Draw the shore on the canvas, or read it from a file.');
  if (open !== null)
    return refuse(`Close ${ringName(open)} first: press “Close the ring”, or tap its first point.`);
  const reading = readSketch(sketch);
  if (reading?.outline) return reading.outline;
  const fault = reading?.findings.find(({ kind }) => kind === 'refused');
  return refuse(fault?.words ?? 'The shore needs at least three points.');
});
