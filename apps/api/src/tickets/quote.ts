import type { TicketType, TicketQuoteView } from '@mereward/shared/tickets/contract';
import type { QuoteDraft, QuoteQuery, TicketQuoteAnswer } from '@mereward/shared/tickets/quote-contract';
import { ticketInterval } from '@mereward/shared/tickets/ticket-interval';
import { grossOf, priceLines, ticketForetold } from '@mereward/shared/tickets/ticket-price';
import { whyNotSell, type Angler } from '@mereward/shared/tickets/why-not-sell';
import type { TicketChoice } from '@mereward/shared/tickets/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { holdsAny, rolesAt, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { findLake, originOfLake } from '../lakes/found';
import { isStaff } from '../lakes/policy';
import { PRICE_SETTERS } from './policy';
import { findTicketType } from './ticket-types';

/** What hangs on who comes along, or is asked for on the way to paying: no reason against a price. */
const ASKED_LATER: ReadonlySet<string> = new Set([
  'age-unknown',
  'no-guardian',
  'guardian-not-near',
  'no-vehicle',
  'no-emergency-contact',
  'no-proof',
  'no-host',
  'host-not-there',
  'match-only',
]);

type Wanted = { lakeId: string; choice: TicketChoice };

async function quoteOf(
  ctx: Ctx,
  at: { fisheryId: string; type: TicketType },
  { lakeId, choice }: Wanted,
): Promise<TicketQuoteAnswer> {
  const lake = await findLake(ctx.tx, lakeId);
  if (lake.fisheryId !== at.fisheryId) throw notFound('lake');
  const { zone } = await fisheryFound(ctx.tx, at.fisheryId);
  const place = { position: originOfLake(lake), zone };
  const hours = ticketInterval(at.type.duration, choice, place);
  if ('refused' in hours) return { quote: null, fault: hours.refused };
  const lines = priceLines(at.type, choice);
  if ('refused' in lines) return { quote: null, fault: lines.refused };
  const asked = { choice, hours, lakeNights: lake.details.nights, zone, now: ctx.now };
  const reasons = whyNotSell(at.type, readerAsAngler(ctx, at.fisheryId), asked).filter(
    ({ code }) => !ASKED_LATER.has(code),
  );
  const moved = hours.words.includes('The clock goes')
    ? ` ${hours.words.slice(hours.words.indexOf('The clock goes'))}`
    : '';
  const quote: TicketQuoteView = {
    from: hours.from.toISOString(),
    until: hours.until.toISOString(),
    words: `${ticketForetold(at.type, choice, place)}${moved}`,
    lines,
    grossPence: grossOf(lines),
    currency: at.type.currency,
    reasons,
  };
  return { quote, fault: '' };
}

/** The reader as far as a price can tell: their roles. Their other tickets are looked at when a peg is held. */
const readerAsAngler = ({ actor }: Ctx, fisheryId: string): Angler => ({
  member: holdsAny(actor, fisheryId, ['member']),
  staff: isStaff(actor, fisheryId),
  inMatch: false,
  bornOn: null,
  stays: [],
  bookingsToCome: 0,
  hostStays: null,
  concessionSeen: true,
  guardian: 'near',
  vehicle: true,
  emergencyContact: true,
});

/** A quote for a kind of ticket still being written. */
export async function quoteDraft(ctx: Ctx, fisheryId: string, input: QuoteDraft): Promise<TicketQuoteAnswer> {
  await fisheryFound(ctx.tx, fisheryId);
  allowOnly(ctx.actor, { fisheryId, what: 'fishery' }, PRICE_SETTERS);
  return quoteOf(ctx, { fisheryId, type: input.details }, input);
}

/** A quote for a kind of ticket that is sold. */
export async function quote(ctx: Ctx, id: string, asked: QuoteQuery): Promise<TicketQuoteAnswer> {
  const type = await findTicketType(ctx.tx, id);
  if (type.withdrawnAt && rolesAt(ctx.actor, type.fisheryId).size === 0) throw notFound('kind of ticket');
  if (!type.details.lakeIds.includes(asked.lakeId))
    throw new Problem('invalid', 'This ticket is not for that lake', {
      detail: 'Choose a lake it is sold for.',
      errors: [{ pointer: '/lakeId', detail: 'Not one of the ticket’s lakes.' }],
    });
  const { lakeId, day, start, rods, people } = asked;
  const choice = { day, start: start ?? null, rods, people };
  return quoteOf(ctx, { fisheryId: type.fisheryId, type: type.details }, { lakeId, choice });
}
