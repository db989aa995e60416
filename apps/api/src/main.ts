import { makeDataSource } from '@mereward/db/data-source';
import { readFileSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import { makeApp } from './app';
import { closeBoardStreams } from './bookings/board-streams';
import { watchPayments } from './bookings/payment-jobs';
import { watchFreed } from './bookings/watch-freed';
import { CHART_BUILDS } from './charts/jobs';
import { fileStoreOf } from './files/store';
import { readConfig, SettingsFault, type Config } from './config';
import { handlers } from './handlers';
import { isDatabaseAway } from './http/database-away';
import { makeLogger } from './http/logging';
import { plainError } from './http/plain-error';
import { watchLost } from './jobs/claimed-run';
import { jobsOn, openQueue } from './jobs/queue';
import { work } from './jobs/worker';
import { openCapture } from './mail/capture';
import { LOG_READINGS } from './surveys/log-queue';

const FINISH_WITHIN_MS = 10_000;

/** The instant of CLOCK_FILE when a test sets one, else the machine's. */
function clockOf(config: Config): () => Date {
  const file = config.clockFile;
  return file ? () => new Date(readFileSync(file, 'utf8').trim()) : () => new Date();
}

async function main(): Promise<void> {
  const settings = readConfig(process.env);
  const logger = makeLogger(settings);
  const capture = settings.smtpUrl ? null : await openCapture();
  if (capture) logger.warn('SMTP_URL is not set: mail is caught here and reaches nobody');
  const config = capture ? { ...settings, smtpUrl: capture.url } : settings;
  outliveTheDatabase((err) => logger.error({ err }, 'the database went away'));
  const source = await makeDataSource(config.databaseUrl).initialize();
  const boss = await openQueue(config.databaseUrl, (err) => logger.error({ err }, 'queue'));
  const server = { config, source, jobs: jobsOn(boss), clock: clockOf(config) };
  const worker = await work({ boss, server, logger, handlers });
  const watches = [CHART_BUILDS, LOG_READINGS].map((table) =>
    watchLost(server, table, (err) =>
      logger.error({ err, job: table.job }, 'lost work could not be taken up'),
    ),
  );
  const stopPayments = watchPayments(server, logger);
  const freed = watchFreed(server, (err) => logger.error({ err }, 'what came free could not be offered'));
  fileStoreOf(config)
    .check()
    .catch((err: unknown) => logger.error({ err }, 'the store of files can’t be used'));
  const http = createServer(makeApp(server, logger, { capture }));
  await listen(http, config);
  logger.info({ port: config.port, url: config.publicUrl }, 'listening');

  const close = async () => {
    await closeBoardStreams(server);
    await finish(http);
    for (const stopWatching of [...watches, stopPayments]) stopWatching();
    await freed.stop();
    await worker.stop();
    await boss.stop({ graceful: true, wait: true, timeout: FINISH_WITHIN_MS });
    await capture?.close();
    await source.destroy();
    logger.info('stopped');
  };
  let closing = false;
  const stop = () => {
    if (closing) process.exit(1); // asked a second time: at once
    closing = true;
    close().then(
      () => process.exit(0),
      (err: unknown) => {
        logger.error({ err }, 'stopping failed');
        process.exit(1);
      },
    );
  };
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, stop);
}

function listen(http: Server, { port, host }: Config): Promise<void> {
  return new Promise((listening, failed) => {
    http.once('error', failed);
    http.listen(port, host, () => {
      http.off('error', failed);
      listening();
    });
  });
}

/** Takes no new request, lets those under way finish, and breaks off only what outlasts its time. */
async function finish(http: Server): Promise<void> {
  const idle = setInterval(() => http.closeIdleConnections(), 100);
  const broken = setTimeout(() => http.closeAllConnections(), FINISH_WITHIN_MS);
  await new Promise((done) => http.close(done));
  clearInterval(idle);
  clearTimeout(broken);
}

/**
 * The queue tells its database how a job ended and waits for no answer, so nobody hears when that fails: the job is
 * taken up again later. Any other promise that fails unheard is a fault of the program, and the end of it.
 */
function outliveTheDatabase(tell: (error: unknown) => void): void {
  process.on('unhandledRejection', (error) => {
    if (isDatabaseAway(error)) tell(error);
    else lastWord(error);
  });
}

/** The last word of a process that can't go on: what was wrong, without what a row or a request held. */
function lastWord(error: unknown): never {
  const words = error instanceof SettingsFault ? error.message : JSON.stringify(plainError(error));
  process.stderr.write(`${words}\n`);
  process.exit(1);
}

process.on('uncaughtException', lastWord);
await main().catch(lastWord);
