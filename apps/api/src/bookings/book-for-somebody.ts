import { Account } from '@mereward/db/entities/accounts/account';
import { Booking } from '@mereward/db/entities/bookings/booking';
import type { BookForSomebody } from '@mereward/shared/bookings/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { accountOf, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { mustRepeat } from '../repeat';
import { detailsOf, heldContent, insertBooking, place } from './hold';
import { refuseUnlet } from './let-faults';
import { letGoOfExpired } from './let-go';
import { occasionOf } from './occasion';
import { postConfirmed } from './post-ticket';
import { TICKET_WRITERS } from './policy';
import { refuseFaulty, sellFaults } from './sell-faults';
import { tell } from './stay';
import { tellTomorrowLater } from './tell-ahead';
import { termsOf } from './terms';

/**
 * A ticket for somebody who asks at the lodge or on the phone, confirmed at once. The office may sell outside what the
 * web sells (notice, members, what is asked on the way); a peg, its room, ages and nights it may not pass over.
 */
export async function bookForSomebody(ctx: Ctx, fisheryId: string, input: BookForSomebody): Promise<void> {
  const { tx, actor } = ctx;
  await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, TICKET_WRITERS);
  if (await isRepeat(ctx, input)) return;
  const { holder, vehicle, note } = input;
  const tickets = input.tickets.map((ticket) =>
    ticket.name === '' && ticket.kind === 'holder' ? { ...ticket, name: holder.name } : ticket,
  );
  const occasion = await occasionOf(ctx, { ...input, tickets });
  if (occasion.fisheryId !== fisheryId) throw notFound('lake');
  await refuseUnlet(ctx, { ...occasion, pegs: occasion.tickets.map(({ peg }) => peg) });
  const account = holder.email === null ? null : await tx.findOneBy(Account, { email: holder.email });
  const said = { guardian: null, vehicle, emergencyContact: '', licence: null, note };
  const accountId = account?.id ?? null;
  const buyer = { accountId, name: holder.name, bookingId: input.id, said };
  refuseFaulty(await sellFaults(ctx, occasion, { buyer, leniency: 'office' }));
  await letGoOfExpired(ctx, occasion.lake.id);
  const terms = await termsOf(tx, fisheryId);
  const inserted = await insertBooking(ctx, occasion, {
    id: input.id,
    accountId,
    holderName: holder.name,
    holderEmail: holder.email,
    status: 'confirmed',
    holdUntil: null,
    source: 'office',
    details: detailsOf(occasion, { terms, said }),
  });
  if (!inserted) {
    if (await isRepeat(ctx, input)) return;
    throw new Problem('conflict', 'The ticket could not be numbered', { detail: 'Send it once more.' });
  }
  await place(ctx, occasion, { bookingId: input.id, state: 'taken' });
  await tell(ctx, input.id, { kind: 'confirmed', by: 'office' });
  await tellTomorrowLater(ctx, input.id);
  await postConfirmed(ctx, input.id);
}

async function isRepeat({ tx, actor }: Ctx, input: BookForSomebody): Promise<boolean> {
  const kept = await tx.findOneBy(Booking, { id: input.id });
  if (!kept) return false;
  const { holder, vehicle, note } = input;
  mustRepeat(
    { by: accountOf(actor), content: { ...heldContent(input), ...holder, vehicle, note } },
    {
      by: kept.writtenBy ?? '',
      content: {
        ...heldContent({ ...kept.details, lakeId: kept.lakeId ?? '' }),
        name: kept.holderName,
        email: kept.holderEmail,
        vehicle: kept.details.vehicle,
        note: kept.details.note,
      },
    },
  );
  return true;
}
