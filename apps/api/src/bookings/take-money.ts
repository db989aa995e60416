import { Payment } from '@mereward/db/entities/payments/payment';
import type { TakeMoney } from '@mereward/shared/bookings/contract';
import { moneyWords, sumPence } from '@mereward/shared/money/money';
import { Problem } from '@mereward/shared/problems/problem';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { currencyOf } from '../payments/currency';
import { MONEY_HANDLERS } from '../payments/policy';
import { mustRepeat } from '../repeat';
import { allow, lockBooking } from './access';
import { closePages } from '../payments/open-payments';
import { paid } from './paid';
import { ranOut } from './stay';

/** Money taken at the lodge: receipt and ledger at once, and the ticket confirmed when it is paid in full. */
export async function takeMoney(ctx: Ctx, bookingId: string, input: TakeMoney): Promise<void> {
  const { tx, actor, now } = ctx;
  const { stay } = await lockBooking(ctx, bookingId);
  allow(holdsAny(actor, stay.fisheryId, MONEY_HANDLERS), 'the office, a manager or the owner');
  const madeBy = accountOf(actor);
  if (await isRepeat(ctx, { ...input, bookingId, madeBy })) return;
  const waits = stay.status === 'hold' || stay.status === 'pending_payment';
  const good = ['confirmed', 'checked_in', 'completed', 'no_show'].includes(stay.status);
  if (!good && (!waits || ranOut(stay, now)))
    throw new Problem('conflict', 'No money can be taken for this booking any more', {
      detail: 'Nothing was written down. Book anew, then take the money for that.',
    });
  const payments = await tx.findBy(Payment, { bookingId, status: 'captured' });
  const duePence = stay.grossPence - sumPence(payments.map(({ amountPence }) => amountPence));
  refuseAmount(input, { duePence, currency: stay.currency, whole: waits });
  const payment = tx.create(Payment, {
    id: input.id,
    fisheryId: stay.fisheryId,
    bookingId,
    method: input.method,
    amountPence: input.amountPence,
    currency: stay.currency,
    status: 'captured',
    providerSession: null,
    providerIntent: null,
    pageUrl: null,
    madeBy,
    madeAt: now,
    takenAt: now,
    lookedAt: null,
    fault: '',
  });
  await tx.insert(Payment, payment);
  await paid(ctx, stay, payment);
  await closePages(ctx, bookingId);
}

async function isRepeat(
  { tx }: Ctx,
  asked: TakeMoney & { bookingId: string; madeBy: string },
): Promise<boolean> {
  const kept = await tx.findOneBy(Payment, { id: asked.id });
  if (!kept) return false;
  const { id, method, amountPence, bookingId, madeBy } = kept;
  const { madeBy: by, ...content } = asked;
  mustRepeat({ by, content }, { by: madeBy ?? '', content: { id, method, amountPence, bookingId } });
  return true;
}

type Due = { duePence: number; currency: string; whole: boolean };

function refuseAmount({ amountPence, method }: TakeMoney, { duePence, currency, whole }: Due): void {
  const due = moneyWords(duePence, currencyOf(currency));
  const refuse = (title: string) => {
    throw new Problem('conflict', title, {
      detail: 'Nothing was written down. Put the amount right and send it again.',
      errors: [{ pointer: '/amountPence', detail: `${due} is to be paid.` }],
    });
  };
  if (method === 'complimentary') {
    if (amountPence !== 0) refuse('A complimentary ticket costs nothing');
    return;
  }
  if (duePence === 0) refuse('It has been paid already');
  if (amountPence === 0 || amountPence > duePence) refuse(`${due} is to be paid, no more`);
  if (whole && amountPence !== duePence) refuse(`A held ticket is paid in full: ${due}`);
}
