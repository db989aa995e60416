import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { TicketType } from '@mereward/db/entities/tickets/ticket-type';
import type { BookedTicket } from '@mereward/shared/bookings/contract';
import type { Jurisdiction } from '@mereward/shared/fisheries/contract';
import { vatLine } from '@mereward/shared/money/vat';
import { Problem, type ProblemError } from '@mereward/shared/problems/problem';
import type { PriceLineView, TicketChoice } from '@mereward/shared/tickets/contract';
import { ticketInterval, type TicketHours } from '@mereward/shared/tickets/ticket-interval';
import { priceLines, priceOn } from '@mereward/shared/tickets/ticket-price';
import { In, type EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { findLake, originOfLake } from '../lakes/found';

export type Wanted = {
  lakeId: string;
  day: string;
  start: string | null;
  tickets: readonly BookedTicket[];
};

/** What somebody asks for, looked up: the lake, the hours, each ticket's kind and peg, and the price lines. */
export type Occasion = {
  fisheryId: string;
  fisheryName: string;
  jurisdiction: Jurisdiction;
  zone: string;
  lake: Lake;
  day: string;
  start: string | null;
  hours: TicketHours;
  season: boolean; // takes no peg's time
  tickets: readonly { ticket: BookedTicket; type: TicketType; peg: Peg | null }[];
  lines: PriceLineView[];
  currency: string;
  turnaroundMinutes: number;
  neighbours: ReadonlyMap<string, readonly string[]>; // of each chosen peg, in walking order
};

type Fault = { index: number; field: string; words: string };

function refuse(faults: readonly Fault[]): void {
  const [first] = faults;
  if (!first) return;
  const errors = faults.map(({ index, field, words }): ProblemError => ({
    pointer: `/tickets/${index}/${field}`,
    detail: words,
  }));
  throw new Problem('invalid', first.words, {
    detail: 'Nothing was kept. Put right what is named below and send it again.',
    errors,
  });
}

/** Somebody beside an angler, without a rod. */
export const isCompanion = ({ rods }: BookedTicket): boolean => rods === 0;

export const choiceOf = (
  ticket: BookedTicket,
  { day, start }: Pick<Wanted, 'day' | 'start'>,
): TicketChoice => ({
  day,
  start,
  rods: Math.max(1, ticket.rods),
  people: ticket.people,
});

/** Looks everything up and refuses what can't be, every fault named. `sold`: kinds taken off sale still count. */
export async function occasionOf(ctx: Ctx, wanted: Wanted, { sold = false } = {}): Promise<Occasion> {
  const { tx } = ctx;
  const lake = await findLake(tx, wanted.lakeId);
  const fishery = await fisheryFound(tx, lake.fisheryId);
  const ids = wanted.tickets.map(({ ticketTypeId }) => ticketTypeId);
  const types = new Map((await tx.findBy(TicketType, { id: In(ids) })).map((type) => [type.id, type]));
  const pegIds = wanted.tickets.flatMap(({ pegId }) => (pegId === null ? [] : [pegId]));
  const pegs = new Map(
    (await tx.findBy(Peg, { id: In(pegIds), lakeId: lake.id })).map((peg) => [peg.id, peg]),
  );
  const faults: Fault[] = [];
  const tickets = wanted.tickets.flatMap((ticket, index) => {
    const type = types.get(ticket.ticketTypeId);
    const known = type?.fisheryId === lake.fisheryId && (sold || type.withdrawnAt === null);
    if (!type || !known) {
      faults.push({
        index,
        field: 'ticketTypeId',
        words: 'This kind of ticket is not sold here. Choose another.',
      });
      return [];
    }
    const peg = ticket.pegId === null ? null : (pegs.get(ticket.pegId) ?? null);
    faults.push(...pegFaults({ ticket, type, peg }, lake).map((fault) => ({ index, ...fault })));
    return [{ ticket, type, peg }];
  });
  refuse(faults);
  refuse(companionFaults(wanted.tickets));
  const place = { position: originOfLake(lake), zone: fishery.zone };
  const hours = sameHours(tickets.map(({ type }) => ticketInterval(type.details.duration, wanted, place)));
  const [first] = tickets;
  if (!first) throw new RangeError('A booking has at least one ticket.');
  return {
    fisheryId: lake.fisheryId,
    fisheryName: fishery.name,
    jurisdiction: fishery.details.jurisdiction,
    zone: fishery.zone,
    lake,
    day: wanted.day,
    start: wanted.start,
    hours,
    season: tickets.some(({ type }) => type.details.duration.kind === 'season'),
    tickets,
    lines: linesOf(tickets, wanted),
    currency: sameCurrency(tickets.map(({ type }) => type.details.currency)),
    turnaroundMinutes: Math.max(...tickets.map(({ type }) => type.details.turnaroundMinutes)),
    neighbours: await neighboursOf(tx, lake, pegIds),
  };
}

type Ticketed = { ticket: BookedTicket; type: TicketType; peg: Peg | null };

function pegFaults({ ticket, type, peg }: Ticketed, lake: Lake): Omit<Fault, 'index'>[] {
  const { details } = type;
  const chosen = details.pegChoice === 'book_a_peg' && details.duration.kind !== 'season';
  const fault = (words: string) => [{ field: 'pegId', words }];
  if (!details.lakeIds.includes(lake.id)) return fault(`“${details.name}” is not sold for ${lake.name}.`);
  if (ticket.pegId !== null && !peg) return fault('There is no such peg on this lake.');
  if (chosen && !peg) return fault('Choose a peg for this ticket.');
  if (!chosen && peg) return fault('With this ticket a peg is chosen on arrival, not now.');
  if (peg && details.pegIds && !details.pegIds.includes(peg.id))
    return fault(`“${details.name}” is not sold for peg ${peg.number}.`);
  return [];
}

/** Who does not fish stands beside somebody who does. */
function companionFaults(tickets: readonly BookedTicket[]): Fault[] {
  const fishing = tickets.filter((ticket) => !isCompanion(ticket));
  return tickets.flatMap((ticket, index) =>
    isCompanion(ticket) && !fishing.some(({ pegId }) => pegId === ticket.pegId)
      ? [{ index, field: 'rods', words: 'Without a rod one can only be beside an angler on the same peg.' }]
      : [],
  );
}

function sameHours(all: readonly (TicketHours | { refused: string })[]): TicketHours {
  const faults = all.flatMap((each, index) =>
    'refused' in each ? [{ index, field: 'ticketTypeId', words: each.refused }] : [],
  );
  refuse(faults);
  const hours = all.flatMap((each) => ('refused' in each ? [] : [each]));
  const [first] = hours;
  if (!first) throw new RangeError('A booking has at least one ticket.');
  refuse(
    hours.flatMap(({ from, until }, index) =>
      from.getTime() === first.from.getTime() && until.getTime() === first.until.getTime()
        ? []
        : [
            {
              index,
              field: 'ticketTypeId',
              words: 'This ticket does not run as long as the first. Book it on its own.',
            },
          ],
    ),
  );
  return first;
}

function sameCurrency(currencies: readonly string[]): string {
  const [first = 'GBP'] = currencies;
  refuse(
    currencies.flatMap((each, index) =>
      each === first
        ? []
        : [
            {
              index,
              field: 'ticketTypeId',
              words: 'This ticket is sold in another currency. Book it on its own.',
            },
          ],
    ),
  );
  return first;
}

function linesOf(tickets: readonly Ticketed[], wanted: Wanted): PriceLineView[] {
  return tickets.flatMap(({ ticket, type }, index) => {
    const lines = isCompanion(ticket)
      ? companionLines({ ticket, type }, wanted.day)
      : priceLines(type.details, choiceOf(ticket, wanted));
    if ('refused' in lines) {
      refuse([{ index, field: 'ticketTypeId', words: lines.refused }]);
      return [];
    }
    return lines;
  });
}

/** Who does not fish costs what a further person does. */
function companionLines(
  { ticket, type }: Omit<Ticketed, 'peg'>,
  day: string,
): PriceLineView[] | { refused: string } {
  const price = priceOn(type.details.prices, day);
  if (!price) return { refused: 'No price is set for that day yet. Ask the fishery.' };
  const { vatCode, vatRateBp } = price;
  const { grossPence, netPence, vatPence } = vatLine(ticket.people * price.extraPersonPence, vatRateBp);
  const words = ticket.people === 1 ? 'Beside the angler' : 'Beside the anglers';
  return [{ words, count: ticket.people, grossPence, netPence, vatPence, vatCode, vatRateBp }];
}

/** Each of these pegs' neighbours in walking order on its lake. */
async function neighboursOf(
  tx: EntityManager,
  { id: lakeId }: Lake,
  pegIds: readonly string[],
): Promise<Map<string, string[]>> {
  if (pegIds.length === 0) return new Map();
  const rows: { id: string; near: string[] }[] = await tx.query(
    `WITH walked AS (
       SELECT id, lag(id) OVER w AS before, lead(id) OVER w AS after FROM peg WHERE lake_id = $1
       WINDOW w AS (ORDER BY walking_order, id))
     SELECT id, array_remove(ARRAY[before, after], NULL) AS near FROM walked WHERE id = ANY ($2)`,
    [lakeId, pegIds],
  );
  return new Map(rows.map(({ id, near }) => [id, near]));
}
