import { fromPlane } from '@mereward/shared/geometry/plane';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { expect, test } from 'vitest';
import { marksAhead } from './marks-ahead';

const origin: [number, number] = [-1.2, 52.1];
const at = (xM: number, yM: number): [number, number] => {
  const [lon, lat] = fromPlane(origin, { xM, yM });
  return [lon, lat];
};
const aMark = (id: string, xM: number, yM: number): LakeView['marks'][number] => ({
  id,
  photos: [],
  version: 1,
  details: {
    code: id,
    name: id,
    position: at(xM, yM),
    fixedBy: 'plan',
    sigmaM: 1,
    permanence: 'permanent',
    nightNote: '',
  },
});
const aPeg = (facingDeg: number): LakeView['pegs'][number] => ({
  id: 'peg',
  number: 'FO7',
  name: '',
  position: at(0, 0),
  facingDeg,
  status: 'open',
  statusReason: '',
  overheadFishing: 'ok',
  fromParkingM: null,
});
const marks = [aMark('south', 0, -150), aMark('east', 150, 0), aMark('north', -10, 150)];
const namesFrom = (facingDeg: number, pegId = 'peg') =>
  marksAhead({ origin, marks, pegs: [aPeg(facingDeg)] }, pegId).map(({ id }) => id);

test('the mark nearest to straight out comes first, across north too', () => {
  expect(namesFrom(10)).toEqual(['north', 'east', 'south']);
  expect(namesFrom(350)).toEqual(['north', 'east', 'south']);
  expect(namesFrom(170)).toEqual(['south', 'east', 'north']);
});

test('with no peg chosen yet the marks stand as the lake has them', () => {
  expect(namesFrom(10, '')).toEqual(['south', 'east', 'north']);
});
