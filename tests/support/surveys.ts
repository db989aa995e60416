import { geodesicAlong } from '@mereward/shared/geometry/geodesic';
import { fromPlane } from '@mereward/shared/geometry/plane';
import type { LakeDetails, LakePolygon } from '@mereward/shared/lakes/contract';
import {
  CastView,
  type CastObservation,
  type KeepCast,
  type OpenVisit,
} from '@mereward/shared/surveys/contract';
import { randomUUID } from 'node:crypto';
import { aKit, anObservation } from './kit';
import type { Person } from './people';
import type { TestServer } from './server';
import {
  aBoard,
  aLake,
  aMark,
  aPeg,
  WATER_CENTRE,
  type TestFishery,
  type TestLake,
  type TestPeg,
} from './waters';

const LONG_M = 150;
const WIDE_M = 62;

/** A long water, 300 × 124 m, so that a mark 148 m from a peg of its south bank stands on the far one. */
export function longOutline(): LakePolygon {
  const ring = Array.from({ length: 120 }, (_, i) => {
    const turn = (i * 2 * Math.PI) / 120;
    const [lon, lat] = fromPlane(WATER_CENTRE, { xM: LONG_M * Math.cos(turn), yM: WIDE_M * Math.sin(turn) });
    return [lon, lat] as [number, number];
  });
  return { type: 'Polygon', coordinates: [[...ring, ring[0] ?? [0, 0]]] };
}

export type TestWater = {
  lake: TestLake;
  peg: TestPeg;
  mark: { id: string; details: { position: [number, number] } };
  board: { id: string };
};

/** The long water with peg FO7 on its south bank, the pump-house chimney 148 m to the north of it, and a gauge board. */
export async function aLongWater(
  test: TestServer,
  fishery: TestFishery,
  wishes: Partial<LakeDetails> = {},
): Promise<TestWater> {
  const lake = await aLake(test, fishery, { name: 'Far Ostle', outline: longOutline(), ...wishes });
  const [lon, lat] = fromPlane(WATER_CENTRE, { xM: 0, yM: -WIDE_M });
  const origin: [number, number] = [lon, lat];
  const chimney = geodesicAlong(origin, 0, 148);
  const peg = await aPeg(test, lake, {
    number: 'FO7',
    name: 'The Point',
    position: origin,
    origin,
    originFixedBy: 'tape_or_plan',
    arcFromDeg: 315,
    arcToDeg: 45,
    longestCastM: 70,
  });
  const mark = await aMark(test, lake, {
    code: 'M3',
    name: 'pump-house chimney',
    position: [chimney[0], chimney[1]],
    sigmaM: 0.5,
  });
  const board = await aBoard(test, lake, { code: 'FO-G1' });
  return { lake, peg, mark, board };
}

/** Saturday 3 April 2027: board 0.62 at 09:05 by the clock at the water. */
export const aVisitBody = (water: TestWater, wishes: Partial<OpenVisit> = {}): OpenVisit => ({
  id: randomUUID(),
  title: 'Spring survey',
  competence: 'lead',
  boardId: water.board.id,
  startedAt: '2027-04-03T08:05:00.000Z',
  gaugeStartM: 0.62,
  weather: { windForce: 2, windFrom: 'SW', note: '' },
  clarity: '',
  weedState: '',
  kit: aKit(),
  consentToPublish: true,
  ...wishes,
});

export const aCastBody = (
  water: TestWater,
  observed: Partial<CastObservation> = {},
  wishes: Partial<Omit<KeepCast, 'observation'>> = {},
): KeepCast => ({
  id: randomUUID(),
  pegId: water.peg.id,
  lineId: randomUUID(),
  observedAt: '2027-04-03T09:00:00.000Z',
  observation: anObservation(water.mark.id, observed),
  ...wishes,
});

export async function openedVisit(
  person: Person,
  water: TestWater,
  wishes: Partial<OpenVisit> = {},
): Promise<string> {
  const body = aVisitBody(water, wishes);
  const answer = await person.post(`/lakes/${water.lake.id}/visits`).send(body);
  if (answer.status !== 201) throw new Error(`The visit was not opened: ${answer.text}`);
  return body.id;
}

type Keeping = { person: Person; water: TestWater; visitId: string };

export async function keptCast(
  { person, water, visitId }: Keeping,
  observed: Partial<CastObservation>,
): Promise<CastView> {
  const answer = await person.post(`/visits/${visitId}/casts`).send(aCastBody(water, observed));
  if (answer.status !== 201) throw new Error(`The cast was not kept: ${answer.text}`);
  return CastView.parse(answer.body);
}

export async function closedVisit({ person, visitId }: Omit<Keeping, 'water'>): Promise<void> {
  const body = { endedAt: '2027-04-03T10:40:00.000Z', gaugeEndM: 0.62 };
  const answer = await person.post(`/visits/${visitId}/close`).send(body);
  if (answer.status !== 200) throw new Error(`The visit was not closed: ${answer.text}`);
}

/** A made-up bed before FO7: a shelf that falls away, a bar across at about fifty metres. Metres at board 0.62. */
export function madeUpDepthM(rangeM: number, offsetDeg: number): number {
  const shelf = 3.2 * (1 - Math.exp(-rangeM / 18));
  return shelf - 0.8 * Math.exp(-(((rangeM - 51) / 7) ** 2)) + 0.004 * offsetDeg;
}

/** A fan of casts from FO7 that covers its arc: every ten degrees, every second wrap. */
export function aFan(): Partial<CastObservation>[] {
  const fan: Partial<CastObservation>[] = [];
  for (let offsetDeg = -40; offsetDeg <= 40; offsetDeg += 10)
    for (let wraps = 4; wraps <= 18; wraps += 2) {
      const depthM = madeUpDepthM(wraps * 3.6576, offsetDeg);
      const pulls = Math.max(1, Math.round((depthM - 0.25) / 0.3048 + 0.5));
      const silt = wraps > 16 || offsetDeg > 20;
      fan.push({
        wrapsWhole: wraps,
        lineText: `${wraps} + 0`,
        pulls,
        ...(silt ? { drop: 'soft_slow', drag: 'smooth_slow_heavy', cameBack: ['black_silt'] } : {}),
        aim: { by: 'mark', markId: '', offsetDeg },
      });
    }
  return fan;
}

/** Opens a visit, keeps the fan and closes it; answers the visit. Rows go in by a file, as a surveyor with a notebook would. */
export async function aSurvey(
  person: Person,
  water: TestWater,
  wishes: Partial<OpenVisit> = {},
): Promise<string> {
  const visitId = await openedVisit(person, water, wishes);
  const heading = 'peg,mark,offset_deg,wraps_whole,wraps_remainder_mm,drop,drag,returned,depth_pulls';
  const rows = aFan().map(
    ({ aim, wrapsWhole, pulls, drop = 'sharp_crack', drag = 'fine_rattle', cameBack }) =>
      [
        'FO7',
        'M3',
        aim?.by === 'mark' ? aim.offsetDeg : 0,
        wrapsWhole,
        0,
        drop,
        drag,
        (cameBack ?? ['none']).join(';'),
        pulls,
      ].join(','),
  );
  const file = { filename: 'fan.csv', text: [heading, ...rows].join('\n'), mapping: null };
  const answer = await person.post(`/visits/${visitId}/imports`).send(file);
  if (answer.status !== 200) throw new Error(`The casts were not taken in: ${answer.text}`);
  await closedVisit({ person, visitId });
  return visitId;
}
