import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { Problem } from '@mereward/shared/problems/problem';
import type { CloseVisit, VisitView } from '@mereward/shared/surveys/contract';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { refuseWrongClock } from '../wrong-clock';
import { CLOCK_OUT_MS } from './cast-time';
import { visitToKeep } from './find-visit';
import { reduceVisitAgain } from './reduce-again';
import { visitView } from './visit-view';

/** Closes a visit with the board's last reading; the level of each cast's hour is then known, so all are reduced again. */
export async function closeVisit(ctx: Ctx, visitId: string, input: CloseVisit): Promise<VisitView> {
  const { tx } = ctx;
  const { visit, lake } = await visitToKeep(ctx, visitId);
  const endedAt = new Date(input.endedAt);
  if (visit.endedAt !== null) {
    const same = visit.endedAt.getTime() === endedAt.getTime() && visit.gaugeEndM === input.gaugeEndM;
    if (same) return visitView(ctx, { visit, lake });
    throw new Problem('conflict', 'This visit is closed already', {
      detail: 'Its last reading stays as it was kept.',
    });
  }
  refuseWrongClock({ at: endedAt, now: ctx.now, pointer: '/endedAt', what: 'end', fastMs: CLOCK_OUT_MS });
  await refuseWrongEnd(tx, visit, endedAt);
  const closed = Object.assign(visit, { endedAt, gaugeEndM: input.gaugeEndM, version: visit.version + 1 });
  await tx.update(
    SurveyVisit,
    { id: visitId },
    { endedAt, gaugeEndM: input.gaugeEndM, version: closed.version },
  );
  await reduceVisitAgain(tx, { visit: closed, lake });
  return visitView(ctx, { visit: closed, lake });
}

async function refuseWrongEnd(tx: EntityManager, visit: SurveyVisit, endedAt: Date): Promise<void> {
  const wrong = (detail: string) =>
    new Problem('invalid', 'That end of the visit can’t be right', {
      errors: [{ pointer: '/endedAt', detail }],
    });
  if (endedAt.getTime() < visit.startedAt.getTime()) throw wrong('The visit would end before it began.');
  const [last] = await tx.query<{ seq: number; at: Date }[]>(
    `SELECT seq, observed_at AS at FROM survey_cast
      WHERE visit_id = $1 AND undone_at IS NULL ORDER BY observed_at DESC LIMIT 1`,
    [visit.id],
  );
  if (last && last.at.getTime() > endedAt.getTime())
    throw wrong(`Cast ${last.seq} was made after that, at ${last.at.toISOString()}.`);
}
