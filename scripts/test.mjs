import { buildApi, buildWeb } from './lib/build.mjs';
import { chromium } from './lib/chromium.mjs';
import { Halt } from './lib/halt.mjs';
import { requireNode, requireWritableRoot } from './lib/machine.mjs';
import { installDependencies } from './lib/packages.mjs';
import { postgresBinaries } from './lib/postgres-binaries.mjs';
import { stopAll } from './lib/run.mjs';
import { runStage, stages, total } from './lib/stages.mjs';
import { elapsed, step } from './lib/steps.mjs';
import { whenAskedToStop } from './lib/stopping.mjs';

/** @typedef {import('./lib/stages.mjs').Sum} Sum */

const startedMs = performance.now();
const stop = whenAskedToStop();

/** Every result so far, so that a run cut short still counts what it saw. @type {Sum[]} */
const sums = [];

/** @param {string} name @param {unknown} error */
function fail(name, error) {
  const text =
    error instanceof Halt
      ? error.message
      : error instanceof Error
        ? (error.stack ?? error.message)
        : String(error);
  process.stdout.write(`\n✗ ${name}: ${text}\n`);
  sums.push({ passed: 0, failed: 1, skipped: 0 });
}

/** Runs stages one after another; one that can't be run is a failure and the next begins. @param {import('./lib/stages.mjs').Stage[]} lane */
async function runLane(lane) {
  for (const stage of lane) {
    if (stop.isAsked()) return;
    try {
      sums.push(await runStage(stage));
    } catch (error) {
      fail(stage.name, error);
    }
  }
}

/** The journeys need what is built, so they come after it; answers what can be run. */
async function builtJourneys() {
  try {
    await step('Server build', buildApi);
    await step('Client build', buildWeb);
    await step('Chromium', async (note) => void (await chromium(note)));
  } catch (error) {
    fail('journeys', error);
    return [];
  }
  return [stages.journeys];
}

async function test() {
  requireNode();
  requireWritableRoot();
  await step('Packages', installDependencies);
  await step('PostgreSQL', async (note) => void (await postgresBinaries({ note })));
  const { format, lint, types, clientTypes, architecture, unit, reference, api } = stages;
  // Two lanes of about one length: what needs a build and then what reads the source, beside everything else.
  const journeys = async () => runLane([...(await builtJourneys()), lint, format]);
  await Promise.all([journeys(), runLane([architecture, types, clientTypes, unit, reference, api])]);
}

try {
  await Promise.race([test(), stop.asked]);
} catch (error) {
  fail('set-up', error);
}
if (stop.isAsked()) fail('the run', new Halt('it was stopped before its end'));
await stopAll();
const { passed, failed, skipped } = total(sums);
const also = skipped > 0 ? `; ${skipped} were skipped and count as neither` : '';
process.stdout.write(`\nAll checks took ${elapsed(startedMs)}${also}.\n`);
process.stdout.write(`${passed} passed, ${failed} failed\n`, () =>
  process.exit(failed > 0 || passed === 0 ? 1 : 0),
);
