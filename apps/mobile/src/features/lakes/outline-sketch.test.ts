import { expect, test } from 'vitest';
import {
  addPlace,
  closeRing,
  EMPTY_SKETCH,
  FinishedSketch,
  insertPlace,
  mayClose,
  openRingOf,
  putRing,
  readSketch,
  removePlace,
  sketchOf,
  startIsland,
  startShore,
  type Sketch,
} from './outline-sketch';

const LON = -1.2;
const LAT = 52.4;
const STEP = 0.001; // about 68 m east, 111 m north
const at = (east: number, north: number): [number, number] => [LON + east * STEP, LAT + north * STEP];

const tapped = (...places: [number, number][]): Sketch =>
  places.reduce((sketch, place) => addPlace(sketch, place), EMPTY_SKETCH);

const square = closeRing(tapped(at(0, 0), at(1, 0), at(1, 1), at(0, 1)));

test('taps make a shore that closes from three points on', () => {
  expect(mayClose(tapped(at(0, 0), at(1, 0)))).toBe(false);
  expect(openRingOf(square)).toBeNull();
  expect(readSketch(square)?.areaM2).toBeCloseTo(68.04 * 111.27, -2); // metres of a thousandth of a degree here
});

test('a tap after the shore is closed adds nothing until an island is begun', () => {
  expect(addPlace(square, at(0.5, 0.5))).toBe(square);
  const island = [at(0.4, 0.4), at(0.6, 0.4), at(0.5, 0.6)];
  const drawn = closeRing(island.reduce((sketch, place) => addPlace(sketch, place), startIsland(square)));
  expect(drawn.rings).toHaveLength(2);
  const water = readSketch(drawn)?.areaM2 ?? 0;
  expect(water).toBeLessThan(readSketch(square)?.areaM2 ?? 0);
});

test('a shore that crosses itself is refused with the place', () => {
  const bow = closeRing(tapped(at(0, 0), at(1, 1), at(1, 0), at(0, 1)));
  const finding = readSketch(bow)?.findings.find(({ kind }) => kind === 'refused');
  expect(finding?.words).toContain('crosses');
  expect(finding?.at?.[0]).toBeCloseTo(LON + STEP / 2, 6);
  expect(FinishedSketch.safeParse(bow).success).toBe(false);
});

test('an open ring and an empty sketch say what to do', () => {
  expect(FinishedSketch.safeParse(EMPTY_SKETCH).error?.issues[0]?.message).toContain('Draw the shore');
  const open = tapped(at(0, 0), at(1, 0), at(1, 1));
  expect(FinishedSketch.safeParse(open).error?.issues[0]?.message).toContain('Close the shore');
});

test('points go in between and out again, and a ring left with two is open', () => {
  const more = insertPlace(square, { ring: 0, index: 3 }, at(-0.2, 0.5));
  expect(more.rings[0]?.places).toHaveLength(5);
  const fewer = [0, 0].reduce((sketch) => removePlace(sketch, { ring: 0, index: 0 }), square);
  expect(fewer.rings[0]).toEqual({ closed: false, places: [at(1, 1), at(0, 1)] });
});

test('a finished sketch and its outline are the same drawing', () => {
  const outline = FinishedSketch.parse(square);
  expect(sketchOf(outline)).toEqual(square);
});

test('a whole ring takes the shore’s place, or is one more island', () => {
  const island = [at(0.4, 0.4), at(0.6, 0.4), at(0.5, 0.6)];
  const withIsland = putRing(startIsland(square), 'island', island);
  expect(withIsland.rings.map(({ closed, places }) => [closed, places.length])).toEqual([
    [true, 4],
    [true, 3],
  ]);
  const anew = putRing(withIsland, 'shore', [at(-1, -1), at(2, -1), at(2, 2), at(-1, 2), at(-1.5, 0)]);
  expect(anew.rings.map(({ places }) => places.length)).toEqual([5, 3]);
  expect(putRing(EMPTY_SKETCH, 'shore', island).rings).toHaveLength(1);
});

test('a shore begun anew leaves the islands, and taps draw it', () => {
  const island = [at(0.4, 0.4), at(0.6, 0.4), at(0.5, 0.6)];
  const begun = startShore(putRing(square, 'island', island));
  expect(readSketch(begun)).toBeNull();
  const taps = [at(-1, -1), at(2, -1), at(2, 2), at(-1, 2)];
  const drawn = closeRing(taps.reduce((sketch, place) => addPlace(sketch, place), begun));
  expect(drawn.rings.map(({ closed, places }) => [closed, places.length])).toEqual([
    [true, 4],
    [true, 3],
  ]);
  expect(readSketch(drawn)?.outline?.coordinates).toHaveLength(2);
});
