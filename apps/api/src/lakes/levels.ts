import { LevelReading } from '@mereward/db/entities/lakes/level-reading';
import { Account } from '@mereward/db/entities/accounts/account';
import type { LevelNow, LevelRecorded, RecordLevel } from '@mereward/shared/lakes/contract';
import { levelOver, levelWarnings } from '@mereward/shared/lakes/water-level';
import { Problem } from '@mereward/shared/problems/problem';
import { Not, type EntityManager } from 'typeorm';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, mustRepeat } from '../repeat';
import { refuseWrongClock } from '../wrong-clock';
import { findBoard } from './found';
import { LAKE_CHANGERS, LEVEL_RECORDERS } from './policy';

/** Keeps a reading of a gauge board and says what is unusual about it. */
export async function recordLevel(ctx: Ctx, boardId: string, input: RecordLevel): Promise<LevelRecorded> {
  const { tx, actor, now } = ctx;
  const { board, lake } = await findBoard(tx, boardId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'gauge board' }, LEVEL_RECORDERS);
  const at = new Date(input.at);
  refuseWrongClock({ at, now, pointer: '/at', what: 'reading' });
  const recordedBy = accountOf(actor);
  const { id, levelM, levelText, note } = input;
  const before = await newest(tx, boardId, id);
  const made = await insertOnce(tx, LevelReading, {
    id,
    boardId,
    at,
    levelM,
    levelText,
    note,
    recordedBy,
    receivedAt: now,
  });
  if (!made) await mustBeKept(tx, { ...input, at }, { boardId, recordedBy });
  const { name } = await tx.findOneByOrFail(Account, { id: recordedBy });
  const reading = { id, at: at.toISOString(), levelM, by: name, note };
  return { reading, warnings: levelWarnings(board.details, { levelM, at }, before) };
}

type Reading = Omit<RecordLevel, 'at'> & { at: Date };

async function mustBeKept(
  tx: EntityManager,
  asked: Reading,
  { boardId, recordedBy }: { boardId: string; recordedBy: string },
): Promise<void> {
  const kept = await tx.findOneBy(LevelReading, { id: asked.id });
  if (!kept || kept.boardId !== boardId) throw notFound('reading');
  const content = ({ at, levelM, levelText, note }: Reading) => ({ at, levelM, levelText, note });
  mustRepeat({ by: recordedBy, content: content(asked) }, { by: kept.recordedBy, content: content(kept) });
}

const newest = (tx: EntityManager, boardId: string, except: string): Promise<LevelReading | null> =>
  tx.findOne(LevelReading, { where: { boardId, id: Not(except) }, order: { at: 'DESC' } });

const OWN_MISTAKE_MS = 86_400_000;

/** Takes a misread figure back: one's own within a day, anybody's by the manager or the owner. */
export async function takeBackReading({ tx, actor, now }: Ctx, readingId: string): Promise<void> {
  const reading = await tx.findOneBy(LevelReading, { id: readingId });
  if (!reading) throw notFound('reading');
  const { lake } = await findBoard(tx, reading.boardId);
  const at = { fisheryId: lake.fisheryId, what: 'reading' };
  allowOnly(actor, at, LEVEL_RECORDERS);
  const fresh = now.getTime() - reading.receivedAt.getTime() < OWN_MISTAKE_MS;
  const own = accountOf(actor) === reading.recordedBy;
  if (!holdsAny(actor, lake.fisheryId, LAKE_CHANGERS) && !(own && fresh))
    throw new Problem('forbidden', 'This reading can’t be taken back by you any more', {
      detail: 'One’s own can be within a day; after that ask the manager.',
    });
  await tx.delete(LevelReading, { id: readingId });
}

/** The newest reading of the lake's datum board as it stands on the board, or null when there is none. */
export type LatestReading = {
  boardReadsM: number;
  at: Date;
  boardCode: string;
  higherNumberHigherWater: boolean;
};

export async function latestReading(tx: EntityManager, lakeId: string): Promise<LatestReading | null> {
  const rows: LatestReading[] = await tx.query(
    `SELECT r.level_m AS "boardReadsM", r.at, b.code AS "boardCode",
            (b.details ->> 'higherNumberHigherWater')::boolean AS "higherNumberHigherWater"
       FROM gauge_board b
      CROSS JOIN LATERAL (SELECT * FROM level_reading WHERE board_id = b.id
                           ORDER BY at DESC, received_at DESC LIMIT 1) r
      WHERE b.lake_id = $1 AND b.is_datum_board`,
    [lakeId],
  );
  return rows[0] ?? null;
}

/** The level now against a chart datum (the lake's, or the one a chart was published with). */
export async function levelNow(tx: EntityManager, lakeId: string, datumM: number): Promise<LevelNow | null> {
  const latest = await latestReading(tx, lakeId);
  if (!latest) return null;
  const { boardReadsM, at, boardCode } = latest;
  return { levelM: levelOver(boardReadsM, latest, datumM), at: at.toISOString(), boardCode, boardReadsM };
}
