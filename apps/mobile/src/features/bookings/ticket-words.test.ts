import { expect, test } from 'vitest';
import { ticketTimes } from './ticket-words';

const ticket = {
  from: '2026-07-04T06:00:00Z',
  until: '2026-07-04T19:00:00Z',
  zone: 'Europe/London',
};

test('a day ticket names its day once, by the fishery’s clock', () => {
  expect(ticketTimes(ticket)).toMatch(/^Sat 4 July 2026, 07:00.* to 20:00/);
});

test('a night ticket names both days', () => {
  const night = { ...ticket, until: '2026-07-05T08:00:00Z' };
  expect(ticketTimes(night)).toMatch(/^Sat 4 July 2026, 07:00.* to Sun 5 July 2026, 09:00/);
});
