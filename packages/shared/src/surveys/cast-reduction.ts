import { bottomEvidence, type BottomEvidence } from './bottom-evidence';
import { castDepth, type CastDepth } from './cast-depth';
import { castPosition, type CastPosition } from './cast-position';
import { refuse, type CastSite, type Refusal } from './cast-site';
import type { CastObservation, Kit, Reduced, ReductionStep, SoundingView } from './contract';
import { ellipse95 } from './covariance';
import { UNREAD_DEPTH } from './error-budget';
import { gradeOf } from './grade';
import { thu95M, tvu95M, yardstickWords } from './hydrographic-yardstick';
import { lineOutM } from './line-out';
import { metres, step } from './reduction-step';
import { spotPlace } from './spot-place';
import { levelAt, levelStep, type LevelAt } from './water-level';

/**
 * Reduces one cast as it was observed to a sounding: where the lead lay (degrees, and metres in the lake's plane),
 * how deep below chart datum (metres, positive down), what bottom, each with its uncertainty, a grade, and the ordered
 * steps that led there. What can't be reduced is answered in words with what to do; nothing is thrown, nothing
 * of the observation is changed, and running it again with better constants gives the better answer.
 */
export function reduceCast(cast: CastObservation, kit: Kit, site: CastSite): Reduced {
  const broken = notFinite(cast, kit, site);
  if (broken) return refused(broken, []);
  const depth = castDepth(cast, kit, site);
  if (!depth.ok) return refused(depth, []);
  const slant = { depthM: depth.depthM ?? UNREAD_DEPTH.depthM, sigmaM: depth.sigmaM ?? UNREAD_DEPTH.sigmaM };
  const position = castPosition(cast, [kit, site], slant);
  if (!position.ok) return refused(position, [...depth.steps, ...position.steps]);
  const place = spotPlace(site.outline, position.from, position.point);
  const steps = [...depth.steps, ...position.steps];
  if (!place.ok) return refused(place, steps);
  const level = site.gauge ? levelAt(site.gauge, site.observedAt) : null;
  const bottom = bottomOf(cast, [kit, site], position);
  const parts = { depth, position, level, bottom, placeWarnings: place.warnings };
  return sounding([cast, kit, site], parts, steps);
}

type Parts = {
  depth: CastDepth;
  position: CastPosition;
  level: LevelAt | null;
  bottom: BottomEvidence;
  placeWarnings: string[];
};

function sounding(
  [cast, kit, site]: readonly [CastObservation, Kit, CastSite],
  parts: Parts,
  before: ReductionStep[],
): Reduced {
  const { depth, position, level, bottom } = parts;
  const datum = atDatum(depth, level);
  const { grade, reasons } = gradeOf({
    radialSigmaM: position.radialSigmaM,
    lateralSigmaM: position.lateralSigmaM,
    depthSigmaM: datum?.sigmaM ?? depth.sigmaM,
    originMarked: site.stance.originMarked,
    mark: cast.aim.by === 'mark' ? (site.mark?.permanence ?? null) : null,
    braid: kit.lineType === 'braid',
    level: level ? (level.known ? 'known' : 'far') : 'unknown',
    remainderStated: cast.remainderStated,
    depthRepeated: depth.repeated,
    depthByFall: depth.byFall,
    floatSight: cast.floatSight,
    flags: cast.flags,
    bottomDisagrees: bottom.askAgain,
  });
  const view: SoundingView = {
    position: [position.place[0], position.place[1]],
    xM: position.point.xM,
    yM: position.point.yM,
    rangeM: position.rangeM,
    lineOutM: position.lineOutM,
    bearingDeg: position.bearingDeg,
    covariance: position.covariance,
    ellipse: ellipse95(position.covariance),
    depthAsReadM: depth.depthM,
    depthM: datum?.depthM ?? null,
    depthSigmaM: datum?.sigmaM ?? depth.sigmaM,
    grade,
    gradeReasons: reasons,
    substrate: bottom.substrate,
    cover: bottom.cover,
    bottom: bottom.bottom,
    bottomWords: bottom.words,
    askAgain: bottom.askAgain,
    warnings: warningsOf(parts, cast, datum?.depthM ?? null),
  };
  return { ok: true, sounding: view, steps: [...before, ...closingSteps(parts, site, datum)] };
}

type AtDatum = { depthM: number; sigmaM: number };

/** Depth below chart datum: what was read, less the water standing above datum at that hour. */
function atDatum({ depthM, sigmaM }: CastDepth, level: LevelAt | null): AtDatum | null {
  if (depthM === null || sigmaM === null || !level) return null;
  return { depthM: depthM - level.aboveDatumM, sigmaM: Math.hypot(sigmaM, level.sigmaM) };
}

function closingSteps(
  { depth, position, level }: Parts,
  site: CastSite,
  datum: AtDatum | null,
): ReductionStep[] {
  if (depth.depthM === null || !level || !site.gauge || !datum) return [];
  const tvuM = tvu95M(datum.sigmaM);
  const thuM = thu95M(position.covariance);
  const yardstick = step(
    [
      'yardstick',
      'Held against the hydrographic yardstick',
      'TVU = 1.96·σ of depth, THU = 2.45·σ of position (95 %)',
    ],
    [
      ['TVU', metres(tvuM, 2)],
      ['THU', metres(thuM, 2)],
    ],
    { value: yardstickWords(depth.depthM, tvuM, thuM) },
  );
  return [levelStep(level, site.gauge.datumM, { asReadM: depth.depthM, ...datum }), yardstick];
}

function warningsOf(
  { depth, level, placeWarnings }: Parts,
  cast: CastObservation,
  depthM: number | null,
): string[] {
  const warnings = [...depth.warnings, ...placeWarnings, ...(level?.warnings ?? [])];
  if (depth.depthM === null && cast.pulls === null) {
    warnings.push('No depth was read, so the slope of the line is taken for a middling depth');
  }
  if (!level)
    warnings.push('The water level of the visit is not known, so the depth can’t be brought to chart datum');
  if (depthM !== null && depthM < 0) warnings.push('At chart datum this spot is dry');
  return warnings;
}

/** Only the peg's other solid stops can change a call: two at one place are a snag. */
function bottomOf(
  cast: CastObservation,
  [kit, site]: readonly [Kit, CastSite],
  position: CastPosition,
): BottomEvidence {
  const stops = site.earlier.filter(({ drag }) => cast.drag === 'solid_stop' && drag === 'solid_stop');
  const earlier = stops.map((stop) => ({ aim: stop.aim, drag: stop.drag, lineOutM: lineOutM(stop, kit) }));
  const here = { aim: cast.aim, drag: cast.drag, lineOutM: position.lineOutM };
  return bottomEvidence(cast, { here, earlier }, site.tables);
}

/** A number that is not one can only come from a broken import; it is named rather than spread. */
function notFinite(cast: CastObservation, kit: Kit, site: CastSite): Refusal | null {
  const gauge = site.gauge
    ? [site.gauge.startM, site.gauge.endM ?? 0, site.gauge.datumM, Date.parse(site.observedAt)]
    : [];
  const numbers: [string, number][] = [
    ...entries(cast),
    ...entries(kit),
    ['aim', cast.aim.by === 'mark' ? cast.aim.offsetDeg : cast.aim.bearingDeg],
    ['stance', site.stance.place[0] + site.stance.place[1] + site.stance.sigmaM],
    ['mark', site.mark ? site.mark.place[0] + site.mark.place[1] + site.mark.sigmaM : 0],
    ...gauge.map((value): [string, number] => ['gauge board or time of the cast', value]),
  ];
  const bad = numbers.find(([, value]) => !Number.isFinite(value));
  return bad
    ? refuse(
        `A number is missing or is not a number: ${bad[0]}`,
        'Type it again, or correct that column of the file',
      )
    : null;
}

function entries(record: object): [string, number][] {
  return Object.entries(record).flatMap(([name, value]: [string, unknown]): [string, number][] =>
    typeof value === 'number' ? [[name, value]] : [],
  );
}

function refused({ reason, remedy }: { reason: string; remedy: string }, steps: ReductionStep[]): Reduced {
  return { ok: false, reason, remedy, steps };
}
