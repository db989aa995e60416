import { ClosureChoice } from '@mereward/db/entities/bookings/closure-choice';
import { IsNull, LessThanOrEqual } from 'typeorm';
import { z } from 'zod';
import type { Ctx } from '../ctx';
import { ctxOf } from '../http/ctx-of';
import { outOfDeadlock } from '../http/deadlock';
import type { Server } from '../http/server';
import type { Handler } from '../jobs/worker';
import { closedRefundLetter, postIf } from './closure-letters';
import { chooser } from './closure-choices';
import { endByRefund } from './refund-closed';

const SettleJob = z.strictObject({ closureId: z.uuid() });

/** Gives all the money back to whoever has not chosen by their deadline, each in a transaction of their own. */
export const settleChoicesJob: Handler = async (job, server) =>
  settleChoices(server, SettleJob.parse(job.payload).closureId);

export async function settleChoices(server: Server, closureId: string): Promise<void> {
  const { source, clock } = server;
  const due = await source.manager.find(ClosureChoice, {
    where: { closureId, choice: IsNull(), chooseUntil: LessThanOrEqual(clock()) },
    order: { bookingId: 'ASC' },
  });
  for (const { id } of due)
    await outOfDeadlock(() => source.transaction((tx) => settleOne(ctxOf(server, tx), id)));
}

async function settleOne(ctx: Ctx, choiceId: string): Promise<void> {
  const found = await chooser(ctx.tx, choiceId, true);
  const { choice, booking, fishery, closure, lake, outcome } = found;
  if (choice.choice !== null || booking.status !== 'choosing') return;
  const backPence = await endByRefund(ctx, choice, 'deadline');
  const to = { ...booking, holder: booking.holderName, lakeName: lake.name, from: outcome.from };
  await postIf(ctx, booking.holderEmail, (email) =>
    closedRefundLetter({ ...to, email }, { closure, fishery }, backPence),
  );
}
