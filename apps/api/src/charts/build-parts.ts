import { availableParallelism } from 'node:os';
import type { Worker } from 'node:worker_threads';
import { doPartsHere, roomFor, type DoParts } from '@mereward/shared/charts/surface-parts';
import { openThread } from '../jobs/thread';
import { doFreeParts, finishParts, type SharedParts } from './part-claims';

/** Below this many samples a chart is quicker made than a second thread is opened. */
const WORTH_A_THREAD = 2000;
/** A part takes a second or two; a thread that is silent for this long after its turn is taken for lost. */
const LOST_AFTER_MS = 30_000;

let second: Worker | undefined; // ends with the thread that opened it

/**
 * Shares the parts of a large chart between this thread and a second one, and waits for both. Only for a thread that may
 * wait. A part the second thread does not finish is done here, with the same answers.
 */
export const doPartsByTwo: DoParts = (parts, report) => {
  const samples = parts[0]?.setup.samples.xM.length ?? 0;
  if (parts.length < 2 || samples <= WORTH_A_THREAD || availableParallelism() < 2)
    return doPartsHere(parts, report);
  const { joined, starts } = roomFor(
    parts,
    (length) => new Float64Array(new SharedArrayBuffer(length * Float64Array.BYTES_PER_ELEMENT)),
  );
  const marks = new Int32Array(new SharedArrayBuffer((parts.length + 1) * Int32Array.BYTES_PER_ELEMENT));
  const shared: SharedParts = { parts, starts, joined, marks };
  second ??= openSecond();
  second.postMessage(shared);
  doFreeParts(shared, () => report(marks.subarray(1).reduce((sum, done) => sum + done, 0) / parts.length));
  finishParts(shared, LOST_AFTER_MS);
  report(1);
  return joined;
};

function openSecond(): Worker {
  const thread = openThread('charts/part', undefined);
  thread.unref(); // a chart that is made needn't wait for it
  thread.on('error', () => (second = undefined)); // what it left undone was done here
  return thread;
}
