import type { Point } from '../../geometry/point';
import { ringsOf, type Outline } from '../../geometry/polygon';
import { isSurveyed, type Grid } from '../grid';
import { deeperRegions, isobathLevels, isobaths, type Isobath } from '../isobaths';
import type { Line } from './mark';
import { softened, spreadInto, waterRaster } from './water-raster';

/** How far depths are carried past the survey's edge so that tints reach the shore under the clip, cells. */
const SPREAD_CELLS = 4;
/** Share of "nobody surveyed here" from which paper is shown: under a half, so the paper never claims too little. */
const PAPER_FROM = 0.4;

/** A chart made ready for drawing: everything that doesn't depend on the scale of the view. Metres. */
export type Ground = {
  water: Line[]; // shore and islands as areas
  shore: Line[]; // their lines; a closed one ends where it began
  depth: Grid | null; // depth of the water drawn, carried a little past the survey's edge; above water is negative
  regions: Isobath[]; // filled one over the other
  isobaths: Isobath[];
  levelsM: number[];
  stepM: number;
  unsurveyed: Line[];
  dry: Line[];
  surveyedAt: Uint8Array | null;
};

export type GroundInput = {
  outline: Outline;
  depth: Grid | null; // below datum, NaN where nobody surveyed
  isobaths: readonly { levelM: number; lines: readonly Line[] }[] | null; // as published, at datum
  stepM: number;
  raisedM: number; // water level above datum; 0 draws the chart as published
};

/** Readies a chart. At another level than datum the isobaths are run again through the same surface. */
export function groundOf(input: GroundInput): Ground {
  const water = ringsOf(input.outline).map((ring) => ring.flatMap(({ xM, yM }) => [xM, yM]));
  const shore = water.map((ring) => [...ring, ...ring.slice(0, 2)]);
  if (!input.depth) return { ...NOTHING, water, shore, stepM: input.stepM };
  const { depth, raisedM, stepM, outline } = input;
  const inWater = waterRaster(depth, outline);
  const drawn = raised(depth, raisedM);
  const levelsM = isobathLevels(drawn, stepM);
  const filledIn = carriedOver(drawn, inWater);
  return {
    water,
    shore,
    depth: filledIn,
    regions: deeperRegions(filledIn, levelsM).slice(1),
    isobaths: linesOf(input, drawn, levelsM),
    levelsM,
    stepM,
    unsurveyed: unsurveyedAreas(depth, inWater),
    dry: raisedM < 0 ? dryAreas(drawn, inWater) : [],
    surveyedAt: Uint8Array.from(depth.values, (value) => (isSurveyed(value) ? 1 : 0)),
  };
}

const NOTHING: Omit<Ground, 'water' | 'shore' | 'stepM'> = {
  depth: null,
  regions: [],
  isobaths: [],
  levelsM: [],
  unsurveyed: [],
  dry: [],
  surveyedAt: null,
};

function raised(depth: Grid, raisedM: number): Grid {
  return raisedM === 0 ? depth : { ...depth, values: depth.values.map((value) => value + raisedM) };
}

/** Land stands at the water's surface, so that the shallowest tint runs out at the shore. */
function carriedOver(depth: Grid, inWater: Uint8Array): Grid {
  const values = depth.values.slice();
  for (let i = 0; i < values.length; i++) if (!isSurveyed(values[i]!) && !inWater[i]) values[i] = 0;
  spreadInto({ values, columns: depth.columns, rows: depth.rows }, SPREAD_CELLS);
  for (let i = 0; i < values.length; i++) if (Number.isNaN(values[i]!)) values[i] = 0;
  return { ...depth, values };
}

function linesOf(input: GroundInput, drawn: Grid, levelsM: readonly number[]): Isobath[] {
  if (input.raisedM !== 0 || !input.isobaths) return isobaths(drawn, levelsM);
  return input.isobaths.map(({ levelM, lines }) => ({
    levelM,
    lines: lines.map((line) => Float64Array.from(line)),
  }));
}

/** Soft-edged areas of the water nobody surveyed; land takes its neighbours' part so that the shore makes no edge. */
function unsurveyedAreas(depth: Grid, inWater: Uint8Array): Line[] {
  const { columns, rows } = depth;
  const values = depth.values.map((value, i) => (inWater[i] ? (isSurveyed(value) ? 0 : 1) : Number.NaN));
  spreadInto({ values, columns, rows }, SPREAD_CELLS);
  for (let i = 0; i < values.length; i++) if (Number.isNaN(values[i]!)) values[i] = 0;
  const soft = softened({ values, columns, rows }, 2);
  return deeperRegions({ ...depth, values: soft.values }, [PAPER_FROM])[1]?.lines ?? [];
}

/** Land carried on from a dry margin, so that the shore makes no edge, cells. */
const DRY_SPREAD_CELLS = 2;

/** Surveyed bed at or above the water's surface, and a little of the land beside it, which the clip takes away. */
function dryAreas(drawn: Grid, inWater: Uint8Array): Line[] {
  const { columns, rows } = drawn;
  const height = drawn.values.map((value) => -value);
  const spread = height.slice();
  spreadInto({ values: spread, columns, rows }, DRY_SPREAD_CELLS);
  const values = height.map((own, i) => (inWater[i] ? own : spread[i]!));
  return deeperRegions({ ...drawn, values }, [0])[1]?.lines ?? [];
}

const CLEAR_CELLS = 1.5;

/** Is a place, and what lies just beside it, surveyed? Words belong to such places only. */
export function isWellSurveyed({ depth, surveyedAt }: Ground, { xM, yM }: Point): boolean {
  if (!depth || !surveyedAt) return false;
  const { columns, rows, cellM, originM } = depth;
  const beside = [-CLEAR_CELLS, 0, CLEAR_CELLS];
  return beside.every((right) =>
    beside.every((up) => {
      const column = Math.round((xM - originM.xM) / cellM + right);
      const row = Math.round((yM - originM.yM) / cellM + up);
      if (column < 0 || row < 0 || column >= columns || row >= rows) return false;
      return surveyedAt[row * columns + column] === 1;
    }),
  );
}
