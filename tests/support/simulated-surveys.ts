import { normal, seeded } from '@mereward/api/demo/random';
import type { ChartInput } from '@mereward/shared/charts/build-chart';
import { fromPlane, pointAlong, type LonLat, type Point } from '@mereward/shared/geometry/plane';
import { insideOutline, type Outline } from '@mereward/shared/geometry/polygon';
import { distanceToShoreM } from '@mereward/shared/geometry/shore-distance';
import { reduceCast } from '@mereward/shared/surveys/cast-reduction';
import type { CastObservation, SoundingView } from '@mereward/shared/surveys/contract';
import { SIGMA } from '@mereward/shared/surveys/error-budget';
import { aCastSite, MARK_ID } from './cast-sites';
import { aKit, anObservation } from './kit';

/** An invented water and its bed: depth in metres below datum, null on land. */
export type SimulatedLake = { outline: Outline; depthM: (p: Point) => number | null };
export type SimulatedCast = { sounding: SoundingView; truth: Point; trueDepthM: number };
export type SimulatedSurvey = {
  lake: SimulatedLake;
  casts: SimulatedCast[];
  soundings: ChartInput['soundings'];
};

const ORIGIN: LonLat = [1.62, 53.6]; // at sea
const KIT = aKit();

/** A whole bank survey of a small water of its own, from one seed: its shape, bed, pegs, casts and every error in them. */
export function simulatedSurvey(seed: number): SimulatedSurvey {
  const random = seeded(seed);
  const lake = inventedLake(random);
  const casts = pegsOf(lake, random).flatMap((peg) => castsFrom(lake, peg, random));
  const soundings = casts.flatMap(({ sounding }, i) => {
    const { xM, yM, depthM, depthSigmaM, grade } = sounding;
    if (depthM === null || depthSigmaM === null) return [];
    const id = String(i).padStart(4, '0');
    return [{ id, xM, yM, depthM, sigmaM: depthSigmaM, grade, substrate: null, cover: null }];
  });
  return { lake, casts, soundings };
}

const between = (random: () => number, least: number, most: number) => least + (most - least) * random();

/** 0.3–0.9 ha with a wavy shore; a shelf of its own steepness, bars, gullies and hollows, and a slow undulation. */
function inventedLake(random: () => number): SimulatedLake {
  const radiusM = between(random, 32, 52);
  const waves = [2, 3, 4, 5].map((k) => [k, between(random, 0, 0.3 / k), between(random, 0, 7)] as const);
  const shore = Array.from({ length: 72 }, (_, i) => {
    const turn = (i * Math.PI) / 36;
    const share = waves.reduce((sum, [k, a, phase]) => sum + a * Math.cos(k * turn + phase), 1);
    return { xM: radiusM * share * Math.cos(turn), yM: radiusM * share * Math.sin(turn) };
  });
  const outline = { shore, islands: [] };
  const floorM = between(random, 1.4, 4.5);
  const overM = between(random, 4, 14);
  const features = Array.from({ length: Math.floor(between(random, 1, 6)) }, () => ({
    xM: between(random, -0.7, 0.7) * radiusM,
    yM: between(random, -0.7, 0.7) * radiusM,
    alongDeg: between(random, 0, 180),
    halfLengthM: between(random, 6, 40),
    halfWidthM: between(random, 5, 13),
    heightM: between(random, -0.3, 0.4) * floorM,
  }));
  const wave = {
    heightM: between(random, 0.02, 0.15),
    lengthM: between(random, 12, 25),
    phase: 7 * random(),
  };
  const depthM = (p: Point): number | null => {
    if (!insideOutline(outline, p)) return null;
    const rise = 1 - Math.exp(-distanceToShoreM(outline, p) / overM); // all dies out in the margin
    const shape = features.reduce((sum, f) => {
      const turn = (f.alongDeg * Math.PI) / 180;
      const [dx, dy] = [p.xM - f.xM, p.yM - f.yM];
      const along = dx * Math.cos(turn) + dy * Math.sin(turn);
      const across = dy * Math.cos(turn) - dx * Math.sin(turn);
      return sum + f.heightM * Math.exp(-((along / f.halfLengthM) ** 2) - (across / f.halfWidthM) ** 2);
    }, 0);
    const ripple = wave.heightM * Math.sin(p.xM / wave.lengthM + wave.phase) * Math.cos(p.yM / wave.lengthM);
    return Math.max(0, rise * (floorM + shape + ripple));
  };
  return { outline, depthM };
}

type SimulatedPeg = { standM: Point; facingDeg: number; fixed: Point };

/** Pegs round the shore, each with the error of its own catalogued place, which all its casts share. */
function pegsOf({ outline }: SimulatedLake, random: () => number): SimulatedPeg[] {
  const every = Math.floor(between(random, 6, 16));
  const { shore } = outline;
  return shore.flatMap((edge, i) => {
    if (i % every !== 0) return [];
    const [before, after] = [shore.at(i - 1)!, shore[(i + 1) % shore.length]!];
    const facingDeg = (Math.atan2(after.xM - before.xM, after.yM - before.yM) * 180) / Math.PI - 90;
    const standM = pointAlong(edge, facingDeg + 180, 1);
    const fixed = { xM: standM.xM + 0.3 * normal(random), yM: standM.yM + 0.3 * normal(random) };
    return [{ standM, facingDeg, fixed }];
  });
}

/** Three or four lines a peg, each with a far-bank mark; rings outwards every second wrap or every third. */
function castsFrom(lake: SimulatedLake, peg: SimulatedPeg, random: () => number): SimulatedCast[] {
  const lines = random() < 0.5 ? [-30, 0, 30] : [-36, -12, 12, 36];
  const step = random() < 0.6 ? 2 : 3;
  return lines.flatMap((offDeg) => {
    const lineDeg = peg.facingDeg + offDeg + 4 * normal(random);
    const markM = pointAlong(peg.standM, lineDeg, between(random, 110, 170));
    const listed = { xM: markM.xM + 0.5 * normal(random), yM: markM.yM + 0.5 * normal(random) };
    const casts: SimulatedCast[] = [];
    for (let wraps = 2 + Math.floor(2 * random()); wraps <= 15; wraps += step) {
      const cast = throwOne(lake, { peg, markM, listed, wraps }, random);
      if (cast) casts.push(cast);
    }
    return casts;
  });
}

type Plan = { peg: SimulatedPeg; markM: Point; listed: Point; wraps: number };

/** How the cast was made: most with care, some by a bare count, some by a compass, some with a float seen poorly. */
function manner(random: () => number): 'careful' | 'bare count' | 'compass' | 'poor float' | 'estimated' {
  const drawn = random();
  if (drawn < 0.62) return 'careful';
  if (drawn < 0.82) return 'bare count';
  if (drawn < 0.9) return 'compass';
  return drawn < 0.96 ? 'poor float' : 'estimated';
}

/** One cast thrown with every error of the budget drawn afresh, then reduced as its surveyor, who knows none of them, would. */
function throwOne(
  lake: SimulatedLake,
  { peg, markM, listed, wraps }: Plan,
  random: () => number,
): SimulatedCast | null {
  const how = manner(random);
  const byMark = how !== 'compass' && how !== 'estimated';
  const offDeg = { compass: SIGMA.compassSightingDeg, estimated: SIGMA.estimatedBearingDeg };
  const aimDeg =
    (byMark ? SIGMA.aimAtMarkDeg : offDeg[how === 'compass' ? how : 'estimated']) * normal(random);
  const beside = SIGMA.besideMarkedOriginM;
  const stand = {
    xM: peg.standM.xM + beside * normal(random),
    yM: peg.standM.yM + beside * normal(random),
  };
  const markDeg = (Math.atan2(markM.xM - stand.xM, markM.yM - stand.yM) * 180) / Math.PI;
  const countM = how === 'bare count' ? KIT.wrapSigmaShare * KIT.stickSpacingM : SIGMA.markedRemainderM;
  const lineM = wraps * KIT.stickSpacingM + Math.hypot(countM, SIGMA.clipM) * normal(random);
  const r = KIT.lineAlongRodM + SIGMA.lineAlongRodM * normal(random);
  const e = (SIGMA.rodElevationDeg * normal(random) * Math.PI) / 180;
  const reelM = KIT.reelHeightM + SIGMA.reelHeightM * normal(random);
  let truth = pointAlong(stand, markDeg + aimDeg, lineM - 0.5);
  let depthM = lake.depthM(truth);
  // Where the lead lies depends on how deep it sinks there: four turns settle it.
  for (let turn = 0; turn < 4 && depthM !== null; turn++) {
    const downM = reelM + r * Math.sin(e) + depthM;
    const rangeM = r * Math.cos(e) + Math.sqrt(Math.max(0, (lineM - r) ** 2 - downM * downM));
    truth = pointAlong(stand, markDeg + aimDeg, rangeM);
    depthM = lake.depthM(truth);
  }
  if (depthM === null || depthM < 0.5) return null;
  const aim: CastObservation['aim'] = byMark
    ? { by: 'mark', markId: MARK_ID, offsetDeg: 0 }
    : {
        by: 'compass',
        bearingDeg: ((markDeg % 360) + 360) % 360,
        method: how === 'compass' ? 'compass_sighting' : 'estimated',
      };
  const cast = anObservation(MARK_ID, {
    aim,
    wrapsWhole: wraps,
    remainderStated: how !== 'bare count',
    lineText: String(wraps),
    ...floatRead(depthM, how === 'poor float', random),
  });
  const reduced = reduceCast(cast, KIT, siteOf(lake, peg, listed));
  return reduced.ok && reduced.sounding.depthM !== null
    ? { sounding: reduced.sounding, truth, trueDepthM: depthM }
    : null;
}

/** Pulls until the float shows, each pull a little off; seen poorly, a pull is easily missed or counted twice. */
function floatRead(depthM: number, poor: boolean, random: () => number): Partial<CastObservation> {
  const pullM = KIT.pullM * (1 + SIGMA.pullShare * normal(random));
  const offsetM = KIT.floatOffsetM + SIGMA.floatOffsetM * normal(random);
  const missed = poor ? 0.5 * normal(random) : 0;
  const pulls = Math.max(1, Math.ceil((depthM - offsetM) / pullM + missed));
  return { pulls, floatSight: poor ? 'poor' : 'good' };
}

function siteOf(lake: SimulatedLake, peg: SimulatedPeg, listed: Point) {
  const place = fromPlane(ORIGIN, peg.fixed);
  const mark = {
    name: 'chimney',
    place: fromPlane(ORIGIN, listed),
    sigmaM: 0.5,
    permanence: 'permanent' as const,
    ofThisLake: true,
  };
  return aCastSite({
    origin: ORIGIN,
    outline: lake.outline,
    stance: { place, sigmaM: 0.3, originMarked: true },
    mark,
  });
}
