import { parentPort, workerData } from 'node:worker_threads';
import type { BuildSource } from './build-source';
import { doPartsByTwo } from './build-parts';
import { makeChart, type MadeChart } from './make-chart';

/** What the thread says while it works. */
export type BuildWord =
  | { kind: 'progress'; step: string; share: number }
  | { kind: 'made'; chart: MadeChart }
  | { kind: 'refused'; words: string };

function say(word: BuildWord): void {
  parentPort?.postMessage(word);
}

const source = workerData as BuildSource; // the only thing that opens this thread is run-build
try {
  const report = (step: string, share: number) => say({ kind: 'progress', step, share });
  say({ kind: 'made', chart: makeChart(source, report, doPartsByTwo) });
} catch (error) {
  if (!(error instanceof RangeError)) throw error;
  say({ kind: 'refused', words: error.message });
}
