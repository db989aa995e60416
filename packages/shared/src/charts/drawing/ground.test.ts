import { describe, expect, test } from 'vitest';
import type { Grid } from '../grid';
import { bottomAreas, confidenceAt } from './bottom-areas';
import { bottomMarks, scatter } from './bottom-marks';
import { drawMap, type MapChoice } from './draw-map';
import { groundOf, isWellSurveyed, type Ground } from './ground';
import type { Mark } from './mark';
import { palettes } from './palette';
import { fitView } from './view';
import { isInside, turnOf, widestPlace } from './widest-place';

const SIDE = 41;
const square = [
  { xM: 0, yM: 0 },
  { xM: 40, yM: 0 },
  { xM: 40, yM: 40 },
  { xM: 0, yM: 40 },
];
const outline = { shore: square, islands: [] };
const frame = { columns: SIDE, rows: SIDE, cellM: 1, originM: { xM: 0, yM: 0 } };

/** A bowl 2 m deep in the middle; the quarter past (28, 28) was never surveyed. */
function bowl(): Grid {
  const values = new Float64Array(SIDE * SIDE);
  for (let row = 0; row < SIDE; row++) {
    for (let column = 0; column < SIDE; column++) {
      const away = Math.hypot(column - 20, row - 20) / 20;
      values[row * SIDE + column] = column > 28 && row > 28 ? Number.NaN : Math.max(0.05, 2 * (1 - away));
    }
  }
  return { ...frame, values };
}

const groundAt = (raisedM: number): Ground =>
  groundOf({ outline, depth: bowl(), isobaths: null, stepM: 0.5, raisedM });

const inside = (ring: ArrayLike<number>, xM: number, yM: number): boolean => {
  let within = false;
  for (let i = 0; i < ring.length; i += 2) {
    const j = (i + 2) % ring.length;
    const [ax, ay, bx, by] = [ring[i]!, ring[i + 1]!, ring[j]!, ring[j + 1]!];
    if (ay > yM !== by > yM && xM < ax + ((yM - ay) / (by - ay)) * (bx - ax)) within = !within;
  }
  return within;
};

describe('a chart made ready', () => {
  test('holds every cell nobody surveyed under paper, and none in the middle of the survey', () => {
    const { unsurveyed } = groundAt(0);
    expect(unsurveyed.some((ring) => inside(ring, 34, 34))).toBe(true);
    expect(unsurveyed.some((ring) => inside(ring, 30, 30))).toBe(true);
    expect(unsurveyed.some((ring) => inside(ring, 20, 20))).toBe(false);
  });

  test('lets words stand on surveyed water only, and not at its very edge', () => {
    const ground = groundAt(0);
    expect(isWellSurveyed(ground, { xM: 20, yM: 20 })).toBe(true);
    expect(isWellSurveyed(ground, { xM: 34, yM: 34 })).toBe(false);
    expect(isWellSurveyed(ground, { xM: 28, yM: 28 })).toBe(false);
  });

  test('has a region for each level that reaches the level’s own depth', () => {
    const { levelsM, regions } = groundAt(0);
    expect(levelsM).toEqual([0.5, 1, 1.5, 2]);
    const metre = regions[1];
    expect(metre?.levelM).toBe(1);
    expect(metre?.lines.some((ring) => inside(ring, 20, 11))).toBe(true); // 1.1 m
    expect(metre?.lines.some((ring) => inside(ring, 20, 9))).toBe(false); // 0.9 m
  });

  test('with the water down shows dry bank where the bed stands out, and no deeper water', () => {
    const low = groundAt(-0.6);
    expect(low.levelsM).toEqual([0.5, 1]);
    const dry = (xM: number, yM: number) => low.dry.filter((ring) => inside(ring, xM, yM)).length % 2 === 1;
    expect(dry(20, 3)).toBe(true); // 0.3 m at datum
    expect(dry(36, 36)).toBe(false); // nobody surveyed it
    expect(dry(20, 20)).toBe(false);
    expect(groundAt(0).dry).toEqual([]);
  });

  test('without depths has only the shore', () => {
    const bare = groundOf({ outline, depth: null, isobaths: null, stepM: 0.5, raisedM: 0 });
    expect(bare.depth).toBeNull();
    expect(bare.water[0]).toEqual([0, 0, 40, 0, 40, 40, 0, 40]);
  });
});

describe('a map', () => {
  const ground = groundAt(0);
  const view = fitView(ground.water, { widthPx: 600, heightPx: 600, marginPx: 20 }, 0);
  const choice: MapChoice = {
    palette: palettes.light,
    view,
    depthWords: (depthM) => depthM.toFixed(1),
    selectedPegId: 'p',
    selectedSpotId: null,
  };
  const parts = {
    ground,
    bottom: [],
    soundings: [],
    spots: [],
    pegs: [{ id: 'p', number: '7', xM: 0, yM: 20, facingDeg: 90, status: 'open' as const }],
    cast: { from: { xM: 0, yM: 20 }, bearingDeg: 90, rangeM: 20, wrapRangesM: [4, 8, 12, 16], ellipse: null },
  };
  const flat = (marks: readonly Mark[]): Mark[] =>
    marks.flatMap((mark) => (mark.kind === 'clip' ? [mark, ...flat(mark.marks)] : [mark]));
  const marks = flat(drawMap(parts, choice));
  const words = marks.flatMap((mark) => (mark.kind === 'text' ? [mark] : []));

  test('labels its isobaths, says what nobody surveyed, and numbers its pegs on the land side', () => {
    expect(words.map((mark) => mark.words)).toEqual(expect.arrayContaining(['1.0', '7', 'not surveyed']));
    expect(words.find((mark) => mark.words === '7')?.x).toBeLessThan(0);
  });

  test('keeps its words on the water and level when the map is turned', () => {
    const turned = fitView(ground.water, { widthPx: 600, heightPx: 600, marginPx: 20 }, 90);
    const mark = flat(drawMap(parts, { ...choice, view: turned })).find(
      (each) => each.kind === 'text' && each.words === 'not surveyed',
    );
    expect(mark?.kind === 'text' && mark.x > 28 && mark.x < 40 && mark.y > 28 && mark.y < 40).toBe(true);
  });

  test('keeps every figure upright', () => {
    for (const { turnDeg } of words) expect(Math.abs(turnDeg)).toBeLessThanOrEqual(90);
  });

  test('a cast carries a tick for every whole wrap', () => {
    const ticks = marks.filter((mark) => mark.kind === 'path' && mark.lines.length === 4);
    expect(ticks).toHaveLength(2); // halo and ink
  });
});

describe('the bottom', () => {
  const classes = new Uint8Array(SIDE * SIDE).fill(255);
  const confidence = new Float64Array(SIDE * SIDE);
  for (let row = 5; row < 25; row++) {
    for (let column = 5; column < 35; column++) {
      classes[row * SIDE + column] = column < 20 ? 3 : 0; // gravel west, silt east
      confidence[row * SIDE + column] = column < 20 ? 0.9 : 0.45;
    }
  }
  const areas = bottomAreas({ ...frame, classes, confidence }, null);
  const ground = groundAt(0);
  const view = fitView(ground.water, { widthPx: 800, heightPx: 800, marginPx: 0 }, 0);

  test('each class has its own area, with its own confidence', () => {
    expect(areas.map(({ kind }) => kind)).toEqual(['silt', 'gravel']);
    const [silt, gravel] = areas;
    expect(confidenceAt(gravel!, 12, 15)).toBeCloseTo(0.9, 9);
    expect(confidenceAt(gravel!, 28, 15)).toBe(0);
    expect(confidenceAt(silt!, 28, 15)).toBeCloseTo(0.45, 9);
  });

  test('where the chart is unsure the pattern is sparse', () => {
    const count = (kind: number) =>
      bottomMarks([areas[kind]!], { ground, palette: palettes.light, view }).reduce(
        (sum, mark) => sum + (mark.kind === 'glyphs' ? mark.at.length / 2 : 0),
        0,
      );
    const unsure = count(0);
    const sure = bottomMarks([{ ...areas[0]!, confidence: confidence.map((c) => (c ? 0.9 : 0)) }], {
      ground,
      palette: palettes.light,
      view,
    }).reduce((sum, mark) => sum + (mark.kind === 'glyphs' ? mark.at.length / 2 : 0), 0);
    expect(unsure).toBeGreaterThan(0);
    expect(unsure).toBeLessThan(sure * 0.5);
  });

  test('a lattice point is scattered alike on every redraw, and spread evenly', () => {
    expect(scatter(3, -7, 1)).toBe(scatter(3, -7, 1));
    let sum = 0;
    for (let i = -20; i < 20; i++) for (let j = -20; j < 20; j++) sum += scatter(i, j, 2);
    expect(sum / 1600).toBeCloseTo(0.5, 1);
  });
});

test('words stand in the widest part of an area and out of its holes', () => {
  const ring = [0, 0, 40, 0, 40, 20, 0, 20];
  const hole = [10, 2, 10, 18, 38, 18, 38, 2];
  expect(turnOf(ring)).toBeGreaterThan(0);
  expect(turnOf(hole)).toBeLessThan(0);
  expect(widestPlace(ring, [])?.xM).toBeCloseTo(20, 6);
  expect(isInside([ring, hole], 20, 10)).toBe(false);
  expect(isInside([ring, hole], 5, 10)).toBe(true);
  const beside = widestPlace(ring, [hole]);
  expect(beside && beside.xM > 10 && beside.xM < 38 && beside.yM > 2 && beside.yM < 18).toBe(false);
});
