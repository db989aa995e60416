import { listenTo } from '../http/database-listener';
import { outOfDeadlock } from '../http/deadlock';
import { ctxOf } from '../http/ctx-of';
import type { Server } from '../http/server';
import { offerFreed, type Freed } from './offer-freed';

/** After so many failures a note is given up, so that it can’t hold up the others. */
const MOST_TRIES = 5;
/** Later than any calendar: the end of what has none. */
const NEVER = new Date(8.64e15);

const NEXT = `
  SELECT id, lake_id AS "lakeId", peg_id AS "pegId", booking_id AS "bookingId", lower(during) AS "from", upper(during) AS until
    FROM peg_freed WHERE tries < ${MOST_TRIES} ORDER BY tries, number LIMIT 1 FOR UPDATE SKIP LOCKED`;

/** Takes up the next note of what came free; answers whether there was one. Several processes may do so at once. */
async function takeUpNext(server: Server, failed: (error: unknown) => void): Promise<boolean> {
  let id: string | null = null;
  try {
    return await outOfDeadlock(() =>
      server.source.transaction(async (tx) => {
        const rows: (Omit<Freed, 'until'> & { until: Date | null })[] = await tx.query(NEXT);
        const [freed] = rows;
        if (!freed) return false;
        id = freed.id;
        await offerFreed(ctxOf(server, tx), { ...freed, until: freed.until ?? NEVER });
        await tx.query('DELETE FROM peg_freed WHERE id = $1', [freed.id]);
        return true;
      }),
    );
  } catch (error) {
    failed(error);
    if (id === null) return false;
    await server.source.query('UPDATE peg_freed SET tries = tries + 1 WHERE id = $1', [id]);
    return true;
  }
}

/** Offers all that came free to those who wait; answers how many notes there were. */
export async function offerAllFreed(server: Server, failed: (error: unknown) => void): Promise<number> {
  let done = 0;
  while (await takeUpNext(server, failed)) done += 1;
  return done;
}

/** Takes up what comes free as soon as the deed that freed it is committed, and at start what was left. */
export function watchFreed(server: Server, failed: (error: unknown) => void): { stop: () => Promise<void> } {
  let running = Promise.resolve();
  const takeUp = (): void => {
    running = running.then(() => offerAllFreed(server, failed).then(() => undefined, failed));
  };
  const listener = listenTo(server.config.databaseUrl, 'peg_freed', {
    heard: takeUp,
    listening: takeUp,
    failed,
  });
  return {
    async stop() {
      await listener.stop();
      await running;
    },
  };
}
