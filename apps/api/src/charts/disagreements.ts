import { Account } from '@mereward/db/entities/accounts/account';
import { Disagreement } from '@mereward/db/entities/charts/disagreement';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Peg } from '@mereward/db/entities/lakes/peg';
import { readChart, type ChartReading } from '@mereward/shared/charts/chart-reading';
import type {
  DisagreementForReview,
  DisagreementList,
  DisagreementReviewList,
  DisagreementView,
  DoubtedSounding,
} from '@mereward/shared/charts/disagreement';
import { BOTTOM_GLYPHS } from '@mereward/shared/charts/drawing/bottom-glyphs';
import { foundAtDatum, gradeOfReport, sigmasApart } from '@mereward/shared/charts/reported-evidence';
import { distanceBetweenM } from '@mereward/shared/geometry/point';
import { In, type EntityManager } from 'typeorm';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { findLake, findPeg } from '../lakes/found';
import { chartContent, layersOf } from './chart-layers';
import { dayLevel } from './day-level';
import { DISAGREEMENT_DECIDERS, whyNotDecide } from './policy';

const MOST_LISTED = 200;

type ChartOf = { id: string; version: string | null; title: string; status: string; reportId: string };

/** Charts that were built with a report. */
async function chartsWith(tx: EntityManager, ids: readonly string[]): Promise<ChartOf[]> {
  if (ids.length === 0) return [];
  return tx.query(
    `SELECT c.id, c.version, c.title, c.status, r.report ->> 'id' AS "reportId"
       FROM chart c
       JOIN peg p ON p.lake_id = c.lake_id
       JOIN disagreement d ON d.peg_id = p.id AND d.id = ANY ($1)
      CROSS JOIN LATERAL jsonb_array_elements(COALESCE(c.built -> 'reports', '[]')) AS r (report)
      WHERE r.report ->> 'id' = d.id::text
      ORDER BY c.drafted_at, c.id`,
    [ids],
  );
}

type Named = { peg: Peg; lake: Lake };

function view(row: Disagreement, { peg, lake }: Named, charts: readonly ChartOf[]): DisagreementView {
  return {
    id: row.id,
    pegId: row.pegId,
    pegNumber: peg.number,
    lakeId: lake.id,
    lakeName: lake.name,
    day: row.day,
    reportedAt: row.reportedAt.toISOString(),
    placeWords: row.place.words,
    found: row.told.found,
    status: row.status,
    decidedAt: row.decidedAt?.toISOString() ?? null,
    reason: row.decision?.reason ?? '',
    grade: row.evidence?.grade ?? null,
    takenBack: row.takenBackAt && { at: row.takenBackAt.toISOString(), reason: row.takenBackReason ?? '' },
    charts: charts
      .filter(({ reportId }) => reportId === row.id)
      .map(({ id, version, title }) => ({ id, version, title })),
  };
}

/** What the reader told of, newest first, and what became of it. */
export async function myDisagreements({ tx, actor }: Ctx): Promise<DisagreementList> {
  const rows = await tx.find(Disagreement, {
    where: { reportedBy: accountOf(actor) },
    order: { reportedAt: 'DESC', id: 'ASC' },
    take: MOST_LISTED,
  });
  const charts = (
    await chartsWith(
      tx,
      rows.map(({ id }) => id),
    )
  ).filter(({ status }) => status === 'published' || status === 'superseded');
  const pegs = await tx.findBy(Peg, { id: In([...new Set(rows.map(({ pegId }) => pegId))]) });
  const disagreements: DisagreementView[] = [];
  for (const row of rows) {
    const peg = pegs.find(({ id }) => id === row.pegId);
    if (peg) disagreements.push(view(row, { peg, lake: await findLake(tx, peg.lakeId) }, charts));
  }
  return { disagreements };
}

/** One's own report as it is kept. */
export async function myDisagreement(ctx: Ctx, id: string): Promise<DisagreementView> {
  const found = (await myDisagreements(ctx)).disagreements.find((each) => each.id === id);
  if (!found) throw notFound('report');
  return found;
}

/** What was told of a lake, each beside the soundings it doubts: those that wait first, oldest first. */
export async function disagreementsOfLake(ctx: Ctx, lakeId: string): Promise<DisagreementReviewList> {
  const { tx, actor } = ctx;
  const lake = await findLake(tx, lakeId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'lake' }, DISAGREEMENT_DECIDERS);
  const rows: { id: string }[] = await tx.query(
    `SELECT d.id FROM disagreement d JOIN peg p ON p.id = d.peg_id WHERE p.lake_id = $1
      ORDER BY d.status <> 'waiting', CASE WHEN d.status = 'waiting' THEN d.reported_at END, d.decided_at DESC, d.id
      LIMIT $2`,
    [lakeId, MOST_LISTED],
  );
  return {
    disagreements: await forReview(
      ctx,
      lake,
      rows.map(({ id }) => id),
    ),
  };
}

/** One report before those who decide it. */
export async function disagreementForReview(ctx: Ctx, id: string): Promise<DisagreementForReview> {
  const row = await ctx.tx.findOneBy(Disagreement, { id });
  if (!row) throw notFound('report');
  const { lake } = await findPeg(ctx.tx, row.pegId);
  allowOnly(ctx.actor, { fisheryId: lake.fisheryId, what: 'report' }, DISAGREEMENT_DECIDERS);
  const [found] = await forReview(ctx, lake, [id]);
  if (!found) throw notFound('report');
  return found;
}

async function forReview(ctx: Ctx, lake: Lake, ids: readonly string[]): Promise<DisagreementForReview[]> {
  const { tx } = ctx;
  const rows = await tx.findBy(Disagreement, { id: In([...ids]) });
  const charts = await chartsWith(tx, ids);
  const pegs = await tx.findBy(Peg, { lakeId: lake.id });
  const people = await tx.findBy(Account, {
    id: In([
      ...new Set(
        rows.flatMap(({ reportedBy, decidedBy, takenBackBy }) => [
          reportedBy,
          decidedBy ?? reportedBy,
          takenBackBy ?? reportedBy,
        ]),
      ),
    ]),
  });
  const published = await publishedOf(tx, lake.id);
  const nameOf = (id: string | null) => people.find((person) => person.id === id)?.name ?? null;
  const reviews: DisagreementForReview[] = [];
  for (const id of ids) {
    const row = rows.find((each) => each.id === id);
    const peg = row && pegs.find((each) => each.id === row.pegId);
    if (!row || !peg) continue;
    const whyNot = whyNotDecide(ctx.actor, { fisheryId: lake.fisheryId, reportedBy: row.reportedBy });
    reviews.push({
      ...view(row, { peg, lake }, charts),
      reporter: nameOf(row.reportedBy) ?? '',
      decidedBy: nameOf(row.decidedBy),
      takenBackBy: nameOf(row.takenBackBy),
      ...(await compared(tx, { row, lake, published, pegs })),
      may: {
        decide: row.status === 'waiting' && whyNot === null,
        takeBack: row.status === 'accepted' && whyNot === null,
        whyNot,
      },
    });
  }
  return reviews;
}

type Published = {
  id: string;
  version: string;
  datumM: number;
  content: NonNullable<Awaited<ReturnType<typeof chartContent>>>;
};

async function publishedOf(tx: EntityManager, lakeId: string): Promise<Published | null> {
  const rows: Omit<Published, 'content'>[] = await tx.query(
    `SELECT id, version, datum_m AS "datumM" FROM chart WHERE lake_id = $1 AND status = 'published'`,
    [lakeId],
  );
  const [row] = rows;
  const content = row && (await chartContent(tx, row.id));
  return row && content ? { ...row, content } : null;
}

type Compared = Pick<
  DisagreementForReview,
  | 'xM'
  | 'yM'
  | 'ellipse'
  | 'foundDepthM'
  | 'foundSigmaM'
  | 'levelWords'
  | 'chart'
  | 'apartM'
  | 'apartSigmas'
  | 'nearest'
  | 'gradeIfAccepted'
  | 'gradeWords'
>;

type Comparing = { row: Disagreement; lake: Lake; published: Published | null; pegs: readonly Peg[] };

/** The report held against the chart that is out now, at that chart's datum. */
async function compared(tx: EntityManager, { row, lake, published, pegs }: Comparing): Promise<Compared> {
  const { xM, yM, ellipse } = row.place;
  const datumM = published?.datumM ?? lake.datumM;
  const { level, words } = await dayLevel(tx, { id: lake.id, datumM }, row.day);
  const found = foundAtDatum(row.told.found, level);
  const reading = published && readChart(layersOf(published.content), { xM, yM });
  const charted =
    reading && reading.depthM !== null && reading.sigmaM !== null
      ? { depthM: reading.depthM, sigmaM: reading.sigmaM }
      : null;
  const { grade, words: gradeWords } = gradeOfReport(row.told, found !== null, false);
  const bottom = bottomWords(reading);
  return {
    xM,
    yM,
    ellipse,
    foundDepthM: found?.depthM ?? null,
    foundSigmaM: found?.sigmaM ?? null,
    levelWords: words,
    chart: published && {
      id: published.id,
      version: published.version,
      depthM: charted?.depthM ?? null,
      sigmaM: charted?.sigmaM ?? null,
      bottom: bottom?.words ?? null,
      bottomConfidence: bottom?.confidence ?? null,
    },
    apartM: found && charted ? found.depthM - charted.depthM : null,
    apartSigmas: found && charted ? sigmasApart(found, charted) : null,
    nearest: published ? nearestSoundings(published, { xM, yM }, pegs) : [],
    gradeIfAccepted: grade,
    gradeWords,
  };
}

function bottomWords(reading: ChartReading | null): { words: string; confidence: number } | null {
  if (!reading) return null;
  const { cover, substrate } = reading;
  if (cover && cover.bottom !== 'clear')
    return { words: BOTTOM_GLYPHS[cover.bottom].words, confidence: cover.confidence };
  return substrate && { words: BOTTOM_GLYPHS[substrate.bottom].words, confidence: substrate.confidence };
}

const MOST_NEAREST = 5;

function nearestSoundings(
  { content: { built } }: Published,
  place: { xM: number; yM: number },
  pegs: readonly Peg[],
): DoubtedSounding[] {
  return built.soundings
    .map((sounding) => ({ sounding, awayM: distanceBetweenM(sounding, place) }))
    .sort((a, b) => a.awayM - b.awayM || (a.sounding.id < b.sounding.id ? -1 : 1))
    .slice(0, MOST_NEAREST)
    .map(({ sounding: { id, pegId, seq, visitId, ...rest }, awayM }) => ({
      id,
      label: `${pegs.find((peg) => peg.id === pegId)?.number ?? 'peg gone'}, cast ${seq}`,
      awayM,
      depthM: rest.depthM,
      sigmaM: rest.sigmaM,
      bottom: rest.bottom,
      grade: rest.grade,
      observedOn: rest.observedOn,
      surveyor: built.visits.find((visit) => visit.id === visitId)?.surveyorName ?? '',
    }));
}
