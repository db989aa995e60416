import { mkdtempSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { krige } from '@mereward/shared/charts/kriging';
import type { KrigingSetup } from '@mereward/shared/charts/kriging-setup';
import { barredBed, barredSoundings, metreCells, rmse } from './beds';
import type { Comparison } from './measure';
import { Peer, runs } from './peers';

const SCRIPT = `
suppressMessages({library(sp); library(gstat)})
args <- commandArgs(TRUE)
p <- read.csv(args[1]); coordinates(p) <- ~x+y
g <- expand.grid(x = 0:199 + 0.5, y = 0:199 + 0.5); coordinates(g) <- ~x+y
v <- vgm(1, "Exp", 30, 0.01)
input <- file("stdin"); open(input)
while (length(readLines(input, n = 1)) > 0) {
  t <- system.time(k <- krige(z ~ 1, p, g, v, nmax = 24, debug.level = 0))["elapsed"]
  cat(t * 1000, paste(k$var1.pred[c(1, 9999, 40000)], collapse = " "), "\\n")
}
`;

/** Prediction and variance from the 24 nearest of 20,000 at 200 × 200 cells, one thread. */
export function krigingComparison(withPeers: boolean): Comparison & { stop: () => void } {
  const samples = barredSoundings(20_000, 0.05);
  const cells = metreCells();
  const setup: KrigingSetup = {
    samples,
    variogram: { model: 'exponential', nuggetM2: 0.01, partialSillM2: 1, rangeM: 30 },
    nuggetIs: 'field',
  };
  const peer = withPeers ? startGstat(samples) : null;
  const missing = withPeers ? 'Rscript with gstat is not installed' : 'asked for with --peers';
  return {
    name: 'kriging, 20,000, 24 neighbours → 200 × 200',
    goal: '≥ 4×, within 1e-6 m',
    ours: () => {
      const { valuesM } = krige(setup, cells, 24);
      const truth = `RMSE ${rmse(valuesM, (i) => barredBed(cells.xM[i]!, cells.yM[i]!)).toFixed(4)} m`;
      const theirs = peer?.answer.trim().split(' ').map(Number) ?? [];
      if (theirs.length !== 3) return truth;
      const apart = Math.max(...[0, 9998, 39_999].map((cell, i) => Math.abs(valuesM[cell]! - theirs[i]!)));
      return `${truth}, ${apart.toExponential(1)} m from the peer`;
    },
    peer: peer === null ? { name: 'gstat', missing } : { name: 'gstat', run: () => peer.round() },
    stop: () => peer?.stop(),
  };
}

/** gstat kept running over these soundings: each round kriges the 200 × 200 cells from 24 neighbours. */
export function startGstat(samples: ReturnType<typeof barredSoundings>): Peer | null {
  if (!runs('Rscript', ['-e', 'library(gstat)'])) return null;
  const rows = Array.from(samples.xM, (x, i) => `${x},${samples.yM[i]},${samples.valueM[i]}`);
  const file = join(mkdtempSync(join(tmpdir(), 'bench-')), 'soundings.csv');
  writeFileSync(file, ['x,y,z', ...rows].join('\n'));
  return Peer.start('Rscript', ['-e', SCRIPT, file]);
}
