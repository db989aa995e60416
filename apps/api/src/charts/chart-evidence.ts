import type { FeltBottom } from '@mereward/shared/charts/bottom-layers';
import type { EndedEvidence } from '@mereward/shared/charts/bottom-quality-contract';
import type { ChartInput } from '@mereward/shared/charts/build-chart';
import { confirmedEvidence } from '@mereward/shared/charts/confirmed-evidence';
import { endedBy, eventWords, type BottomEnding } from '@mereward/shared/surveys/bottom-ending';
import { fadedCover, monthsSince } from '@mereward/shared/surveys/bottom-fading';
import type { EventEnds } from '@mereward/shared/surveys/bottom-event-contract';
import type { Bottom, CoverShares, SoundingView, SubstrateShares } from '@mereward/shared/surveys/contract';
import type { LeftOut } from '@mereward/shared/charts/sounding-roles';
import { pointAlong } from '@mereward/shared/geometry/plane';
import type { BuildSource, SourceCast, SourceReport, SourceVisit } from './build-source';
import type { BuiltPoint, BuiltSounding } from './built';
import type { Reductions } from './source-checks';

/** What a chart is built from once every event since has had its say, and what the chart keeps of it. */
export type ChartEvidence = {
  soundings: ChartInput['soundings'];
  alsoFelt: FeltBottom[];
  built: BuiltSounding[];
  points: BuiltPoint[];
  reports: SourceReport[];
  leftOut: LeftOut[];
  ended: EndedEvidence[];
};

/** Sorts casts, reports and confirmed bottoms by what still counts on the day the chart is made for. */
export function chartEvidence(source: BuildSource, answers: Reductions): ChartEvidence {
  const tally = new Map<string, EndedEvidence>();
  const evidence: ChartEvidence = {
    soundings: [],
    alsoFelt: confirmedEvidence(source.confirmed, {
      endings: source.endings,
      fadeMonths: source.feel.fadeMonths,
      asOf: source.asOf,
    }),
    built: [],
    points: [],
    reports: [],
    leftOut: [],
    ended: [],
  };
  for (const visit of source.visits)
    for (const cast of visit.casts) {
      const answer = answers.get(cast.id);
      if (answer?.ok) addCast(evidence, { source, visit, cast, view: answer.sounding, tally });
      else evidence.leftOut.push({ id: cast.id, why: answer?.reason ?? 'It could not be reduced.' });
    }
  for (const report of source.reports) addReport(evidence, { source, report, tally });
  evidence.ended = [...tally.values()].sort((a, b) => (a.eventId < b.eventId ? -1 : 1));
  return evidence;
}

type Tally = Map<string, EndedEvidence>;
type Casting = {
  source: BuildSource;
  visit: SourceVisit;
  cast: SourceCast;
  view: SoundingView;
  tally: Tally;
};

function addCast(evidence: ChartEvidence, casting: Casting): void {
  const { source, visit, cast, view, tally } = casting;
  const seen = { xM: view.xM, yM: view.yM, day: cast.observedOn };
  const has = { cover: view.cover !== null, substrate: view.substrate !== null, depth: view.depthM !== null };
  const ended = endings(source.endings, seen, { has, tally });
  const cover = ended.cover ? null : faded(view.cover, source, cast.observedOn);
  const substrate = ended.substrate ? null : view.substrate;
  const felt = { substrate, cover, spread: view.covariance, track: trackOf(cast, view) };
  const kept: SoundingView = { ...view, substrate, cover, bottom: labelled(view.bottom, ended) };
  const built = ended.depth ? null : builtSounding(visit, cast, kept);
  if (built) {
    evidence.built.push({ ...built, coverEnded: ended.cover !== null });
    evidence.soundings.push({ ...built, ...felt });
    return;
  }
  if (ended.depth)
    evidence.leftOut.push({
      id: cast.id,
      why: `Its depth was read before: ${lower(eventWords(ended.depth))}.`,
    });
  if (substrate === null && cover === null) {
    if (!ended.depth) evidence.leftOut.push({ id: cast.id, why: nothingLeft(ended) });
    return;
  }
  const { xM, yM, grade } = view;
  evidence.alsoFelt.push({ id: cast.id, xM, yM, grade, ...felt });
  evidence.points.push({
    id: cast.id,
    pegId: cast.pegId,
    observedOn: cast.observedOn,
    xM,
    yM,
    grade,
    bottom: kept.bottom,
    coverEnded: ended.cover !== null,
  });
}

const lower = (words: string): string => words.charAt(0).toLowerCase() + words.slice(1);

function nothingLeft({ cover, substrate }: Ended): string {
  const ending = cover ?? substrate;
  if (ending) return `What was felt no longer counts: ${lower(eventWords(ending))}.`;
  return 'No depth was read and nothing was felt, so it tells nothing.';
}

type Ended = Record<EventEnds, BottomEnding | null>;
type Having = { has: Record<EventEnds, boolean>; tally: Tally };

function endings(
  events: readonly BottomEnding[],
  seen: { xM: number; yM: number; day: string },
  { has, tally }: Having,
): Ended {
  const of = (what: EventEnds): BottomEnding | null => {
    const ending = endedBy(events, what, seen);
    if (ending && has[what]) {
      const row = tally.get(ending.id) ?? {
        eventId: ending.id,
        words: eventWords(ending),
        cover: 0,
        substrate: 0,
        depth: 0,
      };
      tally.set(ending.id, { ...row, [what]: row[what] + 1 });
    }
    return ending;
  };
  return { cover: of('cover'), substrate: of('substrate'), depth: of('depth') };
}

const COVERED: readonly Bottom[] = ['leaf', 'weed_low', 'weed_thick', 'snag'];

/** A label of what has been taken away since is no label any more. */
function labelled(bottom: Bottom, ended: Ended): Bottom {
  const gone = COVERED.includes(bottom) ? ended.cover : ended.substrate;
  return gone ? 'unknown' : bottom;
}

const faded = (cover: CoverShares | null, { feel, asOf }: BuildSource, day: string): CoverShares | null =>
  cover && fadedCover(cover, feel.fadeMonths, monthsSince(day, asOf));

/** From where the lead landed towards the angler, as far as it was drawn. */
function trackOf(
  { observation: { dragLengthM } }: SourceCast,
  { bearingDeg }: SoundingView,
): { xM: number; yM: number } | undefined {
  if (dragLengthM === null || dragLengthM === 0) return undefined;
  return pointAlong({ xM: 0, yM: 0 }, bearingDeg + 180, dragLengthM);
}

function addReport(
  evidence: ChartEvidence,
  { source, report, tally }: { source: BuildSource; report: SourceReport; tally: Tally },
): void {
  const seen = { xM: report.xM, yM: report.yM, day: report.observedOn };
  const has = {
    cover: report.cover !== null,
    substrate: report.substrate !== null,
    depth: report.depthM !== null,
  };
  const ended = endings(source.endings, seen, { has, tally });
  const substrate: SubstrateShares | null = ended.substrate ? null : report.substrate;
  const cover = ended.cover ? null : faded(report.cover, source, report.observedOn);
  const { id, xM, yM, grade } = report;
  const depthM = ended.depth ? null : report.depthM;
  const sigmaM = ended.depth ? null : report.sigmaM;
  if (depthM !== null && sigmaM !== null)
    evidence.soundings.push({ id, xM, yM, grade, depthM, sigmaM, substrate, cover });
  else if (substrate !== null || cover !== null)
    evidence.alsoFelt.push({ id, xM, yM, grade, substrate, cover });
  else return;
  evidence.reports.push({
    ...report,
    substrate,
    cover,
    depthM,
    sigmaM,
    bottom: labelled(report.bottom, ended),
  });
}

function builtSounding({ site }: SourceVisit, cast: SourceCast, view: SoundingView): BuiltSounding | null {
  if (view.depthM === null || view.depthAsReadM === null || view.depthSigmaM === null) return null;
  const { aim, wrapsWhole, remainderM } = cast.observation;
  const shares = [...Object.values(view.substrate ?? {}), ...Object.values(view.cover ?? {})];
  return {
    id: cast.id,
    visitId: site.visit.id,
    pegId: cast.pegId,
    seq: cast.seq,
    observedOn: cast.observedOn,
    xM: view.xM,
    yM: view.yM,
    ellipse: view.ellipse,
    depthM: view.depthM,
    depthAsReadM: view.depthAsReadM,
    sigmaM: view.depthSigmaM,
    grade: view.grade,
    bottom: view.bottom,
    bottomShare: shares.length > 0 ? Math.max(...shares) : null,
    wrapsWhole,
    remainderM,
    lineOutM: view.lineOutM,
    bearingDeg: view.bearingDeg,
    markId: aim.by === 'mark' ? aim.markId : null,
    markOffsetDeg: aim.by === 'mark' ? aim.offsetDeg : 0,
    coverEnded: false,
  };
}
