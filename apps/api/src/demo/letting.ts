import { USUAL_TERMS, type LettingTerms } from '@mereward/shared/bookings/letting-terms';
import type { Rule } from '@mereward/shared/rules/contract';
import type { TicketPrice, TicketType } from '@mereward/shared/tickets/contract';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { DEMO_LAKES } from './fishery';
import { demoId } from './random';

const [FAR_OSTLE, OSTLE_POOL, SEDGE_CUT] = DEMO_LAKES.map(({ id }) => id) as [string, string, string];

export type DemoTicketType = { id: string; details: TicketType };

/** What Ostlemere Waters sells: the usual kinds, each on the lakes it is for, at prices a year old. */
export function demoTicketTypes(year: number): DemoTicketType[] {
  const since = (prices: readonly TicketPrice[]): TicketPrice[] =>
    prices.map((price) => ({ ...price, fromDay: `${year - 1}-01-01` }));
  const kind = (
    template: Omit<TicketType, 'lakeIds'>,
    lakeIds: string[],
    more: Partial<TicketType> = {},
  ) => ({
    id: demoId(`ticket type ${more.name ?? template.name}`),
    details: { ...template, lakeIds, ...more, prices: since(more.prices ?? template.prices) },
  });
  const { day, stay24, stay48, night, junior, concession, guest } = TICKET_TEMPLATES;
  const free = since(stay24.prices).map((price) => ({ ...price, pricePence: 0, extraRodPence: 0 }));
  return [
    kind(day, [FAR_OSTLE, OSTLE_POOL]),
    kind(stay24, [FAR_OSTLE]),
    kind(stay48, [FAR_OSTLE]),
    kind(night, [FAR_OSTLE]),
    kind(junior, [SEDGE_CUT]),
    kind(concession, [FAR_OSTLE, OSTLE_POOL, SEDGE_CUT]),
    kind(guest, [FAR_OSTLE]),
    kind(stay24, [FAR_OSTLE], {
      name: 'Member 24 hours',
      description: 'For members, in their subscription',
      audience: 'member',
      prices: free,
    }),
  ];
}

export const DEMO_TERMS: LettingTerms = { ...USUAL_TERMS, payAtLodge: true };

type Told = Pick<Rule, 'text' | 'reason' | 'category' | 'severity'> & Partial<Pick<Rule, 'basis'>>;

const NETS: Told = {
  text: 'No keepnets or sacks.',
  reason: 'Fish come to harm in warm water.',
  category: 'fish_welfare',
  severity: 'warn',
};
const SHEET: readonly Told[] = [
  {
    text: 'Look up before you choose a spot. Do not fish within 30 m of an overhead line; carry rods flat.',
    reason: 'Electricity jumps gaps; rods and wet lines conduct.',
    category: 'safety',
    severity: 'remove',
  },
  {
    text: 'Never leave a rod with its bait in the water.',
    reason: 'You must be able to take hold of it at once.',
    category: 'conduct',
    severity: 'ban',
    basis: 'byelaw',
  },
  {
    text: 'Barbless hooks only.',
    reason: 'They come out without harm.',
    category: 'tackle',
    severity: 'warn',
  },
  {
    text: 'The lead must come off if the line breaks. No fixed rigs.',
    reason: 'A fish must never drag a lead.',
    category: 'tackle',
    severity: 'remove',
  },
  {
    text: 'A landing net of 42 in and a padded, wetted mat for every fish.',
    reason: 'Less harm on the bank.',
    category: 'fish_welfare',
    severity: 'warn',
  },
  NETS,
  {
    text: 'Under sixteen: with an adult on the same peg or the next, all the time.',
    reason: 'Deep water at the edge.',
    category: 'juniors',
    severity: 'remove',
  },
  {
    text: 'No fires. Stoves stand off the ground.',
    reason: 'Peat burns under the grass.',
    category: 'safety',
    severity: 'warn',
  },
  {
    text: 'Dip nets and mats in the tank at the gate, and let them dry.',
    reason: 'Disease comes on wet nets.',
    category: 'fish_welfare',
    severity: 'warn',
  },
  {
    text: 'Take everything home, line above all.',
    reason: 'Line kills birds.',
    category: 'conduct',
    severity: 'warn',
  },
];

const rulesOf = (told: readonly Told[]): Rule[] =>
  told.map((rule, index) => ({
    id: demoId(`rule ${index + 1}`),
    number: index + 1,
    scope: { lakeIds: null, pegIds: null, ticketTypeIds: null },
    basis: 'fishery',
    link: '',
    ...rule,
  }));

/** Two versions of the rules: the second keeps nets to matches, and minds the overhead line more. */
export const DEMO_RULES = {
  first: rulesOf(
    SHEET.map((rule, index) =>
      index === 0 ? { ...rule, text: 'Do not fish near the overhead line. Carry rods flat.' } : rule,
    ),
  ),
  second: rulesOf(
    SHEET.map((rule) => (rule === NETS ? { ...rule, text: 'Keepnets only in matches.' } : rule)),
  ),
};
