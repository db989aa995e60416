import { expect, test } from 'vitest';
import { depthNow, depthShown, isobathFigure, stepFor } from './depth-words';

test('isobaths carry as many decimals as their step needs', () => {
  expect(isobathFigure(1.5, 0.5, 'm')).toBe('1.5');
  expect(isobathFigure(1.25, 0.25, 'm')).toBe('1.25');
  expect(isobathFigure(3, 1, 'm')).toBe('3');
  expect(isobathFigure(1.8288, stepFor(0.5, 'ft'), 'ft')).toBe('6');
});

test('a chart in feet steps by whole feet', () => {
  expect(stepFor(0.25, 'ft')).toBeCloseTo(0.3048, 9);
  expect(stepFor(0.5, 'ft')).toBeCloseTo(0.6096, 9);
  expect(stepFor(1, 'ft')).toBeCloseTo(1.524, 9);
  expect(stepFor(0.5, 'm')).toBe(0.5);
});

test('depth today is the charted depth and the water’s rise; out of the water it is dry bank', () => {
  expect(depthShown(2.4, { levelM: 0.38, datumM: 0.62 }).depthM).toBeCloseTo(2.16, 9);
  expect(depthShown(2.4, { levelM: 0.38, datumM: 0.62 }).when).toBe('today');
  expect(depthShown(2.4, { levelM: null, datumM: 0.62 })).toEqual({ depthM: 2.4, when: 'at datum' });
  expect(depthNow(0, 'm')).toBe('dry bank');
  expect(depthNow(-0.2, 'm')).toBe('dry bank');
  expect(depthNow(2.16, 'm').replace('\u00A0', ' ')).toBe('2.2 m');
});
