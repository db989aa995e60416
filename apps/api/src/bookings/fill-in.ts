import type { BookingDetails, FillInBooking } from '@mereward/shared/bookings/contract';
import { Problem, type ProblemError } from '@mereward/shared/problems/problem';
import { isDeepStrictEqual } from 'node:util';
import type { Ctx } from '../ctx';
import { staleVersion } from '../repeat';
import { allow, lockBooking } from './access';
import { licenceOf } from './not-yet';
import { isCompanion, occasionOf, type Occasion } from './occasion';
import { refuseFaulty, sellFaults } from './sell-faults';
import { ranOut, step, type Stay } from './stay';

/** Is everybody named? The rest was asked when they were. */
export const isFilledIn = ({ tickets }: Pick<BookingDetails, 'tickets'>): boolean =>
  tickets.length === 0 || tickets.every(({ name }) => name !== '');

/** Names, births, guardian, car, licence: all that a ticket needs, every fault named. */
export async function fillInBooking(ctx: Ctx, bookingId: string, input: FillInBooking): Promise<void> {
  const { stay, standing } = await lockBooking(ctx, bookingId);
  allow(standing.holder || standing.writes, 'whoever holds the ticket');
  refuseOver(stay, ctx.now);
  if (isSame(stay.details, input)) return;
  if (stay.version !== input.version) throw staleVersion();
  const { tickets } = stay.details;
  if (tickets.length !== input.tickets.length)
    throw new Problem('invalid', 'Name the angler of every ticket', {
      detail: `This booking has ${tickets.length === 1 ? 'one ticket' : `${tickets.length} tickets`}.`,
      errors: [{ pointer: '/tickets', detail: 'One for each ticket held, in their order.' }],
    });
  const { version: _, tickets: named, ...said } = input;
  const details: BookingDetails = {
    ...stay.details,
    ...said,
    tickets: tickets.map((ticket, index) => ({ ...ticket, ...named[index] })),
  };
  await refuseIncomplete(ctx, { ...stay, details }, standing.writes);
  await step(ctx, stay, { to: stay.status, kind: 'filled-in', change: { details } });
}

export function refuseOver(stay: Stay, now: Date): void {
  const held = stay.status === 'hold' || stay.status === 'pending_payment';
  if (held && !ranOut(stay, now)) return;
  throw new Problem('conflict', held ? 'The time to hold this peg has run out' : 'This is no hold any more', {
    detail: 'What you typed was not kept here. Hold the peg again, if it is still free.',
  });
}

/** Refuses a booking that can't be sold as it is filled in. */
export async function refuseIncomplete(ctx: Ctx, stay: Stay, byStaff: boolean): Promise<Occasion> {
  const { details } = stay;
  const asked = {
    lakeId: stay.lakeId ?? '',
    day: details.day,
    start: details.start,
    tickets: details.tickets,
  };
  const occasion = await occasionOf(ctx, asked, { sold: true });
  if (!isFilledIn(details))
    throw new Problem('conflict', 'The details of this booking are not filled in', {
      detail: 'Give the name of every angler first.',
    });
  const buyer = { accountId: stay.accountId, name: stay.holderName, bookingId: stay.id, said: details };
  const leniency = byStaff ? 'office' : 'none';
  refuseFaulty(await sellFaults(ctx, occasion, { buyer, leniency }));
  if (!byStaff) refuseUndeclared(occasion, details);
  return occasion;
}

/** Where a licence is needed, its holder says whether they have one. Having none warns, and never refuses. */
function refuseUndeclared(
  { tickets, jurisdiction, day }: Occasion,
  { licence, guardian }: BookingDetails,
): void {
  const errors: ProblemError[] = [];
  const needed = tickets.some(
    ({ ticket, type }) =>
      !isCompanion(ticket) &&
      type.details.needs.rodLicence &&
      licenceOf(ticket, { jurisdiction, day }).needed === 'yes',
  );
  if (needed && licence === null)
    errors.push({
      pointer: '/licence',
      detail: 'Say whether there is a rod licence. It can be bought the same day.',
    });
  if (guardian && !guardian.consent)
    errors.push({
      pointer: '/guardian/consent',
      detail: 'The guardian must agree to stay beside the junior.',
    });
  const [first] = errors;
  if (!first) return;
  throw new Problem('invalid', first.detail, {
    detail: 'Nothing was kept. Put right what is named below and send it again.',
    errors,
  });
}

/** Sent again after a lost answer: all of it is there already. */
function isSame(kept: BookingDetails, { tickets, version: _, ...said }: FillInBooking): boolean {
  const names = kept.tickets.map(({ name, bornOn }) => ({ name, bornOn }));
  const { guardian, vehicle, emergencyContact, licence, note } = kept;
  return isDeepStrictEqual(
    { names, guardian, vehicle, emergencyContact, licence, note },
    { names: tickets, ...said },
  );
}
