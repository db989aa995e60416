import { chartAge, DRAWDOWN_M, type AgeNow } from '@mereward/shared/charts/chart-age';
import type { ChartChange } from '@mereward/shared/charts/chart-change-contract';
import { outlineInPlane } from '@mereward/shared/geometry/outline';
import type { LonLat } from '@mereward/shared/geometry/plane';
import { ringsOf } from '@mereward/shared/geometry/polygon';
import { eventWords } from '@mereward/shared/surveys/bottom-ending';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { Ctx } from '../ctx';
import { eventsOf } from '../surveys/endings';

type Aged = { lakeId: string; surveyedTo: string; datumM: number; zone: string; origin: LonLat };

/** A chart's age today, by what its lake's datum board has read and what has been recorded of its bottom since. */
export async function ageNow(ctx: Ctx, aged: Aged): Promise<AgeNow> {
  const changes = await changesSince(ctx, aged);
  const levelsMoved = await movedSince(ctx, aged);
  const age = chartAge(aged.surveyedTo, civilDay(ctx.now, aged.zone), changes.length > 0 || levelsMoved);
  return { age, changes, levelsMoved };
}

const toCentimetres = (lengthM: number): number => Math.round(lengthM * 100) / 100;

/** What happened after the chart's last cast, newest first. */
async function changesSince({ tx }: Ctx, { lakeId, surveyedTo, origin }: Aged): Promise<ChartChange[]> {
  const events = await eventsOf(tx, lakeId);
  return events
    .filter(({ happenedOn }) => happenedOn > surveyedTo)
    .reverse()
    .map((event) => ({
      kind: event.kind,
      happenedOn: event.happenedOn,
      words: eventWords(event),
      rings:
        event.area &&
        ringsOf(outlineInPlane(origin, event.area)).map((ring) =>
          ring.flatMap(({ xM, yM }) => [toCentimetres(xM), toCentimetres(yM)]),
        ),
    }));
}

async function movedSince({ tx, now }: Ctx, { lakeId, surveyedTo, datumM, zone }: Aged): Promise<boolean> {
  const [since] = await tx.query<{ changed: boolean }[]>(
    `SELECT EXISTS (
       SELECT 1 FROM level_reading r JOIN gauge_board b ON b.id = r.board_id
        WHERE b.lake_id = $1 AND b.is_datum_board
          AND (r.at AT TIME ZONE $2)::date > $3::date AND r.at <= $4
          AND (sense(b.details) * (r.level_m - $5) < -$6::float8
               OR sense(b.details) * (r.level_m - (b.details ->> 'alarmHighM')::float8) >= 0)) AS changed`.replaceAll(
      'sense(b.details)',
      SENSE,
    ),
    [lakeId, zone, surveyedTo, now, datumM, DRAWDOWN_M],
  );
  return since?.changed ?? false;
}

/** 1 on a board whose number rises with the water, −1 on one fitted the other way. */
const SENSE = `(CASE WHEN (b.details ->> 'higherNumberHigherWater')::boolean THEN 1 ELSE -1 END)`;
