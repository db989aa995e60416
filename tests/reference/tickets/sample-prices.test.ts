/**
 * Sources: the trade's invented sample prices for day, 24 h, 48 h, night, junior, concession, guest and match; hours of
 * a day, a night and a session are common practice, no published source. VAT at 20 % of £12.00 is £2.00 by arithmetic.
 * Dawn and dusk of the trade's row 24 (52.6 N 1.5 W, 2027) are given to ± 2 min. Exact in pence.
 */
import { TicketType } from '@mereward/shared/tickets/contract';
import { ticketInterval } from '@mereward/shared/tickets/ticket-interval';
import { priceLines } from '@mereward/shared/tickets/ticket-price';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { expect, test } from 'vitest';

const lakeIds = ['0f1c2b62-7d4e-4a0b-9a38-0c2f5b7f6a01'];

test.each([
  ['day', 1200, 200],
  ['stay24', 2800, 467],
  ['stay48', 5000, 833],
  ['night', 1800, 300],
  ['junior', 600, 100],
  ['concession', 900, 150],
  ['guest', 1000, 167],
  ['match', 900, 150],
] as const)('a %s ticket costs %i pence, %i of it VAT', (template, grossPence, vatPence) => {
  const type = TicketType.parse({ ...TICKET_TEMPLATES[template], lakeIds });
  const lines = priceLines(type, { day: '2027-07-17', start: null, rods: 1, people: 1 });
  expect(lines).toMatchObject([{ grossPence, vatPence, netPence: grossPence - vatPence }]);
});

test.each([
  ['2027-01-09', '2027-01-09T07:14:00Z', '2027-01-09T17:10:00Z'],
  ['2027-07-17', '2027-07-17T03:02:00Z', '2027-07-17T21:21:00Z'],
])('dawn to dusk on %s is an hour either side of the sun', (day, from, until) => {
  const place = { position: [-1.5, 52.6], zone: 'Europe/London' } as const;
  const hours = ticketInterval(TICKET_TEMPLATES.day.duration, { day, start: null }, place);
  if ('refused' in hours) throw new Error(hours.refused);
  const offS = (got: Date, wanted: string): number => Math.abs(got.getTime() - Date.parse(wanted)) / 1000;
  expect(offS(hours.from, from)).toBeLessThanOrEqual(120);
  expect(offS(hours.until, until)).toBeLessThanOrEqual(120);
});
