import type { Refund } from '@mereward/db/entities/payments/refund';
import { moneyWords } from '@mereward/shared/money/money';
import type { Ctx } from '../ctx';
import { letter } from '../mail/letter';
import { postByDay } from '../mail/send';
import { currencyOf } from './currency';

type Reader = {
  name: string;
  email: string | null;
  code: string;
  fishery: string;
  contact: string;
  zone: string;
  currency: string;
};

/** Tells whoever holds the booking that money went back, or truthfully that it did not yet. */
export async function postRefundLetter(ctx: Ctx, refund: Refund, end: 'done' | 'failed'): Promise<void> {
  const { tx, publicUrl } = ctx;
  const rows: Reader[] = await tx.query(
    `SELECT b.holder_name AS name, b.holder_email AS email, b.code, f.name AS fishery,
            f.details->>'officeContact' AS contact, f.zone, b.currency
       FROM booking b JOIN fishery f ON f.id = b.fishery_id WHERE b.id = $1`,
    [refund.bookingId],
  );
  const [reader] = rows;
  if (!reader?.email) return;
  const amount = moneyWords(refund.amountPence, currencyOf(reader.currency));
  const words =
    end === 'done'
      ? {
          subject: `${reader.fishery}: ${amount} given back for booking ${reader.code}`,
          lines: [
            `Hello ${reader.name},`,
            `We have given back ${amount} for booking ${reader.code}: ${refund.reason}`,
            'Paid by card, it is on your statement within five to ten working days, as your bank has it.',
          ],
        }
      : {
          subject: `${reader.fishery}: your refund for booking ${reader.code} has not gone through yet`,
          lines: [
            `Hello ${reader.name},`,
            `We tried to give back ${amount} for booking ${reader.code}, and the card’s bank did not take it. The money is still owed to you.`,
            `The office has been told and will see to it.${reader.contact ? ` You can reach it: ${reader.contact}` : ''}`,
          ],
        };
  const link = { label: 'See the booking', url: `${publicUrl}/tickets/bookings/${refund.bookingId}` };
  await postByDay(ctx, letter(reader.email, { ...words, link }), reader.zone);
}
