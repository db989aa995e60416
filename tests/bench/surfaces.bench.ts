import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { krigeBlended } from '@mereward/shared/charts/kriging-blend';
import { nearestDistancesM } from '@mereward/shared/charts/nearest';
import type { SamplePoints } from '@mereward/shared/charts/sample-points';
import { chooseSurface, nameOf } from '@mereward/shared/charts/surface-choice';
import { interpolateTin, triangulate } from '@mereward/shared/charts/tin';
import { metreCells, rmse } from './beds';
import { runs } from './peers';
import { TRUE_BEDS, type TrueBed } from './true-beds';

/**
 * The surface as a chart makes it of many soundings, its way chosen and blended, held against the true bed beside what peers make
 * of the same soundings: one line a bed and size, root mean square errors in metres. Peers may know the noise as we do:
 * the thin plate is tried with several smoothings and gstat fits its own nugget; the best of each is taken.
 */
export function* surfaceLines(withPeers: boolean): Generator<string> {
  for (const count of [20_000, 100_000])
    for (const bed of TRUE_BEDS) yield surfaceLine(bed, count, withPeers);
}

const cells = metreCells();

function surfaceLine(bed: TrueBed, count: number, withPeers: boolean): string {
  const points = bed.soundings(count);
  const errorM = (values: Float64Array) => rmse(values, (i) => bed.depthM(cells.xM[i]!, cells.yM[i]!));
  const rounds = [0, 1].map(() => timed(() => ourSurface(points)));
  const { valuesM, name } = rounds[1]!.answer;
  const ours = errorM(valuesM);
  const peers: [string, number | null][] = [['TIN', errorM(interpolateTin(triangulate(points), cells))]];
  if (withPeers) peers.push(...peerErrors(bed, points, errorM));
  const best = Math.min(...peers.flatMap(([, error]) => (error === null ? [] : [error])));
  return [
    `surface of a ${bed.name} bed, ${count.toLocaleString('en-GB')}`,
    `ours RMSE ${metres(ours)} in ${rounds[1]!.ms.toFixed(0)} ms (first ${rounds[0]!.ms.toFixed(0)} ms), ${name}`,
    ...peers.map(([peer, error]) => `${peer} ${error === null ? 'not run' : metres(error)}`),
    `ratio ${(best / ours).toFixed(1)}×`,
    `goal ≤ the best peer${ours <= best ? '' : ': MISSED'}`,
    `${Math.round(process.memoryUsage().rss / 1e6)} MB resident`,
  ].join(' | ');
}

const metres = (error: number): string => `${error.toPrecision(2)} m`;

function timed<T>(work: () => T): { answer: T; ms: number } {
  const started = performance.now();
  const answer = work();
  return { answer, ms: performance.now() - started };
}

function ourSurface(points: SamplePoints): { valuesM: Float64Array; name: string } {
  const awayM = nearestDistancesM(points, cells);
  const soundingCount = points.xM.length;
  const input = {
    points,
    soundingCount,
    shoreDistanceM: new Float64Array(soundingCount),
    gapM: awayM.reduce((sum, d) => sum + d, 0) / awayM.length,
    maxGapM: 8,
    awayM,
  };
  const { best } = chooseSurface(input, () => undefined);
  return { valuesM: krigeBlended(best.setup, cells), name: nameOf(best) };
}

const THIN_PLATE = `
import sys, numpy as np
from scipy.interpolate import RBFInterpolator
p = np.fromfile(sys.argv[1]).reshape(-1, 3)
gx, gy = np.meshgrid(np.arange(200) + 0.5, np.arange(200) + 0.5)
at = np.c_[gx.ravel(), gy.ravel()]
RBFInterpolator(p[:, :2], p[:, 2], neighbors=24, smoothing=float(sys.argv[3]))(at).tofile(sys.argv[2])
`;

const GSTAT = `
suppressMessages({library(sp); library(gstat)})
a <- commandArgs(TRUE)
p <- as.data.frame(t(matrix(readBin(a[1], "double", file.size(a[1]) / 8), 3))); names(p) <- c("x", "y", "z")
set.seed(1); s <- p[sample(nrow(p), 5000), ]; coordinates(p) <- ~x+y; coordinates(s) <- ~x+y
g <- expand.grid(x = 0:199 + 0.5, y = 0:199 + 0.5); coordinates(g) <- ~x+y
v <- suppressWarnings(fit.variogram(variogram(z ~ 1, s, cutoff = 60, width = 3), vgm(1, "Exp", 30, 0.01)))
writeBin(krige(z ~ 1, p, g, v, nmax = 24, debug.level = 0)$var1.pred, a[2])
`;

const GMT_SURFACE = `gmt blockmean "$1" -bi3d -bo3d -R0.5/199.5/0.5/199.5 -I1 > "$1.mean" &&
gmt surface "$1.mean" -bi3d -R0.5/199.5/0.5/199.5 -I1 -T0.25 -G"$1.nc=nd" && gmt grd2xyz "$1.nc" -ZBLd > "$2"`;

function peerErrors(
  bed: TrueBed,
  points: SamplePoints,
  errorM: (values: Float64Array) => number,
): [string, number | null][] {
  const folder = mkdtempSync(join(tmpdir(), 'bench-'));
  const [given, made] = [join(folder, 'soundings.f64'), join(folder, 'surface.f64')];
  const { xM, yM, valueM } = points;
  writeFileSync(
    given,
    Float64Array.from({ length: 3 * xM.length }, (_, i) => [xM, yM, valueM][i % 3]![Math.floor(i / 3)]!),
  );
  const error = (command: string, args: readonly string[]): number => {
    execFileSync(command, args, { cwd: folder, stdio: ['ignore', 'ignore', 'pipe'] });
    const bytes = readFileSync(made);
    return errorM(
      new Float64Array(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength)),
    );
  };
  const smoothings = bed.noiseM > 0 ? ['0', '10', '100', '1000'] : ['0'];
  const thinPlate = () =>
    Math.min(...smoothings.map((s) => error('python3', ['-c', THIN_PLATE, given, made, s])));
  const peers: [string, number | null][] = [
    ['thin plate', runs('python3', ['-c', 'import scipy']) ? thinPlate() : null],
    ['GMT surface', runs('gmt', ['--version']) ? error('sh', ['-c', GMT_SURFACE, 'sh', given, made]) : null],
    [
      'gstat exponential',
      runs('Rscript', ['-e', 'library(gstat)']) ? error('Rscript', ['-e', GSTAT, given, made]) : null,
    ],
  ];
  rmSync(folder, { recursive: true });
  return peers;
}
