import { levelAt } from '@mereward/shared/surveys/water-level';
import type { DayLevel } from '@mereward/shared/charts/reported-evidence';
import { dayWords } from '@mereward/shared/time/civil-day';
import type { EntityManager } from 'typeorm';

type Reading = { at: Date; levelM: number; code: string; higherNumberHigherWater: boolean };

/** The datum board's last reading before an instant and its first after it. */
async function readingsAround(tx: EntityManager, lakeId: string, at: Date): Promise<Reading[]> {
  const side = (sign: '<=' | '>', order: 'DESC' | 'ASC') =>
    `(SELECT r.at, r.level_m AS "levelM", b.code,
             (b.details ->> 'higherNumberHigherWater')::boolean AS "higherNumberHigherWater"
        FROM gauge_board b JOIN level_reading r ON r.board_id = b.id
       WHERE b.lake_id = $1 AND b.is_datum_board AND r.at ${sign} $2
       ORDER BY r.at ${order}, r.received_at DESC LIMIT 1)`;
  return tx.query(`${side('<=', 'DESC')} UNION ALL ${side('>', 'ASC')}`, [lakeId, at]);
}

/**
 * The water over datum at noon of a day, linear between the readings round it; null when none lies within a fortnight.
 * The words say which.
 */
export async function dayLevel(
  tx: EntityManager,
  lake: { id: string; datumM: number },
  day: string,
): Promise<{ level: DayLevel; words: string }> {
  const noon = new Date(`${day}T12:00:00Z`);
  const [first, second] = await readingsAround(tx, lake.id, noon);
  if (!first)
    return { level: null, words: 'The gauge board has no reading: the depth can’t be brought to datum.' };
  const gauge = {
    startAt: first.at.toISOString(),
    startM: first.levelM,
    endAt: second?.at.toISOString() ?? null,
    endM: second?.levelM ?? null,
    datumM: lake.datumM,
    higherNumberHigherWater: first.higherNumberHigherWater,
  };
  const { known, aboveDatumM, readingM, sigmaM } = levelAt(gauge, noon.toISOString());
  if (!known)
    return {
      level: null,
      words: `${first.code} was not read within a fortnight of ${dayWords(day)}: the depth can’t be brought to datum.`,
    };
  return {
    level: { aboveDatumM, sigmaM },
    words: `${first.code} stood at ${readingM.toFixed(2)} m on ${dayWords(day)}.`,
  };
}
