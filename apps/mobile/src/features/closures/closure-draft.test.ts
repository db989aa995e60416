import { ClosureDetails } from '@mereward/shared/closures/contract';
import { expect, test } from 'vitest';
import { ClosureDraft, closeOf } from './closure-draft';
import { newId } from '@/lib/new-id';

const lakeId = '8c1b3a7e-6a55-4d6a-8c3f-0b5d7a2f1e90';
const draft: ClosureDraft = {
  what: 'lakes',
  lakeIds: [lakeId],
  pegIds: [],
  method: 'keepnets',
  reason: 'flood',
  effect: 'move',
  from: '2027-02-12T12:00',
  until: '2027-02-15T12:00',
  publicWords: 'The banks are under water.',
  conditions: 'The board reads under 0.70 m\n\n Paths walked ',
  dawns: '',
  moveToLakeId: '',
  chooseUntil: '2027-02-13T10:00',
};
const made = { id: newId(), zone: 'Europe/London', conditionIds: [newId(), newId()] };

test('what is typed becomes a closure the contract takes, its times by the fishery’s clock', () => {
  const summer = { ...draft, from: '2027-07-12T12:00', until: '' };
  const { details } = closeOf(summer, made);
  expect(ClosureDetails.safeParse(details).success).toBe(true);
  expect(details).toMatchObject({ from: '2027-07-12T11:00:00.000Z', until: null });
});

test('each line is a condition of its own, and the same closure twice is the same', () => {
  const once = closeOf(draft, made);
  expect(once.details.liftConditions).toMatchObject([
    { kind: 'tick', words: 'The board reads under 0.70 m' },
    { kind: 'tick', words: 'Paths walked' },
  ]);
  expect(closeOf(draft, made)).toEqual(once);
});

test('an end before the beginning and no lake are named on their fields', () => {
  const faults = ClosureDraft.safeParse({ ...draft, lakeIds: [], until: '2027-02-11T12:00' }).error?.issues;
  expect(faults?.map(({ path }) => path[0])).toEqual(['lakeIds', 'until']);
});

test('only who may choose is told until when and where to', () => {
  const refunding = { ...draft, effect: 'refund' as const, moveToLakeId: lakeId };
  expect(closeOf(refunding, made)).toMatchObject({ moveToLakeId: null, chooseUntil: null });
});
