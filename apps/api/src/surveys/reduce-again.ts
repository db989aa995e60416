import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { IsNull, type EntityManager } from 'typeorm';
import type { VisitFound } from './find-visit';
import { reduceAll } from './reduce-visit';
import { visitSite } from './visit-site';

/** Runs the reduction of every cast of a visit again, with its constants as they are now. Observations stay as they are. */
export async function reduceVisitAgain(tx: EntityManager, found: VisitFound): Promise<void> {
  const site = await visitSite(tx, found);
  const casts = await tx.find(SurveyCast, {
    where: { visitId: found.visit.id, undoneAt: IsNull() },
    order: { seq: 'ASC' },
  });
  const reduced = reduceAll(site, casts);
  await tx.query(
    `UPDATE survey_cast SET reduced = again.reduced::jsonb
       FROM unnest($1::uuid[], $2::text[]) AS again (id, reduced) WHERE survey_cast.id = again.id`,
    [[...reduced.keys()], [...reduced.values()].map((each) => JSON.stringify(each))],
  );
}
