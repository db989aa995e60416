import { affects, type Closure } from '@mereward/shared/closures/closure-effect';
import type { ClosureDetails } from '@mereward/shared/closures/contract';
import type { Interval } from '@mereward/shared/time/interval';
import type { EntityManager } from 'typeorm';

export type ClosureFound = Closure & { publicWords: string };

type Row = Omit<Closure, 'scope' | 'reason' | 'effect'> & { details: ClosureDetails };

/** The closures of a fishery that lie over a stretch, lifted ones left out. */
export async function closuresOver(
  tx: EntityManager,
  fisheryId: string,
  { from, until }: Interval,
): Promise<ClosureFound[]> {
  const rows: Row[] = await tx.query(
    `SELECT lower(during) AS "from", upper(during) AS until, lifted_at AS "liftedAt", details FROM closure
      WHERE fishery_id = $1 AND lower(during) < $3 AND coalesce(upper(during) > $2, true)
        AND coalesce(lifted_at > $2, true)
      ORDER BY lower(during)`,
    [fisheryId, from, until],
  );
  return rows.map(({ details, ...times }) => ({ ...times, ...pick(details) }));
}

const pick = ({ scope, reason, effect, publicWords }: ClosureDetails) => ({
  scope,
  reason,
  effect,
  publicWords,
});

/** What everybody is told of the closure that keeps new bookings off a lake for some hours; null when none does. */
export function closedWords(
  closures: readonly ClosureFound[],
  { lakeId, hours, zone }: { lakeId: string; hours: Interval; zone: string },
): string | null {
  const stay = { lakeId, pegId: null, from: hours.from, until: hours.until, season: false };
  const closed = closures.find((closure) =>
    (['keep_out', 'choose', 'refund'] as const).some((bite) => bite === affects(closure, stay, zone)),
  );
  return closed?.publicWords ?? null;
}
