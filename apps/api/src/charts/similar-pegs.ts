import { Chart } from '@mereward/db/entities/charts/chart';
import { Lake } from '@mereward/db/entities/lakes/lake';
import type { SimilarPeg, SimilarPegs } from '@mereward/shared/charts/chart-answers';
import { pegLikeness, type PegProfile } from '@mereward/shared/charts/peg-likeness';
import { geodesicBetween } from '@mereward/shared/geometry/geodesic';
import type { Ctx } from '../ctx';
import { findPeg } from '../lakes/found';
import { watersOf, type WatersFound } from '../lakes/peg-waters';
import { chartContent } from './chart-layers';
import { chartedLately, NOTHING_CHARTED } from './charted-waters';
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
    const { depthsM, bottoms, covers } = charted?.[i] ?? NOTHING_CHARTED;
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
