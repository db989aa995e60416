import { randomBytes } from 'node:crypto';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { apiFolder } from './build.mjs';
import { at, root } from './paths.mjs';
import { freePort, tryPort } from './port.mjs';
import { exited, launchApart, pause, signalGroup } from './run.mjs';

const readyWithinMs = 30_000;
const stopWithinMs = 5_000;

/**
 * @typedef {object} CardProvider
 * @property {NodeJS.ProcessEnv} settings what the server needs to speak with it
 * @property {() => Promise<void>} stop
 */

/**
 * Starts the demo's card provider, which takes no real card, unless the environment names a real one.
 * @param {{ folder: string, serverPort: number, log?: number | 'inherit' }} wishes folder: where it keeps its state
 * @returns {Promise<CardProvider>}
 */
export async function startCardProvider({ folder, serverPort, log = 'inherit' }) {
  if (process.env.STRIPE_SECRET_KEY) return { settings: {}, stop: async () => {} };
  const besideIt = serverPort + 1000 <= 65_535 ? serverPort + 1000 : 0; // a page opened before a restart stays where it was
  const port = (await tryPort(besideIt, '127.0.0.1')) ?? (await freePort());
  const keys = {
    STRIPE_SECRET_KEY: `sk_demo_${randomBytes(16).toString('hex')}`,
    STRIPE_WEBHOOK_SECRET: `whsec_demo_${randomBytes(16).toString('hex')}`,
  };
  const env = {
    ...process.env,
    NODE_ENV: 'production',
    ...keys,
    CARD_PROVIDER_PORT: String(port),
    CARD_PROVIDER_FILE: join(folder, 'card-provider.json'),
    WEBHOOK_URL: `http://127.0.0.1:${serverPort}/api/payments/webhook`,
  };
  const follow = pathToFileURL(at('scripts', 'lib', 'follow-parent.mjs')).href;
  const args = [
    '--enable-source-maps',
    '--import',
    follow,
    join(apiFolder, 'demo', 'card-provider', 'main.js'),
  ];
  const child = launchApart(process.execPath, args, { cwd: root, env, stdio: ['ignore', log, log, 'ipc'] });
  const gone = exited(child);
  let over = false;
  void gone.then(() => (over = true));
  const url = `http://127.0.0.1:${port}`;
  const stop = async () => {
    if (!over) signalGroup(child, 'SIGTERM');
    await Promise.race([gone, pause(stopWithinMs)]);
    signalGroup(child, 'SIGKILL');
    await gone;
  };
  const sinceMs = performance.now();
  while (!(await answers(`${url}/ready`))) {
    if (over || performance.now() - sinceMs > readyWithinMs) {
      await stop();
      throw new Error('The demo’s card provider did not start.');
    }
    await pause(50);
  }
  return { settings: { ...keys, STRIPE_URL: url }, stop };
}

/** @param {string} url */
async function answers(url) {
  try {
    return (await fetch(url, { signal: AbortSignal.timeout(2_000) })).ok;
  } catch {
    return false;
  }
}
