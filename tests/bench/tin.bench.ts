import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { tinGrid, triangulate } from '@mereward/shared/charts/tin';
import { barredBed, barredSoundings, metreCells, rmse } from './beds';
import type { Comparison } from './measure';
import { Peer, runs } from './peers';

const SCRIPT = `
import sys, time, numpy as np
from scipy.interpolate import LinearNDInterpolator
points = np.fromfile(sys.argv[1]).reshape(-1, 3)
gx, gy = np.meshgrid(np.arange(200) + 0.5, np.arange(200) + 0.5)
for line in sys.stdin:
    started = time.perf_counter()
    LinearNDInterpolator(points[:, :2], points[:, 2])(gx, gy)
    print((time.perf_counter() - started) * 1000, flush=True)
`;

/** 20,000 soundings, triangulated and read at 200 × 200 cells. */
export function tinComparison(withPeers: boolean): Comparison & { stop: () => void } {
  const samples = barredSoundings(20_000, 0);
  const cells = metreCells();
  const frame = { columns: 200, rows: 200, cellM: 1, originM: { xM: 0.5, yM: 0.5 } };
  const peer = withPeers ? startScipy(samples) : null;
  const missing = withPeers ? 'python3 with scipy is not installed' : 'asked for with --peers';
  return {
    name: 'linear surface, 20,000 → 200 × 200',
    goal: '≥ 10×',
    ours: () => {
      const { values } = tinGrid(triangulate(samples), frame);
      return `RMSE ${rmse(values, (i) => barredBed(cells.xM[i]!, cells.yM[i]!)).toFixed(4)} m`;
    },
    peer: peer === null ? { name: 'scipy', missing } : { name: 'scipy', run: () => peer.round() },
    stop: () => peer?.stop(),
  };
}

function startScipy(samples: ReturnType<typeof barredSoundings>): Peer | null {
  if (!runs('python3', ['-c', 'import scipy.interpolate'])) return null;
  const rows = Float64Array.from({ length: 3 * samples.xM.length }, (_, i) => {
    const column = [samples.xM, samples.yM, samples.valueM][i % 3]!;
    return column[Math.floor(i / 3)]!;
  });
  const file = join(mkdtempSync(join(tmpdir(), 'bench-')), 'soundings.f64');
  writeFileSync(file, rows);
  return Peer.start('python3', ['-c', SCRIPT, file]);
}
