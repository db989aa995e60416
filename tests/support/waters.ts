import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { GaugeBoard } from '@mereward/db/entities/lakes/gauge-board';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { LevelReading } from '@mereward/db/entities/lakes/level-reading';
import { Mark } from '@mereward/db/entities/lakes/mark';
import { Peg } from '@mereward/db/entities/lakes/peg';
import type { Role } from '@mereward/shared/accounts/contract';
import type { FisheryDetails } from '@mereward/shared/fisheries/contract';
import { geodesicAreaM2, geodesicBetween, type LonLat } from '@mereward/shared/geometry/geodesic';
import { originOf } from '@mereward/shared/geometry/outline';
import { fromPlane, type Point } from '@mereward/shared/geometry/plane';
import type {
  GaugeBoardDetails,
  LakeDetails,
  LakePolygon,
  MarkDetails,
  PegDetails,
} from '@mereward/shared/lakes/contract';
import { randomUUID } from 'node:crypto';
import { aPerson, type Person } from './people';
import type { TestServer } from './server';

/** Somewhere at sea, so that no real water is meant. */
export const WATER_CENTRE: LonLat = [1.62, 53.6];

const STAFF: readonly Role[] = ['owner', 'manager', 'head_bailiff', 'bailiff', 'office', 'member', 'angler'];

export type TestFishery = { id: string; people: Record<Role, Person> };

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

/** A fishery with one person in each role. */
export async function aFishery(test: TestServer, wishes: Partial<FisheryDetails> = {}): Promise<TestFishery> {
  const { source, clock } = test.server;
  const id = randomUUID();
  const details = fisheryDetails(wishes);
  const founder = await aPerson(test, { name: 'The founder' });
  await source.manager.insert(Fishery, {
    id,
    name: details.name,
    zone: details.zone,
    details,
    version: 1,
    createdBy: founder.id,
    createdAt: clock(),
  });
  const pairs: [Role, Person][] = [];
  for (const role of STAFF)
    pairs.push([
      role,
      await aPerson(test, { name: `The ${role.replace('_', ' ')}`, roles: [{ fisheryId: id, role }] }),
    ]);
  const held = new Map(pairs);
  const person = (role: Role): Person => {
    const found = held.get(role);
    if (!found) throw new Error(`Nobody holds ${role}`);
    return found;
  };
  return {
    id,
    people: {
      owner: person('owner'),
      manager: person('manager'),
      head_bailiff: person('head_bailiff'),
      bailiff: person('bailiff'),
      office: person('office'),
      member: person('member'),
      angler: person('angler'),
    },
  };
}

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

export type TestLake = { id: string; fisheryId: string; details: LakeDetails; origin: LonLat };

export async function aLake(
  test: TestServer,
  fishery: TestFishery,
  wishes: Partial<LakeDetails> = {},
): Promise<TestLake> {
  const id = randomUUID();
  const details = lakeDetails(wishes);
  const rings = details.outline.coordinates;
  const origin = originOf({ type: 'Polygon', coordinates: rings });
  await test.server.source.manager.insert(Lake, {
    id,
    fisheryId: fishery.id,
    name: details.name,
    details,
    originLon: origin[0],
    originLat: origin[1],
    areaM2: geodesicAreaM2(rings),
    datumM: details.datumM,
    version: 1,
    createdBy: fishery.people.owner.id,
    createdAt: test.server.clock(),
  });
  return { id, fisheryId: fishery.id, details, origin };
}

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

export type TestPeg = { id: string; lakeId: string; details: PegDetails };

let walked = 0;

export async function aPeg(
  test: TestServer,
  lake: TestLake,
  wishes: Partial<PegDetails> & { thetaDeg?: number } = {},
): Promise<TestPeg> {
  const { source, clock } = test.server;
  const id = randomUUID();
  const details = pegDetails(wishes);
  const { createdBy } = await source.manager.findOneByOrFail(Lake, { id: lake.id });
  await source.manager.insert(Peg, {
    id,
    lakeId: lake.id,
    number: details.number,
    walkingOrder: (walked += 1),
    details,
    version: 1,
    createdBy,
    createdAt: clock(),
  });
  return { id, lakeId: lake.id, details };
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

export async function aMark(test: TestServer, lake: TestLake, wishes: Partial<MarkDetails> = {}) {
  const { source, clock } = test.server;
  const id = randomUUID();
  const details = markDetails(wishes);
  const { createdBy } = await source.manager.findOneByOrFail(Lake, { id: lake.id });
  const row = { id, lakeId: lake.id, code: details.code, details, version: 1, createdBy, createdAt: clock() };
  await source.manager.insert(Mark, row);
  return { id, lakeId: lake.id, details };
}

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

export async function aBoard(test: TestServer, lake: TestLake, wishes: Partial<GaugeBoardDetails> = {}) {
  const { source, clock } = test.server;
  const id = randomUUID();
  const details = boardDetails(wishes);
  const { createdBy } = await source.manager.findOneByOrFail(Lake, { id: lake.id });
  await source.manager.insert(GaugeBoard, {
    id,
    lakeId: lake.id,
    code: details.code,
    details,
    isDatumBoard: details.isDatumBoard,
    version: 1,
    createdBy,
    createdAt: clock(),
  });
  return { id, lakeId: lake.id, details };
}

/** A level read off a board, metres as the board reads. */
export async function aReading(
  test: TestServer,
  board: { id: string },
  { levelM, at }: { levelM: number; at?: string },
): Promise<string> {
  const { source, clock } = test.server;
  const { createdBy } = await source.manager.findOneByOrFail(GaugeBoard, { id: board.id });
  const id = randomUUID();
  await source.manager.insert(LevelReading, {
    id,
    boardId: board.id,
    at: at === undefined ? clock() : new Date(at),
    levelM,
    levelText: `${levelM} m`,
    note: '',
    recordedBy: createdBy,
    receivedAt: clock(),
  });
  return id;
}
