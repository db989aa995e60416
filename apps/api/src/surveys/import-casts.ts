import { CastImport } from '@mereward/db/entities/surveys/cast-import';
import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { Problem } from '@mereward/shared/problems/problem';
import { castWords } from '@mereward/shared/surveys/cast-words';
import { readCasts, type CastRow, type CastsRead } from '@mereward/shared/surveys/casts-file';
import type { ImportCasts, ImportDone, ImportPreview } from '@mereward/shared/surveys/contract';
import { createHash, randomUUID } from 'node:crypto';
import { accountOf, type Ctx } from '../ctx';
import { castTimeFault } from './cast-time';
import { readCastsText, type CastsText } from './casts-table';
import { visitToKeep, type VisitFound } from './find-visit';
import { nextSeq, refuseAfterClosing } from './keep-cast';
import { reduceVisitAgain } from './reduce-again';
import type { VisitSite } from './reduce-visit';
import { visitSite } from './visit-site';

const SAMPLE_ROWS = 8;
const MOST_ERRORS = 1000;
const AT_ONCE = 500; // rows of one INSERT

/** Says how a file would be read, without keeping anything. */
export async function previewCasts(ctx: Ctx, visitId: string, input: ImportCasts): Promise<ImportPreview> {
  const found = await visitToKeep(ctx, visitId);
  const file = readCastsText(input.text);
  const site = await visitSite(ctx.tx, found);
  const read = readFor({ site, now: ctx.now }, file, input);
  const byRow = new Map(read.casts.map((cast) => [cast.row, cast]));
  return {
    heading: file.table.heading,
    mapping: read.mapping,
    delimiter: file.delimiter,
    rows: file.table.rows.length,
    sample: file.table.rows
      .slice(0, SAMPLE_ROWS)
      .map(({ row, cells }) => ({ row, cells, words: wordsOf(site, byRow.get(row)) })),
    errors: read.errors.slice(0, MOST_ERRORS),
    alreadyImported: await isImported(ctx, visitId, input.text),
  };
}

/** Takes a file's casts in, all of them or none. The same file again adds nothing. */
export async function importCasts(ctx: Ctx, visitId: string, input: ImportCasts): Promise<ImportDone> {
  const found = await visitToKeep(ctx, visitId); // holds the visit: the same file twice at once is taken once
  if (await isImported(ctx, visitId, input.text)) return { added: 0, alreadyImported: true };
  const site = await visitSite(ctx.tx, found);
  const { casts, errors } = readFor({ site, now: ctx.now }, readCastsText(input.text), input);
  if (errors.length > 0)
    throw new Problem(
      'invalid',
      `Nothing was imported: ${errors.length === 1 ? 'a row needs' : `${errors.length} faults need`} putting right`,
      {
        detail: 'Put the rows right in the file and bring it again, or choose the columns again.',
        errors: errors
          .slice(0, MOST_ERRORS)
          .map(({ row, column, detail }) => ({ pointer: `/rows/${row}/${column}`, detail })),
      },
    );
  await insertCasts(ctx, found, { casts, input });
  await reduceVisitAgain(ctx.tx, found);
  return { added: casts.length, alreadyImported: false };
}

function readFor(
  { site: { pegs, marks, visit }, now }: { site: VisitSite; now: Date },
  { table }: CastsText,
  { mapping }: ImportCasts,
): CastsRead {
  const read = readCasts(table, mapping, {
    pegs: [...pegs.values()],
    marks: [...marks.values()].map(({ id, code, details }) => ({ id, code, name: details.name })),
    kit: visit.kit,
    startedAt: visit.startedAt.toISOString(),
  });
  const { endedAt } = visit;
  const errors = read.casts.flatMap(({ row, observedAt }) => {
    const at = new Date(observedAt);
    const late = endedAt !== null && at.getTime() > endedAt.getTime();
    const detail = late ? 'This cast was made after the visit was closed.' : castTimeFault(visit, at, now);
    return detail === null ? [] : [{ row, column: 'at_utc', value: observedAt, detail }];
  });
  return { ...read, errors: [...read.errors, ...errors] };
}

function wordsOf({ pegs, marks }: VisitSite, cast: CastRow | undefined): string {
  if (!cast) return '';
  const { aim } = cast.observation;
  const mark = aim.by === 'mark' ? (marks.get(aim.markId)?.details.name ?? null) : null;
  return castWords(cast.observation, { peg: pegs.get(cast.pegId)?.number ?? '', mark });
}

const hashOf = (text: string): Buffer =>
  createHash('sha256')
    .update(text.replace(/^\uFEFF/, ''))
    .digest();

async function isImported({ tx }: Ctx, visitId: string, text: string): Promise<boolean> {
  return tx.existsBy(CastImport, { visitId, sha256: hashOf(text) });
}

async function insertCasts(
  { tx, actor, now }: Ctx,
  { visit }: VisitFound,
  { casts, input }: { casts: readonly CastRow[]; input: ImportCasts },
): Promise<void> {
  const importId = randomUUID();
  const accountId = accountOf(actor);
  const first = await nextSeq(tx, visit.id);
  await tx.insert(CastImport, {
    id: importId,
    visitId: visit.id,
    filename: input.filename,
    sha256: hashOf(input.text),
    rows: casts.length,
    importedBy: accountId,
    importedAt: now,
  });
  const rows = casts.map(({ pegId, observedAt, observation }, i) => {
    refuseAfterClosing(visit, new Date(observedAt));
    return {
      id: randomUUID(),
      visitId: visit.id,
      pegId,
      lineId: randomUUID(),
      importId,
      seq: first + i,
      observedAt: new Date(observedAt),
      receivedAt: now,
      keptBy: accountId,
      observation,
      undoneAt: null,
      reduced: { ok: false as const, reason: 'Not reduced yet', remedy: 'Look again in a moment', steps: [] },
    };
  });
  for (let i = 0; i < rows.length; i += AT_ONCE)
    await tx
      .createQueryBuilder()
      .insert()
      .into(SurveyCast)
      .values(rows.slice(i, i + AT_ONCE))
      .updateEntity(false)
      .execute();
}
