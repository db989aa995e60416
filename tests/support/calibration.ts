import { buildChart } from '@mereward/shared/charts/build-chart';
import { columnXM, isSurveyed, rowYM } from '@mereward/shared/charts/grid';
import type { Grade } from '@mereward/shared/surveys/contract';
import { simulatedSurvey, type SimulatedCast, type SimulatedSurvey } from './simulated-surveys';

/** The limits of a grade as people are told them, 19 in 20, metres: position each way, depth. */
const LIMITS: Record<Grade, { placeM: number; depthM: number }> = {
  A: { placeM: 2, depthM: 0.3 },
  B: { placeM: 4, depthM: 0.6 },
  C: { placeM: 8, depthM: 1.2 },
  D: { placeM: Infinity, depthM: Infinity },
};

export type GradeSeen = {
  casts: number;
  withinLimits: { along: number; across: number; depth: number }; // shares
  /** Shares inside the cast's own 95 % ellipse, and its own 1.96 σ; depth: the bed at the true place against what was read. */
  own: { ellipse: number; along: number; across: number; depth: number };
  rmsPlaceM: number;
};

export type Calibration = {
  surveys: number;
  cells: number;
  heldShare: number; // of surveyed cells whose true depth lies within 1.96 σ
  meanSquaredSigmas: number;
  rmseM: number;
  grades: Record<Grade, GradeSeen>;
  words: string;
};

/** Whole surveys simulated, charted and held against their beds, pooled. */
export function calibrate({ firstSeed, surveys }: { firstSeed: number; surveys: number }): Calibration {
  const seen = { cells: 0, held: 0, squares: 0, sigmas: 0 };
  const casts: SimulatedCast[] = [];
  for (let seed = firstSeed; seed < firstSeed + surveys; seed++) {
    const survey = simulatedSurvey(seed);
    casts.push(...survey.casts);
    holdChart(survey, seen);
  }
  const grades = gradesSeen(casts);
  const heldShare = seen.held / seen.cells;
  const rmseM = Math.sqrt(seen.squares / seen.cells);
  const percent = (share: number) => `${(100 * share).toFixed(1)} %`;
  const gradeWords = (['A', 'B', 'C', 'D'] as const).map((grade) => {
    const { casts: count, own } = grades[grade];
    const shares = Object.entries(own).map(([name, share]) => `${name} ${percent(share)}`);
    return `${grade} (${count}) ${shares.join(', ')}`;
  });
  return {
    surveys,
    cells: seen.cells,
    heldShare,
    meanSquaredSigmas: seen.sigmas / seen.cells,
    rmseM,
    grades,
    words:
      `${surveys} simulated bank surveys: 95 % bands hold ${percent(heldShare)} of ${seen.cells} cells, ` +
      `RMSE ${rmseM.toFixed(3)} m; casts within their own 95 %: ${gradeWords.join('; ')}`,
  };
}

function gradesSeen(casts: readonly SimulatedCast[]): Record<Grade, GradeSeen> {
  const seen = (grade: Grade) =>
    holdCasts(
      casts.filter(({ sounding }) => sounding.grade === grade),
      grade,
    );
  return { A: seen('A'), B: seen('B'), C: seen('C'), D: seen('D') };
}

type ChartSeen = { cells: number; held: number; squares: number; sigmas: number };

function holdChart({ lake, soundings }: SimulatedSurvey, seen: ChartSeen): void {
  const input = { outline: lake.outline, soundings, contourStepM: 0.5, maxGapM: 10, cellM: 2 };
  const { depth, sigma, frame } = buildChart(input, () => undefined);
  depth.values.forEach((charted, i) => {
    const place = {
      xM: columnXM(frame, i % frame.columns),
      yM: rowYM(frame, Math.floor(i / frame.columns)),
    };
    const truthM = isSurveyed(charted) ? lake.depthM(place) : null;
    if (truthM === null) return;
    const errorM = charted - truthM;
    const sigmas = errorM / sigma.values[i]!;
    seen.cells++;
    seen.squares += errorM * errorM;
    seen.sigmas += sigmas * sigmas;
    if (Math.abs(sigmas) <= 1.96) seen.held++;
  });
}

function holdCasts(casts: readonly SimulatedCast[], grade: Grade): GradeSeen {
  const { placeM, depthM } = LIMITS[grade];
  const errors = casts.map(({ sounding, truth, trueDepthM }) => {
    const [dx, dy] = [sounding.xM - truth.xM, sounding.yM - truth.yM];
    const turn = (sounding.bearingDeg * Math.PI) / 180;
    const [sin, cos] = [Math.sin(turn), Math.cos(turn)];
    const { xx, xy, yy } = sounding.covariance;
    const alongSigmaM = Math.sqrt(xx * sin * sin + 2 * xy * sin * cos + yy * cos * cos);
    const acrossSigmaM = Math.sqrt(xx * cos * cos - 2 * xy * sin * cos + yy * sin * sin);
    return {
      alongSigmaM,
      acrossSigmaM,
      alongM: dx * sin + dy * cos,
      acrossM: dx * cos - dy * sin,
      placeM: Math.hypot(dx, dy),
      mahalanobis2: (yy * dx * dx - 2 * xy * dx * dy + xx * dy * dy) / (xx * yy - xy * xy),
      depthM: (sounding.depthM ?? Number.NaN) - trueDepthM,
      depthSigmas: ((sounding.depthM ?? Number.NaN) - trueDepthM) / (sounding.depthSigmaM ?? Number.NaN),
    };
  });
  type Error = (typeof errors)[number];
  const share = (inside: (error: Error) => boolean) => errors.filter(inside).length / errors.length;
  return {
    casts: casts.length,
    withinLimits: {
      along: share((e) => Math.abs(e.alongM) <= placeM),
      across: share((e) => Math.abs(e.acrossM) <= placeM),
      depth: share((e) => Math.abs(e.depthM) <= depthM),
    },
    own: {
      ellipse: share((e) => e.mahalanobis2 <= 5.991), // χ² of two degrees at 95 %
      along: share((e) => Math.abs(e.alongM) <= 1.96 * e.alongSigmaM),
      across: share((e) => Math.abs(e.acrossM) <= 1.96 * e.acrossSigmaM),
      depth: share((e) => Math.abs(e.depthSigmas) <= 1.96),
    },
    rmsPlaceM: Math.sqrt(errors.reduce((sum, e) => sum + e.placeM ** 2, 0) / errors.length),
  };
}
