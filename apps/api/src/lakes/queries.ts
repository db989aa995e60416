import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { GaugeBoard } from '@mereward/db/entities/lakes/gauge-board';
import type { Lake } from '@mereward/db/entities/lakes/lake';
import { Mark } from '@mereward/db/entities/lakes/mark';
import { Peg } from '@mereward/db/entities/lakes/peg';
import type {
  GaugeBoardView,
  LakeDetails,
  LakeView,
  LevelReadingView,
  MarkView,
  PegDetails,
  PegList,
  PegListItem,
  PegView,
} from '@mereward/shared/lakes/contract';
import { overheadDispute, placesFor, toldLine } from '@mereward/shared/lakes/lake-places';
import { toldPeg } from '@mereward/shared/lakes/told-peg';
import { facingDeg } from '@mereward/shared/lakes/peg-rules';
import type { EntityManager } from 'typeorm';
import type { Actor, Ctx } from '../ctx';
import { photosOf } from '../files/queries';
import { findLake, findPeg, originOfLake } from './found';
import { levelNow } from './levels';
import {
  isMember,
  isStaff,
  mayApproveCharts,
  mayBuildCharts,
  mayChangeLake,
  mayChangePegs,
  mayRecordLevel,
  maySurvey,
} from './policy';

const MOST_READINGS = 60;

/** A lake as this reader sees it: open to everybody, with what is the staff's own left out. */
export async function lakeView({ tx, actor }: Ctx, lakeId: string): Promise<LakeView> {
  const lake = await findLake(tx, lakeId);
  const staff = isStaff(actor, lake.fisheryId);
  const fishery = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  return {
    id: lake.id,
    fisheryId: lake.fisheryId,
    fisheryName: fishery.name,
    zone: fishery.zone,
    details: lakeDetailsFor(actor, lake),
    origin: [lake.originLon, lake.originLat],
    areaM2: lake.areaM2,
    levelNow: await levelNow(tx, lakeId, lake.datumM),
    pegs: await pegsOf(tx, lake, staff),
    marks: await marksOf(tx, lakeId, staff),
    boards: await boardsOf(tx, lakeId, staff),
    publishedChart: await publishedChart(tx, lakeId),
    version: lake.version,
    may: mayAt(actor, lake),
  };
}

const mayAt = (actor: Actor, { fisheryId }: Lake): LakeView['may'] => ({
  change: mayChangeLake(actor, fisheryId),
  changePegs: mayChangePegs(actor, fisheryId),
  recordLevel: mayRecordLevel(actor, fisheryId),
  survey: maySurvey(actor, fisheryId),
  buildCharts: mayBuildCharts(actor, fisheryId),
  approveCharts: mayApproveCharts(actor, fisheryId),
});

/** The lake's details with only those places this reader is shown. */
export function lakeDetailsFor(actor: Actor, { fisheryId, details }: Lake): LakeDetails {
  if (!details.places) return details;
  const reader = { member: isMember(actor, fisheryId), staff: isStaff(actor, fisheryId) };
  return { ...details, places: placesFor(details.places, reader) };
}

/** A peg's details as this reader is told them, with what is drawn near it on the lake. */
export function toldDetails(actor: Actor, lake: Lake, details: PegDetails): PegDetails {
  const places = lakeDetailsFor(actor, lake).places ?? [];
  return pegDetailsFor(actor, lake.fisheryId, toldPeg(details, { places, origin: originOfLake(lake) }));
}

async function pegsOf(tx: EntityManager, lake: Lake, staff: boolean): Promise<PegListItem[]> {
  const drawn = { places: lake.details.places, origin: originOfLake(lake) };
  const pegs = await tx.find(Peg, {
    where: { lakeId: lake.id },
    order: { walkingOrder: 'ASC', number: 'ASC' },
  });
  return pegs.map(({ id, number, details }) => ({
    id,
    number,
    name: details.name,
    position: details.position,
    facingDeg: facingDeg(details),
    status: details.status,
    statusReason: details.statusReason,
    overheadFishing: toldLine(details, drawn).fishing,
    fromParkingM: details.access.fromParkingM,
    ...(staff ? { overheadDispute: overheadDispute(details, drawn) } : {}),
  }));
}

async function marksOf(tx: EntityManager, lakeId: string, staff: boolean): Promise<MarkView[]> {
  const marks = await tx.find(Mark, { where: { lakeId }, order: { code: 'ASC' } });
  const photos = await photosOf(tx, { kind: 'mark', ids: marks.map(({ id }) => id), staff });
  return marks.map(({ id, details, version }) => ({ id, details, photos: photos.get(id) ?? [], version }));
}

type ReadingRow = { id: string; boardId: string; at: Date; levelM: number; by: string; note: string };

async function boardsOf(tx: EntityManager, lakeId: string, staff: boolean): Promise<GaugeBoardView[]> {
  const boards = await tx.find(GaugeBoard, { where: { lakeId }, order: { code: 'ASC' } });
  const rows: ReadingRow[] = await tx.query(
    `SELECT r.id, b.id AS "boardId", r.at, r.level_m AS "levelM", a.name AS by, r.note
       FROM gauge_board b
      CROSS JOIN LATERAL (SELECT * FROM level_reading WHERE board_id = b.id
                           ORDER BY at DESC, received_at DESC LIMIT $2) r
       JOIN account a ON a.id = r.recorded_by
      WHERE b.lake_id = $1 ORDER BY r.at DESC, r.received_at DESC`,
    [lakeId, MOST_READINGS],
  );
  const view = ({ id, at, levelM, by, note }: ReadingRow): LevelReadingView => ({
    id,
    at: at.toISOString(),
    levelM,
    by: staff ? by : '',
    note: staff ? note : '',
  });
  return boards.map(({ id, details, version }) => ({
    id,
    details,
    readings: rows.filter(({ boardId }) => boardId === id).map(view),
    version,
  }));
}

async function publishedChart(tx: EntityManager, lakeId: string): Promise<LakeView['publishedChart']> {
  const rows: { id: string; version: string }[] = await tx.query(
    `SELECT id, version FROM chart WHERE lake_id = $1 AND status = 'published'`,
    [lakeId],
  );
  return rows[0] ?? null;
}

/** A peg as this reader sees it. */
export async function pegView(ctx: Ctx, pegId: string): Promise<PegView> {
  const { peg, lake } = await findPeg(ctx.tx, pegId);
  const photos = await photosFor(ctx, { lake, pegs: [peg] });
  return shapePeg(ctx.actor, { lake, peg, photos: photos.get(pegId) ?? [] });
}

/** Every peg of a lake as this reader sees it, in walking order. */
export async function pegViews(ctx: Ctx, lakeId: string): Promise<PegList> {
  const lake = await findLake(ctx.tx, lakeId);
  const pegs = await ctx.tx.find(Peg, {
    where: { lakeId },
    order: { walkingOrder: 'ASC', number: 'ASC' },
  });
  const photos = await photosFor(ctx, { lake, pegs });
  return {
    pegs: pegs.map((peg) => shapePeg(ctx.actor, { lake, peg, photos: photos.get(peg.id) ?? [] })),
  };
}

const photosFor = ({ tx, actor }: Ctx, { lake, pegs }: { lake: Lake; pegs: readonly Peg[] }) =>
  photosOf(tx, { kind: 'peg', ids: pegs.map(({ id }) => id), staff: isStaff(actor, lake.fisheryId) });

type PegFound = { lake: Lake; peg: Peg; photos: PegView['photos'] };

function shapePeg(actor: Actor, { lake, peg, photos }: PegFound): PegView {
  const change = mayChangePegs(actor, lake.fisheryId);
  return {
    id: peg.id,
    lakeId: peg.lakeId,
    details: pegDetailsFor(actor, lake.fisheryId, peg.details),
    photos,
    version: peg.version,
    may: { change, addPhotos: change },
  };
}

/** The peg's details with the notes this reader may not see emptied. */
export function pegDetailsFor(actor: Actor, fisheryId: string, details: PegDetails): PegDetails {
  return {
    ...details,
    notesMembers: isMember(actor, fisheryId) ? details.notesMembers : '',
    notesStaff: isStaff(actor, fisheryId) ? details.notesStaff : '',
  };
}
