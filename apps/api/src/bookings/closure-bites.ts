import { ClosureChoice } from '@mereward/db/entities/bookings/closure-choice';
import type { Closure } from '@mereward/db/entities/closures/closure';
import type { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { choiceDeadline } from '@mereward/shared/closures/closure-effect';
import { HOUR_MS } from '@mereward/shared/time/zoned';
import { randomUUID } from 'node:crypto';
import { newSecret } from '../accounts/secret-token';
import type { Ctx } from '../ctx';
import { insertOnce } from '../repeat';
import { closedChooseLetter, closedRefundLetter, closedTellLetter, postIf } from './closure-letters';
import { setState, writeEvent } from './closure-history';
import type { Hit } from './closure-hits';
import { freePegs } from './peg-calendar';
import { endByRefund } from './refund-closed';

export type Over = { closure: Closure; fishery: Fishery };

/** What a closure does to one booking in its way, once however often it is done. */
export async function biteOf(ctx: Ctx, over: Over, hit: Hit): Promise<void> {
  switch (hit.bite) {
    case 'keep_out':
      return;
    case 'tell':
    case 'warn':
      return tellOnce(ctx, over, hit);
    case 'choose':
    case 'refund':
      return hit.status === 'hold' || hit.status === 'pending_payment'
        ? letGo(ctx, over, hit)
        : ask(ctx, over, hit);
  }
}

async function tellOnce(ctx: Ctx, { closure, fishery }: Over, hit: Hit): Promise<void> {
  const told: unknown[] = await ctx.tx.query(
    `SELECT 1 FROM booking_event WHERE booking_id = $1 AND kind = 'told_of_closure' AND told->>'closureId' = $2`,
    [hit.id, closure.id],
  );
  if (told.length > 0 || hit.status === 'hold' || hit.status === 'pending_payment') return;
  await writeEvent(ctx, hit.id, { kind: 'told_of_closure', told: { closureId: closure.id } });
  await postIf(ctx, hit.email, (email) => closedTellLetter({ ...hit, email }, { closure, fishery }));
}

/** Nobody has paid yet: the pegs go, and money that still comes is given back as too late. */
async function letGo(ctx: Ctx, { closure }: Over, hit: Hit): Promise<void> {
  await setState(ctx, hit.id, 'expired');
  await freePegs(ctx.tx, hit.id);
  await writeEvent(ctx, hit.id, { kind: 'closed_over', told: { closureId: closure.id, status: 'expired' } });
}

async function ask(ctx: Ctx, over: Over, hit: Hit): Promise<void> {
  const { tx, now } = ctx;
  const { closure, fishery } = over;
  const { token, hash } = newSecret();
  const chooseUntil = deadlineFor(over, hit, now);
  const id = randomUUID();
  const made = await insertOnce(tx, ClosureChoice, {
    id,
    closureId: closure.id,
    bookingId: hit.id,
    tokenDigest: hash,
    chooseUntil,
    choice: null,
    chosenBy: null,
    chosenAt: null,
    outcome: { was: hit.pegs, lakeId: hit.lakeId, from: hit.from, until: hit.until },
  });
  if (!made) return;
  await freePegs(tx, hit.id);
  await setState(ctx, hit.id, 'choosing');
  await writeEvent(ctx, hit.id, { kind: 'closed_over', told: { closureId: closure.id, was: hit.pegs } });
  if (hit.bite === 'refund') {
    const choice = await tx.findOneByOrFail(ClosureChoice, { id });
    const backPence = await endByRefund(ctx, choice, 'office');
    await postIf(ctx, hit.email, (email) => closedRefundLetter({ ...hit, email }, over, backPence));
    return;
  }
  await ctx.jobs.later(tx, {
    name: 'closure.settle',
    payload: { closureId: closure.id },
    afterSeconds: (chooseUntil.getTime() - now.getTime()) / 1000 + 1,
  });
  const url = `${ctx.publicUrl}/choose/${token}`;
  await postIf(ctx, hit.email, (email) =>
    closedChooseLetter({ ...hit, email }, { closure, fishery, chooseUntil }, url),
  );
}

/** The fishery's own deadline for whoever starts after it; the usual one else, with two hours to answer at least. */
function deadlineFor({ closure, fishery }: Over, { from }: Hit, now: Date): Date {
  const usual = choiceDeadline(now, from, fishery.zone);
  if (closure.chooseUntil === null) return usual;
  if (from >= closure.chooseUntil) return closure.chooseUntil;
  return new Date(Math.max(from.getTime(), now.getTime() + 2 * HOUR_MS));
}
