import { Account } from '@mereward/db/entities/accounts/account';
import { Disagreement } from '@mereward/db/entities/charts/disagreement';
import type { TakeBackDisagreement } from '@mereward/shared/charts/disagreement';
import { Problem } from '@mereward/shared/problems/problem';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { findPeg } from '../lakes/found';
import { DISAGREEMENT_DECIDERS, whyNotDecide } from './policy';

/**
 * Takes back that a report was accepted: it counts in no chart built from now on. What it was accepted as stays on
 * record, and so do the charts made with it.
 */
export async function takeBackDisagreement(
  { tx, actor, now }: Ctx,
  disagreementId: string,
  { reason }: TakeBackDisagreement,
): Promise<void> {
  const row = await tx.findOne(Disagreement, {
    where: { id: disagreementId },
    lock: { mode: 'pessimistic_write' },
  });
  if (!row) throw notFound('report');
  const { lake } = await findPeg(tx, row.pegId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'report' }, DISAGREEMENT_DECIDERS);
  const takenBackBy = accountOf(actor);
  const why = whyNotDecide(actor, { fisheryId: lake.fisheryId, reportedBy: row.reportedBy });
  if (why !== null)
    throw new Problem('forbidden', why, { detail: 'Ask another of the office or the bailiffs.' });
  if (row.status === 'taken_back') {
    if (row.takenBackBy === takenBackBy && row.takenBackReason === reason) return;
    const by = row.takenBackBy && (await tx.findOneBy(Account, { id: row.takenBackBy }))?.name;
    throw new Problem('conflict', `This was taken back already${by ? `, by ${by}` : ''}`, {
      detail: 'The first word stands. Yours was not saved.',
    });
  }
  if (row.status !== 'accepted')
    throw new Problem('conflict', 'Only an accepted report can be taken back', {
      detail: row.status === 'waiting' ? 'This one waits: decline it instead.' : 'This one was declined.',
    });
  await tx.update(
    Disagreement,
    { id: row.id },
    { status: 'taken_back', takenBackBy, takenBackAt: now, takenBackReason: reason },
  );
}
