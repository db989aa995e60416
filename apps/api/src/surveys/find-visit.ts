import { Lake } from '@mereward/db/entities/lakes/lake';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { CAST_KEEPERS, CAST_READERS } from './policy';

export type VisitFound = { visit: SurveyVisit; lake: Lake };

type Act = 'read' | 'keep';

/** A lake whose casts this actor may read or keep; a lake of a fishery they have no part in is not there. */
export async function lakeFor({ tx, actor }: Ctx, lakeId: string, act: Act): Promise<Lake> {
  accountOf(actor);
  const lake = await tx.findOneBy(Lake, { id: lakeId });
  if (!lake) throw notFound('lake');
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'lake' }, act === 'read' ? CAST_READERS : CAST_KEEPERS);
  return lake;
}

/** A visit to read. */
export async function visitToRead(ctx: Ctx, visitId: string): Promise<VisitFound> {
  accountOf(ctx.actor);
  return found(ctx, await ctx.tx.findOneBy(SurveyVisit, { id: visitId }), 'read');
}

/** A visit to change, held until the deed is done so that two deeds on it wait for one another. */
export async function visitToKeep(ctx: Ctx, visitId: string): Promise<VisitFound> {
  accountOf(ctx.actor);
  const lock = { mode: 'pessimistic_write' } as const;
  return found(ctx, await ctx.tx.findOne(SurveyVisit, { where: { id: visitId }, lock }), 'keep');
}

async function found({ tx, actor }: Ctx, visit: SurveyVisit | null, act: Act): Promise<VisitFound> {
  const lake = visit && (await tx.findOneBy(Lake, { id: visit.lakeId }));
  if (!visit || !lake) throw notFound('survey visit');
  const at = { fisheryId: lake.fisheryId, what: 'survey visit' };
  allowOnly(actor, at, act === 'read' ? CAST_READERS : CAST_KEEPERS);
  return { visit, lake };
}
