import { makeDataSource } from '@mereward/db/data-source';
import { readFileSync } from 'node:fs';
import { createServer } from 'node:http';
import { makeApp } from './app';
import { readConfig, type Config } from './config';
import { handlers } from './handlers';
import { makeLogger } from './http/logging';
import { jobsOn, openQueue } from './jobs/queue';
import { work } from './jobs/worker';
import { openCapture } from './mail/capture';

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
  const source = await makeDataSource(config.databaseUrl).initialize();
  const boss = await openQueue(config.databaseUrl);
  const server = { config, source, jobs: jobsOn(boss), clock: clockOf(config) };
  const worker = await work({ boss, server, logger, handlers });
  const http = createServer(makeApp(server, logger, capture));
  http.listen(config.port, config.host, () => {
    logger.info({ port: config.port }, 'listening');
  });

  let closing = false;
  const close = async () => {
    if (closing) return;
    closing = true;
    http.closeIdleConnections();
    await new Promise((done) => http.close(done)); // what is under way may finish
    await worker.stop();
    await boss.stop({ graceful: true, timeout: 10_000 });
    await capture?.close();
    await source.destroy();
  };
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void close());
}

await main();
