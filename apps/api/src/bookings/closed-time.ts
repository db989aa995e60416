import type { EntityManager } from 'typeorm';

type Closed = { closureId: string; pegIds: readonly string[]; range: string };

/**
 * Closes pegs in the calendar wherever nothing else has them, and answers how many pieces were written. What another
 * deed is writing at this moment is waited for and passed over: look again for it, until nothing is left to write.
 */
export async function closePegs(tx: EntityManager, { closureId, pegIds, range }: Closed): Promise<number> {
  const rows: unknown[] = await tx.query(
    `INSERT INTO peg_time (lake_id, peg_id, during, lane, state, closure_id)
     SELECT p.lake_id, p.id, piece, 0, 'closed', $1
       FROM peg p
      CROSS JOIN LATERAL unnest(tstzmultirange($3::tstzrange) - coalesce(
        (SELECT range_agg(t.during) FROM peg_time t
          WHERE t.peg_id = p.id AND t.during && $3::tstzrange AND (t.lane <> 0 OR t.closure_id = $1)),
        '{}'::tstzmultirange)) AS piece
      WHERE p.id = ANY ($2)
      ORDER BY p.id
     ON CONFLICT DO NOTHING RETURNING id`,
    [closureId, pegIds, range],
  );
  return rows.length;
}

/** Cuts out of the fishery's own blocks what a closure takes: a match on closed water does not take place. */
export async function cutBlocks(
  tx: EntityManager,
  { pegIds, range }: Pick<Closed, 'pegIds' | 'range'>,
): Promise<void> {
  await tx.query(
    `WITH gone AS (
       DELETE FROM peg_time WHERE block_id IS NOT NULL AND peg_id = ANY ($1) AND during && $2::tstzrange
       RETURNING lake_id, peg_id, during, block_id)
     INSERT INTO peg_time (lake_id, peg_id, during, state, block_id)
     SELECT lake_id, peg_id, piece, 'blocked', block_id
       FROM gone CROSS JOIN LATERAL unnest(tstzmultirange(during) - tstzmultirange($2::tstzrange)) AS piece`,
    [pegIds, range],
  );
}

/** Opens in the calendar what a closure had closed. */
export async function openPegs(tx: EntityManager, closureId: string): Promise<void> {
  await tx.query('DELETE FROM peg_time WHERE closure_id = $1', [closureId]);
}
