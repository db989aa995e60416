import { randomUUID } from 'node:crypto';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import type { LakeDetails } from '@mereward/shared/lakes/contract';
import type { CastObservation, OpenVisit } from '@mereward/shared/surveys/contract';
import { LogView } from '@mereward/shared/surveys/log-contract';
import { aKit } from '../../support/kit';
import { castsFile, chimneyDetails, longOutline, longPegDetails } from '../../support/long-water';
import { boardDetails, lakeDetails } from '../../support/water-details';
import type { Asking } from './people';
import { expect } from './site';

export type StoryWater = { lakeId: string; pegId: string; markId: string; boardId: string };

/** A lake of the journey's own: peg FO7 on its south bank, the pump-house chimney 148 m off, a board at datum 0.62. */
export async function aStoryWater(owner: Asking, wishes: Partial<LakeDetails> = {}): Promise<StoryWater> {
  const { fisheries } = await owner.get('/fisheries', FisheryList);
  const [lakeId, pegId, markId, boardId] = [randomUUID(), randomUUID(), randomUUID(), randomUUID()];
  const details = lakeDetails({
    name: `Long Ostle ${lakeId.slice(0, 4)}`,
    outline: longOutline(),
    ...wishes,
  });
  await owner.do('POST', `/fisheries/${fisheries[0]?.id ?? ''}/lakes`, { id: lakeId, details });
  await owner.do('POST', `/lakes/${lakeId}/pegs`, { id: pegId, details: longPegDetails() });
  await owner.do('PUT', `/lakes/${lakeId}/marks/${markId}`, { details: chimneyDetails(), version: null });
  const board = { details: boardDetails({ code: 'FO-G1' }), version: null };
  await owner.do('PUT', `/lakes/${lakeId}/boards/${boardId}`, board);
  return { lakeId, pegId, markId, boardId };
}

/** Opens a visit at board 0.62 as from `startedAt`. */
export async function anOpenVisit(
  surveyor: Asking,
  { lakeId, boardId }: Pick<StoryWater, 'lakeId' | 'boardId'>,
  wishes: Partial<OpenVisit> = {},
): Promise<string> {
  const visit: OpenVisit = {
    id: randomUUID(),
    title: 'Spring survey',
    competence: 'lead',
    boardId,
    startedAt: '2027-04-03T08:05:00.000Z',
    gaugeStartM: 0.62,
    weather: { windForce: 2, windFrom: 'SW', note: '' },
    clarity: '',
    weedState: '',
    kit: aKit(),
    consentToPublish: true,
    ...wishes,
  };
  await surveyor.do('POST', `/lakes/${lakeId}/visits`, visit);
  return visit.id;
}

/** A log of soundings brought to a visit, and read. */
export async function aLogRead(
  surveyor: Asking,
  visitId: string,
  { name, text }: { name: string; text: string },
): Promise<string> {
  const id = randomUUID();
  await surveyor.send(`/visits/${visitId}/logs`, { id }, { field: 'files', name, text });
  await expect.poll(async () => (await surveyor.get(`/logs/${id}`, LogView)).state).toBe('looked');
  return id;
}

/** Casts made meanwhile, taken in from a table as from a surveyor's notebook. */
export async function castMeanwhile(
  surveyor: Asking,
  visitId: string,
  fan: readonly Partial<CastObservation>[],
): Promise<void> {
  const file = { filename: `${randomUUID()}.csv`, text: castsFile(fan), mapping: null };
  await surveyor.do('POST', `/visits/${visitId}/imports`, file);
}
