import pg from 'pg';

/** How long after a failure the next try is made: twice as long each time, up to the longest. */
const FIRST_WAIT_MS = 250;
const LONGEST_WAIT_MS = 5000;
/** A connection that broke without a word is found out by asking something this often. */
const ASK_EVERY_MS = 20_000;
const ANSWER_WITHIN_MS = 5000;

export type Heard = {
  heard: (payload: string) => void;
  /** It listens, for the first time or again: whatever was told before this went unheard. */
  listening: () => void;
  failed: (error: unknown) => void;
};

export type Listener = { stop: () => Promise<void> };

/**
 * Listens to one channel of a database over one connection of its own, and goes on listening whatever happens to the
 * connection: it is made anew, however long the database stays away. `channel` is a plain lower-case name.
 */
export function listenTo(databaseUrl: string, channel: string, told: Heard): Listener {
  let stopped = false;
  let wake = (): void => undefined;
  let waitMs = FIRST_WAIT_MS;

  const pause = (ms: number): Promise<void> =>
    new Promise((done) => {
      const timer = setTimeout(done, ms);
      wake = () => {
        clearTimeout(timer);
        done();
      };
    });

  /** One connection, from its making to its end. */
  async function listenOnce(): Promise<void> {
    const client = new pg.Client({
      connectionString: databaseUrl,
      keepAlive: true,
      connectionTimeoutMillis: ANSWER_WITHIN_MS,
      query_timeout: ANSWER_WITHIN_MS,
    });
    let over = false;
    const end = (error?: unknown): void => {
      if (error !== undefined && !over && !stopped) told.failed(error);
      over = true;
      wake();
    };
    client.on('error', end);
    client.on('end', () => end());
    client.on('notification', ({ payload }) => told.heard(payload ?? ''));
    try {
      await client.connect();
      await client.query(`LISTEN ${channel}`);
      waitMs = FIRST_WAIT_MS;
      told.listening();
      for (;;) {
        if (over || stopped) break;
        await pause(ASK_EVERY_MS);
        if (over || stopped) break;
        await client.query('SELECT 1');
      }
    } catch (error) {
      end(error);
    } finally {
      over = true;
      await Promise.race([client.end().catch(() => undefined), pause(ANSWER_WITHIN_MS)]);
      wake();
    }
  }

  async function listenOn(): Promise<void> {
    while (!stopped) {
      await listenOnce();
      if (stopped) return;
      await pause(waitMs);
      waitMs = Math.min(LONGEST_WAIT_MS, 2 * waitMs);
    }
  }

  const ended = listenOn();
  return {
    async stop() {
      stopped = true;
      wake();
      await ended;
    },
  };
}
