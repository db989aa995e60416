import { Booking } from '@mereward/db/entities/bookings/booking';
import { ClosureChoice } from '@mereward/db/entities/bookings/closure-choice';
import { Closure } from '@mereward/db/entities/closures/closure';
import { closureState, isLegal } from '@mereward/shared/closures/closure-effect';
import type { LiftClosure } from '@mereward/shared/closures/deeds-contract';
import { Problem } from '@mereward/shared/problems/problem';
import { IsNull } from 'typeorm';
import { closureOf } from '../closures/closure-times';
import { standsAgainst } from '../closures/closure-views';
import { CLOSERS, OVERRIDERS } from '../closures/policy';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { closureNoticeDown } from '../notices/write-notice';
import { staleVersion } from '../repeat';
import { openPegs } from './closed-time';
import { setState, writeEvent } from './closure-history';
import { chooser, type Chooser } from './closure-choices';
import { choiceKeptLetter, postIf } from './closure-letters';
import { freePegs, takePegs } from './peg-calendar';

/**
 * Lifts a closure: its pegs are free again, its notice comes down, and whoever has not chosen yet keeps their own
 * ticket where it is still to come. What stands against it only an owner may pass over, with a reason; law nobody may.
 */
export async function liftWater(ctx: Ctx, closureId: string, input: LiftClosure): Promise<void> {
  const { tx, actor, now } = ctx;
  accountOf(actor);
  const found = await tx.findOneBy(Closure, { id: closureId });
  if (!found) throw notFound('closure');
  allowOnly(actor, { fisheryId: found.fisheryId, what: 'closure' }, CLOSERS);
  const open = await tx.find(ClosureChoice, { where: { closureId, choice: IsNull() } });
  await tx.query('SELECT id FROM booking WHERE id = ANY ($1) ORDER BY id FOR NO KEY UPDATE', [
    open.map(({ bookingId }) => bookingId),
  ]);
  const closure = await tx.findOneOrFail(Closure, {
    where: { id: closureId },
    lock: { mode: 'for_no_key_update' },
  });
  if (closure.liftedAt !== null) return;
  if (closure.version !== input.version) throw staleVersion();
  const state = closureState(closureOf(closure), now);
  if (state === 'over')
    throw new Problem('conflict', 'This closure is over already', { detail: 'There is nothing to lift.' });
  await refuseStanding(ctx, closure, { ...input, begun: state === 'in_force' });
  await tx.update(
    Closure,
    { id: closureId },
    {
      liftedAt: now,
      liftedBy: accountOf(actor),
      lift: { ticked: input.ticked, reason: input.reason },
      version: closure.version + 1,
    },
  );
  await openPegs(tx, closureId);
  await closureNoticeDown(ctx, closureId);
  for (const { id } of open) await giveBack(ctx, await chooser(tx, id, true));
}

async function refuseStanding(
  { tx, actor }: Ctx,
  closure: Closure,
  { ticked, reason, begun }: LiftClosure & { begun: boolean },
): Promise<void> {
  const legal = isLegal(closure.reason);
  if (legal && begun && closure.details.until !== null)
    throw new Problem('forbidden', 'This closure is law: it ends by itself', {
      detail: 'Nobody here may lift it before its end.',
    });
  const { zone } = await fisheryFound(tx, closure.fisheryId);
  const stands = standsAgainst(closure, ticked, zone);
  if (stands.length === 0) return;
  const errors = stands.map((detail) => ({ pointer: '/ticked', detail }));
  if (legal)
    throw new Problem('conflict', 'Something still stands against lifting it', {
      detail: 'It is law, so nobody here may pass over it.',
      errors,
    });
  if (!holdsAny(actor, closure.fisheryId, OVERRIDERS))
    throw new Problem('conflict', 'Something still stands against lifting it', {
      detail: 'Tick what is so. Only the owner may pass over the rest, with a reason.',
      errors,
    });
  if (reason === '')
    throw new Problem('invalid', 'Say why it is lifted all the same', {
      detail: 'Nothing was lifted.',
      errors: [{ pointer: '/reason', detail: 'Give the reason.' }, ...errors],
    });
}

/** Gives somebody who has not chosen their own pegs back, where their time is still to come and nobody has them. */
async function giveBack(ctx: Ctx, found: Chooser): Promise<void> {
  const { tx, now } = ctx;
  const { choice, booking, outcome, fishery, lake } = found;
  if (choice.choice !== null || booking.status !== 'choosing' || outcome.until <= now) return;
  const lost = await takePegs(tx, {
    bookingId: booking.id,
    lakeId: outcome.lakeId,
    from: outcome.from,
    until: outcome.until,
    turnaroundMinutes: outcome.was[0]?.turnaroundMinutes ?? 0,
    state: 'taken',
    pegs: outcome.was,
  });
  if (lost.length > 0) return freePegs(tx, booking.id); // closed otherwise, or let: they go on choosing
  await setState(ctx, booking.id, 'confirmed');
  await tx.update(ClosureChoice, { id: choice.id }, { choice: 'kept', chosenBy: 'office', chosenAt: now });
  await writeEvent(ctx, booking.id, { kind: 'closure_lifted', told: { closureId: choice.closureId } });
  const to = await tx.findOneByOrFail(Booking, { id: booking.id });
  const words = 'The closure is lifted, and your ticket stands as it was. There is nothing to choose.';
  await postIf(ctx, to.holderEmail, (email) =>
    choiceKeptLetter(
      { ...to, holder: to.holderName, lakeName: lake.name, from: outcome.from, email },
      { fishery },
      words,
    ),
  );
}
