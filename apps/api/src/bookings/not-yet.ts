import type { BookedTicket, BookingDetails } from '@mereward/shared/bookings/contract';
import { licenceNeeded, licenceWarning, type LicenceAnswer } from '@mereward/shared/bookings/rod-licence';
import type { Jurisdiction } from '@mereward/shared/fisheries/contract';
import { READING_WORDS } from '@mereward/shared/rules/reading';
import { ageOnDay } from '@mereward/shared/time/age';
import type { Ctx } from '../ctx';
import { readingsOf } from '../rules/readings';
import { isCompanion } from './occasion';

/** Why a ticket doesn't count yet, in words, and whether rules are among it. */
export type NotYet = { words: string[]; rules: boolean };

type Asked = {
  id: string;
  jurisdiction: Jurisdiction;
  zone: string;
  until: Date;
  status: string;
  details: BookingDetails;
};

type Kinds = ReadonlyMap<string, { licence: boolean; proof: string }>;

const LIVE: ReadonlySet<string> = new Set(['hold', 'pending_payment', 'confirmed', 'checked_in']);

/** For each booking, in their order. Those that are over or given up have nothing still to come. */
export async function notYetOf({ tx }: Pick<Ctx, 'tx'>, bookings: readonly Asked[]): Promise<NotYet[]> {
  const live = bookings.filter(({ status }) => LIVE.has(status));
  if (live.length === 0) return bookings.map(() => ({ words: [], rules: false }));
  const readings = await readingsOf(
    tx,
    live.map(({ id }) => id),
  );
  const typeIds = [
    ...new Set(live.flatMap(({ details }) => details.tickets.map((each) => each.ticketTypeId))),
  ];
  const rows: { id: string; licence: boolean; proof: string }[] = await tx.query(
    `SELECT id, (details->'needs'->>'rodLicence')::boolean AS licence, details->>'concessionProof' AS proof
       FROM ticket_type WHERE id = ANY ($1)`,
    [typeIds],
  );
  const kinds: Kinds = new Map(rows.map(({ id, ...kind }) => [id, kind]));
  return bookings.map((booking) => {
    if (!LIVE.has(booking.status)) return { words: [], rules: false };
    const reading = readings.get(booking.id);
    const rules = reading?.needed ?? false;
    const unread = reading && rules && reading.blocks !== 'nothing' ? [READING_WORDS[reading.blocks]] : [];
    const proofs = booking.status === 'checked_in' ? [] : proofWords(booking.details.tickets, kinds);
    return { words: [...unread, ...licenceWords(booking, kinds), ...proofs], rules };
  });
}

/** An adult whose birthday nobody asked for. */
const SOME_ADULT_AGE = 18;

/** What the law of the place asks of one ticket's angler on the day fished. */
export const licenceOf = (
  ticket: Pick<BookedTicket, 'kind' | 'bornOn'>,
  { jurisdiction, day }: { jurisdiction: Jurisdiction; day: string },
): LicenceAnswer => {
  const adult = ticket.kind === 'junior' ? null : SOME_ADULT_AGE;
  return licenceNeeded(jurisdiction, ticket.bornOn === null ? adult : ageOnDay(ticket.bornOn, day), day);
};

function licenceWords({ details, jurisdiction, until, zone }: Asked, kinds: Kinds): string[] {
  const fishing = details.tickets.filter(
    (ticket) => !isCompanion(ticket) && kinds.get(ticket.ticketTypeId)?.licence === true,
  );
  const declared = details.licence && {
    declared: details.licence.held,
    lastSix: details.licence.lastSix,
    expiresOn: details.licence.expiresOn,
  };
  const words = fishing.flatMap((ticket) => {
    const answer = licenceOf(ticket, { jurisdiction, day: details.day });
    return licenceWarning(answer, declared, { until, zone }) ?? [];
  });
  return [...new Set(words)];
}

function proofWords(tickets: readonly BookedTicket[], kinds: Kinds): string[] {
  const proofs = tickets.flatMap(({ ticketTypeId }) => kinds.get(ticketTypeId)?.proof || []);
  return [...new Set(proofs)].map((proof) => `Have with you, to be shown on the bank: ${proof}.`);
}
