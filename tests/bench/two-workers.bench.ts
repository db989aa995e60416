import { once } from 'node:events';
import { Worker } from 'node:worker_threads';
import { readsSource } from '@mereward/api/jobs/thread';
import type { KrigingSetup } from '@mereward/shared/charts/kriging-setup';
import type { SamplePoints } from '@mereward/shared/charts/sample-points';
import { barredBed, barredSoundings, metreCells, rmse } from './beds';
import { startGstat } from './kriging.bench';
import type { KrigePart } from './krige-part.worker';
import type { Comparison } from './measure';

const shared = (column: Float64Array): Float64Array => {
  const copy = new Float64Array(new SharedArrayBuffer(column.byteLength));
  copy.set(column);
  return copy;
};

/** Prediction and variance from the 24 nearest of 100,000 at 200 × 200 cells: two workers, half the targets each. */
export function twoWorkersComparison(withPeers: boolean): Comparison & { stop: () => void } {
  const plain = barredSoundings(100_000, 0.05);
  const samples: SamplePoints = {
    xM: shared(plain.xM),
    yM: shared(plain.yM),
    valueM: shared(plain.valueM),
    errorVarianceM2: shared(plain.errorVarianceM2),
  };
  const setup: KrigingSetup = {
    samples,
    variogram: { model: 'exponential', nuggetM2: 0.01, partialSillM2: 1, rangeM: 30 },
    nuggetIs: 'field',
  };
  const cells = metreCells();
  const [xM, yM] = [shared(cells.xM), shared(cells.yM)];
  const valuesM = shared(new Float64Array(xM.length));
  const varianceM2 = shared(new Float64Array(xM.length));
  const workers = [0, 1].map(
    () =>
      new Worker(new URL('./krige-part.worker.ts', import.meta.url), {
        execArgv: ['--import', readsSource()],
      }),
  );
  const halves = [0, 1].map((half): KrigePart => {
    const of = (column: Float64Array) =>
      column.subarray((half * xM.length) / 2, ((half + 1) * xM.length) / 2);
    return {
      setup,
      targets: { xM: of(xM), yM: of(yM) },
      valuesM: of(valuesM),
      varianceM2: of(varianceM2),
    };
  });
  const peer = withPeers ? startGstat(plain) : null;
  const missing = withPeers ? 'Rscript with gstat is not installed' : 'asked for with --peers';
  return {
    name: 'kriging, 100,000, 24 neighbours → 200 × 200, two workers',
    goal: '≥ 8×, within 1e-6 m',
    ours: async () => {
      const done = workers.map((worker) => once(worker, 'message'));
      workers.forEach((worker, half) => worker.postMessage(halves[half]));
      await Promise.all(done);
      const truth = `RMSE ${rmse(valuesM, (i) => barredBed(xM[i]!, yM[i]!)).toFixed(4)} m`;
      const theirs = peer?.answer.trim().split(' ').map(Number) ?? [];
      if (theirs.length !== 3) return truth;
      const apart = Math.max(...[0, 9998, 39_999].map((cell, i) => Math.abs(valuesM[cell]! - theirs[i]!)));
      return `${truth}, ${apart.toExponential(1)} m from the peer`;
    },
    peer: peer === null ? { name: 'gstat', missing } : { name: 'gstat', run: () => peer.round() },
    stop: () => {
      peer?.stop();
      for (const worker of workers) void worker.terminate();
    },
  };
}
