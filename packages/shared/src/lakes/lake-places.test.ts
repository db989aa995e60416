import { describe, expect, test } from 'vitest';
import { fromPlane } from '../geometry/plane';
import {
  distanceToLineM,
  drawnLineM,
  lakePlaceFaults,
  overheadDispute,
  placesFor,
  placesInPlane,
  toldLine,
} from './lake-places';
import type { LakePlace } from './place-contract';

const ORIGIN = [1.62, 53.6] as const;
const at = (xM: number, yM: number): [number, number] => {
  const [lon, lat] = fromPlane(ORIGIN, { xM, yM });
  return [lon, lat];
};
const square = [at(-50, -50), at(50, -50), at(50, 50), at(-50, 50), at(-50, -50)];
const lake = { origin: ORIGIN, outline: { type: 'Polygon' as const, coordinates: [square] } };

const place = (wishes: Partial<LakePlace>): LakePlace => ({
  id: '00000000-0000-4000-8000-000000000001',
  kind: 'hazard',
  name: 'Soft silt',
  at: [at(0, 55)],
  note: '',
  audience: 'public',
  ...wishes,
});
const wire = place({ kind: 'overhead_line', name: 'Wire', at: [at(-100, 80), at(100, 80)] });
const line = {
  kind: 'none' as const,
  distanceM: null,
  heightM: null,
  operator: '',
  signFitted: false,
  fishing: 'ok' as const,
};
const peg = { position: at(0, 50), origin: at(0, 51), overheadLine: line };

describe('what can’t be so of a place', () => {
  test('a line of one point, a point of two, a hidden hazard and a place far away are each told with their field', () => {
    const fields = (one: Partial<LakePlace>) => lakePlaceFaults([place(one)], lake).map(({ field }) => field);
    expect(fields({})).toEqual([]);
    expect(fields({ kind: 'overhead_line' })).toEqual(['places/0/at']);
    expect(fields({ at: [at(0, 55), at(1, 55)] })).toEqual(['places/0/at']);
    expect(fields({ audience: 'staff' })).toEqual(['places/0/audience']);
    expect(fields({ kind: 'gate', audience: 'staff' })).toEqual([]);
    expect(fields({ at: [at(0, 1100)] })).toEqual(['places/0/at']);
    expect(lakePlaceFaults([place({}), place({})], lake).map(({ field }) => field)).toEqual(['places/1/id']);
  });
});

test('a reader is shown what is for them', () => {
  const places = (['public', 'members', 'staff'] as const).map((audience) => place({ audience }));
  const seen = (member: boolean, staff: boolean) =>
    placesFor(places, { member, staff }).map(({ audience }) => audience);
  expect(seen(false, false)).toEqual(['public']);
  expect(seen(true, false)).toEqual(['public', 'members']);
  expect(seen(true, true)).toEqual(['public', 'members', 'staff']);
  expect(placesFor(undefined, { member: true, staff: true })).toEqual([]);
});

test('places lie in the plane where they were drawn, to a centimetre', () => {
  const [shown] = placesInPlane([wire], ORIGIN);
  expect(shown?.line).toEqual([-100, 80, 100, 80]);
});

test('the distance to a line is to its nearest point, an end or between', () => {
  const bent = [
    { xM: 0, yM: 0 },
    { xM: 10, yM: 0 },
    { xM: 10, yM: 10 },
  ];
  expect(distanceToLineM({ xM: 4, yM: 3 }, bent)).toBeCloseTo(3, 9);
  expect(distanceToLineM({ xM: 13, yM: 14 }, bent)).toBeCloseTo(5, 9);
  expect(distanceToLineM({ xM: 3, yM: 4 }, bent.slice(0, 1))).toBeCloseTo(5, 9);
});

describe('an overhead line drawn near a peg', () => {
  const near = { places: [wire], origin: ORIGIN };
  const far = { places: [{ ...wire, at: [at(-100, 85), at(100, 85)] }], origin: ORIGIN };

  test('is measured from where one stands when that is nearer', () => {
    expect(drawnLineM(peg, near)).toBeCloseTo(29, 3);
    expect(drawnLineM(peg, { origin: ORIGIN })).toBeNull();
  });

  test('is told at the peg within 30 m, whatever its sheet says, and never as ok', () => {
    expect(toldLine(peg, near)).toMatchObject({ kind: 'present', distanceM: 29, fishing: 'restricted' });
    expect(toldLine(peg, far)).toEqual(line);
    const own = { ...line, kind: 'present' as const, distanceM: 12, fishing: 'no_fishing' as const };
    expect(toldLine({ ...peg, overheadLine: own }, near)).toEqual(own);
  });

  test('is a dispute while the peg’s own sheet says less', () => {
    expect(overheadDispute(peg, near)).toContain('drawn 29 m from this peg; the peg’s own sheet says none');
    const present = { ...line, kind: 'present' as const, fishing: 'restricted' as const };
    expect(overheadDispute({ ...peg, overheadLine: { ...present, distanceM: 40 } }, near)).toContain(
      'says 40 m',
    );
    expect(overheadDispute({ ...peg, overheadLine: { ...present, distanceM: 28 } }, near)).toBeNull();
    expect(overheadDispute(peg, far)).toBeNull();
  });
});
