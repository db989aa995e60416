import { cellRegions } from '../geometry/cell-regions';
import { regionRings } from '../geometry/cell-rings';
import { Cover, Substrate } from '../surveys/contract';
import { UNKNOWN_CLASS, type ClassGrid } from './bottom-map';
import type { ChangedArea } from './chart-answers';
import { gridAt, type ChartLayers } from './chart-reading';
import { columnXM, isSurveyed, rowYM, type GridFrame } from './grid';
import { nodesByRegion } from './region-shape';

/** Common practice, no published source. */
export const CHANGE_LIMITS = {
  leastAreaM2: 12, // one place in twenty crosses 1.96 σ by chance: a change is an area, not a cell
  leastSure: 0.6, // of a class, then and now, to be held against one another
  most: 20,
} as const;

/** How much deeper the earlier chart's depths read at the newer one's datum, metres (positive: its datum lay lower). */
export type EarlierChart = { layers: ChartLayers; shiftM: number };

export type ChartChange = { comparedM2: number; areas: ChangedArea[] };

type Shown = { depth: boolean; bottom: boolean };

/**
 * What changed from one chart to another, where both were surveyed: areas whose depth differs by more than 1.96 σ of the
 * difference at every cell (σ of both charts together, as if independent), deeper and shallower apart, and areas where cover
 * or bottom reads otherwise with both readings fairly sure. The newer chart's frame is used; the earlier is read at its
 * cells' middles. Scraps under 12 m² are left out.
 */
export function chartChanges(now: ChartLayers, then: EarlierChart, shown: Shown): ChartChange {
  const frame = now.depth;
  const difference = new Float64Array(frame.values.length).fill(Number.NaN);
  const sigma = new Float64Array(frame.values.length);
  const earlier = earlierClasses(now, then);
  let compared = 0;
  for (let node = 0; node < difference.length; node++) {
    if (!isSurveyed(frame.values[node]!)) continue;
    const place = placeOf(frame, node);
    const depthM = gridAt(then.layers.depth, place);
    const sigmaM = gridAt(then.layers.sigma, place);
    if (depthM === null || sigmaM === null) continue;
    compared++;
    difference[node] = frame.values[node]! - (depthM + then.shiftM);
    sigma[node] = Math.hypot(now.sigma.values[node]!, sigmaM);
  }
  const areas = [
    ...(shown.depth
      ? depthAreas({ difference, sigma, frame }, shown.bottom ? [now.cover, earlier.cover] : null)
      : []),
    ...(shown.bottom ? classAreas([now.cover, earlier.cover], Cover.options, 'cover') : []),
    ...(shown.bottom ? classAreas([now.substrate, earlier.substrate], Substrate.options, 'substrate') : []),
  ];
  const largest = areas.sort((a, b) => b.areaM2 - a.areaM2 || a.xM - b.xM || a.yM - b.yM);
  return { comparedM2: Math.round(compared * frame.cellM ** 2), areas: largest.slice(0, CHANGE_LIMITS.most) };
}

const placeOf = (frame: GridFrame, node: number) => ({
  xM: columnXM(frame, node % frame.columns),
  yM: rowYM(frame, Math.floor(node / frame.columns)),
});

/** The earlier chart's classes, cell by cell of the newer frame. */
function earlierClasses(
  now: ChartLayers,
  { layers }: EarlierChart,
): { cover: ClassGrid; substrate: ClassGrid } {
  const moved = (grid: ClassGrid): ClassGrid => {
    const { columns, rows, cellM, originM } = now.depth;
    const count = columns * rows;
    const out = {
      columns,
      rows,
      cellM,
      originM,
      classes: new Uint8Array(count).fill(UNKNOWN_CLASS),
      confidence: new Float64Array(count),
    };
    for (let node = 0; node < count; node++) {
      const { xM, yM } = placeOf(out, node);
      const column = Math.round((xM - grid.originM.xM) / grid.cellM);
      const row = Math.round((yM - grid.originM.yM) / grid.cellM);
      if (column < 0 || row < 0 || column >= grid.columns || row >= grid.rows) continue;
      out.classes[node] = grid.classes[row * grid.columns + column]!;
      out.confidence[node] = grid.confidence[row * grid.columns + column]!;
    }
    return out;
  };
  return { cover: moved(layers.cover), substrate: moved(layers.substrate) };
}

type Differences = { difference: Float64Array; sigma: Float64Array; frame: GridFrame };

function depthAreas(
  { difference, sigma, frame }: Differences,
  covers: readonly [ClassGrid, ClassGrid] | null,
): ChangedArea[] {
  const kinds = Int8Array.from(difference, (by, node) => {
    if (!isSurveyed(by) || Math.abs(by) <= 1.96 * sigma[node]!) return -1;
    return by > 0 ? 1 : 0;
  });
  return regions(kinds, frame).map(({ nodes, value }) => {
    const mean = (of: Float64Array) => nodes.reduce((sum, node) => sum + of[node]!, 0) / nodes.length;
    const areaM2 = nodes.length * frame.cellM ** 2;
    const meanChangeM = hundredth(mean(difference));
    const kind = value === 1 ? 'deeper' : 'shallower';
    return {
      ...areaOf(nodes, frame),
      kind,
      words: depthWords({ kind, meanChangeM, areaM2 }, covers && coverLost(nodes, covers)),
      meanChangeM,
      meanSigmaM: hundredth(mean(sigma)),
      volumeM3: Math.round(mean(difference) * areaM2 * 10) / 10,
      from: null,
      to: null,
    };
  });
}

/** Share of an area that was weed, litter or snag and is clear now. */
function coverLost(nodes: readonly number[], [now, then]: readonly [ClassGrid, ClassGrid]): number {
  const clear = Cover.options.indexOf('clear');
  const lost = nodes.filter((node) => {
    const [after, before] = [now.classes[node]!, then.classes[node]!];
    return after === clear && before !== clear && before !== UNKNOWN_CLASS;
  });
  return lost.length / nodes.length;
}

function depthWords(
  { kind, meanChangeM, areaM2 }: { kind: 'deeper' | 'shallower'; meanChangeM: number; areaM2: number },
  lost: number | null,
): string {
  const size = `${Math.abs(meanChangeM).toFixed(2)} m over ${Math.round(areaM2)} m²`;
  if (kind === 'shallower')
    return `Shallower by ${size}: silting, a bank that slipped, or weed that held the lead up.`;
  if (lost !== null && lost >= 0.5) return `Deeper by ${size}, where cover went: weed or litter cleared.`;
  return `Deeper by ${size}: scour, digging, or soft silt that went or settled.`;
}

const NAMES: Readonly<Record<Substrate | Cover, string>> = {
  silt: 'silt',
  clay: 'clay',
  sand: 'sand',
  gravel: 'gravel',
  stones: 'stones',
  clear: 'clear bottom',
  low_weed: 'low weed',
  tall_weed: 'tall weed',
  leaf_litter: 'leaf litter',
  snag: 'a snag',
};

/** Areas of one class then and another now, both fairly sure. */
function classAreas(
  [now, then]: readonly [ClassGrid, ClassGrid],
  names: readonly (Substrate | Cover)[],
  layer: 'cover' | 'substrate',
): ChangedArea[] {
  const count = names.length;
  const kinds = Int16Array.from(now.classes, (after, node) => {
    const before = then.classes[node]!;
    const sure = Math.min(now.confidence[node]!, then.confidence[node]!) >= CHANGE_LIMITS.leastSure;
    return after === before || after >= count || before >= count || !sure ? -1 : before * count + after;
  });
  return regions(kinds, now).map(({ nodes, value }) => {
    const from = names[Math.floor(value / count)]!;
    const to = names[value % count]!;
    const area = areaOf(nodes, now);
    const kind = layer === 'substrate' ? 'bottom' : to === 'clear' ? 'cover_lost' : 'cover_gained';
    const may = {
      bottom: 'the bed shifted, or softer ground settled over it',
      cover_lost: 'cleared, died back or washed away',
      cover_gained: 'grown or drifted in',
    }[kind];
    return {
      ...area,
      kind,
      words: `${NAMES[from][0]!.toUpperCase()}${NAMES[from].slice(1)} then, ${NAMES[to]} now, over ${area.areaM2} m²: ${may}.`,
      meanChangeM: null,
      meanSigmaM: null,
      volumeM3: null,
      from,
      to,
    };
  });
}

function regions(kinds: Int8Array | Int16Array, frame: GridFrame): { nodes: number[]; value: number }[] {
  const { of, sizes, values } = cellRegions(kinds, frame.columns);
  return nodesByRegion(of, sizes.length)
    .map((nodes, region) => ({ nodes, value: values[region]! }))
    .filter(({ nodes }) => nodes.length * frame.cellM ** 2 >= CHANGE_LIMITS.leastAreaM2);
}

function areaOf(
  nodes: readonly number[],
  frame: GridFrame,
): Pick<ChangedArea, 'xM' | 'yM' | 'areaM2' | 'rings'> {
  const marks = new Int8Array(frame.columns * frame.rows).fill(-1);
  let [x, y] = [0, 0];
  for (const node of nodes) {
    marks[node] = 0;
    const place = placeOf(frame, node);
    x += place.xM;
    y += place.yM;
  }
  return {
    xM: Math.round((x / nodes.length) * 10) / 10,
    yM: Math.round((y / nodes.length) * 10) / 10,
    areaM2: Math.round(nodes.length * frame.cellM ** 2),
    rings: regionRings(marks, frame, 1)[0] ?? [],
  };
}

const hundredth = (value: number): number => Math.round(value * 100) / 100;
