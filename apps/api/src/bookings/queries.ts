import type { TicketList, TicketView } from '@mereward/shared/bookings/contract';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { findPeg } from '../lakes/found';
import { TICKET_CHECKERS, TICKET_WRITERS } from './policy';

type Row = Omit<TicketView, 'from' | 'until' | 'may'> & { from: Date; until: Date };

const SELECT = `
  SELECT b.id, p.id AS "pegId", p.number AS "pegNumber", l.name AS "lakeName", f.name AS "fisheryName", f.zone,
         lower(b.during) AS "from", upper(b.during) AS until, a.name AS holder
    FROM booking b
    JOIN peg_time t ON t.booking_id = b.id
    JOIN peg p ON p.id = t.peg_id
    JOIN lake l ON l.id = p.lake_id
    JOIN fishery f ON f.id = l.fishery_id
    JOIN account a ON a.id = b.account_id`;

const view = (row: Row, may: TicketView['may']): TicketView => ({
  ...row,
  from: row.from.toISOString(),
  until: row.until.toISOString(),
  may,
});

const LONG_AGO_DAYS = 366;

/** The reader's own tickets, the newest first; those that ended over a year ago are left out. */
export async function myTickets({ tx, actor, now }: Ctx): Promise<TicketList> {
  const rows: Row[] = await tx.query(
    `${SELECT} WHERE b.account_id = $1 AND b.status = 'confirmed' AND upper(b.during) > $2::timestamptz - make_interval(days => $3)
      ORDER BY lower(b.during) DESC, b.id`,
    [accountOf(actor), now, LONG_AGO_DAYS],
  );
  return { tickets: rows.map((row) => view({ ...row, holder: null }, { cancel: row.from > now })) };
}

/** A peg's tickets that have not ended, and for those who write them the last month's too. Bailiffs see a day each way. */
export async function ticketsOfPeg({ tx, actor, now }: Ctx, pegId: string): Promise<TicketList> {
  const { lake } = await findPeg(tx, pegId);
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'peg' }, [...TICKET_WRITERS, ...TICKET_CHECKERS]);
  const writes = holdsAny(actor, lake.fisheryId, TICKET_WRITERS);
  const rows: Row[] = await tx.query(
    `${SELECT} WHERE t.peg_id = $1 AND b.status = 'confirmed'
        AND b.during && tstzrange($2::timestamptz - make_interval(days => $3), $2::timestamptz + make_interval(days => $4))
      ORDER BY lower(b.during), b.id`,
    writes ? [pegId, now, 31, 3660] : [pegId, now, 1, 1],
  );
  return { tickets: rows.map((row) => view(row, { cancel: writes })) };
}

/** One ticket, as whoever wrote it sees it. */
export async function ticketView({ tx }: Ctx, bookingId: string): Promise<TicketView> {
  const rows: Row[] = await tx.query(`${SELECT} WHERE b.id = $1`, [bookingId]);
  const [row] = rows;
  if (!row) throw notFound('ticket');
  return view(row, { cancel: true });
}
