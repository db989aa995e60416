import { Duration, TicketPrice, TicketType } from '@mereward/shared/tickets/contract';
import type { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { z } from 'zod';
import { typedPence, typedPounds } from '@/lib/typed-money';
import { typedNumber, typedNumberOrNothing } from '@/lib/typed-schemas';

const whole = (what: string, min: number, max: number) =>
  typedNumber({ what, min, max }).pipe(z.int('A whole number.'));
const wholeOrNothing = (what: string, min: number, max: number) =>
  typedNumberOrNothing({ what, min, max }).pipe(z.int('A whole number.').nullable());
const dayOrNothing = z
  .union([z.literal(''), z.iso.date('Choose a day')])
  .transform((day) => (day === '' ? null : day));

/** Every field of every duration: what the chosen kind does not use keeps what was typed. */
const TypedDuration = z
  .object({
    kind: z.enum(['fixed_hours', 'dawn_dusk', 'elapsed', 'night', 'season', 'match']),
    starts: z.string(),
    ends: z.string(),
    beforeSunriseMinutes: z.string(),
    afterSunsetMinutes: z.string(),
    hours: z.enum(['12', '24', '48', '72']),
    startsFrom: z.string(),
    startsUntil: z.string(),
    startStepMinutes: z.enum(['15', '30', '60']),
    clockChange: z.enum(['same_clock_time', 'elapsed_hours']),
    firstDay: z.string(),
    lastDay: z.string(),
  })
  .transform((typed, context): Duration => {
    const read = Duration.safeParse(durationTyped(typed));
    if (read.success) return read.data;
    for (const { path, message } of read.error.issues)
      context.issues.push({ code: 'custom', path, message: plainFault(path[0], message), input: typed });
    return z.NEVER;
  });
export type TypedDuration = z.input<typeof TypedDuration>;

const plainFault = (field: PropertyKey | undefined, message: string): string =>
  field === 'firstDay' || field === 'lastDay'
    ? 'Choose a day'
    : field === 'beforeSunriseMinutes' || field === 'afterSunsetMinutes'
      ? 'Minutes from 0 to 240'
      : message;

function durationTyped(typed: TypedDuration) {
  const { kind, starts, ends } = typed;
  switch (kind) {
    case 'fixed_hours':
    case 'night':
    case 'match':
      return { kind, starts, ends };
    case 'dawn_dusk':
      return {
        kind,
        beforeSunriseMinutes: minutes(typed.beforeSunriseMinutes),
        afterSunsetMinutes: minutes(typed.afterSunsetMinutes),
      };
    case 'elapsed': {
      const { startsFrom, startsUntil, clockChange } = typed;
      const [hours, startStepMinutes] = [Number(typed.hours), Number(typed.startStepMinutes)];
      return { kind, hours, startsFrom, startsUntil, startStepMinutes, clockChange };
    }
    case 'season':
      return { kind, firstDay: typed.firstDay, lastDay: typed.lastDay };
  }
}

const minutes = (text: string): number => (text.trim() === '' ? Number.NaN : Number(text));

const TypedPrice = z
  .object({
    fromDay: z.iso.date('Choose the first day it holds for'),
    price: typedPence('The price'),
    extraRod: typedPence('The price of an extra rod'),
    extraPerson: typedPence('The price of a further person'),
    vatCode: TicketPrice.shape.vatCode,
    vatPercent: typedNumber({ what: 'The rate', min: 0, max: 100, unit: '%' }),
  })
  .transform(({ price, extraRod, extraPerson, vatPercent, ...rest }, context): TicketPrice => {
    const rated = hasRate(rest.vatCode);
    if (rated && vatPercent === 0)
      context.issues.push({ code: 'custom', path: ['vatPercent'], message: 'A rate above 0 %', input: 0 });
    return {
      ...rest,
      pricePence: price,
      extraRodPence: extraRod,
      extraPersonPence: extraPerson,
      vatRateBp: rated ? Math.round(vatPercent * 100) : 0,
    };
  });
export type TypedPrice = z.input<typeof TypedPrice>;

/** Whether VAT at a rate of its own is charged; the others carry none, or nought of it. */
export const hasRate = (code: TicketPrice['vatCode']): boolean => code === 'standard' || code === 'reduced';

/** A kind of ticket as it is typed, and what is made of it. */
export const TicketTypeDraft = z
  .object({
    name: z.string().trim().min(1, 'Give it a name, as anglers will read it').max(80, 'At most 80 letters'),
    description: z.string().trim().max(400, 'At most 400 letters'),
    audience: TicketType.shape.audience,
    duration: TypedDuration,
    pegChoice: TicketType.shape.pegChoice,
    lakeIds: z.array(z.string()).min(1, 'Choose a lake at least'),
    everyPeg: z.enum(['every', 'some']),
    pegIds: z.array(z.string()),
    currency: TicketType.shape.currency,
    prices: z.array(TypedPrice).min(1, 'Give it a price'),
    rodsIncluded: whole('Rods included', 1, 10),
    rodsMost: whole('Rods at most', 1, 10),
    peopleMost: whole('People at most', 1, 20),
    leastNoticeHours: whole('Notice', 0, 720),
    mostNoticeDays: whole('Days ahead', 0, 730),
    mostNightsInARow: wholeOrNothing('Nights in a row', 1, 60),
    restHours: whole('Hours off the water', 0, 720),
    mostBookings: wholeOrNothing('Bookings to come', 1, 100),
    turnaroundMinutes: whole('Minutes kept free', 0, 240),
    ages: z.object({
      leastAge: wholeOrNothing('The least age', 0, 120),
      mostAge: wholeOrNothing('The greatest age', 0, 120),
      guardianBelowAge: wholeOrNothing('The age', 0, 18),
    }),
    concessionProof: z.string().trim().max(200, 'At most 200 letters'),
    needs: z.object({ rodLicence: z.boolean(), vehicle: z.boolean(), emergencyContact: z.boolean() }),
    firstDay: dayOrNothing,
    lastDay: dayOrNothing,
  })
  .transform(({ everyPeg, pegIds, ...rest }, context): TicketType => {
    if (everyPeg === 'some' && pegIds.length === 0)
      context.issues.push({ code: 'custom', path: ['pegIds'], message: 'Choose a peg', input: pegIds });
    return { ...rest, pegIds: everyPeg === 'every' ? null : pegIds };
  })
  .pipe(TicketType);
export type TypedTicketType = z.input<typeof TicketTypeDraft>;

const text = (value: number | null): string => (value === null ? '' : String(value));

const PLAIN_HOURS: TypedDuration = {
  kind: 'dawn_dusk',
  starts: '07:00',
  ends: '19:00',
  beforeSunriseMinutes: '60',
  afterSunsetMinutes: '60',
  hours: '24',
  startsFrom: '08:00',
  startsUntil: '12:00',
  startStepMinutes: '60',
  clockChange: 'same_clock_time',
  firstDay: '',
  lastDay: '',
};

function typedDuration(duration: Duration): TypedDuration {
  const written = Object.fromEntries(Object.entries(duration).map(([key, value]) => [key, String(value)]));
  return { ...PLAIN_HOURS, ...written };
}

/** A price as it is typed. */
export const typedPrice = (price: TicketPrice): TypedPrice => ({
  fromDay: price.fromDay,
  price: typedPounds(price.pricePence),
  extraRod: typedPounds(price.extraRodPence),
  extraPerson: typedPounds(price.extraPersonPence),
  vatCode: price.vatCode,
  vatPercent: String(price.vatRateBp / 100),
});

/** A kind of ticket laid into the form. */
export function typedTicketType(details: TicketType): TypedTicketType {
  const { pegIds, prices, ages, duration, ...rest } = details;
  return {
    ...rest,
    duration: typedDuration(duration),
    everyPeg: pegIds === null ? 'every' : 'some',
    pegIds: pegIds ?? [],
    prices: prices.map(typedPrice),
    rodsIncluded: text(rest.rodsIncluded),
    rodsMost: text(rest.rodsMost),
    peopleMost: text(rest.peopleMost),
    leastNoticeHours: text(rest.leastNoticeHours),
    mostNoticeDays: text(rest.mostNoticeDays),
    mostNightsInARow: text(rest.mostNightsInARow),
    restHours: text(rest.restHours),
    mostBookings: text(rest.mostBookings),
    turnaroundMinutes: text(rest.turnaroundMinutes),
    ages: {
      leastAge: text(ages.leastAge),
      mostAge: text(ages.mostAge),
      guardianBelowAge: text(ages.guardianBelowAge),
    },
    firstDay: rest.firstDay ?? '',
    lastDay: rest.lastDay ?? '',
  };
}

type Template = (typeof TICKET_TEMPLATES)[keyof typeof TICKET_TEMPLATES];

/**
 * A template made ready for a fishery: its price holds from today on, on all of its lakes, and VAT is left for the
 * owner to choose where the fishery is not registered.
 */
export function fromTemplate(
  template: Template,
  at: { today: string; lakeIds: readonly string[]; vatRegistered: boolean },
): TypedTicketType {
  const prices = template.prices.map((price) => ({
    ...price,
    fromDay: at.today,
    ...(at.vatRegistered ? {} : { vatCode: 'outside_scope' as const, vatRateBp: 0 }),
  }));
  return typedTicketType({ ...template, lakeIds: [...at.lakeIds], prices });
}
