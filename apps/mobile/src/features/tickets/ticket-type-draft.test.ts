import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { TicketType } from '@mereward/shared/tickets/contract';
import { expect, test } from 'vitest';
import { fromTemplate, TicketTypeDraft, typedTicketType } from './ticket-type-draft';

const lakeIds = ['6a1c1c0e-6f0f-4d0c-8a67-1f6c0b7e1a11'];
const at = { today: '2027-01-04', lakeIds, vatRegistered: true };

const faultsOf = (typed: unknown): string[] =>
  TicketTypeDraft.safeParse(typed).error?.issues.map(
    ({ path, message }) => `${path.join('.')}: ${message}`,
  ) ?? [];

test.each(Object.entries(TICKET_TEMPLATES))(
  'the %s template goes through the form unchanged',
  (_, template) => {
    const details = TicketType.parse({ ...template, lakeIds });
    expect(TicketTypeDraft.parse(typedTicketType(details))).toEqual(details);
  },
);

test('a season goes through the form unchanged', () => {
  const season = TicketType.parse({
    ...TICKET_TEMPLATES.day,
    lakeIds,
    duration: { kind: 'season', firstDay: '2027-04-01', lastDay: '2028-03-31' },
  });
  expect(TicketTypeDraft.parse(typedTicketType(season))).toEqual(season);
});

test('a template begins today, on the fishery’s lakes', () => {
  const typed = fromTemplate(TICKET_TEMPLATES.stay24, at);
  expect(typed.prices[0]).toMatchObject({ fromDay: '2027-01-04', price: '28.00', vatPercent: '20' });
  expect(typed.lakeIds).toEqual(lakeIds);
});

test('a fishery that is not registered charges no VAT to begin with', () => {
  const typed = fromTemplate(TICKET_TEMPLATES.day, { ...at, vatRegistered: false });
  expect(TicketTypeDraft.parse(typed).prices[0]).toMatchObject({ vatCode: 'outside_scope', vatRateBp: 0 });
});

test('faults lie on the fields they are about', () => {
  const typed = fromTemplate(TICKET_TEMPLATES.stay24, at);
  expect(faultsOf({ ...typed, duration: { ...typed.duration, startsFrom: '8' } })).toEqual([
    'duration.startsFrom: A time is written like 07:30',
  ]);
  expect(faultsOf({ ...typed, everyPeg: 'some' })).toEqual(['pegIds: Choose a peg']);
  expect(faultsOf({ ...typed, prices: [{ ...typed.prices[0], vatPercent: '0' }] })).toEqual([
    'prices.0.vatPercent: A rate above 0 %',
  ]);
  expect(faultsOf({ ...typed, rodsMost: '1' })).toEqual([
    'rodsMost: At most must be as many rods as are included, or more',
  ]);
});
