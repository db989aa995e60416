import { TicketType } from '@mereward/shared/tickets/contract';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { expect, test } from 'vitest';
import { eveOfClockChange, quoteDraft, saturdayFrom } from './quote-draft';

const lakeId = '6a1c1c0e-6f0f-4d0c-8a67-1f6c0b7e1a11';
const other = '6a1c1c0e-6f0f-4d0c-8a67-1f6c0b7e1a12';
const stay = TicketType.parse({ ...TICKET_TEMPLATES.stay24, lakeIds: [lakeId] });

test('a Saturday is its own next Saturday', () => {
  expect(saturdayFrom('2027-03-27')).toBe('2027-03-27');
  expect(saturdayFrom('2027-03-28')).toBe('2027-04-03');
});

// European Parliament and Council Directive 2000/84/EC: last Sundays of March and October.
test('the eve of a clock change is the Saturday before it', () => {
  expect(eveOfClockChange('2027-01-04', 'Europe/London')).toBe('2027-03-27');
  expect(eveOfClockChange('2027-03-27', 'Europe/London')).toBe('2027-03-27');
  expect(eveOfClockChange('2027-03-28', 'Europe/London')).toBe('2027-10-30');
  expect(eveOfClockChange('2027-01-04', 'Atlantic/Reykjavik')).toBeNull();
});

test('a start that the kind does not have is asked as noon', () => {
  const asked = { lakeId, day: '2027-03-27', start: '23:00', rods: 2 };
  expect(quoteDraft(stay, asked).choice.start).toBe('12:00');
  expect(quoteDraft(stay, { ...asked, start: '09:00' }).choice.start).toBe('09:00');
});

test('a lake the kind is not sold for gives way to its first', () => {
  expect(quoteDraft(stay, { lakeId: other, day: '2027-03-27', start: '', rods: 1 }).lakeId).toBe(lakeId);
});
