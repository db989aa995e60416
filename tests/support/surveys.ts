import type { LakeDetails } from '@mereward/shared/lakes/contract';
import {
  CastView,
  type CastObservation,
  type KeepCast,
  type OpenVisit,
} from '@mereward/shared/surveys/contract';
import { randomUUID } from 'node:crypto';
import { aKit, anObservation } from './kit';
import { aFan, castsFile, chimneyDetails, longOutline, longPegDetails } from './long-water';
import type { Person } from './people';
import type { TestServer } from './server';
import { aBoard, aLake, aMark, aPeg, type TestFishery, type TestLake, type TestPeg } from './waters';

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
  const peg = await aPeg(test, lake, longPegDetails());
  const mark = await aMark(test, lake, chimneyDetails());
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

/** Opens a visit, keeps the fan and closes it; answers the visit. Rows go in by a file, as a surveyor with a notebook would. */
export async function aSurvey(
  person: Person,
  water: TestWater,
  wishes: Partial<OpenVisit> = {},
): Promise<string> {
  const visitId = await openedVisit(person, water, wishes);
  const file = { filename: 'fan.csv', text: castsFile(aFan()), mapping: null };
  const answer = await person.post(`/visits/${visitId}/imports`).send(file);
  if (answer.status !== 200) throw new Error(`The casts were not taken in: ${answer.text}`);
  await closedVisit({ person, visitId });
  return visitId;
}
