import { moneyWords } from '@mereward/shared/money/money';
import { dayAndClock } from '@mereward/shared/time/day-names';
import type { Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { letter } from '../mail/letter';
import { post } from '../mail/send';
import { currencyOf } from '../payments/currency';
import { moneyOf } from '../payments/money-of';
import { saleWords } from './sale-words';
import { findStay, type Stay } from './stay';

const linkTo = ({ publicUrl }: Ctx, bookingId: string) => `${publicUrl}/tickets/bookings/${bookingId}`;

/** A ticket that was paid for: what, when, how much, and the receipt's number. Sent once, with the deed that confirms it. */
export async function postConfirmed(ctx: Ctx, bookingId: string): Promise<void> {
  const stay = await findStay(ctx.tx, bookingId);
  if (!stay.holderEmail) return;
  const { details } = await fisheryFound(ctx.tx, stay.fisheryId);
  const { receipts } = await moneyOf(ctx.tx, bookingId);
  const [from, until] = [stay.from, stay.until].map((at) => dayAndClock(at.toISOString(), details.zone));
  const paidLines = receipts
    .filter(({ kind }) => kind === 'receipt')
    .map(({ number, told }) => {
      const currency = currencyOf(told.currency);
      const vat = told.vat
        .filter(({ vatPence }) => vatPence > 0)
        .map(({ rateBp, vatPence }) => `, of it VAT at ${rateBp / 100} % ${moneyWords(vatPence, currency)}`);
      return `Paid: ${moneyWords(told.grossPence, currency)}${vat.join('')}. Receipt ${number}.`;
    });
  await post(
    ctx,
    letter(stay.holderEmail, {
      subject: `${details.name}: ticket ${stay.code} is confirmed`,
      lines: [
        `Hello ${stay.holderName},`,
        `Your ticket is confirmed: ${await saleWords(ctx.tx, stay)}.`,
        `From ${from} to ${until}.`,
        ...paidLines,
      ],
      link: { label: 'Open the ticket', url: linkTo(ctx, bookingId) },
      after: [`Its code, to be read aloud at the water: ${stay.code}.`],
    }),
  );
}

/** Money came for a peg that was let go of: it goes back, and we say so plainly. */
export async function postTooLate(ctx: Ctx, stay: Stay, amount: string): Promise<void> {
  if (!stay.holderEmail) return;
  const { details } = await fisheryFound(ctx.tx, stay.fisheryId);
  await post(
    ctx,
    letter(stay.holderEmail, {
      subject: `${details.name}: your payment came too late, and goes back`,
      lines: [
        `Hello ${stay.holderName},`,
        `Your payment of ${amount} reached us after the time to hold the peg had run out, so you have no ticket. We are sorry.`,
        `All of it goes back to the card you paid with. Your bank may take five to ten working days to show it.`,
      ],
      link: { label: 'See the booking', url: linkTo(ctx, stay.id) },
      after: ['If you still want to fish, hold a peg anew.'],
    }),
  );
}
