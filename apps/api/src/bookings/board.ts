import type { BoardAsked, BoardPeg, BoardView } from '@mereward/shared/bookings/availability-contract';
import type { PegDetails } from '@mereward/shared/lakes/contract';
import { toldLine, type Drawn } from '@mereward/shared/lakes/lake-places';
import { whyNotLet } from '@mereward/shared/lakes/peg-rules';
import { civilDay } from '@mereward/shared/time/civil-day';
import { addDays, startOfDay } from '@mereward/shared/time/zoned';
import type { EntityManager } from 'typeorm';
import { holdsAny, type Actor, type Ctx } from '../ctx';
import { notFound } from '../http/deny';
import { DRAWN, CLOSED_SPANS, OPEN_SPANS } from './peg-spans';
import { BOARD_READERS, PEG_BLOCKERS, TICKET_CHECKERS, TICKET_WRITERS } from './policy';

const time = (of: string): string => `to_char((${of}) AT TIME ZONE 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`;

/** A span as JSON; $5 the reader is staff, $6 and $7 between when the reader sees who. */
const SPAN = `json_build_object(
  'from', ${time('lower(t.during)')}, 'until', ${time('upper(t.during)')},
  'fishingUntil', ${time('upper(t.during) - t.turnaround')}, 'state', t.state,
  'words', coalesce(c.details->>'publicWords', CASE WHEN $5 THEN k.title END, ''),
  'closureId', t.closure_id, 'blockId', CASE WHEN $5 THEN t.block_id END,
  'booking', CASE WHEN b.id IS NOT NULL THEN json_build_object('id', b.id, 'code', b.code, 'holder', b.holder_name,
    'status', b.status, 'people', t.people, 'rods', t.rods) END)`;

const AROUND = `
  LEFT JOIN closure c ON c.id = t.closure_id
  LEFT JOIN peg_block k ON k.id = t.block_id
  LEFT JOIN booking b ON b.id = t.booking_id AND $5 AND t.during && tstzrange($6::timestamptz, $7::timestamptz)`;

/**
 * A lake’s pegs with their spans as JSON text. Open spans by (peg, start), closures by an index of their own: both
 * answer alike however many bookings there have been.
 */
export const BOARD_PEGS = `
  SELECT p.id, p.number, p.details->>'name' AS name, p.details->'overheadLine' AS "overheadLine",
         p.details->>'letting' AS letting, p.details->>'status' AS status,
         p.details->>'statusUntil' AS "statusUntil", p.details->>'statusReason' AS "statusReason", spans.list AS spans,
         p.details->'position' AS position, p.details->'origin' AS origin, ${DRAWN}
    FROM peg p JOIN lake l ON l.id = p.lake_id
   CROSS JOIN LATERAL (SELECT coalesce(json_agg(s.span ORDER BY s.start)::text, '[]') AS list FROM (
     SELECT lower(t.during) AS start, ${SPAN} AS span FROM peg_time t ${AROUND} WHERE t.peg_id = p.id AND ${OPEN_SPANS}
     UNION ALL
     SELECT lower(t.during), ${SPAN} FROM peg_time t ${AROUND} WHERE t.peg_id = p.id AND ${CLOSED_SPANS}) s) spans
   WHERE p.lake_id = $1
   ORDER BY p.walking_order, p.number`;

/** Tickets that take a peg on arrival. */
const CHOOSING = `
  SELECT coalesce(json_agg(${SPAN} ORDER BY lower(t.during))::text, '[]') AS list
    FROM peg_time t ${AROUND}
   WHERE t.lake_id = $1 AND t.peg_id IS NULL AND t.state IN ('held', 'taken') AND ${OPEN_SPANS}`;

const LAKE = `SELECT l.id, l.name, f.id AS "fisheryId", f.zone FROM lake l JOIN fishery f ON f.id = l.fishery_id WHERE l.id = $1`;

type LakeRow = { id: string; name: string; fisheryId: string; zone: string };
type PegRow = Pick<
  PegDetails,
  'name' | 'overheadLine' | 'position' | 'origin' | 'status' | 'statusUntil' | 'statusReason'
> & {
  id: string;
  number: string;
  letting: string | null;
  drawn: Drawn;
  spans: string;
};

async function lakeRow(tx: EntityManager, lakeId: string): Promise<LakeRow> {
  const rows: LakeRow[] = await tx.query(LAKE, [lakeId]);
  const [lake] = rows;
  if (!lake) throw notFound('lake');
  return lake;
}

/**
 * The board of a lake as JSON text (BoardView): built by the database, since most of it are spans. A stranger reads
 * that a peg is taken and never by whom.
 */
export async function boardText({ tx, actor, now }: Ctx, lakeId: string, asked: BoardAsked): Promise<string> {
  const lake = await lakeRow(tx, lakeId);
  const from = startOfDay(asked.from, lake.zone);
  const until = startOfDay(addDays(asked.from, asked.days), lake.zone);
  const sight = sightOf(actor, lake, now);
  const values = [lakeId, from, until, now, sight.staff, sight.from, sight.until];
  const pegs: PegRow[] = await tx.query(BOARD_PEGS, values);
  const choosing: { list: string }[] = await tx.query(CHOOSING, values);
  const head: Omit<BoardView, 'pegs' | 'choosing'> = {
    lakeId,
    lakeName: lake.name,
    fisheryId: lake.fisheryId,
    zone: lake.zone,
    from: from.toISOString(),
    until: until.toISOString(),
    may: {
      seeWho: sight.staff,
      block: holdsAny(actor, lake.fisheryId, PEG_BLOCKERS),
      book: holdsAny(actor, lake.fisheryId, TICKET_WRITERS),
    },
  };
  return withTexts(head, { pegs: `[${pegs.map(pegText).join(',')}]`, choosing: choosing[0]?.list ?? '[]' });
}

function pegText(row: PegRow): string {
  const closed = row.status === 'closed' && row.statusUntil === null ? row.statusReason : null;
  const peg: Omit<BoardPeg, 'spans'> = {
    pegId: row.id,
    number: row.number,
    name: row.name,
    shut: whyNotLet({ overheadLine: toldLine(row, row.drawn) }) ?? closed,
    shared: row.letting === 'by_place',
  };
  return withTexts(peg, { spans: row.spans });
}

/** An object’s JSON with further members that are JSON already. */
const withTexts = (object: object, texts: Readonly<Record<string, string>>): string =>
  `${JSON.stringify(object).slice(0, -1)}${Object.entries(texts)
    .map(([name, text]) => `,${JSON.stringify(name)}:${text}`)
    .join('')}}`;

type Sight = { staff: boolean; from: Date | null; until: Date | null };

/** Whose names a reader sees, and over which time (no bounds: always). A bailiff: yesterday’s to tomorrow’s. */
function sightOf(actor: Actor, { fisheryId, zone }: LakeRow, now: Date): Sight {
  if (holdsAny(actor, fisheryId, BOARD_READERS)) return { staff: true, from: null, until: null };
  if (!holdsAny(actor, fisheryId, TICKET_CHECKERS)) return { staff: false, from: null, until: null };
  const today = civilDay(now, zone);
  return {
    staff: true,
    from: startOfDay(addDays(today, -1), zone),
    until: startOfDay(addDays(today, 2), zone),
  };
}
