import { chartAge, DRAWDOWN_M, type ChartAge } from '@mereward/shared/charts/chart-age';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { Ctx } from '../ctx';

type Aged = { lakeId: string; surveyedTo: string; datumM: number; zone: string };

/** A chart's age today, looking at what the lake's datum board has read since. */
export async function ageNow(
  { tx, now }: Ctx,
  { lakeId, surveyedTo, datumM, zone }: Aged,
): Promise<ChartAge> {
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
  return chartAge(surveyedTo, civilDay(now, zone), since?.changed ?? false);
}

/** 1 on a board whose number rises with the water, −1 on one fitted the other way. */
const SENSE = `(CASE WHEN (b.details ->> 'higherNumberHigherWater')::boolean THEN 1 ELSE -1 END)`;
