import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { GaugeBoard } from '@mereward/db/entities/lakes/gauge-board';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { LevelReading } from '@mereward/db/entities/lakes/level-reading';
import { Mark } from '@mereward/db/entities/lakes/mark';
import { Peg } from '@mereward/db/entities/lakes/peg';
import type { Role } from '@mereward/shared/accounts/contract';
import type { FisheryDetails } from '@mereward/shared/fisheries/contract';
import { geodesicAreaM2, type LonLat } from '@mereward/shared/geometry/geodesic';
import { originOf } from '@mereward/shared/geometry/outline';
import type {
  GaugeBoardDetails,
  LakeDetails,
  MarkDetails,
  PegDetails,
} from '@mereward/shared/lakes/contract';
import { randomUUID } from 'node:crypto';
import { aPerson, type Person } from './people';
import type { TestServer } from './server';
import { boardDetails, fisheryDetails, lakeDetails, markDetails, pegDetails } from './water-details';

const STAFF: readonly Role[] = ['owner', 'manager', 'head_bailiff', 'bailiff', 'office', 'member', 'angler'];

export type TestFishery = { id: string; people: Record<Role, Person> };

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

export async function aMark(test: TestServer, lake: TestLake, wishes: Partial<MarkDetails> = {}) {
  const { source, clock } = test.server;
  const id = randomUUID();
  const details = markDetails(wishes);
  const { createdBy } = await source.manager.findOneByOrFail(Lake, { id: lake.id });
  const row = { id, lakeId: lake.id, code: details.code, details, version: 1, createdBy, createdAt: clock() };
  await source.manager.insert(Mark, row);
  return { id, lakeId: lake.id, details };
}

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
