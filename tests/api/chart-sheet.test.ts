import { Lake } from '@mereward/db/entities/lakes/lake';
import { geodesicBetween } from '@mereward/shared/geometry/geodesic';
import type { LakePolygon } from '@mereward/shared/lakes/contract';
import { spawnSync } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { publishedChart } from '../support/charts';
import { drawnOn, type Drawn } from '../support/pdf-strokes';
import { aStranger, type Asker } from '../support/people';
import { aServer, type TestServer } from '../support/server';
import { aLongWater, aSurvey, type TestWater } from '../support/surveys';
import { aFishery, type TestFishery } from '../support/waters';

vi.setConfig({ testTimeout: 60_000 }); // the thread that draws reads its source when it starts

let server: TestServer;
let here: TestFishery;
let water: TestWater;
let chartId: string;

beforeAll(async () => {
  server = await aServer();
  here = await aFishery(server, { name: 'Ostlemere Waters' });
  water = await aLongWater(server, here);
  const joan = here.people.head_bailiff;
  const visitIds = [await aSurvey(joan, water)];
  const lakeId = water.lake.id;
  chartId = await publishedChart(server, { person: joan, approver: here.people.manager, lakeId, visitIds });
});
afterAll(() => server.close());

async function sheet(size: string, reader: Asker = aStranger(server)): Promise<Buffer> {
  const answer = await reader.get(`/charts/${chartId}/sheet.pdf?size=${size}`).buffer(true);
  expect(answer.headers['content-type']).toBe('application/pdf');
  return Buffer.from(answer.body);
}

const PAPER_PT = { a3: [841.89, 1190.55], a4: [595.28, 841.89] } as const; // ISO 216
const POINT_M = 0.0254 / 72;

const scaleOf = (pdf: Buffer): number => Number(/Scale 1:(\d+) on A/.exec(pdf.toString('latin1'))?.[1]);
const width = ({ left, right }: Drawn): number => right - left;
const height = ({ bottom, top }: Drawn): number => top - bottom;

/** The bar: the longest of the flat boxes, 6 px of 0.6 pt high. */
function barOf(pdf: Buffer): Drawn {
  const flat = drawnOn(pdf).filter((each) => each.act === 'stroke' && Math.abs(height(each) - 3.6) < 0.01);
  const bar = flat.sort((a, b) => width(b) - width(a))[0];
  if (!bar) throw new Error('The sheet has no bar');
  return bar;
}

/** How far the water reaches from west to east and from south to north, by geodesics over the middle of its box. */
function spanM({ coordinates: [shore = []] }: LakePolygon): { acrossM: number; upM: number } {
  const lons = shore.map(([lon]) => lon);
  const lats = shore.map(([, lat]) => lat);
  const [west, east, south, north] = [
    Math.min(...lons),
    Math.max(...lons),
    Math.min(...lats),
    Math.max(...lats),
  ];
  const middle: [number, number] = [(west + east) / 2, (south + north) / 2];
  return {
    acrossM: geodesicBetween([west, middle[1]], [east, middle[1]]).distanceM,
    upM: geodesicBetween([middle[0], south], [middle[0], north]).distanceM,
  };
}

describe.each(['a4', 'a3'] as const)('a chart sheet on %s', (size) => {
  test('is drawn at the scale it states: the bar and the water, measured on the page', async () => {
    const pdf = await sheet(size);
    const scale = scaleOf(pdf);
    expect([100, 200, 250, 500, 750, 1000, 1250, 1500, 2000, 2500, 5000]).toContain(scale);
    const barM = width(barOf(pdf)) * POINT_M * scale;
    // Places are written to a tenth of a px, 0.06 pt of paper: twice that either way.
    const toleranceM = 0.12 * POINT_M * scale;
    const round = [1, 2, 5, 10, 20, 50, 100, 200, 500].find((each) => Math.abs(each - barM) < toleranceM);
    expect(round, `a bar of ${barM} m`).toBeDefined();
    const { details } = await server.server.source.manager.findOneByOrFail(Lake, { id: water.lake.id });
    const { acrossM, upM } = spanM(details.outline);
    const clips = drawnOn(pdf).filter(({ act }) => act === 'clip');
    const drawn = clips.find(
      (each) =>
        Math.abs(width(each) * POINT_M * scale - acrossM) < toleranceM + 0.05 && // and the ellipsoid's curve
        Math.abs(height(each) * POINT_M * scale - upM) < toleranceM + 0.05,
    );
    expect(drawn, `water ${acrossM} m by ${upM} m`).toBeDefined();
  });

  test('keeps everything on the paper', async () => {
    const pdf = await sheet(size);
    const box = /MediaBox \[0 0 ([\d.]+) ([\d.]+)\]/.exec(pdf.toString('latin1'));
    const paper = [Number(box?.[1]), Number(box?.[2])].sort((a, b) => a - b);
    expect(paper).toEqual([...PAPER_PT[size]]);
    expect(pdf.toString('latin1').match(/\/Type \/Page\b/g)).toHaveLength(1);
  });

  test.runIf(spawnSync('pdftoppm', ['-v']).error === undefined)(
    'prints its bar as long as it says, by the pixels of another program',
    async () => {
      const pdf = await sheet(size);
      const longest = barInPixels(pdf);
      const barM = (longest / 300) * 0.0254 * scaleOf(pdf);
      const toleranceM = ((2 / 300) * 0.0254 + 0.0001) * scaleOf(pdf); // two pixels and the rim
      expect([1, 2, 5, 10, 20, 50, 100, 200, 500].some((each) => Math.abs(each - barM) < toleranceM)).toBe(
        true,
      );
    },
  );
});

/** The longest dark run that begins at the sheet's edge and stops short of the frame's, at 300 dots an inch. */
function barInPixels(pdf: Buffer): number {
  const folder = mkdtempSync(join(tmpdir(), 'mereward-sheet-'));
  try {
    writeFileSync(join(folder, 'sheet.pdf'), pdf);
    const said = spawnSync('pdftoppm', ['-r', '300', '-gray', '-singlefile', 'sheet.pdf', 'sheet'], {
      cwd: folder,
    });
    if (said.status !== 0) throw new Error(String(said.stderr));
    const picture = readFileSync(join(folder, 'sheet.pgm'));
    const [head = '', across = ''] =
      /^P5\s+(\d+)\s+(\d+)\s+255\s/.exec(picture.toString('latin1', 0, 40)) ?? [];
    const columns = Number(across);
    let longest = 0;
    for (let row = head.length; row + columns <= picture.length; row += columns) {
      let run = 0;
      const from = row + Math.round((30.3 / 72) * 300); // half a point inside the edge
      while (run < columns && (picture[from + run] ?? 255) < 128) run++;
      if (run > longest && run < columns * 0.85) longest = run;
    }
    return longest;
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

describe('who may have a chart sheet', () => {
  test('a paper that isn’t A3 or A4 is refused in words', async () => {
    const answer = await aStranger(server).get(`/charts/${chartId}/sheet.pdf?size=a9`);
    expect(answer.status).toBe(400);
  });

  test('there is none of a chart that isn’t this reader’s to know of', async () => {
    expect((await aStranger(server).get(`/charts/${randomUUID()}/sheet.pdf`)).status).toBe(404);
  });

  test('whoever may see no depths gets no isobath on it', async () => {
    const lake = await server.server.source.manager.findOneByOrFail(Lake, { id: water.lake.id });
    const hidden = { depth: 'staff', bottom: 'staff', spots: 'staff', soundings: 'staff' } as const;
    await server.server.source.manager.update(
      Lake,
      { id: lake.id },
      { details: { ...lake.details, audiences: hidden } },
    );
    const strangers = drawnOn(await sheet('a4')).length;
    const staffs = drawnOn(await sheet('a4', here.people.bailiff)).length;
    expect(strangers).toBeLessThan(staffs / 2);
    await server.server.source.manager.update(Lake, { id: lake.id }, { details: lake.details });
  });
});
