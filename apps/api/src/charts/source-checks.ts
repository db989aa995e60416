import { chartChecks, type CheckedPeg } from '@mereward/shared/charts/chart-checks';
import type { CheckView } from '@mereward/shared/charts/contract';
import type { Reduced } from '@mereward/shared/surveys/contract';
import { coverageOf } from '../surveys/coverage';
import type { BuildSource, SourceVisit } from './build-source';

export type Reductions = ReadonlyMap<string, Reduced>;

/** Whatever can be checked of the casts a chart is made from. Runs in the thread that builds it. */
export function sourceChecks(source: BuildSource, reduced: Reductions): CheckView[] {
  const outline = source.visits[0]?.site.outline;
  if (!outline) return [];
  return [
    reducible(source, reduced),
    ...chartChecks({
      outline,
      casts: source.visits.flatMap((visit) => checkedCasts(visit, reduced)),
      visits: source.visits.map(({ site: { visit }, day, casts, logs }) => ({
        id: visit.id,
        label: visit.title,
        gaugeStartM: visit.gaugeStartM,
        gaugeEndM: visit.gaugeEndM,
        // Where nothing was cast, no sticks were counted.
        stickCheckedOn: casts.length === 0 && logs.length > 0 ? day : visit.kit.stickCheckedOn,
        visitedOn: day,
      })),
      pegs: checkedPegs(source, reduced),
    }),
  ];
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
    const { xM, yM, depthM, depthSigmaM, bearingDeg, rangeM } = answer.sounding;
    const label = labelOf(site.pegs.get(cast.pegId)?.number, cast.seq);
    const line = { pegId: cast.pegId, bearingDeg, rangeM };
    return [{ id: cast.id, label, xM, yM, depthM, depthSigmaM, line }];
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
