import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { BottomTable } from '@mereward/db/entities/surveys/bottom-table';
import { Problem } from '@mereward/shared/problems/problem';
import type {
  BottomTableThen,
  BottomTableVersion,
  BottomTableView,
  KeepBottomTable,
} from '@mereward/shared/surveys/bottom-table-contract';
import { USUAL_FEEL } from '@mereward/shared/surveys/usual-feel';
import { In, type EntityManager } from 'typeorm';
import { orConflict } from '../conflict';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { mustRepeat, staleVersion } from '../repeat';
import { TABLE_CHANGERS, TABLE_READERS } from './policy';

const USUAL_VERSION: BottomTableVersion = {
  version: 0,
  kind: 'usual',
  reason: 'Built in. Common practice, no published source',
  madeBy: null,
  madeAt: null,
  confirmedCasts: 0,
};

/** The table in force at a fishery, and every version before it. */
export async function readBottomTable(ctx: Ctx, fisheryId: string): Promise<BottomTableView> {
  await fisheryFor(ctx, fisheryId, 'read');
  const rows = await versionsOf(ctx.tx, fisheryId);
  const shaped = await shapeVersions(ctx.tx, rows);
  const history = [...shaped, USUAL_VERSION];
  return {
    inForce: history[0] ?? USUAL_VERSION,
    feel: rows[0]?.feel ?? USUAL_FEEL,
    history,
    may: { change: holdsAny(ctx.actor, fisheryId, TABLE_CHANGERS) },
  };
}

/** One version as it was. */
export async function readBottomTableThen(
  ctx: Ctx,
  fisheryId: string,
  version: string,
): Promise<BottomTableThen> {
  await fisheryFor(ctx, fisheryId, 'read');
  if (version === '0') return { made: USUAL_VERSION, feel: USUAL_FEEL };
  const row = /^\d{1,9}$/.test(version)
    ? await ctx.tx.findOneBy(BottomTable, { fisheryId, version: Number(version) })
    : null;
  if (!row) throw notFound('version of this table');
  const [made] = await shapeVersions(ctx.tx, [row]);
  return { made: made ?? USUAL_VERSION, feel: row.feel ?? USUAL_FEEL };
}

/** Puts a new version in force; it is worked with from the next reduction on. The unique number settles a race. */
export async function keepBottomTable(
  ctx: Ctx,
  fisheryId: string,
  input: KeepBottomTable,
): Promise<BottomTableView> {
  await fisheryFor(ctx, fisheryId, 'change');
  const { tx } = ctx;
  if (await keptAlready(ctx, fisheryId, input)) return readBottomTable(ctx, fisheryId);
  const looked = await tx.findOneBy(BottomTable, { fisheryId, version: input.after });
  await addVersion(ctx, {
    ...input,
    fisheryId,
    kind: input.feel === null ? 'usual' : 'edited',
    knows: input.feel === null ? [] : (looked?.knows ?? []),
    confirmedCasts: input.feel === null ? 0 : (looked?.confirmedCasts ?? 0),
  });
  return readBottomTable(ctx, fisheryId);
}

type NewVersion = Pick<
  BottomTable,
  'id' | 'fisheryId' | 'kind' | 'feel' | 'knows' | 'confirmedCasts' | 'reason'
> & {
  after: number;
};

export async function addVersion({ tx, actor, now }: Ctx, { after, ...made }: NewVersion): Promise<void> {
  const newest = await tx.findOne(BottomTable, {
    where: { fisheryId: made.fisheryId },
    order: { version: 'DESC' },
  });
  if ((newest?.version ?? 0) !== after) throw staleVersion();
  const row = tx.create(BottomTable, {
    ...made,
    version: after + 1,
    madeBy: accountOf(actor),
    madeAt: now,
  });
  await orConflict(tx.insert(BottomTable, row), 'bottom_table_version', 'Someone changed this meanwhile');
}

/** Sent again after a lost answer: the same id with the same content is done already. */
async function keptAlready(
  { tx, actor }: Ctx,
  fisheryId: string,
  { id, after, feel, reason }: KeepBottomTable,
): Promise<boolean> {
  const kept = await tx.findOneBy(BottomTable, { id });
  if (!kept) return false;
  if (kept.fisheryId !== fisheryId) throw notFound('table');
  mustRepeat(
    { by: accountOf(actor), content: { after, feel, reason } },
    { by: kept.madeBy, content: { after: kept.version - 1, feel: kept.feel, reason: kept.reason } },
  );
  return true;
}

const versionsOf = (tx: EntityManager, fisheryId: string): Promise<BottomTable[]> =>
  tx.find(BottomTable, { where: { fisheryId }, order: { version: 'DESC' }, take: 200 });

async function shapeVersions(tx: EntityManager, rows: readonly BottomTable[]): Promise<BottomTableVersion[]> {
  const people = await tx.findBy(Account, { id: In(rows.map(({ madeBy }) => madeBy)) });
  return rows.map(({ version, kind, reason, madeBy, madeAt, confirmedCasts }) => ({
    version,
    kind,
    reason,
    madeBy: people.find(({ id }) => id === madeBy)?.name ?? '',
    madeAt: madeAt.toISOString(),
    confirmedCasts,
  }));
}

/** A fishery whose table this actor may read or change; one they have no part in is not there. */
export async function fisheryFor(
  { tx, actor }: Ctx,
  fisheryId: string,
  act: 'read' | 'change',
): Promise<void> {
  accountOf(actor);
  if (!(await tx.existsBy(Fishery, { id: fisheryId }))) throw notFound('fishery');
  allowOnly(actor, { fisheryId, what: 'fishery' }, act === 'read' ? TABLE_READERS : TABLE_CHANGERS);
}

export const learntMeanwhile = (): Problem =>
  new Problem('conflict', 'This proposal has been overtaken', {
    detail: 'A bottom was confirmed, a cast kept or the table changed since. Look at the new proposal first.',
  });
