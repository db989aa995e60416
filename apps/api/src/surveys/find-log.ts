import { Lake } from '@mereward/db/entities/lakes/lake';
import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { IsNull } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import type { VisitFound } from './find-visit';
import { CAST_KEEPERS, CAST_READERS } from './policy';

export type LogFound = VisitFound & { log: SoundingImport };

/** A log to read: it, its visit and its lake. One that was taken back is not there. */
export function logToRead(ctx: Ctx, logId: string): Promise<LogFound> {
  return found(ctx, logId, { roles: CAST_READERS, hold: false });
}

/** A log to change, held until the deed is done. */
export function logToChange(ctx: Ctx, logId: string): Promise<LogFound> {
  return found(ctx, logId, { roles: CAST_KEEPERS, hold: true });
}

type Wish = { roles: typeof CAST_READERS; hold: boolean };

async function found({ tx, actor }: Ctx, logId: string, { roles, hold }: Wish): Promise<LogFound> {
  accountOf(actor);
  const log = await tx.findOne(SoundingImport, {
    where: { id: logId, undoneAt: IsNull() },
    ...(hold ? { lock: { mode: 'pessimistic_write' } } : {}),
  });
  const visit = log && (await tx.findOneBy(SurveyVisit, { id: log.visitId }));
  const lake = visit && (await tx.findOneBy(Lake, { id: visit.lakeId }));
  if (!log || !visit || !lake) throw notFound('log');
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'log' }, roles);
  return { log, visit, lake };
}
