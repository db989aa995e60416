import { Account } from '@mereward/db/entities/accounts/account';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import type { CastView, VisitList, VisitWithCasts } from '@mereward/shared/surveys/contract';
import type { Reducing } from '@mereward/shared/surveys/reducing-contract';
import { USUAL_FEEL } from '@mereward/shared/surveys/usual-feel';
import { In } from 'typeorm';
import type { Ctx } from '../ctx';
import { castView } from './cast-view';
import { coverageOf } from './coverage';
import { lakeFor, visitToRead } from './find-visit';
import { mayKeepCasts } from './policy';
import { castsToday } from './reduce-again';
import type { VisitSite } from './reduce-visit';
import { visitSite } from './visit-site';
import { shapeVisit, soundingCounts, visitView } from './visit-view';

const MOST_VISITS = 500;

/** The visits of a lake, newest first. */
export async function listVisits(ctx: Ctx, lakeId: string): Promise<VisitList> {
  const { tx, actor } = ctx;
  const lake = await lakeFor(ctx, lakeId, 'read');
  const visits = await tx.find(SurveyVisit, {
    where: { lakeId },
    order: { startedAt: 'DESC', id: 'ASC' },
    take: MOST_VISITS,
  });
  const people = await tx.findBy(Account, { id: In(visits.map((visit) => visit.surveyorId)) });
  const names = new Map(people.map((person) => [person.id, person.name]));
  const counts = await tx.query<{ id: string; n: number }[]>(
    `SELECT visit_id AS id, count(*)::int AS n FROM survey_cast
      WHERE visit_id = ANY ($1) AND undone_at IS NULL GROUP BY visit_id`,
    [visits.map((visit) => visit.id)],
  );
  const soundings = await soundingCounts(
    tx,
    visits.map((visit) => visit.id),
  );
  const countOf = new Map(counts.map(({ id, n }) => [id, n]));
  const shaped = visits.map((visit) =>
    shapeVisit(
      ctx,
      { visit, lake },
      {
        surveyorName: names.get(visit.surveyorId) ?? '',
        castCount: countOf.get(visit.id) ?? 0,
        soundingCount: soundings.get(visit.id) ?? 0,
      },
    ),
  );
  return { visits: shaped, may: { open: mayKeepCasts(actor, lake.fisheryId) } };
}

/** A visit, its casts in the order they were made, and how much of each peg's arc they cover. */
export async function readVisit(ctx: Ctx, visitId: string): Promise<VisitWithCasts> {
  const found = await visitToRead(ctx, visitId);
  const site = await visitSite(ctx.tx, found);
  const casts = await castsToday(ctx.tx, site);
  return {
    visit: await visitView(ctx, found),
    casts: casts.map((cast) => withoutSteps(castView(cast))),
    coverage: coverageOf(site, casts),
    reducing: reducingOf(site),
  };
}

/** What a phone needs beside the kit to reduce alike; the built-in table it has already. */
const reducingOf = ({ table, lead }: VisitSite): Reducing => ({
  tableVersion: table.version,
  feel: table.feel === USUAL_FEEL ? null : table.feel,
  lead,
});

/** Steps are three quarters of a cast's bytes, and whoever opens one can work them out: the reduction is shared. */
const withoutSteps = (cast: CastView): CastView => ({ ...cast, reduced: { ...cast.reduced, steps: [] } });
