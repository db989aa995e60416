import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { Problem } from '@mereward/shared/problems/problem';
import type { CastView, KeepCast } from '@mereward/shared/surveys/contract';
import { isDeepStrictEqual } from 'node:util';
import type { EntityManager } from 'typeorm';
import { orConflict } from '../conflict';
import { accountOf, type Ctx } from '../ctx';
import { plain } from '../repeat';
import { castTimeFault } from './cast-time';
import { castView } from './cast-view';
import { visitToKeep, type VisitFound } from './find-visit';
import { castsOf, reduceVisitAgain } from './reduce-again';
import { reduceAt } from './reduce-visit';
import { isReducedWith, visitSite } from './visit-site';

/**
 * Keeps one cast exactly as it was observed and answers with its reduction. A cast that can't be reduced is kept
 * all the same and says why. Sent again it is answered as kept.
 */
export async function keepCast(ctx: Ctx, visitId: string, input: KeepCast): Promise<CastView> {
  const { tx, actor, now } = ctx;
  const found = await visitToKeep(ctx, visitId);
  const known = await tx.findOneBy(SurveyCast, { id: input.id });
  if (known) return castView(await sameCast(tx, { known, visitId }, input));
  refuseAfterClosing(found.visit, new Date(input.observedAt));
  refuseWrongTime(ctx, found, input);
  const site = await visitSite(tx, found);
  if (!site.pegs.has(input.pegId))
    throw new Problem('invalid', 'That peg is not on this lake', {
      errors: [{ pointer: '/pegId', detail: 'Choose one of the pegs of this lake.' }],
    });
  const observed = { ...input, observedAt: new Date(input.observedAt) };
  const stops = (await castsOf(tx, visitId)).filter(
    ({ pegId, observation }) => pegId === input.pegId && observation.drag === 'solid_stop',
  );
  const seen = stops.map((each) => each.observation);
  const cast = tx.create(SurveyCast, {
    ...observed,
    visitId,
    importId: null,
    seq: await nextSeq(tx, visitId),
    receivedAt: now,
    keptBy: accountOf(actor),
    undoneAt: null,
    reduced: reduceAt(site, observed, seen),
  });
  await orConflict(
    tx.insert(SurveyCast, cast),
    'survey_cast_pkey',
    'A cast with this id was kept at another visit',
  );
  const bearsOnOthers = input.observation.drag === 'solid_stop' && stops.length > 0;
  if (bearsOnOthers || !isReducedWith(site)) await reduceVisitAgain(tx, found);
  return castView(cast);
}

/** The next number of a visit's casts; the visit's row is held, so that no two get the same. */
export async function nextSeq(tx: EntityManager, visitId: string): Promise<number> {
  const [last] = await tx.query<{ seq: number }[]>(
    'SELECT coalesce(max(seq), 0)::int AS seq FROM survey_cast WHERE visit_id = $1',
    [visitId],
  );
  return (last?.seq ?? 0) + 1;
}

/** A cast typed before the visit was closed may still arrive from a phone that had no signal. */
export function refuseAfterClosing({ endedAt }: VisitFound['visit'], observedAt: Date): void {
  if (endedAt === null || observedAt.getTime() <= endedAt.getTime()) return;
  throw new Problem('conflict', 'This visit is closed', {
    detail: 'The cast was made after the visit ended. Open another visit for it.',
  });
}

function refuseWrongTime({ now }: Ctx, { visit }: VisitFound, { observedAt }: KeepCast): void {
  const fault = castTimeFault(visit, new Date(observedAt), now);
  if (fault)
    throw new Problem('invalid', 'This cast can’t have been made then', {
      detail: 'Put the time right and keep it again.',
      errors: [{ pointer: '/observedAt', detail: fault }],
    });
}

async function sameCast(
  tx: EntityManager,
  { known, visitId }: { known: SurveyCast; visitId: string },
  sent: KeepCast,
): Promise<SurveyCast> {
  if (known.visitId !== visitId) await refuseOtherLake(tx, known.visitId, visitId);
  const asKept = {
    pegId: known.pegId,
    lineId: known.lineId,
    at: known.observedAt.getTime(),
    seen: known.observation,
  };
  const asSent = {
    pegId: sent.pegId,
    lineId: sent.lineId,
    at: Date.parse(sent.observedAt),
    seen: sent.observation,
  };
  if (known.visitId === visitId && known.undoneAt !== null)
    throw new Problem('conflict', 'This cast was taken back', {
      detail: 'Keep it again as a new cast if it counts.',
    });
  if (known.visitId === visitId && isDeepStrictEqual(plain(asKept), plain(asSent))) return known;
  throw new Problem('conflict', 'Another cast was kept under this id', {
    detail: 'A kept cast never changes. Take it back and keep a new one.',
  });
}

async function refuseOtherLake(tx: EntityManager, knownVisitId: string, visitId: string): Promise<void> {
  const known = await tx.findOneBy(SurveyVisit, { id: knownVisitId });
  const asked = await tx.findOneBy(SurveyVisit, { id: visitId });
  if (known?.lakeId !== asked?.lakeId) throw new Problem('not-found', 'There is no such cast at this visit');
}
