import type { FisheryDetails } from '@mereward/shared/fisheries/contract';
import { geodesicBetween, type LonLat } from '@mereward/shared/geometry/geodesic';
import { fromPlane, type Point } from '@mereward/shared/geometry/plane';
import type {
  GaugeBoardDetails,
  LakeDetails,
  LakePolygon,
  MarkDetails,
  PegDetails,
} from '@mereward/shared/lakes/contract';

/** Somewhere at sea, so that no real water is meant. */
export const WATER_CENTRE: LonLat = [1.62, 53.6];

export const fisheryDetails = (wishes: Partial<FisheryDetails> = {}): FisheryDetails => ({
  name: 'Wend Bottom Waters',
  legalEntity: '',
  address: '',
  postcode: '',
  gridReference: '',
  position: [WATER_CENTRE[0], WATER_CENTRE[1]],
  jurisdiction: 'ENG',
  zone: 'Europe/London',
  vatStatus: 'not_registered',
  vatNumber: '',
  officeContact: '',
  dutyPhone: '01632 960 001',
  meetingPoint: 'The white gate',
  opening: '',
  facilities: '',
  conduct: '',
  gateCode: '4711',
  ...wishes,
});

const SHORE_POINTS = 60;

/** The shore at an angle (counter-clockwise from east) round the lake's middle: a lobed ring of about 180 × 120 m. */
export function shorePoint(thetaDeg: number): Point {
  const theta = (thetaDeg * Math.PI) / 180;
  const r = 75 * (1 + 0.1 * Math.cos(2 * theta + 0.3) + 0.06 * Math.cos(3 * theta + 1.1));
  return { xM: 1.2 * r * Math.cos(theta), yM: (r / 1.2) * Math.sin(theta) };
}

const place = (point: Point): [number, number] => {
  const [lon, lat] = fromPlane(WATER_CENTRE, point);
  return [lon, lat];
};

const closed = (points: Point[]): [number, number][] => {
  const places = points.map(place);
  const first = places[0];
  return first ? [...places, first] : places;
};

/** The test lake: its lobed shore, and an island of 8 m radius in its eastern half. */
export function lakeOutline(): LakePolygon {
  const shore = Array.from({ length: SHORE_POINTS }, (_, i) => shorePoint((i * 360) / SHORE_POINTS));
  const island = Array.from({ length: 12 }, (_, i) => {
    const theta = (-i * Math.PI) / 6;
    return { xM: 40 + 8 * Math.cos(theta), yM: 5 + 8 * Math.sin(theta) };
  });
  return { type: 'Polygon', coordinates: [closed(shore), closed(island)] };
}

export const lakeDetails = (wishes: Partial<LakeDetails> = {}): LakeDetails => ({
  name: 'Long Wend',
  kind: 'gravel_pit',
  outline: lakeOutline(),
  nights: true,
  maxPeople: null,
  maxRods: null,
  stockClass: 'improved',
  ownership: 'owned',
  designations: '',
  publicPathBeside: false,
  inflowOutflow: '',
  emergencyAccess: 'By the white gate',
  phoneSignal: '',
  datumM: 0.62,
  maxGapM: 8,
  longestCastM: 120,
  audiences: { depth: 'public', bottom: 'ticket', spots: 'ticket', soundings: 'staff' },
  ...wishes,
});

/** A peg on the shore at an angle, looking over the middle of the lake, 80° wide. */
export function pegDetails(wishes: Partial<PegDetails> & { thetaDeg?: number } = {}): PegDetails {
  const { thetaDeg = 200, ...rest } = wishes;
  const position = place(shorePoint(thetaDeg));
  const inwardDeg = geodesicBetween(position, WATER_CENTRE).bearingDeg;
  return {
    number: 'LW7',
    name: '',
    position,
    origin: position,
    originMark: 'painted dot on the peg board',
    originFixedBy: 'gnss',
    originMarked: true,
    arcFromDeg: (inwardDeg + 320) % 360,
    arcToDeg: (inwardDeg + 40) % 360,
    waterWords: '',
    longestCastM: null,
    platform: { kind: 'timber', widthM: 2, lengthM: 2.5, heightM: 0.3, inspectedOn: null, state: '' },
    access: {
      fromParkingM: 120,
      surface: 'gravel',
      steepest: '',
      steps: 0,
      gates: '',
      barrow: 'yes',
      winter: '',
    },
    stepFree: { kind: 'unknown', facts: '' },
    parking: { bay: '', spaces: null, walkMinutes: 2, vehicleLimit: '', winterClosure: '' },
    people: 1,
    rods: 3,
    shelters: 1,
    overheadLine: {
      kind: 'none',
      distanceM: null,
      heightM: null,
      operator: '',
      signFitted: false,
      fishing: 'ok',
    },
    hazards: ['deep margin'],
    tackleLimits: '',
    notesPublic: 'A quiet corner.',
    notesMembers: 'The margin drops off by the alder.',
    notesStaff: 'Board loose: mend before May.',
    status: 'open',
    statusReason: '',
    statusUntil: null,
    emergency: { gridReference: '', throwLine: 'by the hut', ambulanceGate: 'white gate', sayThis: '' },
    ...rest,
  };
}

/** A chimney on the far bank, north-east of the lake. */
export const markDetails = (wishes: Partial<MarkDetails> = {}): MarkDetails => ({
  code: 'M3',
  name: 'pump-house chimney',
  position: place({ xM: 110, yM: 60 }),
  fixedBy: 'plan',
  sigmaM: 1,
  permanence: 'permanent',
  nightNote: '',
  ...wishes,
});

export const boardDetails = (wishes: Partial<GaugeBoardDetails> = {}): GaugeBoardDetails => ({
  code: 'LW-G1',
  kind: 'board',
  position: place(shorePoint(270)),
  unit: 'm',
  higherNumberHigherWater: true,
  normalLowM: 0.55,
  normalHighM: 0.7,
  alarmLowM: null,
  alarmHighM: 1.1,
  lastCleanedOn: null,
  isDatumBoard: true,
  ...wishes,
});
