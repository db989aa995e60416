import { expect, test } from 'vitest';
import { fromPlane } from '../geometry/plane';
import { PegDetails } from './contract';
import type { LakePlace, LakePlaceKind } from './place-contract';
import { toldPeg } from './told-peg';

const ORIGIN = [1.62, 53.6] as const;
const at = (xM: number, yM: number): [number, number] => {
  const [lon, lat] = fromPlane(ORIGIN, { xM, yM });
  return [lon, lat];
};

const peg: PegDetails = {
  ...{ number: 'P1', name: '', position: at(0, 0), origin: at(0, 0), originMark: '', originFixedBy: 'gnss' },
  ...{ originMarked: true, arcFromDeg: 335, arcToDeg: 25, waterWords: '', longestCastM: null },
  platform: { kind: 'bank', widthM: null, lengthM: null, heightM: null, inspectedOn: null, state: '' },
  access: {
    ...{
      fromParkingM: null,
      surface: '',
      steepest: '',
      steps: null,
      gates: '',
      barrow: 'unknown',
      winter: '',
    },
  },
  stepFree: { kind: 'unknown', facts: '' },
  parking: { bay: 'Lodge', spaces: null, walkMinutes: null, vehicleLimit: '', winterClosure: '' },
  ...{ people: 1, rods: 2, shelters: 0 },
  overheadLine: {
    ...{ kind: 'none', distanceM: null, heightM: null, operator: '', signFitted: false, fishing: 'ok' },
  },
  hazards: ['Steep bank'],
  ...{ tackleLimits: '', notesPublic: '', notesMembers: '', notesStaff: '' },
  ...{ status: 'open', statusReason: '', statusUntil: null },
  emergency: { gridReference: '', throwLine: '', ambulanceGate: 'White gate', sayThis: '' },
};

let drawnSoFar = 0;
const place = (kind: LakePlaceKind, name: string, ...points: [number, number][]): LakePlace => ({
  id: `00000000-0000-4000-8000-${String(drawnSoFar++).padStart(12, '0')}`,
  ...{ kind, name, at: points, note: '', audience: 'public' },
});

test('a peg is told with what is drawn near it, its own words first, and stays within what its sheet may hold', () => {
  const told = toldPeg(peg, {
    origin: ORIGIN,
    places: [
      place('throw_line', 'Ring on the far post', at(90, 0)),
      place('throw_line', 'Ring by the willow', at(12, 0)),
      place('gate', 'Field gate', at(0, -50)),
      place('hazard', 'Submerged stakes', at(-14, 14)),
      place('hazard', 'Soft silt', at(60, 0)),
      place('parking', 'Lodge car park', at(-100, 0)),
      place('overhead_line', 'Wire', at(-100, 20), at(100, 20)),
    ],
  });
  expect(told.emergency.throwLine).toBe('Ring by the willow, 12 m to the east');
  expect(told.emergency.ambulanceGate).toBe('White gate; drawn: Field gate, 50 m to the south');
  expect(told.parking.bay).toBe('Lodge; drawn: Lodge car park, 100 m to the west');
  expect(told.hazards).toEqual(['Steep bank', 'Submerged stakes, 20 m to the north-west']);
  expect(told.overheadLine).toMatchObject({ kind: 'present', distanceM: 20, fishing: 'restricted' });
  expect(PegDetails.parse(told)).toEqual(told);
});

test('words that don’t fit beside a peg’s own are left to the chart', () => {
  const long = { ...peg, parking: { ...peg.parking, bay: 'The long field behind the lodge, by the oak' } };
  const told = toldPeg(long, { origin: ORIGIN, places: [place('parking', 'Lodge car park', at(-100, 0))] });
  expect(told.parking.bay).toBe(long.parking.bay);
});
