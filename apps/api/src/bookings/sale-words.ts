import { dayName } from '@mereward/shared/time/day-names';
import type { EntityManager } from 'typeorm';
import type { Stay } from './stay';

/** What was sold, as a receipt and the card provider's page name it: “24 hours, Far Ostle, peg 11, Sat 17 July 2027”. */
export async function saleWords(
  tx: EntityManager,
  { id, details, lakeId }: Pick<Stay, 'id' | 'details' | 'lakeId'>,
): Promise<string> {
  const rows: { lake: string | null; pegs: string[] }[] = await tx.query(
    `SELECT (SELECT name FROM lake WHERE id = $2) AS lake,
            coalesce((SELECT array_agg(p.number ORDER BY p.walking_order)
                        FROM peg_time t JOIN peg p ON p.id = t.peg_id WHERE t.booking_id = $1), '{}') AS pegs`,
    [id, lakeId],
  );
  const { lake = null, pegs = [] } = rows[0] ?? {};
  const where = pegs.length === 0 ? [] : [`${pegs.length === 1 ? 'peg' : 'pegs'} ${pegs.join(', ')}`];
  return [details.ticketName, ...(lake === null ? [] : [lake]), ...where, dayName(details.day)].join(', ');
}
