import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { LeadCalibration } from '@mereward/db/entities/surveys/lead-calibration';
import { Problem } from '@mereward/shared/problems/problem';
import type { CalibrateLead, LeadList, LeadView } from '@mereward/shared/surveys/lead-contract';
import { calibrateLead, type LeadCalibration as Calibration } from '@mereward/shared/surveys/lead-fall';
import { civilDay } from '@mereward/shared/time/civil-day';
import { In } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, mustRepeat } from '../repeat';
import { refuseDay } from './confirmed-bottoms';
import { CAST_KEEPERS, CAST_READERS, mayKeepCasts } from './policy';

/** Keeps a lead's falls and the rate worked out of them. */
export async function keepLead(ctx: Ctx, fisheryId: string, input: CalibrateLead): Promise<LeadView> {
  const { tx, actor, now } = ctx;
  const { zone } = await fisheryOfLeads(ctx, fisheryId, 'keep');
  const known = await tx.findOneBy(LeadCalibration, { id: input.id });
  if (!known) {
    refuseDay(input.calibratedOn, civilDay(now, zone), '/calibratedOn');
    await insertOnce(tx, LeadCalibration, {
      ...input,
      fisheryId,
      calibration: calibrationOf(input),
      calibratedBy: accountOf(actor),
      receivedAt: now,
      putAwayAt: null,
    });
  }
  const kept = known ?? (await tx.findOneByOrFail(LeadCalibration, { id: input.id }));
  if (kept.fisheryId !== fisheryId) throw notFound('lead');
  const { name, leadG, leadShape, lineType, falls, calibratedOn, note } = kept;
  mustRepeat(
    { by: accountOf(actor), content: input },
    {
      by: kept.calibratedBy,
      content: { id: kept.id, name, leadG, leadShape, lineType, falls, calibratedOn, note },
    },
  );
  const [view] = await shape(ctx, [kept]);
  if (!view) throw notFound('lead');
  return view;
}

function calibrationOf({ falls }: CalibrateLead): Calibration {
  const answer = calibrateLead(falls);
  if (answer.ok) return answer.calibration;
  throw new Problem('invalid', answer.reason, {
    detail: answer.remedy,
    errors: [{ pointer: '/falls', detail: answer.reason }],
  });
}

/** A fishery's leads: those in use first, newest first. */
export async function listLeads(ctx: Ctx, fisheryId: string): Promise<LeadList> {
  await fisheryOfLeads(ctx, fisheryId, 'read');
  const rows = await ctx.tx.find(LeadCalibration, {
    where: { fisheryId },
    order: { putAwayAt: { direction: 'ASC', nulls: 'FIRST' }, receivedAt: 'DESC', id: 'ASC' },
    take: 500,
  });
  return { leads: await shape(ctx, rows), may: { calibrate: mayKeepCasts(ctx.actor, fisheryId) } };
}

/** Takes a lead out of the choice: lost, or counted anew. Visits that name it keep its rate. */
export async function putLeadAway(ctx: Ctx, leadId: string): Promise<void> {
  const { tx, actor, now } = ctx;
  accountOf(actor);
  const lead = await tx.findOneBy(LeadCalibration, { id: leadId });
  if (!lead) throw notFound('lead');
  allowOnly(actor, { fisheryId: lead.fisheryId, what: 'lead' }, CAST_KEEPERS);
  if (lead.putAwayAt === null) await tx.update(LeadCalibration, { id: leadId }, { putAwayAt: now });
}

async function fisheryOfLeads({ tx, actor }: Ctx, fisheryId: string, act: 'read' | 'keep'): Promise<Fishery> {
  accountOf(actor);
  const fishery = await tx.findOneBy(Fishery, { id: fisheryId });
  if (!fishery) throw notFound('fishery');
  allowOnly(actor, { fisheryId, what: 'fishery' }, act === 'read' ? CAST_READERS : CAST_KEEPERS);
  return fishery;
}

async function shape({ tx }: Ctx, rows: readonly LeadCalibration[]): Promise<LeadView[]> {
  const people = await tx.findBy(Account, { id: In(rows.map(({ calibratedBy }) => calibratedBy)) });
  const used = await tx.query<{ leadId: string; visitId: string; title: string; lakeName: string }[]>(
    `SELECT v.kit ->> 'leadId' AS "leadId", v.id AS "visitId", v.title, l.name AS "lakeName"
       FROM survey_visit v JOIN lake l ON l.id = v.lake_id
      WHERE v.kit ->> 'leadId' = ANY ($1) ORDER BY v.started_at DESC`,
    [rows.map(({ id }) => id)],
  );
  return rows.map((row) => ({
    id: row.id,
    name: row.name,
    leadG: row.leadG,
    leadShape: row.leadShape,
    lineType: row.lineType,
    falls: row.falls,
    calibration: row.calibration,
    calibratedOn: row.calibratedOn,
    note: row.note,
    by: people.find(({ id }) => id === row.calibratedBy)?.name ?? '',
    putAway: row.putAwayAt !== null,
    usedBy: used
      .filter(({ leadId }) => leadId === row.id)
      .map(({ visitId, title, lakeName }) => ({ visitId, title, lakeName })),
  }));
}
