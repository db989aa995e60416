import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { readdirSync, readFileSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { ownFolder, root } from '../../scripts/lib/paths.mjs';
import { freePort } from '../../scripts/lib/port.mjs';

export type DemoSite = {
  url: string;
  databaseUrl: string;
  /** From the command to the line that says it is there. */
  readyMs: number;
  stop: () => Promise<void>;
};

/** The program as anybody starts it, with its demo. What it says while it fails is in the error. */
export async function openDemoSite(): Promise<DemoSite> {
  const started = performance.now();
  const child = spawn(process.execPath, ['scripts/start.mjs'], {
    cwd: root,
    env: { ...process.env, PORT: String(await freePort()) },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  const gone = once(child, 'exit');
  const stop = async () => {
    child.kill('SIGTERM');
    await gone;
  };
  let said = '';
  const url = await new Promise<string>((found, failed) => {
    const listen = (text: Buffer) => {
      said += text.toString('utf8');
      const at = /Mereward is at (\S+)/.exec(said)?.[1];
      if (at) found(at);
    };
    child.stdout.on('data', listen);
    child.stderr.on('data', listen);
    void gone.then(() => failed(new Error(`The program did not start:\n${said.slice(-2000)}`)));
  });
  return { url, databaseUrl: newestDatabaseUrl(), readyMs: performance.now() - started, stop };
}

/** Each running copy writes its database's address down when it starts; ours is the last. */
function newestDatabaseUrl(): string {
  const own = join(ownFolder('demo'), '..');
  const files = readdirSync(own)
    .filter((name) => /^demo(-\d)?$/.test(name))
    .map((name) => join(own, name, 'database-url'))
    .flatMap((file) => {
      const found = statSync(file, { throwIfNoEntry: false });
      return found ? [{ file, atMs: found.mtimeMs }] : [];
    })
    .sort((one, other) => other.atMs - one.atMs);
  if (!files[0]) throw new Error('No running copy has written its database’s address down');
  return readFileSync(files[0].file, 'utf8').trim();
}
