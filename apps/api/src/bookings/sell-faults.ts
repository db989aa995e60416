import type { BookedTicket, BookingDetails } from '@mereward/shared/bookings/contract';
import { Problem, type ProblemError } from '@mereward/shared/problems/problem';
import { ageOnDay } from '@mereward/shared/time/age';
import type { Interval } from '@mereward/shared/time/interval';
import { nightsIn } from '@mereward/shared/tickets/nights';
import { whyNotSell, type Angler, type SellFault } from '@mereward/shared/tickets/why-not-sell';
import type { Ctx } from '../ctx';
import { STAFF } from '../lakes/policy';
import { choiceOf, isCompanion, type Occasion } from './occasion';
import { termsOf } from './terms';

/** For whom, and what is known of them besides the tickets. */
export type Buyer = {
  accountId: string | null; // null: nobody we know
  name: string;
  bookingId: string; // not counted among their others
  said: Pick<BookingDetails, 'guardian' | 'vehicle' | 'emergencyContact'>;
};

/** Which faults are passed over: what is asked on the way to paying, or what the office may decide by itself. */
export type Leniency = 'none' | 'asked_later' | 'office';

const ASKED_LATER: ReadonlySet<string> = new Set([
  'age-unknown',
  'no-guardian',
  'no-vehicle',
  'no-emergency-contact',
]);
const OFFICE_DECIDES: ReadonlySet<string> = new Set([
  ...ASKED_LATER,
  'too-late',
  'too-early',
  'not-yet-sold',
  'no-longer-sold',
  'members-only',
  'staff-only',
  'match-only',
  'no-host',
  'host-not-there',
  'too-many-bookings',
]);

const passedOver = (leniency: Leniency, code: string): boolean =>
  leniency !== 'none' && (leniency === 'office' ? OFFICE_DECIDES : ASKED_LATER).has(code);

/** Under this age somebody is a junior whatever their ticket is called. Common practice, no published source. */
const ADULT_AGE = 18;

export type TicketFault = SellFault & { index: number };

/** Every reason why these tickets can't be sold to this buyer, each with the ticket it is about. */
export async function sellFaults(
  ctx: Ctx,
  occasion: Occasion,
  { buyer, leniency }: { buyer: Buyer; leniency: Leniency },
): Promise<TicketFault[]> {
  const known = await knownOf(ctx, occasion, buyer);
  const { juniorNights } = await termsOf(ctx.tx, occasion.fisheryId);
  const { hours, zone, lake, day } = occasion;
  const faults = occasion.tickets.flatMap(({ ticket, type }, index) => {
    const night = nightFault({ ticket, leastAge: type.details.ages.leastAge, day }, juniorNights);
    const late = !juniorNights && nightsIn(hours, zone) > 0 && !occasion.season ? night : [];
    if (isCompanion(ticket)) return late.map((fault) => ({ ...fault, index }));
    const angler = anglerOf({ occasion, buyer, known }, index);
    const asked = {
      choice: choiceOf(ticket, occasion),
      hours,
      lakeNights: lake.details.nights,
      zone,
      now: ctx.now,
    };
    return [...whyNotSell(type.details, angler, asked), ...late].map((fault) => ({ ...fault, index }));
  });
  return faults.filter(({ code }) => !passedOver(leniency, code));
}

/** Refuses with every fault; `kind` invalid, each pointing at its ticket. */
export function refuseFaulty(faults: readonly TicketFault[]): void {
  const [first] = faults;
  if (!first) return;
  const pointers: Record<string, string> = {
    'age-unknown': 'bornOn',
    'too-young': 'bornOn',
    'too-old': 'bornOn',
    'too-many-rods': 'rods',
    'too-many-people': 'people',
  };
  const whole: Record<string, string> = {
    'no-guardian': '/guardian',
    'guardian-not-near': '/guardian',
    'no-vehicle': '/vehicle',
    'no-emergency-contact': '/emergencyContact',
  };
  const errors = faults.map(({ code, words, index }): ProblemError => {
    const field = pointers[code] ?? 'ticketTypeId';
    return { pointer: whole[code] ?? `/tickets/${index}/${field}`, detail: words };
  });
  throw new Problem('invalid', first.words, {
    detail: 'Nothing was kept. Put right what is named below, or choose another ticket or day.',
    errors,
  });
}

type OtherStay = Interval & { pegIds: string[]; ticketTypeIds: string[] };
type Known = { member: boolean; staff: boolean; others: OtherStay[] };

// A stay of more than a month is a season ticket, which is no night on the bank.
const OTHERS = `
  SELECT lower(b.during) AS "from", upper(b.during) AS until,
         coalesce((SELECT array_agg(t.peg_id) FROM peg_time t WHERE t.booking_id = b.id AND t.peg_id IS NOT NULL), '{}') AS "pegIds",
         coalesce((SELECT array_agg(t->>'ticketTypeId') FROM jsonb_array_elements(b.details->'tickets') t), '{}') AS "ticketTypeIds"
    FROM booking b
   WHERE b.account_id = $1 AND b.fishery_id = $2 AND b.id <> $3
     AND b.status IN ('hold', 'pending_payment', 'confirmed', 'checked_in', 'completed')
     AND (b.hold_until IS NULL OR b.status NOT IN ('hold', 'pending_payment') OR b.hold_until > $4)
     AND (upper(b.during) > $4 OR b.during && tstzrange($5::timestamptz - interval '70 days', $6::timestamptz + interval '70 days'))`;

async function knownOf({ tx, now }: Ctx, { fisheryId, hours }: Occasion, buyer: Buyer): Promise<Known> {
  if (buyer.accountId === null) return { member: false, staff: false, others: [] };
  const roles: { role: string }[] = await tx.query(
    'SELECT role FROM fishery_role WHERE account_id = $1 AND fishery_id = $2',
    [buyer.accountId, fisheryId],
  );
  const held = new Set(roles.map(({ role }) => role));
  const others: OtherStay[] = await tx.query(OTHERS, [
    buyer.accountId,
    fisheryId,
    buyer.bookingId,
    now,
    hours.from,
    hours.until,
  ]);
  return { member: held.has('member'), staff: STAFF.some((role) => held.has(role)), others };
}

const SEASON_MS = 32 * 86_400_000;
const isSeason = ({ from, until }: Interval): boolean => until.getTime() - from.getTime() > SEASON_MS;

type Asking = { occasion: Occasion; buyer: Buyer; known: Known };

function anglerOf({ occasion, buyer, known }: Asking, index: number): Angler {
  const { ticket } = occasion.tickets[index] ?? {};
  if (!ticket) throw new RangeError('There is no such ticket.');
  const own = ticket.kind === 'holder';
  const stays = known.others.filter((each) => !isSeason(each));
  const withHolder = occasion.tickets.some((each) => each.ticket.kind === 'holder');
  const toCome = known.others.filter(({ ticketTypeIds }) => ticketTypeIds.includes(ticket.ticketTypeId));
  return {
    member: known.member,
    staff: known.staff,
    inMatch: false,
    bornOn: ticket.bornOn,
    stays: own ? stays : [],
    bookingsToCome: own ? toCome.length : 0,
    hostStays: known.member ? [...stays, ...(withHolder ? [occasion.hours] : [])] : null,
    concessionSeen: true, // it is looked at on the bank; until then the ticket says so
    guardian: guardianOf({ occasion, buyer, known }, ticket),
    vehicle: buyer.said.vehicle !== '',
    emergencyContact: buyer.said.emergencyContact !== '',
  };
}

/**
 * Where the guardian is. Adults of the same booking, and the buyer's other pegs when the buyer is the guardian, are
 * known places: one of them must be the junior's peg or next to it. With none known the guardian's own word counts.
 */
function guardianOf({ occasion, buyer, known }: Asking, junior: BookedTicket): Angler['guardian'] {
  const adults = occasion.tickets.filter(
    ({ ticket }) => ticket.kind !== 'junior' && ticket !== junior && !isMinor(ticket, occasion.day),
  );
  const { guardian } = buyer.said;
  const sameName = guardian?.name.trim().toLowerCase() === buyer.name.trim().toLowerCase();
  const { from, until } = occasion.hours;
  const elsewhere = sameName
    ? known.others.filter((each) => each.from < until && from < each.until).flatMap(({ pegIds }) => pegIds)
    : [];
  const places = [
    ...adults.flatMap(({ ticket }) => (ticket.pegId === null ? [] : [ticket.pegId])),
    ...elsewhere,
  ];
  const near =
    places.length === 0 || junior.pegId === null || places.some((pegId) => nextTo(occasion, pegId, junior));
  if (!near) return 'named';
  return guardian?.consent === true ? 'near' : 'none';
}

/** The same peg, or its neighbour in walking order. Pegs that aren't of this booking are looked up by the caller. */
function nextTo(
  { neighbours }: Pick<Occasion, 'neighbours'>,
  pegId: string,
  { pegId: own }: BookedTicket,
): boolean {
  return own !== null && (own === pegId || (neighbours.get(own)?.includes(pegId) ?? false));
}

export function isMinor({ kind, bornOn }: BookedTicket, day: string): boolean {
  return kind === 'junior' || (bornOn !== null && ageOnDay(bornOn, day) < ADULT_AGE);
}

type NightAsked = { ticket: BookedTicket; leastAge: number | null; day: string };

/** A junior at night, unless the ticket they fish on is itself for their age. */
function nightFault({ ticket, leastAge, day }: NightAsked, allowed: boolean): SellFault[] {
  const ownTicket = !isCompanion(ticket) && leastAge !== null;
  if (allowed || ownTicket || !isMinor(ticket, day)) return [];
  return [{ code: 'junior-night', words: 'No junior may be on the bank at night here, fishing or not.' }];
}
