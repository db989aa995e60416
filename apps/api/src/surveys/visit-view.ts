import { Account } from '@mereward/db/entities/accounts/account';
import type { VisitView } from '@mereward/shared/surveys/contract';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import type { VisitFound } from './find-visit';
import { mayKeepCasts } from './policy';

/** What a view of a visit needs beside its row. */
export type VisitNames = { surveyorName: string; castCount: number; soundingCount: number };

export async function visitView(ctx: Ctx, found: VisitFound): Promise<VisitView> {
  const { tx } = ctx;
  const surveyor = await tx.findOneBy(Account, { id: found.visit.surveyorId });
  const [count] = await tx.query<{ n: number }[]>(
    'SELECT count(*)::int AS n FROM survey_cast WHERE visit_id = $1 AND undone_at IS NULL',
    [found.visit.id],
  );
  const soundings = await soundingCounts(tx, [found.visit.id]);
  return shapeVisit(ctx, found, {
    surveyorName: surveyor?.name ?? '',
    castCount: count?.n ?? 0,
    soundingCount: soundings.get(found.visit.id) ?? 0,
  });
}

/** How many soundings the logs of some visits brought, by visit. */
export async function soundingCounts(
  tx: EntityManager,
  visitIds: readonly string[],
): Promise<Map<string, number>> {
  const rows = await tx.query<{ id: string; n: number }[]>(
    `SELECT visit_id AS id, sum((report->>'kept')::int)::int AS n FROM sounding_import
      WHERE visit_id = ANY ($1) AND state = 'done' AND undone_at IS NULL GROUP BY visit_id`,
    [visitIds],
  );
  return new Map(rows.map(({ id, n }) => [id, n]));
}

export function shapeVisit({ actor }: Ctx, { visit, lake }: VisitFound, names: VisitNames): VisitView {
  const mayKeep = mayKeepCasts(actor, lake.fisheryId);
  return {
    id: visit.id,
    lakeId: lake.id,
    lakeName: lake.name,
    title: visit.title,
    surveyor: { id: visit.surveyorId, name: names.surveyorName },
    competence: visit.competence,
    status: visit.endedAt === null ? 'open' : 'closed',
    startedAt: visit.startedAt.toISOString(),
    endedAt: visit.endedAt?.toISOString() ?? null,
    boardId: visit.boardId,
    gaugeStartM: visit.gaugeStartM,
    gaugeEndM: visit.gaugeEndM,
    datumM: lake.datumM,
    weather: visit.weather,
    clarity: visit.clarity,
    weedState: visit.weedState,
    kit: visit.kit,
    consentToPublish: visit.consentToPublish,
    castCount: names.castCount,
    soundingCount: names.soundingCount,
    version: visit.version,
    may: { addCasts: mayKeep && visit.endedAt === null, correct: mayKeep },
  };
}
