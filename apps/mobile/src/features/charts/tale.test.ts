import { describe, expect, test } from 'vitest';
import { palettes } from '@mereward/shared/charts/drawing/palette';
import { roomFor } from './tale-marks';
import { changeTale, featureTale, insideRings, taleAt, type Tale } from './tale';

const square = (halfM: number, atM = 0): number[] => [
  atM - halfM,
  -halfM,
  atM + halfM,
  -halfM,
  atM + halfM,
  halfM,
  atM - halfM,
  halfM,
  atM - halfM,
  -halfM,
];
const tale = (key: string, halfM: number, atM = 0): Tale => ({
  key,
  kind: 'feature',
  title: key,
  words: '',
  sign: key,
  certain: true,
  xM: atM,
  yM: 0,
  rings: [square(halfM, atM)],
  areaM2: 4 * halfM * halfM,
});

describe('what is told of a touched place', () => {
  test('is the smallest area it lies in', () => {
    const tales = [tale('shelf', 20), tale('bar', 4)];
    expect(taleAt(tales, { xM: 1, yM: 1 })?.key).toBe('bar');
    expect(taleAt(tales, { xM: 10, yM: 0 })?.key).toBe('shelf');
    expect(taleAt(tales, { xM: 30, yM: 0 })).toBeNull();
  });

  test('is an area whose middle is near, where it lies in none', () => {
    expect(taleAt([tale('hole', 1, 50)], { xM: 52.5, yM: 0 })?.key).toBe('hole');
  });

  test('leaves a hole in an area out of it', () => {
    const rings = [square(10), square(3)];
    expect(insideRings(rings, { xM: 0, yM: 0 })).toBe(false);
    expect(insideRings(rings, { xM: 6, yM: 0 })).toBe(true);
  });
});

test('a feature’s words don’t say its name twice', () => {
  const named = featureTale({
    ...tale('bar-2', 4),
    kind: 'bar',
    name: 'Bar 2',
    words: 'Bar 2: 34 m long, 9 m wide',
    lengthM: 34,
    widthM: 9,
    axisDeg: 40,
    depthM: 1.4,
    aroundM: 2.5,
    reliefM: 1.1,
    reliefSigmaM: 0.2,
    rings: [square(4)],
  });
  expect(named).toMatchObject({ title: 'Bar 2', words: '34 m long, 9 m wide', sign: 'Bar 2' });
});

test('a change says on the map which way and by how much', () => {
  const change = {
    words: '',
    ...{ xM: 0, yM: 0, areaM2: 40, rings: [square(3)] },
    meanSigmaM: 0.1,
    volumeM3: -12,
    from: null,
    to: null,
  };
  expect(changeTale({ ...change, kind: 'shallower', meanChangeM: -0.31 }, 0).sign).toBe('0.3 m shallower');
  expect(changeTale({ ...change, kind: 'cover_lost', meanChangeM: null }, 1).sign).toBe('cover lost');
});

test('where names would lie on one another the larger is written, and the chosen one always', () => {
  const view = { widthPx: 400, heightPx: 400, pxPerM: 1, centre: { xM: 0, yM: 0 }, turnDeg: 0 };
  const tales = [tale('small', 2, 10), tale('large', 9), tale('far', 2, 150)];
  const written = (chosenKey: string | null) =>
    roomFor(tales, { palette: palettes.light, view, chosenKey }).map(({ key }) => key);
  expect(written(null).sort()).toEqual(['far', 'large']);
  expect(written('small').sort()).toEqual(['far', 'small']);
});
