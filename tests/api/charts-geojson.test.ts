import { Lake } from '@mereward/db/entities/lakes/lake';
import { ChartView } from '@mereward/shared/charts/contract';
import { geodesicAreaM2 } from '@mereward/shared/geometry/geodesic';
import { Audience, type LayerAudiences } from '@mereward/shared/lakes/contract';
import { VisitWithCasts } from '@mereward/shared/surveys/contract';
import fc from 'fast-check';
import { spawnSync } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { z } from 'zod';
import { publishedChart } from '../support/charts';
import { aStranger, type Asker } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aLongWater, aSurvey, type TestWater } from '../support/surveys';
import { aFishery, type TestFishery } from '../support/waters';

let server: TestServer;
let here: TestFishery;
let water: TestWater;
let chartId: string;

const OPEN: LayerAudiences = { depth: 'public', bottom: 'public', spots: 'public', soundings: 'public' };

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  water = await aLongWater(server, here);
  const joan = here.people.head_bailiff;
  const visitId = await aSurvey(joan, water);
  chartId = await publishedChart(server, {
    person: joan,
    approver: here.people.manager,
    lakeId: water.lake.id,
    visitIds: [visitId],
  });
  const { casts } = VisitWithCasts.parse((await joan.get(`/visits/${visitId}`)).body);
  const [position] = casts.flatMap(({ reduced }) => (reduced.ok ? [reduced.sounding.position] : []));
  await joan.put(`/pegs/${water.peg.id}/spots/${randomUUID()}`).send({
    details: { name: 'The bar', position, usableRadiusM: 2, note: '' },
    version: null,
  });
  await setAudiences(OPEN);
});
afterAll(() => server.close());

async function setAudiences(audiences: LayerAudiences): Promise<void> {
  const lake = await server.server.source.manager.findOneByOrFail(Lake, { id: water.lake.id });
  await server.server.source.manager.update(
    Lake,
    { id: lake.id },
    { details: { ...lake.details, audiences } },
  );
}

const Position = z.tuple([z.number().min(-180).max(180), z.number().min(-90).max(90)]);
const Ring = z.array(Position).min(4); // RFC 7946, 3.1.6
const Geometry = z.discriminatedUnion('type', [
  z.strictObject({ type: z.literal('Point'), coordinates: Position }),
  z.strictObject({ type: z.literal('LineString'), coordinates: z.array(Position).min(2) }),
  z.strictObject({
    type: z.literal('MultiLineString'),
    coordinates: z.array(z.array(Position).min(2)).min(1),
  }),
  z.strictObject({ type: z.literal('Polygon'), coordinates: z.array(Ring).min(1) }),
  z.strictObject({ type: z.literal('MultiPolygon'), coordinates: z.array(z.array(Ring).min(1)).min(1) }),
]);
type Geometry = z.infer<typeof Geometry>;
const Feature = z.strictObject({
  type: z.literal('Feature'),
  id: z.string().optional(),
  geometry: Geometry,
  properties: z.record(z.string(), z.union([z.string(), z.number(), z.null()])),
});
/** Strict: no `crs` (RFC 7946, 4), nothing that another program would trip over. */
const Collection = z.strictObject({ type: z.literal('FeatureCollection'), features: z.array(Feature) });
type Collection = z.infer<typeof Collection>;

const taken = async (reader: Asker = aStranger(server)): Promise<Collection> => {
  const answer = await reader.get(`/charts/${chartId}/geojson`).buffer(true);
  expect(answer.headers['content-type']).toContain('application/geo+json');
  return Collection.parse(JSON.parse(answer.text ?? answer.body.toString('utf8')));
};

function polygonsIn(geometry: Geometry): [number, number][][][] {
  if (geometry.type === 'Polygon') return [geometry.coordinates];
  return geometry.type === 'MultiPolygon' ? geometry.coordinates : [];
}

/** Twice the signed area in degrees: positive when the ring turns counter-clockwise. */
function turn(ring: readonly (readonly [number, number])[]): number {
  const [[lon0, lat0] = [0, 0]] = ring;
  return ring.slice(1).reduce((sum, [lon, lat], i) => {
    const [before, latBefore] = ring[i] ?? [0, 0];
    return sum + (before - lon0) * (lat - lat0) - (lon - lon0) * (latBefore - lat0);
  }, 0);
}

describe('a chart’s GeoJSON', () => {
  test('holds what the map shows, each feature with its chart, level and days', async () => {
    const { features } = await taken();
    const kinds = new Set(features.map(({ properties }) => properties['kind']));
    for (const kind of ['lake', 'peg', 'origin', 'limit_line', 'marker', 'gauge', 'spot', 'contour', 'cast'])
      expect(kinds).toContain(kind);
    expect(features.some(({ properties }) => properties['bottom'] === 'gravel')).toBe(true);
    for (const { properties } of features)
      expect(properties).toMatchObject({ chart: '2027.1', datum_m: 0.62, surveyed_from: '2027-04-03' });
    const cast = features.find(({ properties }) => properties['kind'] === 'cast')?.properties;
    expect(Number(cast?.['ellipse_95_major_m'])).toBeGreaterThanOrEqual(Number(cast?.['ellipse_95_minor_m']));
    const ids = features.flatMap(({ id }) => (id === undefined ? [] : [id]));
    expect(new Set(ids).size).toBe(ids.length);
  });

  test('closes every ring and turns it as RFC 7946 says', async () => {
    const rings = (await taken()).features.flatMap(({ geometry }) => polygonsIn(geometry));
    expect(rings.length).toBeGreaterThan(3);
    for (const [outer = [], ...holes] of rings) {
      for (const ring of [outer, ...holes]) expect(ring.at(-1)).toEqual(ring[0]);
      expect(turn(outer)).toBeGreaterThan(0);
      for (const hole of holes) expect(turn(hole)).toBeLessThan(0);
    }
  });

  test('states the area of each bottom as its own rings enclose it on the ellipsoid', async () => {
    const areas = (await taken()).features.filter(({ properties }) => properties['area_m2'] !== undefined);
    expect(areas.length).toBeGreaterThan(0);
    for (const { geometry, properties } of areas) {
      const areaM2 = polygonsIn(geometry).reduce((sum, rings) => sum + geodesicAreaM2(rings), 0);
      // Corners stand to the centimetre: along some hundred metres of edge that is a square metre or two.
      expect(Math.abs(areaM2 - Number(properties['area_m2']))).toBeLessThan(2 + areaM2 * 0.002);
    }
  });

  test.runIf(spawnSync('ogrinfo', ['--version']).error === undefined)(
    'is opened by another program with every feature in it',
    async () => {
      const collection = await taken();
      const folder = mkdtempSync(join(tmpdir(), 'mereward-layers-'));
      try {
        const file = join(folder, 'chart.geojson');
        writeFileSync(file, JSON.stringify(collection));
        const said = spawnSync('ogrinfo', ['-ro', '-al', '-so', file], { encoding: 'utf8' });
        expect(said.status).toBe(0);
        expect(said.stdout).toContain(`Feature Count: ${collection.features.length}`);
        expect(said.stdout).toContain('WGS 84');
        const sql = `SELECT COUNT(*) AS bad FROM "chart" WHERE NOT ST_IsValid(geometry)`;
        const valid = spawnSync('ogrinfo', ['-ro', '-q', '-dialect', 'SQLite', '-sql', sql, file], {
          encoding: 'utf8',
        });
        if (valid.status === 0 && valid.stdout.includes('bad'))
          expect(valid.stdout).toContain('bad (Integer) = 0');
      } finally {
        rmSync(folder, { recursive: true, force: true });
      }
    },
  );

  test('shows nobody more than their screen does', async () => {
    const audience = fc.constantFrom(...Audience.options);
    const audiences = fc.record({ depth: audience, bottom: audience, spots: audience, soundings: audience });
    const readers = fc.constantFrom('stranger', 'member', 'angler', 'bailiff');
    await fc.assert(
      fc.asyncProperty(audiences, readers, async (shown, who) => {
        await setAudiences(shown);
        const reader =
          who === 'stranger'
            ? aStranger(server)
            : here.people[z.enum(['member', 'angler', 'bailiff']).parse(who)];
        const view = ChartView.parse((await reader.get(`/charts/${chartId}`)).body);
        const page = z
          .object({ spots: z.array(z.object({ name: z.string() })).nullable() })
          .parse((await reader.get(`/pegs/${water.peg.id}/page`)).body);
        const { features } = await taken(reader);
        const of = (kind: string) => features.filter(({ properties }) => properties['kind'] === kind);
        expect(of('contour').length > 0).toBe(view.isobaths !== null);
        expect(
          of('cast')
            .map(({ id }) => id)
            .sort(),
        ).toEqual([...(view.soundings ?? []), ...(view.bottomPoints ?? [])].map(({ id }) => id).sort());
        expect(of('bottom_area').length > 0).toBe(view.substrate !== null);
        expect(of('spot').length).toBe(page.spots?.length ?? 0);
        if (!view.isobaths) expect(JSON.stringify(features)).not.toMatch(/"depth_at_datum_m":\d/);
        if (!view.substrate) expect(JSON.stringify(features)).not.toMatch(/gravel|"clay"|silt/);
      }),
      { numRuns: 25 },
    );
    await setAudiences(OPEN);
  }, 60_000);
});
