import { Account } from '@mereward/db/entities/accounts/account';
import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import type { LogList, LogView } from '@mereward/shared/surveys/log-contract';
import { In, IsNull, type EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { logToRead, type LogFound } from './find-log';
import { visitToRead } from './find-visit';
import { mayKeepCasts } from './policy';

/** One log as it stands. */
export async function readLogView(ctx: Ctx, logId: string): Promise<LogView> {
  return logView(ctx, await logToRead(ctx, logId));
}

export async function logView({ tx, actor }: Ctx, { log, lake }: LogFound): Promise<LogView> {
  const names = await namesOf(tx, [log]);
  return shapeLog(log, names, mayKeepCasts(actor, lake.fisheryId));
}

/** The logs of a visit, newest first. */
export async function listLogs(ctx: Ctx, visitId: string): Promise<LogList> {
  const { lake } = await visitToRead(ctx, visitId);
  const logs = await ctx.tx.find(SoundingImport, {
    where: { visitId, undoneAt: IsNull() },
    order: { importedAt: 'DESC', id: 'ASC' },
  });
  const names = await namesOf(ctx.tx, logs);
  const may = mayKeepCasts(ctx.actor, lake.fisheryId);
  return {
    logs: logs.map((log) => {
      const { preview, report, ...rest } = shapeLog(log, names, may);
      void preview;
      return { ...rest, kept: report?.kept ?? null };
    }),
    may: { bring: may },
  };
}

async function namesOf(tx: EntityManager, logs: readonly SoundingImport[]): Promise<Map<string, string>> {
  const people = await tx.findBy(Account, { id: In(logs.map((log) => log.importedBy)) });
  return new Map(people.map(({ id, name }) => [id, name]));
}

function shapeLog(log: SoundingImport, names: ReadonlyMap<string, string>, may: boolean): LogView {
  const busy = log.state === 'queued' || log.state === 'running';
  return {
    id: log.id,
    visitId: log.visitId,
    filenames: log.filenames,
    state: log.state,
    goal: log.goal,
    step: log.step,
    share: log.share,
    error: log.error,
    options: log.options,
    preview: busy ? null : log.preview, // asked for every second meanwhile, and of no use
    report: log.report,
    importedBy: names.get(log.importedBy) ?? '',
    importedAt: log.importedAt.toISOString(),
    may: { change: may && !busy && log.state !== 'done', undo: may && !busy, cancel: may && busy },
  };
}
