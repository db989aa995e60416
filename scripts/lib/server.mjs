import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { apiFolder, webFolder } from './build.mjs';
import { at, root } from './paths.mjs';
import { exited, launchApart, pause, signalGroup } from './run.mjs';

const readyWithinMs = 60_000;
const stopWithinMs = 20_000;

/**
 * @typedef {object} Server
 * @property {string} url
 * @property {Promise<void>} ready
 * @property {Promise<number>} exited
 * @property {() => Promise<void>} stop
 * @property {() => Promise<void>} kill ends it at once, as a power cut does
 */

/**
 * Starts the built server; `ready` waits until it says so itself.
 * @param {number} port
 * @param {NodeJS.ProcessEnv} settings laid over the environment
 * @param {{ log?: number | 'inherit' }} [options] log: where its lines go, a file's number or this terminal
 * @returns {Server}
 */
export function startServer(port, settings, { log = 'inherit' } = {}) {
  const follow = pathToFileURL(at('scripts', 'lib', 'follow-parent.mjs')).href;
  const env = { ...process.env, NODE_ENV: 'production', WEB_DIR: webFolder, ...settings, PORT: String(port) };
  const args = ['--enable-source-maps', '--import', follow, join(apiFolder, 'main.js')];
  const child = launchApart(process.execPath, args, { cwd: root, env, stdio: ['ignore', log, log, 'ipc'] });
  const gone = exited(child);
  let code = /** @type {number | undefined} */ (undefined);
  void gone.then((each) => (code = each));
  const host = settings.HOST ?? process.env.HOST ?? '127.0.0.1';
  const asked = host === '0.0.0.0' || host === '::' ? '127.0.0.1' : host;
  const url = `http://${asked.includes(':') ? `[${asked}]` : asked}:${port}`;
  const ready = async () => {
    const sinceMs = performance.now();
    while (!(await answers(`${url}/api/ready`))) {
      if (code !== undefined) throw new Error(`The server stopped while starting (exit code ${code}).`);
      if (performance.now() - sinceMs > readyWithinMs) {
        signalGroup(child, 'SIGKILL');
        throw new Error('The server did not become ready within a minute.');
      }
      await new Promise((resolve) => setTimeout(resolve, 50));
    }
  };
  return {
    url,
    ready: ready(),
    exited: gone,
    async kill() {
      signalGroup(child, 'SIGKILL');
      await gone;
    },
    async stop() {
      if (code === undefined) signalGroup(child, 'SIGTERM');
      await Promise.race([gone, pause(stopWithinMs)]);
      signalGroup(child, 'SIGKILL');
      await gone;
    },
  };
}

/** @param {string} url */
async function answers(url) {
  try {
    return (await fetch(url, { signal: AbortSignal.timeout(5_000) })).ok;
  } catch {
    return false;
  }
}
