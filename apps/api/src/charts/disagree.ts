import { Disagreement } from '@mereward/db/entities/charts/disagreement';
import { Spot } from '@mereward/db/entities/charts/spot';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Mark } from '@mereward/db/entities/lakes/mark';
import type { Peg } from '@mereward/db/entities/lakes/peg';
import type { Disagree, FoundAt } from '@mereward/shared/charts/disagreement';
import {
  countedPlace,
  REPORT_SIGMA,
  roundPlace,
  type ReportedPlace,
} from '@mereward/shared/charts/reported-evidence';
import { countWords, stickWords } from '@mereward/shared/charts/spot-words';
import { Problem } from '@mereward/shared/problems/problem';
import type { Refusal } from '@mereward/shared/surveys/cast-site';
import { civilDay, dayWords } from '@mereward/shared/time/civil-day';
import type { EntityManager } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { findPeg } from '../lakes/found';
import { isMember } from '../lakes/policy';
import { runningTicket } from '../lakes/running-ticket';
import { insertOnce, mustRepeat } from '../repeat';
import { siteOf } from './asked-site';
import { sightOf } from './layers';

/** Somebody who means well tells of a few places a day; past this it is a slip or a nuisance. */
const MOST_A_DAY = 20;
const OLDEST_DAYS = 60;
const DAY_MS = 86_400_000;

type Place = Disagreement['place'];
type Ground = { peg: Peg; lake: Lake };

/** Keeps what an angler found at a peg that the chart tells otherwise. It waits for a person and alters no chart. */
export async function disagree(ctx: Ctx, pegId: string, told: Disagree): Promise<void> {
  const { tx, actor, now } = ctx;
  const reportedBy = accountOf(actor);
  const ground = await findPeg(tx, pegId);
  if (await isKept(tx, { pegId, reportedBy }, told)) return;
  await refuseDay(ctx, ground, told.day);
  await refuseOutsiders(ctx, ground, told.day);
  await refuseTooMany(ctx, reportedBy);
  const place = await placeOf(ctx, ground, told);
  const chart: { id: string }[] = await tx.query(
    `SELECT id FROM chart WHERE lake_id = $1 AND status = 'published'`,
    [ground.lake.id],
  );
  const row = {
    id: told.id,
    pegId,
    chartId: chart[0]?.id ?? null,
    reportedBy,
    reportedAt: now,
    day: told.day,
    told,
    place,
    status: 'waiting' as const,
  };
  if (await insertOnce(tx, Disagreement, row)) return;
  if (!(await isKept(tx, { pegId, reportedBy }, told))) throw notFound('peg');
}

async function isKept(
  tx: EntityManager,
  { pegId, reportedBy }: { pegId: string; reportedBy: string },
  told: Disagree,
): Promise<boolean> {
  const kept = await tx.findOneBy(Disagreement, { id: told.id });
  if (!kept) return false;
  if (kept.pegId !== pegId || kept.reportedBy !== reportedBy) throw notFound('report');
  mustRepeat({ by: reportedBy, content: told }, { by: kept.reportedBy, content: kept.told });
  return true;
}

function refuse(pointer: string, title: string, detail: string): never {
  throw new Problem('invalid', title, {
    detail: 'Nothing was sent. Put it right and send it again.',
    errors: [{ pointer, detail }],
  });
}

async function refuseDay({ tx, now }: Ctx, { lake }: Ground, day: string): Promise<void> {
  const { zone } = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  if (day > civilDay(now, zone)) refuse('/day', 'That day lies in the future', 'Later than today.');
  if (day < civilDay(new Date(now.getTime() - OLDEST_DAYS * DAY_MS), zone))
    refuse('/day', `That was over ${OLDEST_DAYS} days ago`, `At most ${OLDEST_DAYS} days back: beds change.`);
}

/** Members and staff tell of any peg; anybody else of the peg and the day their ticket covered. */
async function refuseOutsiders(ctx: Ctx, { peg, lake }: Ground, day: string): Promise<void> {
  const { tx, actor, now } = ctx;
  if (isMember(actor, lake.fisheryId)) return;
  const { zone } = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  const rows: unknown[] = await tx.query(
    `SELECT 1 FROM booking b JOIN peg_time t ON t.booking_id = b.id
      WHERE b.account_id = $1 AND t.peg_id = $2 AND b.status IN ('confirmed', 'checked_in', 'completed')
        AND lower(b.during) <= $5 AND b.during && tstzrange(($3::date)::timestamp AT TIME ZONE $4, ($3::date + 1)::timestamp AT TIME ZONE $4)
      LIMIT 1`,
    [accountOf(actor), peg.id, day, zone, now],
  );
  if (rows.length > 0) return;
  throw new Problem('forbidden', `You had no ticket for peg ${peg.number} on ${dayWords(day)}`, {
    detail:
      'What was found there is told by those who fished it, by members and by staff. Choose the day of your ticket.',
  });
}

async function refuseTooMany({ tx, now }: Ctx, reportedBy: string): Promise<void> {
  const rows: { count: number }[] = await tx.query(
    'SELECT count(*)::int AS count FROM disagreement WHERE reported_by = $1 AND reported_at > $2',
    [reportedBy, new Date(now.getTime() - DAY_MS)],
  );
  if ((rows[0]?.count ?? 0) < MOST_A_DAY) return;
  throw new Problem('too-many', `You have told of ${MOST_A_DAY} places within a day`, {
    detail: 'They are kept and will be read. Tell of this one tomorrow.',
  });
}

async function placeOf(ctx: Ctx, ground: Ground, { at, found }: Disagree): Promise<Place> {
  const { placed, words } = await located(ctx, ground, { at, depthM: found.depthM });
  if (!placed.ok) refuse('/at', placed.reason, placed.remedy);
  const { position, xM, yM, ellipse } = placed;
  return { position, xM, yM, ellipse, words };
}

type Located = { placed: ReportedPlace | Refusal; words: string };

async function located(
  ctx: Ctx,
  ground: Ground,
  { at, depthM }: { at: FoundAt; depthM: number | null },
): Promise<Located> {
  const { tx } = ctx;
  switch (at.by) {
    case 'spot': {
      const spot = await seenSpot(ctx, ground, at.spotId);
      const { name, position, usableRadiusM } = spot.details;
      const sigmaM = Math.max(REPORT_SIGMA.spotM, usableRadiusM / 2);
      return { placed: roundPlace(siteOf(ground, null), position, sigmaM), words: `at the spot “${name}”` };
    }
    case 'place':
      return {
        placed: roundPlace(siteOf(ground, null), at.position, REPORT_SIGMA.touchedPlaceM),
        words: 'at a place touched on the chart',
      };
    case 'count': {
      const mark = await tx.findOneBy(Mark, { id: at.markId, lakeId: ground.lake.id });
      if (!mark) refuse('/at/markId', 'That is no far-bank mark of this lake', 'Choose one of this lake’s.');
      const count = `${countWords(at.wrapsWhole, at.remainderM)} (${stickWords(at.stickSpacingM)})`;
      const side = at.offsetDeg < 0 ? 'left' : 'right';
      const off = at.offsetDeg === 0 ? 'over' : `${Math.abs(at.offsetDeg)}° ${side} of`;
      return {
        placed: countedPlace(siteOf(ground, mark), at, depthM),
        words: `${count} ${off} ${mark.details.name}`,
      };
    }
  }
}

/** A spot of the peg that this reader is shown; to anybody else it isn't there. */
async function seenSpot(ctx: Ctx, { peg, lake }: Ground, spotId: string): Promise<Spot> {
  const spot = await ctx.tx.findOneBy(Spot, { id: spotId, pegId: peg.id });
  const sight = sightOf(ctx, lake, (await runningTicket(ctx, peg.id)) !== null);
  if (!spot || !sight.sees.spots)
    refuse('/at/spotId', 'There is no such spot at this peg', 'Tell the place by wraps and mark instead.');
  return spot;
}
