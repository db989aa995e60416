import { fromPlane, type LonLat } from '@mereward/shared/geometry/plane';
import { expect, test } from 'vitest';
import { positionText } from '@/lib/position-text';
import { draftOf, fittingOf, TypedPoints, type DraftPoint } from './picture-draft';

const ORIGIN: LonLat = [1.6, 53.6];
const known = (label: string, xPx: number, yPx: number): DraftPoint => ({
  label,
  xPx,
  yPx,
  position: positionText(fromPlane(ORIGIN, { xM: xPx / 10 - 50, yM: 40 - yPx / 10 })),
});
const three = [known('a', 0, 0), known('b', 1000, 0), known('c', 500, 800)];

test('a point without a place yet is left out of the fit, and is missed by nothing known', () => {
  const points = [three[0]!, { label: '', xPx: 9, yPx: 9, position: '' }, three[1]!, three[2]!];
  const fitting = fittingOf({ fit: 'similarity', points }, ORIGIN);
  expect(fitting?.points.map(({ label }) => label)).toEqual(['a', 'b', 'c']);
  expect(fitting?.missedM[1]).toBeNull();
  expect(fitting?.missedM[3]).toBeLessThan(0.02); // a place typed to seven decimals is good to a centimetre
});

test('too few points, or points that can’t be fitted, give no fit', () => {
  expect(fittingOf({ fit: 'similarity', points: three.slice(0, 1) }, ORIGIN)).toBeNull();
  expect(fittingOf({ fit: 'affine', points: three }, ORIGIN)).toBeNull();
});

test('a point without words or a place is refused where it stands', () => {
  const issues = TypedPoints.safeParse({
    fit: 'similarity',
    points: [three[0], { label: ' ', xPx: 1, yPx: 1, position: '' }],
  }).error?.issues;
  expect(issues?.map(({ path }) => path.join('.'))).toEqual(['points.1.label', 'points.1.position']);
});

test('kept points come back as they were', () => {
  const sent = TypedPoints.parse({ fit: 'affine', points: three });
  expect(draftOf(sent)).toEqual({ fit: 'affine', points: three });
});
