import { BookForSomebody } from '@mereward/shared/bookings/contract';
import { expect, test } from 'vitest';
import { bookingFor, FIRST_TICKET, ON_ARRIVAL, SomebodyDraft } from './somebody-draft';

const uuid = (last: string) => `6a1c1c0e-6f0f-4d0c-8a67-1f6c0b7e1a${last}`;
const [id, lakeId, day24, junior, peg] = ['01', '02', '03', '04', '05'].map(uuid) as [
  string,
  string,
  string,
  string,
  string,
];
const facts = { id, starts: ['08:00', '12:00'], juniorTypes: new Set([junior]) };
const typed = {
  lakeId,
  day: '2027-07-17',
  start: '12:00',
  holder: { name: 'Ada Reed', email: '' },
  vehicle: '',
  note: '',
  tickets: [{ ...FIRST_TICKET, ticketTypeId: day24, pegId: peg }],
};

test('one ticket is its holder’s own, and needs no address', () => {
  const asked = bookingFor(SomebodyDraft.parse(typed), facts);
  expect(BookForSomebody.parse(asked)).toEqual(asked);
  expect(asked).toMatchObject({ start: '12:00', holder: { name: 'Ada Reed', email: null } });
  expect(asked.tickets).toEqual([
    { ticketTypeId: day24, pegId: peg, rods: 2, people: 1, kind: 'holder', name: 'Ada Reed', bornOn: null },
  ]);
});

test('further tickets are guests’ or juniors’, by their kind', () => {
  const tickets = [
    ...typed.tickets,
    { ...FIRST_TICKET, ticketTypeId: day24, pegId: ON_ARRIVAL, name: 'Ben Holt' },
    { ...FIRST_TICKET, ticketTypeId: junior, pegId: peg, name: 'Cy Reed', bornOn: '2015-05-01' },
  ];
  const asked = bookingFor(SomebodyDraft.parse({ ...typed, tickets }), facts);
  expect(asked.tickets.map(({ kind, name, pegId, bornOn }) => [kind, name, pegId, bornOn])).toEqual([
    ['holder', 'Ada Reed', peg, null],
    ['guest', 'Ben Holt', null, null],
    ['junior', 'Cy Reed', peg, '2015-05-01'],
  ]);
});

test('a start the ticket does not have gives way to its first; where hours are given there is none', () => {
  const read = SomebodyDraft.parse({ ...typed, start: '23:00' });
  expect(bookingFor(read, facts).start).toBe('08:00');
  expect(bookingFor(read, { ...facts, starts: [] }).start).toBeNull();
});

test('a ticket without a peg is refused on its field', () => {
  const read = SomebodyDraft.safeParse({ ...typed, tickets: [{ ...FIRST_TICKET, ticketTypeId: day24 }] });
  expect(read.error?.issues.map(({ path, message }) => `${path.join('.')}: ${message}`)).toEqual([
    'tickets.0.pegId: Choose a peg',
  ]);
});
