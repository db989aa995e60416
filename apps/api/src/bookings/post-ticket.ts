import { accountOrNull, type Ctx } from '../ctx';
import type { Letter } from '../mail/letter';
import { post, postByDay } from '../mail/send';
import {
  cancelledLetter,
  confirmedLetter,
  movedLetter,
  paymentFailedLetter,
  type Addressed,
  type Cancelled,
  type Moved,
} from './ticket-letters';
import { ticketPaper } from './ticket-paper';

export const rulesUrlOf = (
  { publicUrl }: Pick<Ctx, 'publicUrl'>,
  { fisheryId }: Pick<Addressed, 'fisheryId'>,
): string => `${publicUrl}/water/rules/${fisheryId}`;

/**
 * Posts a letter about a booking in the deed it tells of. What answers its reader's own deed leaves at once; what
 * others did waits for the end of the quiet hours. A holder without an address is told at the lodge.
 */
async function postAbout(ctx: Ctx, bookingId: string, letterTo: (paper: Addressed) => Letter): Promise<void> {
  const paper = await ticketPaper(ctx, bookingId);
  const { email, accountId, zone } = paper;
  if (!email) return;
  const made = letterTo({ ...paper, email });
  const own = accountId !== null && accountOrNull(ctx.actor) === accountId;
  if (own) await post(ctx, made);
  else await postByDay(ctx, made, zone);
}

/** A ticket is there: its holder has just paid or asked for it, so it leaves whatever the hour. */
export async function postConfirmed(ctx: Ctx, bookingId: string): Promise<void> {
  const paper = await ticketPaper(ctx, bookingId);
  const { email } = paper;
  if (email) await post(ctx, confirmedLetter({ ...paper, email }, rulesUrlOf(ctx, paper)));
}

/** A card was refused: minutes count, so it leaves whatever the hour. */
export async function postPaymentFailed(ctx: Ctx, bookingId: string, fault: string): Promise<void> {
  const paper = await ticketPaper(ctx, bookingId);
  const { email } = paper;
  if (email) await post(ctx, paymentFailedLetter({ ...paper, email }, fault));
}

export const postMoved = (ctx: Ctx, bookingId: string, moved: Moved): Promise<void> =>
  postAbout(ctx, bookingId, (paper) => movedLetter(paper, moved));

export const postCancelled = (ctx: Ctx, bookingId: string, cancelled: Cancelled): Promise<void> =>
  postAbout(ctx, bookingId, (paper) => cancelledLetter(paper, cancelled));
