import { parentPort } from 'node:worker_threads';
import { krige } from '@mereward/shared/charts/kriging';
import type { KrigingSetup } from '@mereward/shared/charts/kriging-setup';
import type { Targets } from '@mereward/shared/charts/sample-points';

/** A part of the targets, and where its answers go; the arrays are shared, not copied. */
export type KrigePart = {
  setup: KrigingSetup;
  targets: Targets;
  valuesM: Float64Array;
  varianceM2: Float64Array;
};

parentPort?.on('message', ({ setup, targets, valuesM, varianceM2 }: KrigePart) => {
  const made = krige(setup, targets, 24);
  valuesM.set(made.valuesM);
  varianceM2.set(made.varianceM2);
  parentPort?.postMessage('done');
});
