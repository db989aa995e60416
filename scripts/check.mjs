import { requireNode } from './lib/machine.mjs';
import { stopAll } from './lib/run.mjs';
import { runStage, stages, total } from './lib/stages.mjs';
import { whenAskedToStop } from './lib/stopping.mjs';

/** The quick checks every commit passes: format, types, architecture, unit. */
const stop = whenAskedToStop();

async function check() {
  requireNode();
  const { format, types, clientTypes, architecture, unit } = stages;
  const sums = [];
  for (const stage of [format, types, clientTypes, architecture, unit]) sums.push(await runStage(stage));
  return total(sums);
}

const answer = await Promise.race([check(), stop.asked.then(() => ({ passed: 0, failed: 1, skipped: 0 }))]);
await stopAll();
process.stdout.write(`${answer.passed} passed, ${answer.failed} failed\n`, () =>
  process.exit(answer.failed > 0 ? 1 : 0),
);
