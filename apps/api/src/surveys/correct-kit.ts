import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { Problem } from '@mereward/shared/problems/problem';
import type { CorrectKit, VisitView } from '@mereward/shared/surveys/contract';
import type { Ctx } from '../ctx';
import { visitToKeep } from './find-visit';
import { refuseWrongLead } from './kit-lead';
import { reduceVisitAgain } from './reduce-again';
import { visitView } from './visit-view';

/** Corrects a constant of a visit and reduces every cast of it again. Published charts keep what they were made from. */
export async function correctKit(
  ctx: Ctx,
  visitId: string,
  { kit, version }: CorrectKit,
): Promise<VisitView> {
  const { tx } = ctx;
  const { visit, lake } = await visitToKeep(ctx, visitId);
  if (visit.version !== version)
    throw new Problem('conflict', 'Someone changed this meanwhile', {
      detail: 'Look at the visit as it is now, then correct it again.',
    });
  await refuseWrongLead(tx, lake.fisheryId, kit);
  const corrected = Object.assign(visit, { kit, version: version + 1 });
  await tx.update(SurveyVisit, { id: visitId }, { kit, version: version + 1 });
  await reduceVisitAgain(tx, { visit: corrected, lake });
  return visitView(ctx, { visit: corrected, lake });
}
