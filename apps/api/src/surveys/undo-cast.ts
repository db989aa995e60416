import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { Problem } from '@mereward/shared/problems/problem';
import { IsNull } from 'typeorm';
import type { Ctx } from '../ctx';
import { visitToKeep } from './find-visit';
import { reduceVisitAgain } from './reduce-again';

/** Takes back the last cast of a visit. What was observed stays in the record, marked as taken back. */
export async function undoCast(ctx: Ctx, visitId: string, castId: string): Promise<void> {
  const { tx, now } = ctx;
  const found = await visitToKeep(ctx, visitId);
  const cast = await tx.findOneBy(SurveyCast, { id: castId, visitId });
  if (!cast) throw new Problem('not-found', 'There is no such cast at this visit');
  if (cast.undoneAt !== null) return;
  const last = await tx.findOne(SurveyCast, {
    where: { visitId, undoneAt: IsNull() },
    order: { seq: 'DESC' },
  });
  if (last && last.id !== castId)
    throw new Problem('conflict', `Cast ${last.seq} came after this one`, {
      detail: 'Only the last cast can be taken back. Take that one back first.',
    });
  await tx.update(SurveyCast, { id: castId }, { undoneAt: now });
  if (cast.observation.drag === 'solid_stop') await reduceVisitAgain(tx, found); // another's snag may hang on it
}
