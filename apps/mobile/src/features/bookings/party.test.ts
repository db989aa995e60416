import type { TicketTypeView } from '@mereward/shared/tickets/contract';
import { expect, test } from 'vitest';
import { aMember, kindsBeside, withChange, withMember } from './party';

const kind = (id: string, audience: string, starts = '07:00', rodsMost = 3) =>
  ({
    id,
    details: { audience, rodsMost, duration: { kind: 'fixed_hours', starts, ends: '19:00' } },
  }) as TicketTypeView;

test('a ticket has no more rods than its kind allows, and says whose it is', () => {
  expect(aMember({ pegId: 'SC2', kind: kind('junior', 'junior', '07:00', 1), rods: 3 })).toEqual({
    pegId: 'SC2',
    ticketTypeId: 'junior',
    kind: 'junior',
    rods: 1,
    people: 1,
  });
});

test('only kinds that run as long stand in one booking', () => {
  const day = kind('day', 'public');
  expect(
    kindsBeside([day, kind('junior', 'junior'), kind('late', 'public', '09:00')], day).map(({ id }) => id),
  ).toEqual(['day', 'junior']);
});

test('a peg is in a party once', () => {
  const member = aMember({ pegId: 'FO7', kind: kind('day', 'public'), rods: 2 });
  expect(withMember([member], member)).toHaveLength(1);
  expect(withMember([member], { ...member, pegId: 'FO8' })).toHaveLength(2);
});

test('a ticket of a party is changed or taken out by its place', () => {
  const member = aMember({ pegId: 'FO7', kind: kind('day', 'public'), rods: 2 });
  const party = [member, { ...member, pegId: 'FO8' }];
  expect(withChange(party, 1, { rods: 1 })[1]?.rods).toBe(1);
  expect(withChange(party, 0, null).map(({ pegId }) => pegId)).toEqual(['FO8']);
});
