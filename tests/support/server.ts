import { makeApp } from '@mereward/api/app';
import { closeBoardStreams } from '@mereward/api/bookings/board-streams';
import { offerAllFreed } from '@mereward/api/bookings/watch-freed';
import { readConfig, type Config } from '@mereward/api/config';
import { handlers } from '@mereward/api/handlers';
import { makeLogger } from '@mereward/api/http/logging';
import type { Server } from '@mereward/api/http/server';
import { jobsOn, openQueue } from '@mereward/api/jobs/queue';
import { work, workOff } from '@mereward/api/jobs/worker';
import { openCapture, type CapturedMail } from '@mereward/api/mail/capture';
import { makeDataSource } from '@mereward/db/data-source';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { freshDatabase } from './fresh-database';

type Logger = ReturnType<typeof makeLogger>;

export type TestServer = {
  app: ReturnType<typeof makeApp>;
  server: Server;
  /** Settles what time it is from now on, for tokens, deeds and all. */
  setNow: (instant: string | Date) => void;
  /** Lets time pass. */
  pass: (seconds: number) => void;
  /** Does every queued job there is, mail included; answers how many. */
  settle: () => Promise<number>;
  /** Starts the worker as the real server runs it, polling; `close` stops it. What `settle` would do is then a race. */
  startWorker: () => Promise<void>;
  /** Stops the workers started so far: they fetch nothing more, and `settle` is by itself again. */
  stopWorkers: () => Promise<void>;
  /** Where caught mail is sent to, for what stands between. */
  captureUrl: string;
  /** Mail caught so far, newest last. */
  mails: readonly CapturedMail[];
  /** Does the queued jobs and answers the newest mail to that address; fails when there is none. */
  mailTo: (address: string) => Promise<CapturedMail>;
  close: () => Promise<void>;
};

const START = '2027-04-03T09:00:00Z';

type Wishes = { env?: NodeJS.ProcessEnv; logger?: Logger };

/** The real application on a fresh migrated database, with real jobs, mail caught over real SMTP and a clock of its own. */
export async function aServer({ env = {}, logger }: Wishes = {}): Promise<TestServer> {
  const [database, capture] = await Promise.all([freshDatabase(), openCapture()]);
  const filesDir = mkdtempSync(join(tmpdir(), 'mereward-files-'));
  const config: Config = readConfig({
    DATABASE_URL: database.url,
    SMTP_URL: capture.url,
    FILES_DIR: filesDir,
    WEB_DIR: filesDir,
    PUBLIC_URL: 'http://127.0.0.1:4310',
    LOG_LEVEL: 'silent',
    ...env,
  });
  const source = await makeDataSource(config.databaseUrl).initialize();
  const log = logger ?? makeLogger(config);
  const boss = await openQueue(config.databaseUrl, (err) => log.error({ err }, 'queue'));
  let now = new Date(START);
  const server: Server = { config, source, jobs: jobsOn(boss), clock: () => now };
  const ground = { boss, server, logger: log, handlers };
  const fail = (error: unknown) => {
    throw error;
  };
  const settle = async () => {
    let done = await workOff(ground);
    while ((await offerAllFreed(server, fail)) > 0) done += await workOff(ground);
    return done;
  };
  const running: { stop: () => Promise<void> }[] = [];
  const stopWorkers = async () => {
    for (const worker of running.splice(0)) await worker.stop();
  };
  return {
    app: makeApp(server, log, { capture }),
    server,
    setNow: (instant) => void (now = new Date(instant)),
    pass: (seconds) => void (now = new Date(now.getTime() + seconds * 1000)),
    settle,
    startWorker: async () => void running.push(await work(ground)),
    stopWorkers,
    captureUrl: capture.url,
    mails: capture.mails,
    mailTo: async (address) => {
      await settle();
      const mail = capture.mails.findLast(({ to }) => to === address);
      if (!mail) throw new Error(`No mail has come for ${address}`);
      return mail;
    },
    close: async () => {
      await stopWorkers();
      await closeBoardStreams(server);
      await boss.stop({ graceful: true, wait: true, timeout: 10_000 });
      await source.destroy();
      await capture.close();
      await database.drop();
      rmSync(filesDir, { recursive: true, force: true });
    },
  };
}
