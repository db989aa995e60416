import { ChartView, PegPageView } from '@mereward/shared/charts/contract';
import { fromPlane } from '@mereward/shared/geometry/plane';
import { LakeView, PegView } from '@mereward/shared/lakes/contract';
import type { LakePlace } from '@mereward/shared/lakes/place-contract';
import { ProblemBody } from '@mereward/shared/problems/problem';
import { spawnSync } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { publishedChart } from '../support/charts';
import { aPerson, aStranger, type Asker } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aLongWater, aSurvey, type TestWater } from '../support/surveys';
import { aFishery, type TestFishery } from '../support/waters';
import { WATER_CENTRE } from '../support/water-details';

let server: TestServer;
let here: TestFishery;
let water: TestWater;
let chartId: string;

beforeAll(async () => {
  server = await aServer();
  server.setNow('2027-04-03T12:00:00Z');
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  water = await aLongWater(server, here);
  const visitId = await aSurvey(here.people.head_bailiff, water);
  const [person, approver] = [here.people.head_bailiff, here.people.manager];
  chartId = await publishedChart(server, { person, approver, lakeId: water.lake.id, visitIds: [visitId] });
});
afterAll(() => server.close());

const at = (xM: number, yM: number): [number, number] => {
  const [lon, lat] = fromPlane(WATER_CENTRE, { xM, yM });
  return [lon, lat];
};
const place = (wishes: Partial<LakePlace>): LakePlace => ({
  id: randomUUID(),
  kind: 'parking',
  name: 'Lodge car park',
  at: [at(60, -80)],
  note: '',
  audience: 'public',
  ...wishes,
});

const lakeSeen = async (by: Asker) => LakeView.parse((await by.get(`/lakes/${water.lake.id}`)).body);
const kept = async (places: LakePlace[] | undefined, by = here.people.manager) => {
  const { details, version } = await lakeSeen(by);
  const { places: _were, ...rest } = details;
  return by.put(`/lakes/${water.lake.id}`).send({ details: places ? { ...rest, places } : rest, version });
};
const pegNow = async () =>
  PegView.parse((await here.people.manager.get(`/pegs/${water.peg.id}/details`)).body);
const peg = pegNow;
const kinds = async (by: Asker): Promise<string[]> => {
  const { body, text } = await by.get(`/charts/${chartId}/geojson`).buffer(true);
  const { features } = JSON.parse(text ?? body.toString('utf8')) as {
    features: { properties: { kind: string; name?: string } }[];
  };
  const drawn = ['parking', 'gate', 'throw_line', 'hazard', 'overhead_line'];
  return features.map(({ properties }) => properties.kind).filter((kind) => drawn.includes(kind));
};

describe('places drawn on a lake', () => {
  test('are kept by owner and manager, shown by audience, and left alone by a change that says nothing of them', async () => {
    const places = [
      place({}),
      place({ kind: 'gate', name: 'Works gate', audience: 'staff' }),
      place({ kind: 'parking', name: 'Members’ bays', audience: 'members' }),
      place({ kind: 'hazard', name: 'Soft silt' }),
      place({ kind: 'overhead_line', name: 'Wire', at: [at(-300, 150), at(300, 150)] }),
    ];
    expect((await kept(places, here.people.bailiff)).status).toBe(403);
    expect((await kept(places)).status).toBe(200);
    expect((await kept(undefined)).status).toBe(200);
    const names = async (by: Asker) => (await lakeSeen(by)).details.places?.map(({ name }) => name);
    const open = ['Lodge car park', 'Soft silt', 'Wire'];
    expect(await names(aStranger(server))).toEqual(open);
    expect(await names(here.people.member)).toEqual(
      expect.arrayContaining([...open, 'Members’ bays']) as string[],
    );
    expect(await names(here.people.bailiff)).toHaveLength(5);
    const shown = ChartView.parse((await aStranger(server).get(`/charts/${chartId}`)).body).places;
    expect(shown?.map(({ name }) => name)).toEqual(open);
    expect(await kinds(aStranger(server))).toEqual(['parking', 'hazard', 'overhead_line']);
    expect(await kinds(here.people.member)).toEqual(['parking', 'parking', 'hazard', 'overhead_line']);
    expect(await kinds(here.people.owner)).toHaveLength(5);
  });

  test('are refused with their field where they can’t be so', async () => {
    const refused = async (one: Partial<LakePlace>) => {
      const answer = await kept([place({}), place(one)]);
      expect(answer.status).toBe(400);
      return ProblemBody.parse(answer.body).errors?.map(({ pointer }) => pointer);
    };
    expect(await refused({ kind: 'overhead_line' })).toEqual(['/details/places/1/at']);
    expect(await refused({ kind: 'hazard', audience: 'members' })).toEqual(['/details/places/1/audience']);
    expect(await refused({ at: [at(0, 5000)] })).toEqual(['/details/places/1/at']);
    expect(await refused({ name: '' })).toEqual(['/details/places/1/name']);
  });

  test.runIf(spawnSync('ogrinfo', ['--version']).error === undefined)(
    'are read back by another program where they were drawn, the overhead line as a line',
    async () => {
      await kept([
        place({ at: [at(60, -80)] }),
        place({ kind: 'overhead_line', name: 'Wire', at: [at(-300, 150), at(0, 160), at(300, 150)] }),
      ]);
      const folder = mkdtempSync(join(tmpdir(), 'places-'));
      const { body, text } = await aStranger(server).get(`/charts/${chartId}/geojson`).buffer(true);
      const file = join(folder, 'chart.geojson');
      writeFileSync(file, text ?? body);
      const asked = (kind: string) =>
        String(spawnSync('ogrinfo', ['-ro', '-al', '-q', '-where', `kind='${kind}'`, file]).stdout);
      const parking = /POINT \(([-\d.]+) ([-\d.]+)\)/.exec(asked('parking'));
      expect(Number(parking?.[1])).toBeCloseTo(at(60, -80)[0], 6);
      expect(Number(parking?.[2])).toBeCloseTo(at(60, -80)[1], 6);
      const wire = asked('overhead_line');
      expect(wire).toMatch(/LINESTRING \(([-\d.]+ [-\d.]+,?){3}\)/);
      expect(wire).toContain('visibility (String) = public');
      rmSync(folder, { recursive: true });
    },
  );
});

describe('an overhead line drawn within 30 m of a peg', () => {
  const wireAt = async (awayM: number) => {
    const [lon, lat] = (await peg()).details.origin;
    const north = fromPlane([lon, lat], { xM: -200, yM: -awayM });
    const south = fromPlane([lon, lat], { xM: 200, yM: -awayM });
    return place({
      kind: 'overhead_line',
      name: 'Wire',
      at: [
        [north[0], north[1]],
        [south[0], south[1]],
      ],
    });
  };

  test('warns at that peg, keeps it from being let, and asks for its sheet to be put right', async () => {
    expect((await kept([await wireAt(20)])).status).toBe(200);
    const page = PegPageView.parse((await aStranger(server).get(`/pegs/${water.peg.id}/page`)).body);
    expect(page.cautions[0]).toMatch(/^A power line passes 20 m from this peg\. Restricted/);
    const lake = await lakeSeen(here.people.bailiff);
    const item = lake.pegs.find(({ id }) => id === water.peg.id);
    expect(item?.overheadFishing).toBe('restricted');
    expect(item?.overheadDispute).toContain('drawn 20 m from this peg');
    const open = (await lakeSeen(aStranger(server))).pegs.find(({ id }) => id === water.peg.id);
    expect(open).toMatchObject({ overheadFishing: 'restricted' });
    expect(open).not.toHaveProperty('overheadDispute');

    const sofia = await aPerson(server, { name: 'Sofia Marsh' });
    const ticket = await here.people.office.post(`/pegs/${water.peg.id}/bookings`).send({
      id: randomUUID(),
      email: sofia.email,
      from: '2027-04-04T06:00:00.000Z',
      until: '2027-04-04T18:00:00.000Z',
    });
    expect(ticket.status).toBe(409);
    expect(ProblemBody.parse(ticket.body).title).toContain('no assessment is on file');

    const { details, version } = await peg();
    const same = await here.people.manager.put(`/pegs/${water.peg.id}`).send({ details, version });
    expect(same.status).toBe(400);
    expect(ProblemBody.parse(same.body).errors?.[0]?.pointer).toBe('/details/overheadLine/kind');
    const line = { ...details.overheadLine, kind: 'present', distanceM: 21, fishing: 'no_fishing' };
    const right = { details: { ...details, overheadLine: line }, version };
    expect((await here.people.manager.put(`/pegs/${water.peg.id}`).send(right)).status).toBe(200);
    const after = await lakeSeen(here.people.bailiff);
    expect(after.pegs.find(({ id }) => id === water.peg.id)?.overheadDispute).toBeNull();
  });
});
