import { Account } from '@mereward/db/entities/accounts/account';
import { ChartLeftOut } from '@mereward/db/entities/charts/chart-left-out';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { SoundingImport } from '@mereward/db/entities/surveys/sounding-import';
import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import type { LeftOutView, LeftOutWhat } from '@mereward/shared/charts/left-out-contract';
import { In, type EntityManager } from 'typeorm';
import { whatOf } from './source-left-out';

/** What is left out of a chart, newest first, and behind it what was put back. */
export async function leftOutViews(tx: EntityManager, chartId: string): Promise<LeftOutView[]> {
  const rows = await tx.find(ChartLeftOut, { where: { chartId }, order: { leftOutAt: 'DESC', id: 'ASC' } });
  if (rows.length === 0) return [];
  const ids = rows.flatMap(({ leftOutBy, putBackBy }) => (putBackBy ? [leftOutBy, putBackBy] : [leftOutBy]));
  const people = await tx.findBy(Account, { id: In([...new Set(ids)]) });
  const nameOf = (id: string): string => people.find((person) => person.id === id)?.name ?? '';
  const labelOf = await labels(tx, rows);
  const views = rows.map((row) => ({
    id: row.id,
    what: whatOf(row),
    label: labelOf(whatOf(row)),
    reason: row.reason,
    by: nameOf(row.leftOutBy),
    at: row.leftOutAt.toISOString(),
    putBack:
      row.putBackBy && row.putBackAt ? { by: nameOf(row.putBackBy), at: row.putBackAt.toISOString() } : null,
  }));
  return [...views.filter(({ putBack }) => !putBack), ...views.filter(({ putBack }) => putBack)];
}

/** "Cast 12, peg FO7", "boat.log: soundings 120 to 140", "boat.log: a cell of 1 m". */
async function labels(
  tx: EntityManager,
  rows: readonly ChartLeftOut[],
): Promise<(what: LeftOutWhat) => string> {
  const casts = await tx.find(SurveyCast, {
    where: { id: In(rows.flatMap(({ castId }) => castId ?? [])) },
    select: { id: true, seq: true, pegId: true },
  });
  const pegs = await tx.find(Peg, {
    where: { id: In(casts.map(({ pegId }) => pegId)) },
    select: { id: true, number: true },
  });
  const logs = await tx.find(SoundingImport, {
    where: { id: In(rows.flatMap(({ logId }) => logId ?? [])) },
    select: { id: true, filenames: true },
  });
  const file = (logId: string): string =>
    logs.find(({ id }) => id === logId)?.filenames.join(', ') ?? 'A log';
  return (what) => {
    if (what.kind === 'cell') return `${file(what.logId)}: a cell of ${Number(what.sideM.toFixed(2))} m`;
    if (what.kind === 'run')
      return what.fromSeq === what.toSeq
        ? `${file(what.logId)}: sounding ${what.fromSeq}`
        : `${file(what.logId)}: soundings ${what.fromSeq} to ${what.toSeq}`;
    const cast = casts.find(({ id }) => id === what.castId);
    const peg = pegs.find(({ id }) => id === cast?.pegId)?.number;
    return `Cast ${cast?.seq ?? '?'}, ${peg === undefined ? 'a peg that is gone' : `peg ${peg}`}`;
  };
}
