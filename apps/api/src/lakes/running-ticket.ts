import type { EntityManager } from 'typeorm';
import type { Actor } from '../ctx';

type Asked = { tx: EntityManager; actor: Actor; now: Date };
export type RunningTicket = { from: Date; until: Date };

// Tickets are the bookings' own; here they are only read, since what may be seen of a lake hangs on them.
const RUNNING = `
  SELECT lower(b.during) AS "from", upper(b.during) AS until
    FROM booking b JOIN peg_time t ON t.booking_id = b.id
   WHERE b.account_id = $1 AND b.status IN ('confirmed', 'checked_in') AND b.during @> $2::timestamptz`;

async function running(asked: Asked, where: string, id: string): Promise<RunningTicket | null> {
  const { tx, actor, now } = asked;
  if (actor.kind === 'stranger') return null;
  const rows: RunningTicket[] = await tx.query(
    `${RUNNING} AND ${where} ORDER BY upper(b.during) DESC LIMIT 1`,
    [actor.id, now, id],
  );
  return rows[0] ?? null;
}

/** The reader's own ticket for this peg that runs now, if there is one. */
export const runningTicket = (asked: Asked, pegId: string): Promise<RunningTicket | null> =>
  running(asked, 't.peg_id = $3', pegId);

/** The reader's own ticket for any peg of this lake that runs now. */
export const runningTicketAtLake = (asked: Asked, lakeId: string): Promise<RunningTicket | null> =>
  running(asked, 't.lake_id = $3', lakeId);
