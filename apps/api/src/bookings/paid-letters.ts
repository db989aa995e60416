import type { Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { letter } from '../mail/letter';
import { post } from '../mail/send';
import type { Stay } from './stay';

const linkTo = ({ publicUrl }: Ctx, bookingId: string) => `${publicUrl}/tickets/bookings/${bookingId}`;

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
