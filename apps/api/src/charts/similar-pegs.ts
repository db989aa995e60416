import { Chart } from '@mereward/db/entities/charts/chart';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { UNKNOWN_CLASS, type ClassGrid } from '@mereward/shared/charts/bottom-map';
import type { SimilarPeg, SimilarPegs } from '@mereward/shared/charts/chart-answers';
import { columnXM, isSurveyed, rowYM } from '@mereward/shared/charts/grid';
import { pegLikeness, PROFILE_BANDS_M, type PegProfile } from '@mereward/shared/charts/peg-likeness';
import { geodesicBetween } from '@mereward/shared/geometry/geodesic';
import { ownerAt } from '@mereward/shared/lakes/peg-waters';
import { Cover, Substrate } from '@mereward/shared/surveys/contract';
import type { Ctx } from '../ctx';
import { findPeg } from '../lakes/found';
import { watersOf, type WatersFound } from '../lakes/peg-waters';
import { chartContent, layersOf, type ChartContent } from './chart-layers';
import { sightOnChart, type Sight } from './layers';

const MOST = 8;

/** Open pegs most like this one: of its own lake first, then of the fishery's others, within what this reader sees. */
export async function similarPegs(ctx: Ctx, pegId: string): Promise<SimilarPegs> {
  const { tx } = ctx;
  const { peg, lake } = await findPeg(tx, pegId);
  const lakes = await tx.find(Lake, {
    where: { fisheryId: lake.fisheryId },
    order: { name: 'ASC', id: 'ASC' },
  });
  const profiled = [];
  for (const each of lakes) profiled.push(await profilesOf(ctx, each));
  const home = profiled.find(({ lake: { id } }) => id === lake.id);
  const mine = home?.profiles.get(pegId);
  if (!home || !mine) return { pegId, pegs: [], compared: comparedWords(null) };
  const pegs = profiled.flatMap(({ lake: other, found, profiles }) =>
    found.pegs.flatMap((each): SimilarPeg[] => {
      const theirs = profiles.get(each.id);
      if (each.id === pegId || !theirs || each.details.status === 'closed') return [];
      const { likeness, alike, differs } = pegLikeness(mine, theirs);
      return [
        {
          pegId: each.id,
          number: each.number,
          name: each.details.name,
          lakeId: other.id,
          lakeName: other.name,
          sameLake: other.id === lake.id,
          distanceM: Math.round(geodesicBetween(peg.details.origin, each.details.origin).distanceM),
          likeness: Math.round(likeness * 100) / 100,
          alike,
          differs,
          stepFree: each.details.stepFree.kind,
          status: each.details.status,
        },
      ];
    }),
  );
  return { pegId, pegs: pegs.sort(byLikeness).slice(0, MOST), compared: comparedWords(home.sight) };
}

const byLikeness = (a: SimilarPeg, b: SimilarPeg): number =>
  Number(b.sameLake) - Number(a.sameLake) ||
  Math.round(10 * b.likeness) - Math.round(10 * a.likeness) ||
  a.distanceM - b.distanceM;

function comparedWords(sight: Sight | null): string {
  const kept = [sight?.sees.depth ? null : 'depths', sight?.sees.bottom ? null : 'bottoms'].filter(
    (each) => each !== null,
  );
  const of = ['bottom', 'weed and litter', 'depth ring by ring', 'steps, walk, barrow and step-free access'];
  const told = `Likeness is over what is known of both pegs: ${of.join(', ')}. Common practice, no published source.`;
  return kept.length === 0 ? told : `${told} Not compared for you: ${kept.join(' and ')}.`;
}

type Profiled = { lake: Lake; found: WatersFound; sight: Sight; profiles: ReadonlyMap<string, PegProfile> };

async function profilesOf(ctx: Ctx, lake: Lake): Promise<Profiled> {
  const { tx } = ctx;
  const found = await watersOf(tx, lake);
  const sight = await sightOnChart(ctx, lake);
  const chart = await tx.findOne(Chart, {
    where: { lakeId: lake.id, status: 'published' },
    select: { id: true },
  });
  const content = chart && (sight.sees.depth || sight.sees.bottom) ? await chartContent(tx, chart.id) : null;
  const charted = content ? chartedLately(content, found) : null;
  const profiles = found.pegs.map(({ id, details }, i): [string, PegProfile] => {
    const { depthsM, bottoms, covers } = charted?.[i] ?? NOTHING;
    return [
      id,
      {
        depthsM: sight.sees.depth ? depthsM : null,
        bottoms: sight.sees.bottom ? bottoms : null,
        covers: sight.sees.bottom ? covers : null,
        details,
      },
    ];
  });
  return { lake, found, sight, profiles: new Map(profiles) };
}

type Charted = Pick<PegProfile, 'depthsM' | 'bottoms' | 'covers'>;
const NOTHING: Charted = { depthsM: null, bottoms: null, covers: null };

/** What lies in each peg's water, by a frozen chart and the waters it was read for. */
const lately = new WeakMap<ChartContent, { waters: WatersFound['waters']; charted: Charted[] }>();

function chartedLately(content: ChartContent, found: WatersFound): Charted[] {
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
