import type { SectionPoint } from '@mereward/shared/charts/contract';
import { expect, test } from 'vitest';
import { pointAtLineOut, sectionStretches, wrapRangesM } from './section-words';

const point = (lineOutM: number, depthM: number | null, bottom: SectionPoint['bottom']): SectionPoint => ({
  rangeM: lineOutM - 1,
  lineOutM,
  depthM,
  sigmaM: depthM === null ? null : 0.1,
  bottom,
});
const points = [
  point(1, 0, 'silt'),
  point(5, 1, 'silt'),
  point(9, 2, 'gravel'),
  point(13, 1.6, 'gravel'),
  point(17, null, null),
  point(21, null, null),
];

test('a section is read out as stretches of one bottom with their depths at the water’s level', () => {
  expect(sectionStretches(points, 0.5)).toEqual([
    { fromLineOutM: 1, toLineOutM: 9, shallowestM: 0.5, deepestM: 1.5, bottom: 'silt' },
    { fromLineOutM: 9, toLineOutM: 17, shallowestM: 2.1, deepestM: 2.5, bottom: 'gravel' },
    { fromLineOutM: 17, toLineOutM: 21, shallowestM: null, deepestM: null, bottom: null },
  ]);
});

test('a count of line lies between two points by the straight line', () => {
  expect(pointAtLineOut(points, 7)).toMatchObject({ rangeM: 6, depthM: 1.5, bottom: 'gravel' });
  expect(pointAtLineOut(points, 15)?.depthM).toBeNull();
  expect(pointAtLineOut(points, 30)).toBeNull();
});

test('every whole wrap has its range, as far as the section goes', () => {
  expect(wrapRangesM(points, 4)).toEqual([3, 7, 11, 15, 19]);
});
