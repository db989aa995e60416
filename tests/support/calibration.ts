import { buildChart } from '@mereward/shared/charts/build-chart';
import { columnXM, isSurveyed, rowYM } from '@mereward/shared/charts/grid';
import type { Grade } from '@mereward/shared/surveys/contract';
import { simulatedSurvey, type SimulatedCast, type SimulatedSurvey } from './simulated-surveys';

/** The one-σ limits of a grade as the bailiffs are told them, metres: position each way, depth. */
const LIMITS: Record<Grade, { placeM: number; depthM: number }> = {
  A: { placeM: 1, depthM: 0.15 },
  B: { placeM: 2, depthM: 0.3 },
  C: { placeM: 4, depthM: 0.6 },
  D: { placeM: Infinity, depthM: Infinity },
};

export type GradeSeen = {
  casts: number;
  withinLimits: { along: number; across: number; depth: number }; // shares
  ownEllipse: number; // share inside the cast's own 95 % ellipse
  ownDepthBand: number; // share inside its own 1.96 σ of depth; the bed at the true place against what was read
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
  const gradeSeen = (grade: Grade) =>
    holdCasts(
      casts.filter(({ sounding }) => sounding.grade === grade),
      grade,
    );
  const grades = { A: gradeSeen('A'), B: gradeSeen('B'), C: gradeSeen('C'), D: gradeSeen('D') };
  const heldShare = seen.held / seen.cells;
  const rmseM = Math.sqrt(seen.squares / seen.cells);
  const percent = (share: number) => `${(100 * share).toFixed(1)} %`;
  const gradeWords = (['A', 'B', 'C'] as const).map((grade) => {
    const { casts: count, withinLimits: w } = grades[grade];
    return `${grade} (${count}) along ${percent(w.along)}, across ${percent(w.across)}, depth ${percent(w.depth)}`;
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
      `RMSE ${rmseM.toFixed(3)} m; casts within their grade’s limits: ${gradeWords.join('; ')}`,
  };
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
    const { xx, xy, yy } = sounding.covariance;
    return {
      alongM: dx * Math.sin(turn) + dy * Math.cos(turn),
      acrossM: dx * Math.cos(turn) - dy * Math.sin(turn),
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
    ownEllipse: share((e) => e.mahalanobis2 <= 5.991), // χ² of two degrees at 95 %
    ownDepthBand: share((e) => Math.abs(e.depthSigmas) <= 1.96),
    rmsPlaceM: Math.sqrt(errors.reduce((sum, e) => sum + e.placeM ** 2, 0) / errors.length),
  };
}
