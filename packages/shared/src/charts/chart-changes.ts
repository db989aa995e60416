import { cellRegions } from '../geometry/cell-regions';
import { regionRings } from '../geometry/cell-rings';
import { Cover, Substrate } from '../surveys/contract';
import { bedDifference } from './bed-difference';
import { UNKNOWN_CLASS, type ClassGrid } from './bottom-map';
import type { ChangedArea } from './chart-answers';
import { gridAt, type ChartLayers } from './chart-reading';
import { columnXM, isSurveyed, rowYM, type GridFrame } from './grid';
import { nodesByRegion } from './region-shape';
import type { SamplePoints } from './sample-points';

/** Common practice, no published source. */
export const CHANGE_LIMITS = {
  leastAreaM2: 12, // a change is an area, not a cell
  byChance: 0.05, // of two surveys of an unchanged bed, so many tell of a change of depth anywhere
  sharedSigmaM: 0.03, // of two boards' readings, which all soundings of a visit share and no number of them averages out
  leastSure: 0.6, // of a class, then and now, to be held against one another
  most: 20,
} as const;

/** A chart with the soundings its depths come from; of the newer chart, those that the earlier had not. */
export type SoundedChart = { layers: ChartLayers; bed: SamplePoints };

/** How much deeper the earlier chart's depths read at the newer one's datum, metres (positive: its datum lay lower). */
export type EarlierChart = SoundedChart & { shiftM: number };

export type ChartChange = { comparedM2: number; areas: ChangedArea[] };

type Shown = { depth: boolean; bottom: boolean };

/**
 * What changed from one chart to another, where both were surveyed. Depths: areas where the difference kriged from both
 * charts' soundings (`bedDifference`; never the two surfaces subtracted) exceeds 1.96 σ, deeper and shallower apart, and
 * somewhere the bound that chance alone crosses anywhere on the lake once in twenty comparisons. Cover and bottom: areas that
 * read otherwise with both readings fairly sure. The newer chart's frame is used; the earlier is read at its cells' middles.
 * Scraps under 12 m² are left out.
 */
export function chartChanges(sounded: SoundedChart, then: EarlierChart, shown: Shown): ChartChange {
  const now = sounded.layers;
  const frame = now.depth;
  const earlier = earlierClasses(now, then);
  const compared = frame.values.map((depthM, node) =>
    isSurveyed(depthM) && gridAt(then.layers.depth, placeOf(frame, node)) !== null ? 1 : 0,
  );
  const areas = [
    ...(shown.depth
      ? depthAreas(differences(sounded, then, compared), shown.bottom ? [now.cover, earlier.cover] : null)
      : []),
    ...(shown.bottom ? classAreas([now.cover, earlier.cover], Cover.options, 'cover') : []),
    ...(shown.bottom ? classAreas([now.substrate, earlier.substrate], Substrate.options, 'substrate') : []),
  ];
  const largest = areas.sort((a, b) => b.areaM2 - a.areaM2 || a.xM - b.xM || a.yM - b.yM);
  const count = compared.reduce((sum, mark) => sum + mark, 0);
  return { comparedM2: Math.round(count * frame.cellM ** 2), areas: largest.slice(0, CHANGE_LIMITS.most) };
}

const MOST_PLACES = 2500; // the difference is worked out at; cells between take the nearest place's

/** The difference at every compared cell, NaN elsewhere, and how many σ chance alone may reach anywhere. */
function differences(now: SoundedChart, then: EarlierChart, compared: Float64Array): Differences {
  const frame = now.layers.depth;
  const difference = new Float64Array(compared.length).fill(Number.NaN);
  const sigma = new Float64Array(compared.length);
  const blocks = blocksOf(compared, frame);
  const middles = [...blocks.values()].map((nodes) => middleOf(frame, nodes));
  const places = {
    xM: Float64Array.from(middles, ({ xM }) => xM),
    yM: Float64Array.from(middles, ({ yM }) => yM),
  };
  const { differenceM, sigmaM } = bedDifference([now.bed, then.bed], then.shiftM, places);
  [...blocks.values()].forEach((nodes, block) => {
    for (const node of nodes) {
      difference[node] = differenceM[block]!;
      sigma[node] = Math.hypot(sigmaM[block]!, CHANGE_LIMITS.sharedSigmaM);
    }
  });
  const independent = Math.max(1, Math.min(now.bed.xM.length, then.bed.xM.length));
  return { difference, sigma, frame, chanceSigmas: chanceSigmas(independent) };
}

function middleOf(frame: GridFrame, nodes: readonly number[]) {
  const places = nodes.map((node) => placeOf(frame, node));
  const mean = (of: (place: { xM: number; yM: number }) => number) =>
    places.reduce((sum, place) => sum + of(place), 0) / places.length;
  return { xM: mean(({ xM }) => xM), yM: mean(({ yM }) => yM) };
}

/** Compared cells in square blocks; at the shore, what is left of them. */
function blocksOf(compared: Float64Array, { columns }: GridFrame): Map<number, number[]> {
  const count = compared.reduce((sum, mark) => sum + mark, 0);
  const side = Math.max(1, Math.ceil(Math.sqrt(count / MOST_PLACES)));
  const blocks = new Map<number, number[]>();
  compared.forEach((mark, node) => {
    if (mark === 0) return;
    const key = Math.floor(Math.floor(node / columns) / side) * columns + Math.floor((node % columns) / side);
    const block = blocks.get(key);
    if (block) block.push(node);
    else blocks.set(key, [node]);
  });
  return blocks;
}

/**
 * How many σ the greatest of so many independent differences reaches by chance once in twenty times, at most: a normal is
 * beyond z with less than e^(−z²/2), and of all together no more than the sum (Bonferroni).
 */
const chanceSigmas = (independent: number): number =>
  Math.sqrt(2 * Math.log(independent / CHANGE_LIMITS.byChance));

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

type Differences = {
  difference: Float64Array;
  sigma: Float64Array;
  frame: GridFrame;
  chanceSigmas: number;
};

function depthAreas(
  { difference, sigma, frame, chanceSigmas: leastPeak }: Differences,
  covers: readonly [ClassGrid, ClassGrid] | null,
): ChangedArea[] {
  const kinds = Int8Array.from(difference, (by, node) => {
    if (!isSurveyed(by) || Math.abs(by) <= 1.96 * sigma[node]!) return -1;
    return by > 0 ? 1 : 0;
  });
  const peak = (nodes: readonly number[]) =>
    nodes.reduce((most, node) => Math.max(most, Math.abs(difference[node]!) / sigma[node]!), 0);
  const sure = regions(kinds, frame).filter(({ nodes }) => peak(nodes) > leastPeak);
  return sure.map(({ nodes, value }) => {
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
