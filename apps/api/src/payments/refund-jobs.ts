import { Payment } from '@mereward/db/entities/payments/payment';
import { Refund } from '@mereward/db/entities/payments/refund';
import { ctxOf } from '../http/ctx-of';
import { outOfDeadlock } from '../http/deadlock';
import type { Server } from '../http/server';
import type { Handler } from '../jobs/worker';
import { outcomeOf, refundFaultWords } from './heard';
import { providerOf, refusalOf } from './provider';
import { AskRefundJob } from './refunds';
import { askedByHand, settleRefund, type RefundOutcome } from './settle-refund';

/** Asks the provider for one refund. Its id is the idempotency key: asked ten times it is given once. */
export const askRefund: Handler = async ({ payload }, server) => {
  const { refundId } = AskRefundJob.parse(payload);
  const { manager } = server.source;
  const refund = await manager.findOneBy(Refund, { id: refundId });
  if (refund?.status !== 'queued') return;
  const payment = await manager.findOneByOrFail(Payment, { id: refund.paymentId });
  if (askedByHand(refund, payment)) return;
  const outcome = await askProvider(server, refund, payment);
  if (outcome === null) return; // still at it: its message tells the end
  await outOfDeadlock(() =>
    server.source.transaction((tx) => settleRefund(ctxOf(server, tx), refundId, outcome)),
  );
};

async function askProvider(server: Server, refund: Refund, payment: Payment): Promise<RefundOutcome | null> {
  const provider = await providerOf(server.config);
  if (!provider)
    throw new Error('No card provider is set (STRIPE_SECRET_KEY), so this refund stays in the queue');
  if (payment.providerIntent === null)
    return { kind: 'failed', fault: refundFaultWords(''), providerRef: null };
  const metadata = { refund_id: refund.id, payment_id: payment.id };
  const asked = { payment_intent: payment.providerIntent, amount: refund.amountPence, metadata };
  try {
    const made = await provider.stripe.refunds.create(asked, { idempotencyKey: refund.id });
    return outcomeOf(made);
  } catch (error) {
    const refusal = refusalOf(error);
    if (!refusal) throw error;
    return { kind: 'failed', fault: refundFaultWords(refusal.code), providerRef: null };
  }
}
