import { makeDataSource } from '@mereward/db/data-source';
import { readFileSync } from 'node:fs';
import { createServer } from 'node:http';
import { makeApp } from './app';
import { readConfig, type Config } from './config';
import { makeLogger } from './http/logging';
import { jobsOn, openQueue } from './jobs/queue';
import { work } from './jobs/worker';

/** The instant of CLOCK_FILE when a test sets one, else the machine's. */
function clockOf(config: Config): () => Date {
  const file = config.clockFile;
  return file ? () => new Date(readFileSync(file, 'utf8').trim()) : () => new Date();
}

async function main(): Promise<void> {
  const config = readConfig(process.env);
  const logger = makeLogger(config);
  const source = await makeDataSource(config.databaseUrl).initialize();
  const boss = await openQueue(config.databaseUrl);
  const server = { config, source, jobs: jobsOn(boss), clock: clockOf(config) };
  const worker = await work(boss, server, logger);
  const http = createServer(makeApp(server, logger));
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
    await source.destroy();
  };
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void close());
}

await main();
