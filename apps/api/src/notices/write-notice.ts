import { Notice } from '@mereward/db/entities/notices/notice';
import type { NoticeDetails, NoticeView, WriteNotice } from '@mereward/shared/notices/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { IsNull, type EntityManager } from 'typeorm';
import { accountOf, holdsAny, type Actor, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, mustRepeat, staleVersion } from '../repeat';
import { NOTICE_WRITERS } from './policy';

const rangeOf = ({ from, until }: Pick<WriteNotice, 'from' | 'until'>): string =>
  `[${new Date(from).toISOString()},${until === null ? '' : new Date(until).toISOString()})`;

/** A range as PostgreSQL writes it, `["2027-07-01 09:00:00+00",)`, as instants. */
export function timesOf(during: string): { from: string; until: string | null } {
  const [from = '', until = ''] = during.slice(1, -1).replace(/"/g, '').split(',');
  return {
    from: new Date(from).toISOString(),
    until: until === '' ? null : new Date(until).toISOString(),
  };
}

export const noticeView = (row: Notice, actor: Actor): NoticeView => ({
  id: row.id,
  lakeIds: row.lakeIds,
  severity: row.severity,
  ...timesOf(row.during),
  details: row.details,
  writtenAt: row.writtenAt.toISOString(),
  version: row.version,
  may: { change: row.closureId === null && holdsAny(actor, row.fisheryId, NOTICE_WRITERS) },
});

/** Puts a notice up; the same id and content again is no fault. */
export async function writeNotice(ctx: Ctx, fisheryId: string, input: WriteNotice): Promise<void> {
  const { tx, actor, now } = ctx;
  await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, NOTICE_WRITERS);
  await refuseNotice(tx, fisheryId, input);
  const writtenBy = accountOf(actor);
  const { id, lakeIds, severity, details } = input;
  const row = { id, fisheryId, lakeIds, severity, details, during: rangeOf(input), closureId: null };
  if (await insertOnce(tx, Notice, { ...row, writtenBy, writtenAt: now, takenDownAt: null, version: 1 }))
    return;
  const kept = await tx.findOneByOrFail(Notice, { id });
  if (kept.fisheryId !== fisheryId) throw notFound('notice');
  const content = { lakeIds, severity, details };
  mustRepeat(
    { by: writtenBy, content },
    {
      by: kept.writtenBy,
      content: { lakeIds: kept.lakeIds, severity: kept.severity, details: kept.details },
    },
  );
}

/** Changes a notice; the version tells which one the writer had before them. */
export async function changeNotice(
  ctx: Ctx,
  noticeId: string,
  { version, ...input }: WriteNotice & { version: number },
): Promise<void> {
  const { tx } = ctx;
  const notice = await noticeToChange(ctx, noticeId);
  await refuseNotice(tx, notice.fisheryId, input);
  const { lakeIds, severity, details } = input;
  const changed = await tx.update(
    Notice,
    { id: noticeId, version, takenDownAt: IsNull() },
    { lakeIds, severity, details, during: rangeOf(input), version: version + 1 },
  );
  if (changed.affected !== 1) throw staleVersion();
}

/** Takes a notice down; it stays on record. */
export async function takeDown(ctx: Ctx, noticeId: string): Promise<void> {
  await noticeToChange(ctx, noticeId);
  await ctx.tx.update(Notice, { id: noticeId, takenDownAt: IsNull() }, { takenDownAt: ctx.now });
}

async function noticeToChange({ tx, actor }: Ctx, noticeId: string): Promise<Notice> {
  accountOf(actor);
  const notice = await tx.findOneBy(Notice, { id: noticeId });
  if (!notice) throw notFound('notice');
  allowOnly(actor, { fisheryId: notice.fisheryId, what: 'notice' }, NOTICE_WRITERS);
  if (notice.closureId !== null)
    throw new Problem('conflict', 'This notice belongs to a closure', {
      detail: 'It goes when the closure is lifted.',
    });
  return notice;
}

async function refuseNotice(tx: EntityManager, fisheryId: string, input: WriteNotice): Promise<void> {
  if (input.until !== null && Date.parse(input.until) <= Date.parse(input.from))
    throw new Problem('invalid', 'The notice ends before it begins', {
      detail: 'Nothing was saved. Put the end right.',
      errors: [{ pointer: '/until', detail: 'It ends before it begins.' }],
    });
  const rows: { id: string }[] = await tx.query(
    'SELECT id FROM lake WHERE fishery_id = $1 AND id = ANY ($2)',
    [fisheryId, input.lakeIds],
  );
  if (rows.length !== new Set(input.lakeIds).size) throw notFound('lake');
}

type ClosedNotice = {
  closureId: string;
  fisheryId: string;
  lakeIds: string[];
  from: string;
  until: string | null;
  details: NoticeDetails;
};

/** The notice of a closure, once for each; it is no more to be changed by hand. */
export async function noticeOfClosure({ tx, actor, now }: Ctx, closed: ClosedNotice): Promise<void> {
  const { closureId, fisheryId, lakeIds, details } = closed;
  await insertOnce(tx, Notice, {
    id: closureId, // one for each closure
    fisheryId,
    lakeIds,
    severity: 'closed',
    during: rangeOf(closed),
    closureId,
    details,
    writtenBy: accountOf(actor),
    writtenAt: now,
    takenDownAt: null,
    version: 1,
  });
}

/** Takes the notice of a lifted closure down. */
export async function closureNoticeDown({ tx, now }: Ctx, closureId: string): Promise<void> {
  await tx.update(Notice, { closureId, takenDownAt: IsNull() }, { takenDownAt: now });
}
