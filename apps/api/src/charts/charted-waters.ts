import { UNKNOWN_CLASS, type ClassGrid } from '@mereward/shared/charts/bottom-map';
import { columnXM, isSurveyed, rowYM } from '@mereward/shared/charts/grid';
import { PROFILE_BANDS_M, type PegProfile } from '@mereward/shared/charts/peg-likeness';
import { ownerAt } from '@mereward/shared/lakes/peg-waters';
import { Cover, Substrate } from '@mereward/shared/surveys/contract';
import type { WatersFound } from '../lakes/peg-waters';
import { layersOf, type ChartContent } from './chart-layers';

/** What a chart says of one peg’s water; metres below datum. `rangeM`: from its shallowest to its deepest place. */
export type Charted = Pick<PegProfile, 'depthsM' | 'bottoms' | 'covers'> & {
  rangeM: { shallowestM: number; deepestM: number } | null;
};
export const NOTHING_CHARTED: Charted = { depthsM: null, bottoms: null, covers: null, rangeM: null };

/** What lies in each peg's water, by a frozen chart and the waters it was read for. */
const lately = new WeakMap<ChartContent, { waters: WatersFound['waters']; charted: Charted[] }>();

export function chartedLately(content: ChartContent, found: WatersFound): Charted[] {
  const known = lately.get(content);
  if (known?.waters === found.waters) return known.charted;
  const charted = chartedWaters(content, found);
  lately.set(content, { waters: found.waters, charted });
  return charted;
}

function chartedWaters(content: ChartContent, { stances, waters }: WatersFound): Charted[] {
  const { depth, substrate, cover } = layersOf(content);
  const bands = PROFILE_BANDS_M.length - 1;
  const sums = stances.map(() => ({
    depth: new Array<number>(bands).fill(0),
    cells: new Array<number>(bands).fill(0),
    shallowestM: Infinity,
    deepestM: -Infinity,
  }));
  const tallies = stances.map(() => ({
    bottoms: new Map<string, number>(),
    covers: new Map<string, number>(),
  }));
  for (let node = 0; node < depth.values.length; node++) {
    if (!isSurveyed(depth.values[node]!)) continue;
    const place = {
      xM: columnXM(depth, node % depth.columns),
      yM: rowYM(depth, Math.floor(node / depth.columns)),
    };
    const owner = ownerAt(waters, place);
    const stance = stances[owner];
    if (!stance) continue;
    const rangeM = Math.hypot(place.xM - stance.at.xM, place.yM - stance.at.yM);
    const band = PROFILE_BANDS_M.findLastIndex((fromM) => rangeM >= fromM);
    const { depth: depths, cells } = sums[owner]!;
    sums[owner]!.shallowestM = Math.min(sums[owner]!.shallowestM, depth.values[node]!);
    sums[owner]!.deepestM = Math.max(sums[owner]!.deepestM, depth.values[node]!);
    if (band >= 0 && band < bands) {
      depths[band] = depths[band]! + depth.values[node]!;
      cells[band] = cells[band]! + 1;
    }
    count(tallies[owner]!.bottoms, substrate, { node, names: Substrate.options });
    count(tallies[owner]!.covers, cover, { node, names: Cover.options });
  }
  return stances.map((_, i) => ({
    depthsM: sums[i]!.depth.map((sum, band) =>
      sums[i]!.cells[band]! > 0 ? sum / sums[i]!.cells[band]! : null,
    ),
    bottoms: sharesOf(tallies[i]!.bottoms),
    covers: sharesOf(tallies[i]!.covers),
    rangeM: rangeOf(sums[i]!),
  }));
}

function count(
  tally: Map<string, number>,
  { classes }: ClassGrid,
  { node, names }: { node: number; names: readonly string[] },
): void {
  const kind = names[classes[node]!];
  if (classes[node] === UNKNOWN_CLASS || kind === undefined) return;
  tally.set(kind, (tally.get(kind) ?? 0) + 1);
}

function sharesOf(tally: ReadonlyMap<string, number>): Record<string, number> | null {
  const total = [...tally.values()].reduce((sum, cells) => sum + cells, 0);
  return total === 0 ? null : Object.fromEntries([...tally].map(([kind, cells]) => [kind, cells / total]));
}

const rangeOf = ({ shallowestM, deepestM }: { shallowestM: number; deepestM: number }): Charted['rangeM'] =>
  shallowestM <= deepestM ? { shallowestM, deepestM } : null;
