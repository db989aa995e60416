import { z } from 'zod';
import { Version } from '../fisheries/contract';
import { AmountPence, Currency, PricePence } from '../money/money';
import { VatCode, VatRateBp } from '../money/vat';

const words = (max: number) => z.string().trim().max(max);
/** A clock time at the lake, HH:MM. */
export const Clock = z.string().regex(/^([01]\d|2[0-3]):[0-5]\d$/, 'A time is written like 07:30');

export const Audience = z.enum(['public', 'member', 'guest', 'junior', 'concession', 'match', 'staff']);
export type Audience = z.infer<typeof Audience>;

/** How long a ticket is good for. Where the end is not after the start by the clock it is the next day's. */
export const Duration = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('fixed_hours'), starts: Clock, ends: Clock }),
  z.strictObject({
    kind: z.literal('dawn_dusk'),
    beforeSunriseMinutes: z.int().min(0).max(240),
    afterSunsetMinutes: z.int().min(0).max(240),
  }),
  z.strictObject({
    kind: z.literal('elapsed'),
    hours: z.union([z.literal(12), z.literal(24), z.literal(48), z.literal(72)]),
    startsFrom: Clock, // the person picks a start from here …
    startsUntil: Clock, // … to here, both allowed
    startStepMinutes: z.union([z.literal(15), z.literal(30), z.literal(60)]),
    clockChange: z.enum(['same_clock_time', 'elapsed_hours']), // what a day means when the clock is moved
  }),
  z.strictObject({ kind: z.literal('night'), starts: Clock, ends: Clock }),
  z.strictObject({ kind: z.literal('season'), firstDay: z.iso.date(), lastDay: z.iso.date() }),
  z.strictObject({ kind: z.literal('match'), starts: Clock, ends: Clock }),
]);
export type Duration = z.infer<typeof Duration>;

/** What a ticket costs for days fished from `fromDay` on, until a later price takes over. All in, VAT included. */
export const TicketPrice = z
  .strictObject({
    fromDay: z.iso.date(),
    pricePence: PricePence,
    extraRodPence: PricePence,
    extraPersonPence: PricePence, // on a double peg
    vatCode: VatCode,
    vatRateBp: VatRateBp,
  })
  .refine(({ vatCode, vatRateBp }) => (vatCode === 'standard' || vatCode === 'reduced') === vatRateBp > 0, {
    path: ['vatRateBp'],
    error: 'The standard and the reduced code have a rate above 0; the others have none',
  });
export type TicketPrice = z.infer<typeof TicketPrice>;

const bounds = z.strictObject({
  leastAge: z.int().min(0).max(120).nullable(), // on the day fished
  mostAge: z.int().min(0).max(120).nullable(),
  guardianBelowAge: z.int().min(0).max(18).nullable(), // younger anglers need a guardian on the same or the next peg
});

/** A kind of ticket as the owner sets it. */
export const TicketType = z
  .strictObject({
    name: words(80).min(1),
    description: words(400),
    audience: Audience,
    duration: Duration,
    pegChoice: z.enum(['book_a_peg', 'book_the_lake_choose_on_arrival', 'draw']),
    lakeIds: z.array(z.uuid()).min(1).max(50),
    pegIds: z.array(z.uuid()).min(1).max(500).nullable(), // null: every peg of these lakes
    currency: Currency,
    prices: z.array(TicketPrice).min(1).max(60),
    rodsIncluded: z.int().min(1).max(10),
    rodsMost: z.int().min(1).max(10),
    peopleMost: z.int().min(1).max(20),
    leastNoticeHours: z.int().min(0).max(720), // 0: sold until it ends
    mostNoticeDays: z.int().min(0).max(730),
    mostNightsInARow: z.int().min(1).max(60).nullable(),
    restHours: z.int().min(0).max(720), // off the water before the nights are counted afresh
    mostBookings: z.int().min(1).max(100).nullable(), // still to come, one person, this kind
    turnaroundMinutes: z.int().min(0).max(240), // the peg is kept free so long after it ends
    ages: bounds,
    concessionProof: words(200), // what is to be shown; '' when nothing
    needs: z.strictObject({ rodLicence: z.boolean(), vehicle: z.boolean(), emergencyContact: z.boolean() }),
    firstDay: z.iso.date().nullable(), // sold for days fished from here …
    lastDay: z.iso.date().nullable(), // … to here, both included
  })
  .superRefine((type, context) => {
    const fault = (path: string[], message: string): void =>
      context.addIssue({ code: 'custom', path, message });
    if (type.rodsMost < type.rodsIncluded)
      fault(['rodsMost'], 'At most must be as many rods as are included, or more');
    if (type.firstDay && type.lastDay && type.lastDay < type.firstDay)
      fault(['lastDay'], 'The last day lies before the first');
    const { leastAge, mostAge } = type.ages;
    if (leastAge !== null && mostAge !== null && mostAge < leastAge)
      fault(['ages', 'mostAge'], 'The oldest is younger than the youngest');
    if (new Set(type.prices.map(({ fromDay }) => fromDay)).size < type.prices.length)
      fault(['prices'], 'Two prices begin on the same day');
    if (type.duration.kind === 'season' && type.duration.lastDay < type.duration.firstDay)
      fault(['duration', 'lastDay'], 'The season ends before it begins');
    if (type.duration.kind === 'elapsed' && type.duration.startsUntil < type.duration.startsFrom)
      fault(['duration', 'startsUntil'], 'The latest start lies before the earliest');
    if (type.audience === 'concession' && type.concessionProof === '')
      fault(['concessionProof'], 'Say what is to be shown for the lower price');
  });
export type TicketType = z.infer<typeof TicketType>;

/** What somebody asks for: a day at the lake, a start where the kind leaves the choice, how many rods and people. */
export const TicketChoice = z.strictObject({
  day: z.iso.date(),
  start: Clock.nullable(), // only for kinds with a start to pick
  rods: z.int().min(1).max(10),
  people: z.int().min(1).max(20),
});
export type TicketChoice = z.infer<typeof TicketChoice>;

/** POST /api/fisheries/:fisheryId/ticket-types (office, manager, owner); the same id and content again is no fault. */
export const SaveTicketType = z.strictObject({ id: z.uuid(), details: TicketType });
export type SaveTicketType = z.infer<typeof SaveTicketType>;
/** PUT /api/ticket-types/:ticketTypeId: sold tickets keep the price and terms they were sold with. */
export const ChangeTicketType = z.strictObject({ details: TicketType, version: Version });
export type ChangeTicketType = z.infer<typeof ChangeTicketType>;

export const TicketTypeView = z.object({
  id: z.uuid(),
  fisheryId: z.uuid(),
  details: TicketType,
  version: z.int(),
  may: z.object({ change: z.boolean() }),
});
export type TicketTypeView = z.infer<typeof TicketTypeView>;
export const TicketTypeList = z.object({ ticketTypes: z.array(TicketTypeView) });
export type TicketTypeList = z.infer<typeof TicketTypeList>;

export const PriceLineView = z.object({
  words: z.string(),
  count: z.int(),
  grossPence: AmountPence,
  netPence: AmountPence,
  vatPence: AmountPence,
  vatCode: VatCode,
  vatRateBp: VatRateBp,
});
export type PriceLineView = z.infer<typeof PriceLineView>;

/** What a ticket would cost and when it would end; `reasons` is empty when it can be had. */
export const TicketQuoteView = z.object({
  from: z.iso.datetime(),
  until: z.iso.datetime(),
  words: z.string(),
  lines: z.array(PriceLineView),
  grossPence: AmountPence,
  currency: Currency,
  reasons: z.array(z.object({ code: z.string(), words: z.string() })),
});
export type TicketQuoteView = z.infer<typeof TicketQuoteView>;
