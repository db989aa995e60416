import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { instantOf } from '../time/zoned';
import {
  affects,
  choiceDeadline,
  choiceOutcome,
  closedUntil,
  closureState,
  mayBookInSpite,
  type BookedStay,
  type Closure,
} from './closure-effect';
import { ClosureDetails, ClosureEffect } from './contract';
import { whyNotLift } from './lifting';

const zone = 'Europe/London';
const at = (civil: string): Date => instantOf(civil, zone).at;
const [far, pool, peg] = ['far', 'pool', 'fo7'];
const flood = (more: Partial<Closure> = {}): Closure => ({
  scope: { kind: 'lakes', lakeIds: [far] },
  reason: 'flood',
  effect: 'move',
  from: at('2027-02-12T12:00'),
  until: at('2027-02-15T12:00'),
  liftedAt: null,
  ...more,
});
const stay = (from: string, until: string, more: Partial<BookedStay> = {}): BookedStay => ({
  lakeId: far,
  pegId: peg,
  from: at(from),
  until: at(until),
  season: false,
  ...more,
});

describe('whom a closure hits', () => {
  const weekend = stay('2027-02-13T12:00', '2027-02-14T12:00');

  test('those whose time and place it meets', () => {
    expect(affects(flood(), weekend, zone)).toBe('choose');
    expect(affects(flood(), stay('2027-02-11T12:00', '2027-02-12T12:00'), zone)).toBe('none');
    expect(affects(flood(), stay('2027-02-15T12:00', '2027-02-16T12:00'), zone)).toBe('none');
    expect(affects(flood(), { ...weekend, lakeId: pool }, zone)).toBe('none');
    expect(affects(flood({ until: null }), stay('2027-12-01T12:00', '2027-12-02T12:00'), zone)).toBe(
      'choose',
    );
    expect(affects(flood(), { ...weekend, season: true }, zone)).toBe('tell');
    expect(affects(flood({ effect: 'refund', scope: { kind: 'fishery' } }), weekend, zone)).toBe('refund');
    expect(affects(flood({ scope: { kind: 'pegs', pegIds: [peg] }, effect: 'block' }), weekend, zone)).toBe(
      'keep_out',
    );
    expect(
      affects(flood({ scope: { kind: 'pegs', pegIds: [peg] } }), { ...weekend, pegId: null }, zone),
    ).toBe('none');
  });

  test('a closed night hits stays over a midnight, closed keepnets nobody’s peg', () => {
    const night = flood({ scope: { kind: 'method', method: 'night', lakeIds: null }, effect: 'refund' });
    expect(affects(night, weekend, zone)).toBe('refund');
    expect(affects(night, stay('2027-02-13T07:00', '2027-02-13T17:00'), zone)).toBe('none');
    const nets = flood({ scope: { kind: 'method', method: 'keepnets', lakeIds: [far] }, effect: 'refund' });
    expect(affects(nets, weekend, zone)).toBe('warn');
    expect(affects(nets, { ...weekend, lakeId: pool }, zone)).toBe('none');
  });

  test('one lifted early is over from then', () => {
    const lifted = flood({ liftedAt: at('2027-02-13T10:00') });
    expect(affects(lifted, weekend, zone)).toBe('none');
    expect(closedUntil(lifted)).toEqual(at('2027-02-13T10:00'));
    expect(closedUntil(flood({ liftedAt: at('2027-02-20T10:00') }))).toEqual(at('2027-02-15T12:00'));
    expect(closureState(flood(), at('2027-02-12T11:59'))).toBe('to_come');
    expect(closureState(flood(), at('2027-02-12T12:00'))).toBe('in_force');
    expect(closureState(flood({ until: null }), at('2030-02-12T12:00'))).toBe('in_force');
    expect(closureState(lifted, at('2027-02-13T10:00'))).toBe('over');
    expect(closureState(flood({ liftedAt: at('2027-02-12T08:00') }), at('2027-02-12T09:00'))).toBe('over');
  });

  test('nobody is hit by one that shares no instant with their stay, whatever its effect', () => {
    const hour = fc.integer({ min: 0, max: 100 });
    const length = fc.integer({ min: 1, max: 40 });
    fc.assert(
      fc.property(
        hour,
        length,
        hour,
        length,
        fc.constantFrom(...ClosureEffect.options),
        (from, hours, start, stayed, effect) => {
          const instant = (count: number): Date => new Date(Date.UTC(2027, 6, 1) + count * 3_600_000);
          const closure = flood({
            effect,
            from: instant(from),
            until: instant(from + hours),
            scope: { kind: 'fishery' },
          });
          const booked = { ...weekend, from: instant(start), until: instant(start + stayed) };
          const shares = Math.max(from, start) < Math.min(from + hours, start + stayed);
          expect(affects(closure, booked, zone) !== 'none').toBe(shares);
        },
      ),
    );
  });
});

test('law can’t be set aside, an own closure can by the manager', () => {
  const byelaw = flood({ reason: 'byelaw_close_season', effect: 'block' });
  expect([mayBookInSpite(byelaw, 'keep_out', true), mayBookInSpite(flood(), 'choose', true)]).toEqual([
    false,
    true,
  ]);
  expect([mayBookInSpite(flood(), 'choose', false), mayBookInSpite(flood(), 'warn', false)]).toEqual([
    false,
    true,
  ]);
});

test('who has not chosen by the deadline gets all the money back', () => {
  const told = at('2027-02-12T07:10');
  const deadline = choiceDeadline(told, at('2027-02-13T12:00'), zone);
  expect(deadline).toEqual(at('2027-02-13T10:00'));
  expect(choiceDeadline(told, at('2027-02-12T12:00'), zone)).toEqual(at('2027-02-12T12:00'));
  expect(choiceDeadline(told, at('2027-02-12T08:00'), zone)).toEqual(at('2027-02-12T09:10'));
  const moved = { choice: 'move_date' as const, at: at('2027-02-13T09:59') };
  expect(choiceOutcome(null, deadline, at('2027-02-13T09:59'))).toBeNull();
  expect(choiceOutcome(null, deadline, deadline)).toBe('refund');
  expect(choiceOutcome(moved, deadline, at('2027-02-14T09:00'))).toBe('move_date');
  expect(choiceOutcome({ ...moved, at: deadline }, deadline, at('2027-02-14T09:00'))).toBe('refund');
});

test('oxygen must be good at two dawns running before the lake is opened', () => {
  const conditions = [
    { kind: 'dawn_oxygen' as const, leastMgL: 5, dawns: 2 },
    { kind: 'tick' as const, id: 'aerators', words: 'Aerators looked at' },
  ];
  const dawn = (day: string, oxygenMgL: number) => ({ at: at(`${day}T05:05`), oxygenMgL });
  const why = (dawns: ReturnType<typeof dawn>[], ticked: string[] = ['aerators']): string[] =>
    whyNotLift(conditions, { ticked: new Set(ticked), dawns, zone });
  const [sunday, monday] = [dawn('2027-07-18', 5.4), dawn('2027-07-19', 5.8)];
  expect(why([sunday])).toEqual(['2 dawn readings running of 5.0 mg/l or more: so far 1']);
  expect(why([monday, sunday])).toEqual([]);
  expect(why([sunday, dawn('2027-07-20', 5.8)])).toHaveLength(1);
  expect(why([sunday, monday, dawn('2027-07-20', 4.9)])).toHaveLength(1);
  expect(why([sunday, monday, dawn('2027-07-19', 4.9)])).toHaveLength(1);
  expect(why([sunday, monday], [])).toEqual(['Aerators looked at']);
});

test('a closure that ends before it begins is refused', () => {
  const details = {
    scope: { kind: 'fishery' },
    reason: 'ice',
    effect: 'move',
    from: '2027-01-02T00:00:00Z',
    until: null,
    publicWords: 'Ice on all lakes. Keep off it.',
    liftConditions: [],
  };
  expect(ClosureDetails.safeParse(details).success).toBe(true);
  expect(ClosureDetails.safeParse({ ...details, until: '2027-01-01T00:00:00Z' }).success).toBe(false);
});
