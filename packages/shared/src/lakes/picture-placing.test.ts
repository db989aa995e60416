import { expect, test } from 'vitest';
import { fromPlane, type LonLat } from '../geometry/plane';
import { pictureCautions, placedPicture, worstPoint } from './picture-placing';

const ORIGIN: LonLat = [1.6, 53.6];
const SIZE = { widthPx: 2000, heightPx: 1600 };
const known = (label: string, [xPx, yPx]: [number, number], [xM, yM]: [number, number]) => {
  const [lon, lat] = fromPlane(ORIGIN, { xM, yM });
  return { label, xPx, yPx, position: [lon, lat] as [number, number] };
};
const corners = [
  known('Peg 1', [0, 0], [-100, 80]),
  known('Peg 2', [2000, 0], [100, 80]),
  known('Peg 3', [0, 1600], [-100, -80]),
  known('Peg 4', [2000, 1600], [100, -80]),
];
const cautionsOf = (points: typeof corners, fit: 'similarity' | 'affine' = 'similarity') => {
  const placed = placedPicture(points, { origin: ORIGIN, fit });
  if (!placed) throw new Error('no fit');
  return pictureCautions(placed, points, SIZE);
};

test('four good points all round the picture give nothing to be cautious of', () => {
  expect(cautionsOf(corners)).toEqual([]);
  expect(cautionsOf(corners, 'affine')).toEqual([]);
});

test('two points are told to check nothing', () => {
  expect(cautionsOf(corners.slice(1, 3))).toEqual([{ kind: 'unchecked' }]);
});

test('a wrong point is named with how far it is missed', () => {
  const wrong = [...corners.slice(0, 3), known('Peg 4', [2000, 1600], [130, -80])];
  const [caution] = cautionsOf(wrong);
  expect(caution).toMatchObject({ kind: 'misses', worst: 'Peg 4' });
  const placed = placedPicture(wrong, { origin: ORIGIN, fit: 'similarity' });
  expect(placed && worstPoint(placed)).toBe(3);
});

test('points in one corner are told to say little of the rest', () => {
  const near = [known('a', [0, 0], [0, 0]), known('b', [300, 0], [30, 0]), known('c', [0, 300], [0, -30])];
  expect(cautionsOf(near)).toEqual([{ kind: 'narrow' }]);
});

test('a stretched picture is told with its stretch', () => {
  const stretched = corners.map((point) => {
    const [x, y] = [point.xPx / 10 - 100, 80 - point.yPx / 10];
    return known(point.label, [point.xPx, point.yPx], [x * 1.25, y]);
  });
  const [caution] = cautionsOf(stretched, 'affine');
  expect(caution?.kind).toBe('stretched');
  expect(caution?.kind === 'stretched' && caution.share).toBeCloseTo(0.25, 6);
});
