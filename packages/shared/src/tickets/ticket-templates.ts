import type { TicketPrice, TicketType } from './contract';

type Template = Omit<TicketType, 'lakeIds'>;

const price = (pricePence: number, extraRodPence = 0): TicketPrice => ({
  fromDay: '2026-01-01',
  pricePence,
  extraRodPence,
  extraPersonPence: 0,
  vatCode: 'standard',
  vatRateBp: 2000,
});

const day: Template = {
  name: 'Day',
  description: 'One hour before sunrise to one hour after sunset',
  audience: 'public',
  duration: { kind: 'dawn_dusk', beforeSunriseMinutes: 60, afterSunsetMinutes: 60 },
  pegChoice: 'book_a_peg',
  pegIds: null,
  currency: 'GBP',
  prices: [price(1200, 400)],
  rodsIncluded: 2,
  rodsMost: 3,
  peopleMost: 1,
  leastNoticeHours: 0,
  mostNoticeDays: 90,
  mostNightsInARow: null,
  restHours: 0,
  mostBookings: null,
  turnaroundMinutes: 60,
  ages: { leastAge: null, mostAge: null, guardianBelowAge: null },
  concessionProof: '',
  needs: { rodLicence: true, vehicle: false, emergencyContact: false },
  firstDay: null,
  lastDay: null,
};

const stay = (hours: 24 | 48): Template => ({
  ...day,
  name: `${hours} hours`,
  description: `${hours} hours from a start you choose`,
  duration: {
    kind: 'elapsed',
    hours,
    startsFrom: '08:00',
    startsUntil: '12:00',
    startStepMinutes: 60,
    clockChange: 'same_clock_time',
  },
  prices: [price(hours === 24 ? 2800 : 5000, 400)],
  mostNightsInARow: 2,
  restHours: 24,
  ages: { leastAge: 16, mostAge: null, guardianBelowAge: null },
  needs: { rodLicence: true, vehicle: true, emergencyContact: true },
});

/**
 * Kinds of ticket for an owner to start from, each to be looked over: prices are invented, hours and limits are common
 * practice with no published source. The ages of a junior differ from place to place.
 */
export const TICKET_TEMPLATES = {
  day,
  stay24: stay(24),
  stay48: stay(48),
  night: {
    ...stay(24),
    name: 'Night',
    description: '19:00 to 07:00',
    duration: { kind: 'night', starts: '19:00', ends: '07:00' },
    prices: [price(1800, 400)],
  },
  junior: {
    ...day,
    name: 'Junior day',
    audience: 'junior',
    prices: [price(600)],
    rodsMost: 2,
    ages: { leastAge: null, mostAge: 15, guardianBelowAge: 16 },
    needs: { rodLicence: true, vehicle: false, emergencyContact: true },
  },
  concession: {
    ...day,
    name: 'Concession day',
    audience: 'concession',
    prices: [price(900, 400)],
    concessionProof: 'a card or letter that says so',
  },
  guest: { ...day, name: 'Guest day', audience: 'guest', prices: [price(1000, 400)] },
  match: {
    ...day,
    name: 'Match peg',
    description: 'A place in a match',
    audience: 'match',
    duration: { kind: 'match', starts: '08:00', ends: '17:00' },
    pegChoice: 'draw',
    prices: [price(900)],
    rodsMost: 2,
  },
} as const satisfies Record<string, Template>;
