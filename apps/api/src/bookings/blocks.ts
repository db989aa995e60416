import { PegBlock } from '@mereward/db/entities/bookings/peg-block';
import type { BlockList, BlockPegs, BlockView } from '@mereward/shared/bookings/availability-contract';
import { Problem } from '@mereward/shared/problems/problem';
import { DAY_MS } from '@mereward/shared/time/zoned';
import type { EntityManager } from 'typeorm';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { STAFF } from '../lakes/policy';
import { insertOnce, mustRepeat } from '../repeat';
import { PEG_BLOCKERS } from './policy';

const LONGEST_MS = 32 * DAY_MS;

type PegRow = { id: string; number: string; lakeId: string };

/** Keeps pegs back for a while: all of them, or none when one is let or kept back already. */
export async function blockPegs(ctx: Ctx, fisheryId: string, input: BlockPegs): Promise<void> {
  const { tx, actor, now } = ctx;
  await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, PEG_BLOCKERS);
  refuseTimes(input, now);
  const pegs = await pegsOfFishery(tx, fisheryId, input.pegIds);
  const by = accountOf(actor);
  const row = {
    id: input.id,
    fisheryId,
    title: input.title,
    during: `[${input.from},${input.until})`,
    madeBy: by,
    madeAt: now,
  };
  if (!(await insertOnce(tx, PegBlock, row))) {
    const kept = await keptBlock(tx, fisheryId, input.id);
    return mustRepeat({ by, content: contentOf(input) }, kept);
  }
  const got: { pegId: string }[] = await tx.query(
    `INSERT INTO peg_time (lake_id, peg_id, during, state, block_id)
     SELECT p.lake_id, p.id, tstzrange($2::timestamptz, $3::timestamptz), 'blocked', $1
       FROM peg p WHERE p.id = ANY ($4) ORDER BY p.id
     ON CONFLICT DO NOTHING RETURNING peg_id AS "pegId"`,
    [input.id, input.from, input.until, pegs.map(({ id }) => id)],
  );
  const free = new Set(got.map(({ pegId }) => pegId));
  const inTheWay = pegs.filter(({ id }) => !free.has(id));
  if (inTheWay.length === 0) return;
  throw new Problem(
    'conflict',
    `Not free for all of that time: ${inTheWay.map(({ number }) => number).join(', ')}`,
    {
      detail: 'Nothing was kept back. Move their tickets first, or leave these pegs out.',
      errors: inTheWay.map(({ id, number }) => ({
        pointer: `/pegIds/${input.pegIds.indexOf(id)}`,
        detail: `${number} is let, closed or kept back already.`,
      })),
    },
  );
}

function refuseTimes({ from, until }: BlockPegs, now: Date): void {
  const refuse = (title: string): never => {
    throw new Problem('invalid', title, {
      detail: 'Nothing was kept back. Put the time right and send it again.',
      errors: [{ pointer: '/until', detail: title }],
    });
  };
  const [start, end] = [Date.parse(from), Date.parse(until)];
  if (end <= start) refuse('It must end after it starts');
  if (end - start > LONGEST_MS) refuse('Pegs are kept back for at most 32 days at a time');
  if (end <= now.getTime()) refuse('That time is over already');
}

async function pegsOfFishery(
  tx: EntityManager,
  fisheryId: string,
  ids: readonly string[],
): Promise<PegRow[]> {
  const pegs: PegRow[] = await tx.query(
    `SELECT p.id, p.number, p.lake_id AS "lakeId" FROM peg p JOIN lake l ON l.id = p.lake_id
      WHERE l.fishery_id = $1 AND p.id = ANY ($2) ORDER BY l.name, p.walking_order`,
    [fisheryId, ids],
  );
  if (pegs.length < new Set(ids).size) throw notFound('peg');
  return pegs;
}

type Content = { title: string; pegIds: string[]; from: string; until: string };

const contentOf = ({ title, pegIds, from, until }: BlockPegs): Content => ({
  title,
  pegIds: [...new Set(pegIds)].sort(),
  from: new Date(from).toISOString(),
  until: new Date(until).toISOString(),
});

async function keptBlock(
  tx: EntityManager,
  fisheryId: string,
  id: string,
): Promise<{ by: string; content: Content }> {
  const rows: { by: string; title: string; from: Date; until: Date; pegIds: string[] }[] = await tx.query(
    `SELECT k.made_by AS by, k.title, lower(k.during) AS "from", upper(k.during) AS until,
            ARRAY (SELECT peg_id FROM peg_time WHERE block_id = k.id ORDER BY peg_id::text) AS "pegIds"
       FROM peg_block k WHERE k.id = $1 AND k.fishery_id = $2`,
    [id, fisheryId],
  );
  const [row] = rows;
  if (!row) throw notFound('block');
  const { by, title, pegIds } = row;
  return { by, content: { title, pegIds, from: row.from.toISOString(), until: row.until.toISOString() } };
}

/** Gives pegs that were kept back to everybody again. */
export async function unblockPegs(ctx: Ctx, at: { fisheryId: string; blockId: string }): Promise<void> {
  const { tx, actor } = ctx;
  await fisheryFound(tx, at.fisheryId);
  allowOnly(actor, { fisheryId: at.fisheryId, what: 'fishery' }, PEG_BLOCKERS);
  const block = await tx.findOneBy(PegBlock, { id: at.blockId, fisheryId: at.fisheryId });
  if (!block) throw notFound('block');
  await tx.query('DELETE FROM peg_time WHERE block_id = $1', [block.id]);
  await tx.delete(PegBlock, { id: block.id });
}

type BlockRow = Omit<BlockView, 'from' | 'until' | 'may'> & { from: Date; until: Date };

const BLOCKS = `
  SELECT k.id, k.title, lower(k.during) AS "from", upper(k.during) AS until, a.name AS "madeBy",
            (SELECT coalesce(json_agg(json_build_object('pegId', p.id, 'number', p.number, 'lakeName', l.name)
                      ORDER BY l.name, p.walking_order), '[]')
               FROM peg_time t JOIN peg p ON p.id = t.peg_id JOIN lake l ON l.id = p.lake_id
              WHERE t.block_id = k.id) AS pegs
    FROM peg_block k JOIN account a ON a.id = k.made_by`;

const blockView = ({ actor }: Ctx, fisheryId: string, row: BlockRow): BlockView => ({
  ...row,
  from: row.from.toISOString(),
  until: row.until.toISOString(),
  may: { remove: holdsAny(actor, fisheryId, PEG_BLOCKERS) },
});

/** One block, as whoever made it sees it. */
export async function blockOf(ctx: Ctx, fisheryId: string, blockId: string): Promise<BlockView> {
  const rows: BlockRow[] = await ctx.tx.query(`${BLOCKS} WHERE k.id = $1`, [blockId]);
  const [row] = rows;
  if (!row) throw notFound('block');
  return blockView(ctx, fisheryId, row);
}

/** What is kept back from now on, for staff. */
export async function blocksOf(ctx: Ctx, fisheryId: string): Promise<BlockList> {
  const { tx, actor, now } = ctx;
  await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, STAFF);
  const rows: BlockRow[] = await tx.query(
    `${BLOCKS} WHERE k.fishery_id = $1 AND upper(k.during) > $2 ORDER BY lower(k.during), k.id`,
    [fisheryId, now],
  );
  return { blocks: rows.map((row) => blockView(ctx, fisheryId, row)) };
}
