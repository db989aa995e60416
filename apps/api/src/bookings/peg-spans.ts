import type { PegSpan } from '@mereward/shared/bookings/peg-standing';
import { toldLine, type Drawn } from '@mereward/shared/lakes/lake-places';
import type { PegDetails } from '@mereward/shared/lakes/contract';
import type { EntityManager } from 'typeorm';

/** The database's cap on a stay: what overlaps a stretch began no earlier than this before it. */
const LONGEST = `interval '32 days'`;

/**
 * The rows of `peg_time` that take something of a stretch, for `t` in FROM; $2 from, $3 until, $4 now. A hold that has
 * run out takes nothing, whether or not anybody has cleared it away.
 */
export const OPEN_SPANS = `t.state <> 'closed' AND lower(t.during) > $2::timestamptz - ${LONGEST}
  AND lower(t.during) < $3 AND upper(t.during) > $2
  AND (t.state <> 'held' OR EXISTS (SELECT 1 FROM booking h WHERE h.id = t.booking_id AND h.hold_until > $4))`;
export const CLOSED_SPANS = `t.state = 'closed' AND lower(t.during) < $3 AND coalesce(upper(t.during) > $2, true)`;

const SPAN = `extract(epoch FROM lower(t.during))::float8 AS "fromS", extract(epoch FROM upper(t.during))::float8 AS "untilS",
  extract(epoch FROM t.turnaround)::float8 AS "turnS", t.state, t.people, t.rods`;

/** The lake’s drawing as far as a line drawn near a peg stands against letting it. */
export const DRAWN = `json_build_object('places', coalesce(l.details->'places', '[]'), 'origin', json_build_array(l.origin_lon, l.origin_lat)) AS drawn`;

const PEGS = `
  SELECT p.id, p.lake_id AS "lakeId", p.number, p.details, spans.list AS spans,
         ${DRAWN}
    FROM peg p JOIN lake l ON l.id = p.lake_id
   CROSS JOIN LATERAL (SELECT coalesce(json_agg(s), '[]') AS list FROM (
     SELECT ${SPAN}, '' AS words FROM peg_time t WHERE t.peg_id = p.id AND ${OPEN_SPANS}
     UNION ALL
     SELECT ${SPAN}, c.details->>'publicWords' FROM peg_time t JOIN closure c ON c.id = t.closure_id
      WHERE t.peg_id = p.id AND ${CLOSED_SPANS}) s) spans
   WHERE p.lake_id = ANY ($1)
   ORDER BY l.name, p.walking_order, p.number`;

/** Everybody on a lake, whether on a peg or still to choose one. */
const ON_LAKE = `
  SELECT t.lake_id AS "lakeId", ${SPAN}, '' AS words FROM peg_time t
   WHERE t.lake_id = ANY ($1) AND t.state IN ('held', 'taken') AND ${OPEN_SPANS}`;

type Row = {
  fromS: number;
  untilS: number | null;
  turnS: number;
  state: PegSpan['state'];
  people: number;
  rods: number;
  words: string;
};

/** Later than any calendar: the end of what has none. */
const NEVER_MS = 8.64e15;

const spanOf = ({ fromS, untilS, turnS, ...row }: Row): PegSpan => {
  const untilMs = untilS === null ? NEVER_MS : untilS * 1000;
  return {
    ...row,
    from: new Date(fromS * 1000),
    until: new Date(untilMs),
    fishingUntil: new Date(untilMs - turnS * 1000),
  };
};

/** A peg as it may be let: its overhead line is the worse of its own sheet’s and the lake’s drawing’s. */
export type PegOfLake = {
  id: string;
  lakeId: string;
  number: string;
  details: PegDetails;
  spans: PegSpan[];
};

type Stretch = { lakeIds: readonly string[]; from: Date; until: Date; now: Date };
const values = ({ lakeIds, from, until, now }: Stretch) => [lakeIds, from, until, now];

/** Every peg of some lakes with what takes it in a stretch, in walking order, lake by lake. */
export async function pegsWithSpans(tx: EntityManager, stretch: Stretch): Promise<PegOfLake[]> {
  const rows: (Omit<PegOfLake, 'spans'> & { spans: Row[]; drawn: Drawn })[] = await tx.query(
    PEGS,
    values(stretch),
  );
  return rows.map(({ drawn, details, ...row }) => ({
    ...row,
    details: { ...details, overheadLine: toldLine(details, drawn) },
    spans: row.spans.map(spanOf),
  }));
}

/** Whom some lakes have to find room for in a stretch, for those with a limit of people or rods. */
export async function spansOnLakes(tx: EntityManager, stretch: Stretch): Promise<Map<string, PegSpan[]>> {
  const onLakes = new Map<string, PegSpan[]>();
  if (stretch.lakeIds.length === 0) return onLakes;
  const rows: (Row & { lakeId: string })[] = await tx.query(ON_LAKE, values(stretch));
  for (const { lakeId, ...row } of rows) {
    const here = onLakes.get(lakeId) ?? [];
    here.push(spanOf(row));
    onLakes.set(lakeId, here);
  }
  return onLakes;
}
