import { Chart } from '@mereward/db/entities/charts/chart';
import { chartChecks, type CheckedPeg } from '@mereward/shared/charts/chart-checks';
import type { CheckView } from '@mereward/shared/charts/contract';
import { reduceAll } from '../surveys/reduce-visit';
import { coverageOf } from '../surveys/coverage';
import type { Reduced } from '@mereward/shared/surveys/contract';
import type { EntityManager } from 'typeorm';
import { buildSource, sourceDigest, type BuildSource, type SourceVisit } from './build-source';
import { Built, type BuiltSounding } from './built';
import type { ChartFound } from './find-chart';

type Reductions = Map<string, Reduced>;

/**
 * Everything checked before a chart may be published, from the rows as they are now. A published chart was checked on
 * its day and is not checked again.
 */
export async function checksOf(tx: EntityManager, { chart, lake }: ChartFound): Promise<CheckView[]> {
  if (chart.status !== 'draft' && chart.status !== 'submitted') return [];
  const source = await buildSource(tx, chart);
  const reduced: Reductions = new Map();
  for (const visit of source.visits)
    for (const [id, answer] of reduceAll(visit.site, visit.casts)) reduced.set(id, answer);
  const [outline] = source.visits.map((visit) => visit.site.outline);
  if (!outline) return [gone()];
  const built = chart.builtAt !== null && chart.inputSha256 !== null;
  return [
    builtFresh(built, built && chart.inputSha256?.equals(sourceDigest(source)) === true),
    consented(source),
    reducible(source, reduced),
    ...chartChecks({
      outline,
      casts: source.visits.flatMap((visit) => checkedCasts(visit, reduced)),
      visits: source.visits.map(({ site: { visit }, day }) => ({
        id: visit.id,
        label: visit.title,
        gaugeStartM: visit.gaugeStartM,
        gaugeEndM: visit.gaugeEndM,
        stickCheckedOn: visit.kit.stickCheckedOn,
        visitedOn: day,
      })),
      pegs: checkedPegs(source, reduced),
    }),
    snagsCarried(await publishedSnags(tx, lake.id), [...reduced.values()]),
  ];
}

const gone = (): CheckView => ({
  key: 'visits_there',
  state: 'failed',
  blocks: true,
  words: 'The visits of this chart are gone. Make a new draft.',
  ids: [],
});

function builtFresh(built: boolean, fresh: boolean): CheckView {
  const words = !built
    ? 'The chart is not built yet.'
    : fresh
      ? 'The chart was built from its visits as they are.'
      : 'Something it was built from has changed since. Build it again.';
  const passed = built && fresh;
  return { key: 'built', state: passed ? 'passed' : 'failed', blocks: !passed, words, ids: [] };
}

function consented({ visits }: BuildSource): CheckView {
  const without = visits.filter(({ site }) => !site.visit.consentToPublish).map(({ site }) => site.visit);
  if (without.length === 0)
    return {
      key: 'consent',
      state: 'passed',
      blocks: false,
      words: 'Every visit may be published.',
      ids: [],
    };
  const titles = without.map((visit) => `“${visit.title}”`).join(', ');
  const words = `No consent to publish was given for ${titles}. Leave it out, or ask its surveyor.`;
  return { key: 'consent', state: 'failed', blocks: true, words, ids: without.map((visit) => visit.id) };
}

const NAMED = 3;

function reducible({ visits }: BuildSource, reduced: Reductions): CheckView {
  const refused = visits.flatMap(({ site, casts }) =>
    casts.flatMap((cast) => {
      const answer = reduced.get(cast.id);
      if (answer === undefined || answer.ok) return [];
      return [
        { id: cast.id, words: `${labelOf(site.pegs.get(cast.pegId)?.number, cast.seq)}: ${answer.reason}` },
      ];
    }),
  );
  if (refused.length === 0)
    return {
      key: 'casts_reduced',
      state: 'passed',
      blocks: false,
      words: 'Every cast could be reduced.',
      ids: [],
    };
  const more = refused.length > NAMED ? `; and ${refused.length - NAMED} more` : '';
  const named = refused.slice(0, NAMED).map(({ words }) => words);
  const words = `Casts that can’t be placed; correct them or leave the visit out: ${named.join('; ')}${more}.`;
  return { key: 'casts_reduced', state: 'failed', blocks: true, words, ids: refused.map(({ id }) => id) };
}

const labelOf = (peg: string | undefined, seq: number): string => `Cast ${seq} (${peg ?? 'peg gone'})`;

function checkedCasts({ site, casts }: SourceVisit, reduced: Reductions) {
  return casts.flatMap((cast) => {
    const answer = reduced.get(cast.id);
    if (!answer?.ok) return [];
    const { xM, yM, depthM } = answer.sounding;
    return [{ id: cast.id, label: labelOf(site.pegs.get(cast.pegId)?.number, cast.seq), xM, yM, depthM }];
  });
}

/** Each peg's cover by all the casts of the chart together, whichever day they were made. */
function checkedPegs({ visits }: BuildSource, reduced: Reductions): CheckedPeg[] {
  const [first] = visits;
  if (!first) return [];
  const casts = visits.flatMap((visit) =>
    visit.casts.flatMap((cast) => {
      const answer = reduced.get(cast.id);
      return answer ? [{ pegId: cast.pegId, lineId: cast.lineId, reduced: answer }] : [];
    }),
  );
  return coverageOf(first.site, casts).map(({ pegId, share, repeatsShare }) => ({
    id: pegId,
    label: first.site.pegs.get(pegId)?.number ?? '',
    arcShare: share,
    repeatsShare,
  }));
}

/** A snag on the chart that is out now must be found again or have been cast over, not be forgotten. */
const SNAG_WITHIN_M = 3;

async function publishedSnags(tx: EntityManager, lakeId: string): Promise<BuiltSounding[]> {
  const row = await tx.findOne(Chart, {
    where: { lakeId, status: 'published' },
    select: { id: true, built: true },
  });
  if (!row || row.built === null) return [];
  return Built.parse(row.built).soundings.filter((sounding) => sounding.bottom === 'snag');
}

function snagsCarried(snags: readonly BuiltSounding[], reduced: readonly Reduced[]): CheckView {
  const seen = reduced.flatMap((answer) => (answer.ok ? [answer.sounding] : []));
  const lost = snags.filter(
    (snag) => !seen.some((each) => Math.hypot(each.xM - snag.xM, each.yM - snag.yM) <= SNAG_WITHIN_M),
  );
  if (lost.length === 0)
    return {
      key: 'snags_carried',
      state: 'passed',
      blocks: false,
      words: 'No snag of the chart before is forgotten.',
      ids: [],
    };
  const words = `${lost.length} of the snags on the published chart ${lost.length === 1 ? 'has' : 'have'} no cast near them in these visits. Include the visit that found them, or cast there again.`;
  return { key: 'snags_carried', state: 'warning', blocks: false, words, ids: lost.map((snag) => snag.id) };
}
