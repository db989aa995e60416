import type PgBoss from 'pg-boss';
import type pino from 'pino';
import type { Server } from '../http/server';

/** Does the queued jobs in this process; heavy ones hand over to a thread of their own. */
export async function work(
  _boss: PgBoss,
  _server: Server,
  _logger: pino.Logger,
): Promise<{ stop(): Promise<void> }> {
  return { stop: async () => {} };
}
