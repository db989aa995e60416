import type { EntityManager } from 'typeorm';

/** A peg asked for, with whoever would be on it. `pegId` null: somewhere on the lake, chosen on arrival. */
export type PegWanted = { pegId: string | null; people: number; rods: number };

export type PegsWanted = {
  bookingId: string;
  lakeId: string;
  from: Date;
  until: Date; // of the fishing; the turnaround is added
  turnaroundMinutes: number;
  state: 'held' | 'taken';
  pegs: readonly PegWanted[];
};

const INSERT = `
  INSERT INTO peg_time (lake_id, peg_id, during, turnaround, lane, state, booking_id, people, rods)
  SELECT $1, want.peg_id, tstzrange($2::timestamptz, $3::timestamptz + make_interval(mins => $4), '[)'),
         make_interval(mins => $4),
         CASE WHEN p.details->>'letting' = 'by_place' THEN 1 ELSE nextval('peg_time_lane') END,
         $5, $6, want.people, want.rods
    FROM unnest($7::uuid[], $8::int[], $9::int[]) AS want (peg_id, people, rods)
    LEFT JOIN peg p ON p.id = want.peg_id
   ORDER BY want.peg_id
  ON CONFLICT DO NOTHING
  RETURNING peg_id AS "pegId"`;

/**
 * Writes a booking's pegs into the calendar: one sorted insert that passes over what is taken, since plain inserts
 * against an exclusion deadlock. Answers the pegs somebody else has; with any the whole deed must be given up.
 */
export async function takePegs(tx: EntityManager, wanted: PegsWanted): Promise<string[]> {
  const { pegs } = wanted;
  const rows: { pegId: string | null }[] = await tx.query(INSERT, [
    wanted.lakeId,
    wanted.from,
    wanted.until,
    wanted.turnaroundMinutes,
    wanted.state,
    wanted.bookingId,
    pegs.map(({ pegId }) => pegId),
    pegs.map(({ people }) => people),
    pegs.map(({ rods }) => rods),
  ]);
  const got = new Set(rows.map(({ pegId }) => pegId));
  return pegs.flatMap(({ pegId }) => (pegId !== null && !got.has(pegId) ? [pegId] : []));
}

/** Gives a booking's pegs back to the calendar. */
export async function freePegs(tx: EntityManager, bookingId: string): Promise<void> {
  await tx.query('DELETE FROM peg_time WHERE booking_id = $1', [bookingId]);
}
