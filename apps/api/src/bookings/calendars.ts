import { CalendarFeed } from '@mereward/db/entities/bookings/calendar-feed';
import type {
  CalendarList,
  CalendarMade,
  CalendarView,
  MakeCalendar,
} from '@mereward/shared/bookings/calendar-contract';
import { Problem } from '@mereward/shared/problems/problem';
import { IsNull } from 'typeorm';
import { newSecret, secretHash } from '../accounts/secret-token';
import { accountOf, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { findLake } from '../lakes/found';
import { STAFF } from '../lakes/policy';
import { lakeCalendar, ownCalendar } from './calendar-texts';

/** Far more calendar programs than anybody has. */
const MOST = 20;

/** Makes a secret address of one’s own bookings, or of a lake’s calendar without names, for its staff. */
export async function makeCalendar(ctx: Ctx, { id, lakeId }: MakeCalendar): Promise<CalendarMade> {
  const { tx, actor, now, publicUrl } = ctx;
  const accountId = accountOf(actor);
  if (lakeId !== null) {
    const { fisheryId } = await findLake(tx, lakeId);
    allowOnly(actor, { fisheryId, what: 'lake' }, STAFF);
  }
  if ((await tx.countBy(CalendarFeed, { accountId, revokedAt: IsNull() })) >= MOST)
    throw new Problem('conflict', `You have ${MOST} calendar addresses already`, {
      detail: 'Take one away that is not in use any more.',
    });
  const { token, hash } = newSecret();
  const rows: unknown[] = await tx.query(
    `INSERT INTO calendar_feed (id, account_id, lake_id, token_digest, made_at) VALUES ($1, $2, $3, $4, $5)
     ON CONFLICT DO NOTHING RETURNING id`,
    [id, accountId, lakeId, hash, now],
  );
  if (rows.length === 0)
    throw new Problem('conflict', 'This calendar address was made already', {
      detail: 'It is told only once. Take it away and make a new one.',
    });
  const { calendars } = await myCalendars(ctx);
  const made = calendars.find((each) => each.id === id);
  if (!made) throw notFound('calendar');
  return { ...made, url: `${publicUrl}/api/calendars/${token}.ics` };
}

/** One’s own addresses that are in use, the newest first; never their secrets, which nobody knows any more. */
export async function myCalendars({ tx, actor }: Ctx): Promise<CalendarList> {
  const rows: (Omit<CalendarView, 'madeAt'> & { madeAt: Date })[] = await tx.query(
    `SELECT c.id, c.lake_id AS "lakeId", l.name AS "lakeName", c.made_at AS "madeAt"
       FROM calendar_feed c LEFT JOIN lake l ON l.id = c.lake_id
      WHERE c.account_id = $1 AND c.revoked_at IS NULL ORDER BY c.made_at DESC, c.id`,
    [accountOf(actor)],
  );
  return { calendars: rows.map((row) => ({ ...row, madeAt: row.madeAt.toISOString() })) };
}

/** From now on the address finds nothing; a second time changes nothing. */
export async function revokeCalendar({ tx, actor, now }: Ctx, id: string): Promise<void> {
  const feed = await tx.findOneBy(CalendarFeed, { id, accountId: accountOf(actor) });
  if (!feed) throw notFound('calendar');
  if (feed.revokedAt === null) await tx.update(CalendarFeed, { id }, { revokedAt: now });
}

/**
 * The calendar at a secret address, as text/calendar. What its maker may see now is what it shows: a lake’s calendar
 * ends when they no longer belong to its staff.
 */
export async function calendarAt(ctx: Ctx, token: string): Promise<string> {
  const { tx } = ctx;
  const feed = await tx.findOneBy(CalendarFeed, { tokenDigest: secretHash(token), revokedAt: IsNull() });
  if (!feed) throw notFound('calendar');
  if (feed.lakeId === null) return ownCalendar(ctx, feed.accountId);
  const rows: unknown[] = await tx.query(
    `SELECT 1 FROM fishery_role r JOIN lake l ON l.fishery_id = r.fishery_id
      WHERE l.id = $1 AND r.account_id = $2 AND r.role = ANY ($3) LIMIT 1`,
    [feed.lakeId, feed.accountId, STAFF],
  );
  if (rows.length === 0) throw notFound('calendar');
  return lakeCalendar(ctx, feed.lakeId);
}
