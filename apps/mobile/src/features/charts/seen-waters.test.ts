import type { PegPageView } from '@mereward/shared/charts/contract';
import type { FisheryView } from '@mereward/shared/fisheries/contract';
import type { LakeView } from '@mereward/shared/lakes/contract';
import { expect, test } from 'vitest';
import { emergencyFisheries } from './seen-waters';

const peg = (id: string, fisheryId = 'f1'): PegPageView =>
  ({
    id,
    fishery: { id: fisheryId, name: 'Ostlemere', dutyPhone: '01632 960001', meetingPoint: 'the lodge' },
    lake: { id: 'l1', name: 'Far Ostle', emergencyAccess: 'by the lower gate', phoneSignal: 'one bar' },
  }) as PegPageView;
const lake = {
  id: 'l2',
  fisheryId: 'f2',
  fisheryName: 'Sallow',
  details: { name: 'Pit', emergencyAccess: 'track', phoneSignal: '' },
} as LakeView;
const fishery = {
  id: 'f2',
  details: {
    name: 'Sallow Water',
    dutyPhone: '01632 960002',
    meetingPoint: 'road gate',
    gridReference: 'TM 1 2',
  },
} as FisheryView;
const at = <T>(readAtMs: number, value: T) => ({ value, readAtMs });

test('nothing seen is nothing told', () => {
  expect(emergencyFisheries({ fisheries: [], lakes: [], pegs: [] })).toEqual([]);
});

test('a fishery seen only by a peg’s page tells its phone, its gate and that lake’s route', () => {
  const [told] = emergencyFisheries({ fisheries: [], lakes: [], pegs: [at(5, peg('p1'))] });
  expect(told).toMatchObject({
    name: 'Ostlemere',
    dutyPhone: '01632 960001',
    meetingPoint: 'the lodge',
    lakes: [{ name: 'Far Ostle', route: 'by the lower gate', signal: 'one bar' }],
    readAtMs: 5,
  });
});

test('the water seen last comes first, with its fishery’s own numbers', () => {
  const told = emergencyFisheries({
    fisheries: [at(1, fishery)],
    lakes: [at(9, lake)],
    pegs: [at(5, peg('p1'))],
  });
  expect(told.map(({ name }) => name)).toEqual(['Sallow Water', 'Ostlemere']);
  expect(told[0]).toMatchObject({
    dutyPhone: '01632 960002',
    gridReference: 'TM 1 2',
    lakes: [{ name: 'Pit' }],
  });
});

test('of many pegs the six seen last are told', () => {
  const pegs = Array.from({ length: 9 }, (_, i) => at(i, peg(`p${String(i)}`)));
  const [told] = emergencyFisheries({ fisheries: [], lakes: [], pegs });
  expect(told?.pegs.map(({ id }) => id)).toEqual(['p8', 'p7', 'p6', 'p5', 'p4', 'p3']);
});
