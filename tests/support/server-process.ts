import { spawn, type ChildProcess } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { freePort } from '../../scripts/lib/port.mjs';
import { freshDatabase } from './fresh-database';

/** The server as a process of its own, from its source. */
export type ServerProcess = {
  url: string;
  port: number;
  child: ChildProcess;
  /** Everything it has written so far. */
  written: () => string;
  /** The exit code, or the signal that killed it. */
  ended: Promise<number | NodeJS.Signals | null>;
  close: () => Promise<void>;
};

const root = fileURLToPath(new URL('../..', import.meta.url));

export async function aServerProcess(env: NodeJS.ProcessEnv = {}): Promise<ServerProcess> {
  const [database, port] = await Promise.all([freshDatabase(), freePort()]);
  const filesDir = mkdtempSync(join(tmpdir(), 'mereward-files-'));
  const child = spawn(process.execPath, ['--import', 'tsx', 'apps/api/src/main.ts'], {
    cwd: root,
    env: {
      PATH: process.env.PATH,
      DATABASE_URL: database.url,
      PORT: String(port),
      FILES_DIR: filesDir,
      ...env,
    },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const parts: string[] = [];
  child.stdout.on('data', (part: Buffer) => parts.push(part.toString()));
  child.stderr.on('data', (part: Buffer) => parts.push(part.toString()));
  const ended = new Promise<number | NodeJS.Signals | null>((end) =>
    child.once('exit', (code, signal) => end(code ?? signal)),
  );
  const url = `http://127.0.0.1:${port}`;
  const close = async () => {
    child.kill('SIGKILL');
    await ended;
    await database.drop();
    rmSync(filesDir, { recursive: true, force: true });
  };
  const written = () => parts.join('');
  let over = false;
  void ended.then(() => (over = true));
  while (!(await ready(url))) {
    if (over) {
      await close();
      throw new Error(`The server ended while starting:\n${written()}`);
    }
    await new Promise((next) => setTimeout(next, 50));
  }
  return { url, port, child, written, ended, close };
}

async function ready(url: string): Promise<boolean> {
  try {
    return (await fetch(`${url}/api/ready`)).ok;
  } catch {
    return false;
  }
}
