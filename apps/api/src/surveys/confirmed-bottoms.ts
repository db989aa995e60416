import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { ConfirmedBottom } from '@mereward/db/entities/surveys/confirmed-bottom';
import { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import { toPlane } from '@mereward/shared/geometry/plane';
import { insideOutline } from '@mereward/shared/geometry/polygon';
import { Problem } from '@mereward/shared/problems/problem';
import { endedBy, eventWords, type BottomEnding } from '@mereward/shared/surveys/bottom-ending';
import type {
  ConfirmBottom,
  ConfirmedBottoms,
  ConfirmedBottomView,
} from '@mereward/shared/surveys/confirmed-contract';
import { civilDay } from '@mereward/shared/time/civil-day';
import { In, IsNull, type EntityManager } from 'typeorm';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { originOfLake } from '../lakes/found';
import { insertOnce, mustRepeat } from '../repeat';
import { endingsOf } from './endings';
import { lakeFor } from './find-visit';
import { CAST_KEEPERS, CONFIRMED_SETTLERS, mayKeepCasts } from './policy';

/** Keeps a bottom somebody made certain of, at a cast or at a place on the map. Sent twice, it is kept once. */
export async function confirmBottom(
  ctx: Ctx,
  lakeId: string,
  input: ConfirmBottom,
): Promise<ConfirmedBottomView> {
  const { tx, actor, now } = ctx;
  const lake = await lakeFor(ctx, lakeId, 'keep');
  const known = await tx.findOneBy(ConfirmedBottom, { id: input.id });
  if (!known) {
    await refuseFuture(ctx, lake, input);
    const place = input.castId === null ? typedPlace(lake, input) : await placeOfCast(tx, lake, input.castId);
    const { castId, id, substrate, cover, method, day, note } = input;
    await insertOnce(tx, ConfirmedBottom, {
      id,
      castId,
      substrate,
      cover,
      method,
      day,
      note,
      ...place,
      lakeId,
      confirmedBy: accountOf(actor),
      receivedAt: now,
      takenBackAt: null,
    });
  }
  const kept = known ?? (await tx.findOneByOrFail(ConfirmedBottom, { id: input.id }));
  if (kept.lakeId !== lakeId) throw notFound('confirmed bottom');
  mustRepeat(
    { by: accountOf(actor), content: said(input) },
    { by: kept.confirmedBy, content: saidOf(kept, input) },
  );
  const [view] = await shape(ctx, lake, [kept]);
  if (!view) throw notFound('confirmed bottom');
  return view;
}

const said = ({ castId, position, substrate, cover, method, day, note }: ConfirmBottom): unknown => [
  castId,
  position,
  substrate,
  cover,
  method,
  day,
  note,
];

const saidOf = (kept: ConfirmedBottom, { position }: ConfirmBottom): unknown => [
  kept.castId,
  position === null ? null : [kept.lon, kept.lat],
  kept.substrate,
  kept.cover,
  kept.method,
  kept.day,
  kept.note,
];

/** The confirmed bottoms of a lake, newest first. */
export async function listConfirmed(ctx: Ctx, lakeId: string): Promise<ConfirmedBottoms> {
  const lake = await lakeFor(ctx, lakeId, 'read');
  const rows = await ctx.tx.find(ConfirmedBottom, {
    where: { lakeId, takenBackAt: IsNull() },
    order: { day: 'DESC', receivedAt: 'DESC', id: 'ASC' },
    take: 1000,
  });
  return {
    confirmed: await shape(ctx, lake, rows),
    may: { confirm: mayKeepCasts(ctx.actor, lake.fisheryId) },
  };
}

/** Takes back what was wrongly confirmed: one's own, or anybody's by the manager or the owner. It stays in the record. */
export async function takeBackConfirmed(ctx: Ctx, confirmedId: string): Promise<void> {
  const { tx, actor, now } = ctx;
  const by = accountOf(actor);
  const row = await tx.findOneBy(ConfirmedBottom, { id: confirmedId });
  const lake = row && (await tx.findOneBy(Lake, { id: row.lakeId }));
  if (!row || !lake) throw notFound('confirmed bottom');
  const at = { fisheryId: lake.fisheryId, what: 'confirmed bottom' };
  allowOnly(actor, at, [...CAST_KEEPERS, ...CONFIRMED_SETTLERS]);
  if (row.confirmedBy !== by) allowOnly(actor, at, CONFIRMED_SETTLERS);
  if (row.takenBackAt === null) await tx.update(ConfirmedBottom, { id: confirmedId }, { takenBackAt: now });
}

type Place = Pick<ConfirmedBottom, 'lon' | 'lat' | 'positionSigmaM'>;

function typedPlace(lake: Lake, { position, positionSigmaM }: ConfirmBottom): Place {
  const [lon, lat] = position ?? [0, 0];
  const origin = originOfLake(lake);
  if (insideOutline(outlineInPlane(origin, lake.details.outline), toPlane(origin, [lon, lat])))
    return { lon, lat, positionSigmaM };
  throw new Problem('invalid', 'That place is not on the water', {
    detail: 'Tap a place inside the shore, and clear of islands.',
    errors: [{ pointer: '/position', detail: 'This is not on the water of this lake.' }],
  });
}

async function placeOfCast(tx: EntityManager, lake: Lake, castId: string): Promise<Place> {
  const wrong = (detail: string) =>
    new Problem('invalid', 'That cast can’t be confirmed', {
      detail: 'Choose another cast, or tap the place on the map.',
      errors: [{ pointer: '/castId', detail }],
    });
  const cast = await tx.findOneBy(SurveyCast, { id: castId, undoneAt: IsNull() });
  const visit = cast && (await tx.findOneBy(SurveyVisit, { id: cast.visitId }));
  if (!cast || visit?.lakeId !== lake.id) throw wrong('There is no such cast on this lake.');
  if (!cast.reduced.ok) throw wrong('This cast could not be placed.');
  const {
    position: [lon, lat],
    covariance,
  } = cast.reduced.sounding;
  return { lon, lat, positionSigmaM: Math.sqrt((covariance.xx + covariance.yy) / 2) };
}

async function refuseFuture({ tx, now }: Ctx, lake: Lake, { day }: ConfirmBottom): Promise<void> {
  const { zone } = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  refuseDay(day, civilDay(now, zone), '/day');
}

/** Refuses a civil day that has not been yet, or that only a slip in the year can have told. */
export function refuseDay(day: string, today: string, pointer: string): void {
  if (day <= today && day >= '1980-01-01') return;
  const detail = day > today ? 'This day has not been yet.' : 'Earlier than 1980.';
  throw new Problem('invalid', 'That day can’t be right', {
    detail: 'Put the day right and send it again.',
    errors: [{ pointer, detail }],
  });
}

async function shape(ctx: Ctx, lake: Lake, rows: readonly ConfirmedBottom[]): Promise<ConfirmedBottomView[]> {
  const { tx, actor } = ctx;
  const people = await tx.findBy(Account, { id: In(rows.map((row) => row.confirmedBy)) });
  const endings = await endingsOf(tx, lake);
  const settles = holdsAny(actor, lake.fisheryId, CONFIRMED_SETTLERS);
  const own = (row: ConfirmedBottom): boolean =>
    accountOf(actor) === row.confirmedBy && mayKeepCasts(actor, lake.fisheryId);
  return rows.map((row) => ({
    id: row.id,
    castId: row.castId,
    position: [row.lon, row.lat],
    positionSigmaM: row.positionSigmaM,
    substrate: row.substrate,
    cover: row.cover,
    method: row.method,
    day: row.day,
    note: row.note,
    by: people.find(({ id }) => id === row.confirmedBy)?.name ?? '',
    endedBy: endedWords(row, lake, endings),
    may: { takeBack: settles || own(row) },
  }));
}

function endedWords(row: ConfirmedBottom, lake: Lake, endings: readonly BottomEnding[]): string | null {
  const seen = { ...toPlane(originOfLake(lake), [row.lon, row.lat]), day: row.day };
  const of = (what: 'substrate' | 'cover') => row[what] !== null && endedBy(endings, what, seen);
  const ending = of('cover') || of('substrate');
  return ending ? eventWords(ending) : null;
}
