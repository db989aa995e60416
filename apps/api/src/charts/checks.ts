import { Chart } from '@mereward/db/entities/charts/chart';
import type { CheckView } from '@mereward/shared/charts/contract';
import type { EntityManager } from 'typeorm';
import { buildSource, sourceDigest, type BuildSource } from './build-source';
import type { Built, BuiltPoint } from './built';
import { chartContent } from './chart-layers';
import type { ChartFound } from './find-chart';

/**
 * Everything checked before a chart may be published. What hangs on the casts was checked when it was built, and
 * stands as long as the digest of what it was built from is the same. Of a published chart that part alone is told, as
 * it stood on its day.
 */
export async function checksOf(tx: EntityManager, { chart, lake }: ChartFound): Promise<CheckView[]> {
  const built = (await chartContent(tx, chart.id))?.built ?? null;
  if (chart.status !== 'draft' && chart.status !== 'submitted') return built?.checks ?? [];
  const source = await buildSource(tx, chart);
  const fresh = built !== null && chart.inputSha256?.equals(sourceDigest(source)) === true;
  return [
    builtFresh(built !== null, fresh),
    consented(source),
    ...(built ? [...built.checks, snagsCarried(await publishedSnags(tx, lake.id), stillSeen(built))] : []),
  ];
}

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

/** A snag on the chart that is out now must be found again or have been cast over, not be forgotten. */
const SNAG_WITHIN_M = 3;

type Seen = Pick<BuiltPoint, 'id' | 'xM' | 'yM'>;

/** Casts whose word on what lies there still stands: one from before a snag was taken out does not show that it is gone. */
const stillSeen = ({ soundings, points }: Built): Seen[] =>
  [...soundings, ...points].filter(({ coverEnded }) => !coverEnded);

async function publishedSnags(tx: EntityManager, lakeId: string): Promise<Seen[]> {
  const row = await tx.findOne(Chart, { where: { lakeId, status: 'published' }, select: { id: true } });
  const content = row && (await chartContent(tx, row.id));
  if (!content) return [];
  const { soundings, points } = content.built;
  return [...soundings, ...points].filter(({ bottom }) => bottom === 'snag');
}

function snagsCarried(snags: readonly Seen[], seen: readonly Seen[]): CheckView {
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
