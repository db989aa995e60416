import { expect, test } from 'vitest';
import { USUAL_CANCELLATION } from './cancellation';
import { cancellationSteps } from './cancellation-words';

const start = new Date('2027-07-17T11:00:00Z'); // Saturday noon in London
const steps = (now: string, policy = USUAL_CANCELLATION) =>
  cancellationSteps(policy, { start, now: new Date(now), zone: 'Europe/London' });

test('a policy is told by the instants at which its steps fall for one ticket', () => {
  expect(steps('2027-07-01T09:00:00Z')).toEqual([
    'Until Sat 10 July 2027, 12:00: all of it back, or a move to another date.',
    'Until Thu 15 July 2027, 12:00: 50 % back, or a move to another date.',
    'Until Sat 17 July 2027, 12:00: nothing back, but a move if the peg is let again.',
  ]);
});

test('steps that are over are left out; one still holds at its very instant', () => {
  expect(steps('2027-07-10T11:00:00Z')).toHaveLength(3);
  expect(steps('2027-07-10T11:00:00.001Z')).toHaveLength(2);
  expect(steps('2027-07-16T11:00:00Z')).toEqual([
    'Until Sat 17 July 2027, 12:00: nothing back, but a move if the peg is let again.',
  ]);
  expect(steps('2027-07-17T11:00:00Z')).toEqual(['It has begun: nothing is given back.']);
});

test('a policy whose last step ends before the start says that nothing goes back after it', () => {
  const short = { ...USUAL_CANCELLATION, tiers: USUAL_CANCELLATION.tiers.slice(0, 1) };
  expect(steps('2027-07-01T09:00:00Z', short)).toEqual([
    'Until Sat 10 July 2027, 12:00: all of it back, or a move to another date.',
    'After that: nothing back.',
  ]);
  expect(steps('2027-07-16T09:00:00Z', short)).toEqual(['So near to the start nothing is given back.']);
});
