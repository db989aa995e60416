import type { SaleLine } from '@mereward/shared/payments/line-parts';
import type { PaymentMethod } from '@mereward/shared/payments/payment-state';
import { priceLines } from '@mereward/shared/tickets/ticket-price';
import { ticketInterval } from '@mereward/shared/tickets/ticket-interval';
import { civilDay } from '@mereward/shared/time/civil-day';
import { addDays, DAY_MS, HOUR_MS } from '@mereward/shared/time/zoned';
import { DEMO_LAKES, OSTLEMERE, type DemoLake } from './fishery';
import type { DemoTicketType } from './letting';
import { COLIN, SOFIA } from './people';
import { demoId, pick, seeded } from './random';

export type DemoStay = {
  id: string;
  lakeId: string;
  pegId: string;
  type: DemoTicketType;
  holder: { id: string | null; name: string; email: string | null };
  day: string;
  start: string | null;
  from: Date;
  until: Date;
  rods: number;
  lines: SaleLine[];
  grossPence: number;
  method: PaymentMethod;
  bookedAt: Date;
  cancelledAt: Date | null; // a week or more before, all of it given back
  cameToday: boolean; // on the bank now, and seen
};

/** How full a lake is by month, January first: share of its pegs let on a weekday; twice as many on Saturday. */
const FULL = [0.03, 0.04, 0.07, 0.1, 0.13, 0.16, 0.15, 0.14, 0.12, 0.09, 0.05, 0.03];
const FIRST = ['Ann', 'Bram', 'Cass', 'Dev', 'Edie', 'Fitz', 'Gail', 'Hal', 'Ines', 'Jory', 'Kit', 'Lowen'];
const LAST = [
  'Arkle',
  'Bexley',
  'Cobb',
  'Dunmore',
  'Eddle',
  'Farrow',
  'Garside',
  'Hoad',
  'Illsley',
  'Jopling',
];
const MINUTE_MS = 60_000;

type Kinds = Record<'FO' | 'OP' | 'SC', Record<string, number>>;
const KINDS: Kinds = {
  FO: { Day: 40, '24 hours': 22, '48 hours': 8, Night: 10, 'Concession day': 8, 'Member 24 hours': 12 },
  OP: { Day: 80, 'Concession day': 20 },
  SC: { 'Junior day': 85, 'Concession day': 15 },
};

/** A year of tickets up to now and five weeks ahead, the same for the same day; no peg is let twice. */
export function demoStays(types: readonly DemoTicketType[], now: Date): DemoStay[] {
  const random = seeded(20_261);
  const today = civilDay(now, OSTLEMERE.zone);
  const stays: DemoStay[] = [];
  for (const lake of DEMO_LAKES)
    for (const peg of lake.pegs) {
      if (peg.details.overheadLine.fishing === 'no_fishing' || peg.details.status === 'closed') continue;
      let freeFrom = 0;
      for (let ahead = -365; ahead <= 35; ahead += 1) {
        const day = addDays(today, ahead);
        if (random() > chance(day, ahead)) continue;
        const stay = stayOn({ lake, peg, types, day, now, random });
        const nearSofia = peg.id === demoId('peg FO7') && ahead >= -3 && ahead <= 1; // her own ticket is there
        if (!stay || nearSofia || stay.from.getTime() < freeFrom) continue;
        if (stay.cancelledAt === null)
          freeFrom = stay.until.getTime() + stay.type.details.turnaroundMinutes * MINUTE_MS;
        stays.push(stay);
      }
    }
  return stays;
}

function chance(day: string, ahead: number): number {
  const at = new Date(`${day}T12:00:00Z`);
  const weekend = at.getUTCDay() === 6 ? 2 : at.getUTCDay() === 0 ? 1.5 : 1;
  const soFar = ahead <= 0 ? 1 : Math.max(0.15, 1 - ahead / 30); // fewer have booked far ahead
  return (FULL[at.getUTCMonth()] ?? 0.1) * weekend * soFar;
}

type Drawn = {
  lake: DemoLake;
  peg: DemoLake['pegs'][number];
  types: readonly DemoTicketType[];
  day: string;
  now: Date;
  random: () => number;
};

function stayOn({ lake, peg, types, day, now, random }: Drawn): DemoStay | null {
  const name = pick(random, KINDS[lake.prefix as keyof Kinds]);
  const type = types.find(({ details }) => details.name === name);
  if (!type) throw new RangeError(`The demo sells no ${name}`);
  const { duration, rodsIncluded, rodsMost } = type.details;
  const start = duration.kind === 'elapsed' ? pick(random, { '08:00': 1, '10:00': 2, '12:00': 3 }) : null;
  const place = { position: peg.details.position, zone: OSTLEMERE.zone };
  const hours = ticketInterval(duration, { day, start }, place);
  const rods = Math.min(peg.details.rods, random() < 0.15 ? rodsMost : rodsIncluded);
  const lines = priceLines(type.details, { day, start, rods, people: 1 });
  const [first, last] = [
    FIRST[Math.floor(random() * FIRST.length)],
    LAST[Math.floor(random() * LAST.length)],
  ];
  const noticeMs = (0.2 + 20 * random() ** 2) * DAY_MS;
  const cancels = random() < 0.05;
  const method = pick<PaymentMethod>(random, { card_online: 70, cash: 22, card_reader: 8 } as Record<
    PaymentMethod,
    number
  >);
  if ('refused' in hours || 'refused' in lines) return null;
  const bookedAt = new Date(
    Math.min(hours.from.getTime() - noticeMs - (cancels ? 8 * DAY_MS : 0), now.getTime() - HOUR_MS),
  );
  const cancelledAt = new Date(hours.from.getTime() - 7.5 * DAY_MS);
  const member = type.details.audience === 'member';
  const grossPence = lines.reduce((sum, line) => sum + line.grossPence, 0);
  return {
    id: demoId(`stay ${peg.id} ${day}`),
    lakeId: lake.id,
    pegId: peg.id,
    type,
    holder:
      member && random() < 0.4
        ? COLIN
        : random() < 0.02 && hours.until <= now
          ? SOFIA
          : { id: null, name: `${first} ${last}`, email: null },
    day,
    start,
    from: hours.from,
    until: hours.until,
    rods,
    lines: lines.map(({ words, grossPence: gross, vatRateBp, vatPence }) => ({
      words,
      grossPence: gross,
      rateBp: vatRateBp,
      vatPence,
    })),
    grossPence,
    // What lies ahead was paid at the lodge: the demo's card page knows nothing of cards of the past.
    method: hours.from > now && method === 'card_online' ? 'card_reader' : method,
    bookedAt,
    cancelledAt:
      cancels && grossPence > 0 && cancelledAt > bookedAt && cancelledAt < now ? cancelledAt : null,
    cameToday: hours.from <= now,
  };
}
