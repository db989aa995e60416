import { readFileSync } from 'node:fs';
import { buildApi, buildWeb } from './lib/build.mjs';
import { startCardProvider } from './lib/card-provider.mjs';
import { callBuilt, filesFolder, openDatabase, signingSecret, takePlace } from './lib/database.mjs';
import { Halt } from './lib/halt.mjs';
import { requireNode, requireWritableRoot } from './lib/machine.mjs';
import { installDependencies } from './lib/packages.mjs';
import { at } from './lib/paths.mjs';
import { servingPort } from './lib/port.mjs';
import { stopAll } from './lib/run.mjs';
import { startServer } from './lib/server.mjs';
import { elapsed, step } from './lib/steps.mjs';
import { whenAskedToStop } from './lib/stopping.mjs';

/** What has been started, to be stopped in the opposite order. @type {(() => Promise<void> | void)[]} */
const started = [];
const stop = whenAskedToStop();

/** @param {string} text */
const say = (text) => process.stdout.write(`${text}\n`);

async function start() {
  const startedMs = performance.now();
  requireNode();
  requireWritableRoot();
  const place = takePlace();
  started.push(place.release);
  const port = await servingPort(process.env.PORT);
  await step('Packages', installDependencies);
  const database = await step('Database', (note) => openDatabase(place, note));
  started.push(database.stop);
  await step('Server build', buildApi);
  await step('Client build', buildWeb);
  const settings = {
    DATABASE_URL: database.url,
    ACCESS_TOKEN_SECRET: process.env.ACCESS_TOKEN_SECRET ?? signingSecret(place),
    FILES_DIR: process.env.FILES_DIR ?? filesFolder(place),
    LOG_LEVEL: process.env.LOG_LEVEL ?? 'error',
  };
  await step('Migrations', () => callBuilt('migrate.js', 'migrate', settings));
  const demo = await step('Demo', (note) => openDemo(settings, note));
  const cards = demo.shown
    ? await step('Card page', () => startCardProvider({ folder: place.folder, serverPort: port }))
    : null;
  if (cards) started.push(cards.stop);
  const server = startServer(port, { ...settings, ...cards?.settings, DEMO: String(demo.shown) });
  started.push(server.stop);
  await step('Server', () => server.ready);
  say('');
  say(`Mereward is at ${server.url}  (ready in ${elapsed(startedMs)})`);
  for (const line of demo.signIns) say(line);
  say('Ctrl-C stops it.');
  const code = await Promise.race([server.exited, ...(database.lost ? [database.lost] : [])]);
  throw new Error(`The server stopped by itself (exit code ${code}).`);
}

/**
 * Puts the demo into a database that holds nobody and lists its sign-ins; DEMO=true or false decides otherwise.
 * @param {NodeJS.ProcessEnv} settings @param {(text: string) => void} note
 * @returns {Promise<{ shown: boolean, signIns: string[] }>}
 */
async function openDemo(settings, note) {
  const wish = process.env.DEMO;
  const shown = wish
    ? /^(1|true|yes|on)$/i.test(wish)
    : (await callBuilt('demo/room-for-demo.js', 'roomForDemo', settings)) === true;
  if (!shown) {
    note(wish ? 'left out, as DEMO says' : 'left out: this database holds people already');
    return { shown, signIns: [] };
  }
  const lines = await callBuilt('demo/seed.js', 'seed', settings);
  return { shown, signIns: Array.isArray(lines) ? lines.map(String) : [] };
}

/** Stops what is still being done, then what was started, the last first: the database outlives its users. */
async function stopStarted() {
  await stopAll();
  for (const undo of started.splice(0).reverse()) await undo();
}

/** @param {unknown} error */
function explain(error) {
  if (error instanceof Halt) process.stderr.write(`\n${error.message}\n`);
  else process.stderr.write(`\n${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
}

let code = 0;
try {
  await Promise.race([start(), stop.asked]);
  say('\nStopping.');
} catch (error) {
  code = 1;
  if (!stop.isAsked()) explain(error);
  else code = 0;
}
await stopStarted();
const { version } = JSON.parse(readFileSync(at('package.json'), 'utf8'));
if (code === 0) say(`Mereward ${version} has stopped.`);
process.exit(code);
