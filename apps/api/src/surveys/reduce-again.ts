import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { IsNull, type EntityManager } from 'typeorm';
import type { VisitFound } from './find-visit';
import { reduceAll, type VisitSite } from './reduce-visit';
import { isReducedWith, siteDigest, visitSite } from './visit-site';

/** Runs the reduction of every cast of a visit again, with its constants as they are now. Observations stay as they are. */
export async function reduceVisitAgain(tx: EntityManager, found: VisitFound): Promise<void> {
  const site = await visitSite(tx, found);
  const reduced = reduceAll(site, await castsOf(tx, found.visit.id));
  await tx.query(
    `UPDATE survey_cast SET reduced = again.reduced::jsonb
       FROM unnest($1::uuid[], $2::text[]) AS again (id, reduced) WHERE survey_cast.id = again.id`,
    [[...reduced.keys()], [...reduced.values()].map((each) => JSON.stringify(each))],
  );
  await tx.update(SurveyVisit, { id: found.visit.id }, { reducedWith: siteDigest(site) });
}

/** The casts of a visit in the order they were made, as they are kept. */
export const castsOf = (tx: EntityManager, visitId: string): Promise<SurveyCast[]> =>
  tx.find(SurveyCast, { where: { visitId, undoneAt: IsNull() }, order: { seq: 'ASC' } });

/**
 * The casts of a visit with their reduction as it stands today. A mark or a peg may have been put right since they were
 * kept: then they are reduced afresh for this reader, and written at the next deed on the visit.
 */
export async function castsToday(tx: EntityManager, site: VisitSite): Promise<SurveyCast[]> {
  const casts = await castsOf(tx, site.visit.id);
  if (casts.length === 0 || isReducedWith(site)) return casts;
  const reduced = reduceAll(site, casts);
  return casts.map((cast) => Object.assign(cast, { reduced: reduced.get(cast.id) ?? cast.reduced }));
}
