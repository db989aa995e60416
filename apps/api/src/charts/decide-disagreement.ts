import { Account } from '@mereward/db/entities/accounts/account';
import { Disagreement } from '@mereward/db/entities/charts/disagreement';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import type { DecideDisagreement } from '@mereward/shared/charts/disagreement';
import { reportEvidence, type ReportEvidence } from '@mereward/shared/charts/reported-evidence';
import { Problem } from '@mereward/shared/problems/problem';
import { civilDay, dayWords } from '@mereward/shared/time/civil-day';
import { isDeepStrictEqual } from 'node:util';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { findPeg } from '../lakes/found';
import { dayLevel } from './day-level';
import { DISAGREEMENT_DECIDERS, whyNotDecide } from './policy';

/** Accepts or declines what an angler told. The first decision stands; the published chart stays as it is. */
export async function decideDisagreement(
  ctx: Ctx,
  disagreementId: string,
  decision: DecideDisagreement,
): Promise<void> {
  const { tx, actor, now } = ctx;
  const row = await tx.findOne(Disagreement, {
    where: { id: disagreementId },
    lock: { mode: 'pessimistic_write' },
  });
  if (!row) throw notFound('report');
  const { lake } = await findPeg(tx, row.pegId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'report' }, DISAGREEMENT_DECIDERS);
  const decidedBy = accountOf(actor);
  const why = whyNotDecide(actor, { fisheryId: lake.fisheryId, reportedBy: row.reportedBy });
  if (why !== null)
    throw new Problem('forbidden', why, { detail: 'Ask another of the office or the bailiffs.' });
  if (row.status !== 'waiting') {
    if (row.decidedBy === decidedBy && isDeepStrictEqual(row.decision, decision)) return;
    const by = row.decidedBy && (await tx.findOneBy(Account, { id: row.decidedBy }))?.name;
    throw new Problem('conflict', `This was ${row.status} already${by ? `, by ${by}` : ''}`, {
      detail: 'The first decision stands. Yours was not saved.',
    });
  }
  const accepted = decision.decision === 'accept';
  await tx.update(
    Disagreement,
    { id: row.id },
    {
      status: accepted ? 'accepted' : 'declined',
      decidedBy,
      decidedAt: now,
      decision,
      evidence: accepted ? await evidenceOf(ctx, [row, lake], decision) : null,
    },
  );
}

async function evidenceOf(
  { tx, now }: Ctx,
  [row, lake]: readonly [Disagreement, Lake],
  { remeasured }: Extract<DecideDisagreement, { decision: 'accept' }>,
): Promise<ReportEvidence> {
  const day = remeasured?.day ?? row.day;
  const { zone } = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  const invalid = (pointer: string, title: string, detail: string): never => {
    throw new Problem('invalid', title, { detail, errors: [{ pointer, detail: title }] });
  };
  if (day < row.day || day > civilDay(now, zone))
    invalid(
      '/remeasured/day',
      `That day must lie between ${dayWords(row.day)} and today`,
      'Nothing was decided. Put the day right.',
    );
  const { bottom, snag, weed } = row.told.found;
  if (remeasured?.depthM === null && bottom === null && !snag && weed === null)
    invalid(
      '/remeasured/depthM',
      'Only a depth was reported: say what depth staff found',
      'Nothing was decided. Fill it in, or accept the report as it is.',
    );
  const { level, words } = await dayLevel(tx, lake, day);
  if (level === null && remeasured !== null && remeasured.depthM !== null)
    invalid('/remeasured/day', words, 'Record the gauge board’s reading of that day first, then accept.');
  return reportEvidence({ ...row.told, place: row.place, level, remeasured });
}
