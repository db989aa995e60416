import type { ChartListItem } from '@mereward/shared/charts/contract';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { expect, test } from 'vitest';
import { officeTasks } from './office-tasks';

const NOW = Date.parse('2027-05-01T12:00:00Z');

const board = {
  id: 'b0000000-0000-4000-8000-000000000000',
  version: 1,
  readings: [],
  details: {
    code: 'GB1',
    kind: 'board',
    position: [0, 52],
    unit: 'm',
    higherNumberHigherWater: true,
    normalLowM: null,
    normalHighM: null,
    alarmLowM: null,
    alarmHighM: null,
    lastCleanedOn: null,
    isDatumBoard: true,
  },
} satisfies LakeView['boards'][number];

const peg = {
  id: 'c0000000-0000-4000-8000-000000000000',
  number: '1',
  name: '',
  position: [0, 52],
  facingDeg: 0,
  status: 'open',
  statusReason: '',
  overheadFishing: 'ok',
  fromParkingM: null,
} satisfies LakeView['pegs'][number];

const mark = {
  id: 'd0000000-0000-4000-8000-000000000000',
  version: 1,
  photos: [],
  details: {
    code: 'M1',
    name: 'dead oak',
    position: [0, 52],
    fixedBy: 'plan',
    sigmaM: 3,
    permanence: 'tree',
    nightNote: '',
  },
} satisfies LakeView['marks'][number];

const lakeOf = (parts: Partial<LakeView>): LakeView => ({
  id: 'a0000000-0000-4000-8000-000000000000',
  fisheryId: 'f0000000-0000-4000-8000-000000000000',
  fisheryName: 'A fishery',
  zone: 'Europe/London',
  details: {
    name: 'Long Water',
    kind: 'farm_pond',
    outline: { type: 'Polygon', coordinates: [] },
    nights: false,
    maxPeople: null,
    maxRods: null,
    stockClass: 'natural',
    ownership: 'owned',
    designations: '',
    publicPathBeside: false,
    inflowOutflow: '',
    emergencyAccess: '',
    phoneSignal: '',
    datumM: 0.6,
    maxGapM: 8,
    longestCastM: 100,
    audiences: { depth: 'public', bottom: 'public', spots: 'public', soundings: 'staff' },
  },
  origin: [0, 52],
  areaM2: 10_000,
  levelNow: { levelM: 0.6, at: '2027-04-30T08:00:00Z', boardCode: 'GB1', boardReadsM: 0.6 },
  pegs: [peg],
  marks: [mark],
  boards: [board],
  publishedChart: null,
  version: 1,
  may: {
    change: true,
    changePegs: true,
    recordLevel: true,
    survey: true,
    buildCharts: true,
    approveCharts: true,
  },
  ...parts,
});

const chart = (status: ChartListItem['status']): ChartListItem => ({
  id: 'e0000000-0000-4000-8000-000000000000',
  version: null,
  title: 'Spring survey',
  status,
  surveyedFrom: null,
  surveyedTo: null,
  submittedBy: 'Joan',
  approvedBy: null,
  publishedAt: null,
  build: null,
});

const titles = (lake: LakeView, charts: ChartListItem[]): string[] =>
  officeTasks({ lake, charts, reports: [], nowMs: NOW }).map(({ title }) => title);

test('a lake that is read, pegged and published wants nothing', () => {
  expect(titles(lakeOf({}), [chart('published')])).toEqual([]);
});

test('a submitted chart comes first, and only to those who may approve it', () => {
  const bare = lakeOf({ pegs: [] });
  expect(titles(bare, [chart('submitted')])[0]).toBe('Spring survey of Long Water waits for approval');
  const office = lakeOf({ may: { ...bare.may, approveCharts: false } });
  expect(titles(office, [chart('submitted')])).toEqual([]);
});

test('a lake without a chart is told to everybody; who may not draft one is told who does', () => {
  const { may } = lakeOf({});
  const [task] = officeTasks({
    lake: lakeOf({ may: { ...may, buildCharts: false } }),
    charts: [],
    reports: [],
    nowMs: NOW,
  });
  expect(task).toMatchObject({ title: 'Long Water has no chart', href: '/office/charts' });
  expect(task?.note).toContain('head bailiff drafts it');
});

test('a new lake wants pegs, a board, marks, in that order, and no chart before its pegs', () => {
  const fresh = lakeOf({ pegs: [], boards: [], marks: [], levelNow: null });
  expect(titles(fresh, [])).toEqual([
    'Long Water has no pegs',
    'Long Water has no datum board',
    'Long Water has no far-bank marks',
  ]);
});

test('a board read a fortnight ago is left alone, a day later it is asked for', () => {
  const readAt = (at: string) =>
    lakeOf({ levelNow: { levelM: 0.6, at, boardCode: 'GB1', boardReadsM: 0.6 } });
  expect(titles(readAt('2027-04-17T12:00:00Z'), [chart('published')])).toEqual([]);
  expect(titles(readAt('2027-04-16T12:00:00Z'), [chart('published')])).toEqual(['Read GB1 on Long Water']);
});

test('reports that wait are counted together, and those decided no longer ask', () => {
  const lake = lakeOf({});
  const asked = (reports: { status: 'waiting' | 'accepted' | 'declined' }[]) =>
    officeTasks({ lake, charts: [], reports, nowMs: NOW }).map(({ title }) => title);
  const waiting = { status: 'waiting' } as const;
  expect(asked([waiting, { status: 'accepted' }])).toContain('An angler found Long Water not as charted');
  expect(asked([waiting, waiting])).toContain('2 reports that Long Water is not as charted');
  expect(asked([{ status: 'declined' }]).filter((title) => /as charted/.test(title))).toEqual([]);
});
