import type { WorkTable } from '@mereward/api/jobs/claimed-run';
import { spawn, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { createRequire } from 'node:module';
import { fileURLToPath, pathToFileURL } from 'node:url';
import type { TestServer } from './server';

const entry = fileURLToPath(new URL('../../apps/api/src/main.ts', import.meta.url));
const loader = pathToFileURL(createRequire(import.meta.url).resolve('tsx')).href;

/** The real server in a process of its own, on a test's own database, there to be killed. */
export function aProcessOn({ server }: TestServer, env: NodeJS.ProcessEnv = {}): ChildProcess {
  const { databaseUrl, smtpUrl, filesDir } = server.config;
  return spawn(process.execPath, ['--import', loader, entry], {
    env: {
      ...process.env,
      DATABASE_URL: databaseUrl,
      SMTP_URL: smtpUrl ?? '',
      FILES_DIR: filesDir,
      WEB_DIR: filesDir,
      PORT: '0',
      LOG_LEVEL: 'silent',
      ...env,
    },
    stdio: 'ignore',
  });
}

export async function killed(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return;
  const gone = once(child, 'exit');
  child.kill('SIGKILL');
  await gone;
}

export async function until(holds: () => Promise<boolean>): Promise<void> {
  while (!(await holds())) await new Promise((again) => setTimeout(again, 10));
}

/** Lets the time pass after which a run that says nothing counts as lost. */
export const letItBeLost = ({ server }: TestServer, { name }: WorkTable): Promise<unknown> =>
  server.source.query(
    `UPDATE ${name} SET updated_at = updated_at - interval '1 minute' WHERE state = 'running'`,
  );
