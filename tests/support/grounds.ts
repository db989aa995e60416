import type { Person } from './people';
import { aServer, type TestServer } from './server';
import { aLongWater, type TestWater } from './surveys';
import { aFishery, aLake, type TestFishery, type TestLake } from './waters';

/** Two fisheries on one server: `here`, and `elsewhere`, whose people must see nothing of it. */
export type Ground = { server: TestServer; here: TestFishery; elsewhere: TestFishery };

async function twoFisheries(name?: string): Promise<Ground> {
  const server = await aServer();
  const here = await aFishery(server, name === undefined ? {} : { name });
  return { server, here, elsewhere: await aFishery(server, { name: 'Upper Sallow' }) };
}

/** The ground of tests about a lake as such. */
export async function aLakeGround(): Promise<Ground & { lake: TestLake }> {
  const ground = await twoFisheries();
  return { ...ground, lake: await aLake(ground.server, ground.here) };
}

/** The ground of tests about surveys and charts: a lake with a peg, a mark and a board, at noon of a day in April. */
export async function aSurveyGround(): Promise<Ground & { water: TestWater; joan: Person }> {
  const ground = await twoFisheries('Ostlemere Waters');
  ground.server.setNow('2027-04-03T12:00:00Z');
  const water = await aLongWater(ground.server, ground.here);
  return { ...ground, water, joan: ground.here.people.head_bailiff };
}
