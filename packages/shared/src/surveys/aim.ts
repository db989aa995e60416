import { geodesicAlong, geodesicBetween, normaliseBearing } from '../geometry/geodesic';
import type { LonLat } from '../geometry/plane';
import type { Aim, CastObservation, Kit, ReductionStep } from './contract';
import { refuse, type AimMark, type CastSite, type Refusal } from './cast-site';
import { SIGMA } from './error-budget';
import { degrees, metres, plusMinus, step } from './reduction-step';

const DEGREES = 180 / Math.PI;

/** Where the angler really stood and which way the line lies, true. */
export type AimedFrom = {
  ok: true;
  from: LonLat; // the stance moved by the side-step
  bearingDeg: number;
  sigmaDeg: number;
  markRangeM: number | null; // null when aimed by compass
  steps: ReductionStep[];
};

type Aimed = Pick<CastObservation, 'aim' | 'sidestepM'>;

/**
 * True bearing of a cast. To a far-bank mark: the geodesic from where the angler stood to the mark, plus the offset
 * (right positive); a side-step x then moves the spot by only x·(1 − S/R). By compass: magnetic plus declination, and
 * a side-step moves the spot by all of x.
 */
export function aimedFrom(cast: Aimed, kit: Kit, site: CastSite): AimedFrom | Refusal {
  return cast.aim.by === 'mark'
    ? byMark(cast.aim, cast.sidestepM, site)
    : byCompass(cast.aim, cast.sidestepM, [kit, site]);
}

function byMark(aim: Extract<Aim, { by: 'mark' }>, sidestepM: number, site: CastSite): AimedFrom | Refusal {
  const mark = site.mark;
  if (!mark) {
    return refuse(
      'The far-bank mark of this cast is not in the lake’s catalogue',
      'Add the mark, or aim by another',
    );
  }
  if (!mark.ofThisLake) {
    return refuse(`“${mark.name}” is a mark of another lake`, 'Pick a far-bank mark of this lake');
  }
  const straight = geodesicBetween(site.stance.place, mark.place);
  if (!(straight.distanceM > 1)) {
    return refuse(
      `“${mark.name}” stands on the peg itself, so it gives no bearing`,
      'Pick a mark on the far bank',
    );
  }
  const from = sidestep(site.stance.place, straight.bearingDeg, sidestepM);
  const seen = geodesicBetween(from, mark.place);
  const bearingDeg = normaliseBearing(seen.bearingDeg + aim.offsetDeg);
  const sigmaDeg = markSigmaDeg(mark, seen.distanceM);
  const inputs = [
    ['mark', mark.name],
    ['bearing to the mark', degrees(seen.bearingDeg, 3)],
    ['range of the mark R', metres(seen.distanceM, 1)],
    ['side-step', metres(sidestepM, 2)],
    ['offset, right positive', degrees(aim.offsetDeg)],
  ] as const;
  const result = { value: degrees(bearingDeg, 3), sigma: plusMinus(sigmaDeg, '°') };
  const steps = [
    step(['bearing', 'Bearing over the mark', 'θ = bearing to the mark + offset'], inputs, result),
  ];
  return { ok: true, from, bearingDeg, sigmaDeg, markRangeM: seen.distanceM, steps };
}

/** Half a degree of aim, or the mark's own error seen from the peg when that is more. */
function markSigmaDeg(mark: AimMark, rangeM: number): number {
  return Math.max(SIGMA.aimAtMarkDeg, Math.atan(mark.sigmaM / rangeM) * DEGREES);
}

function byCompass(
  aim: Extract<Aim, { by: 'compass' }>,
  sidestepM: number,
  [kit, site]: readonly [Kit, CastSite],
): AimedFrom {
  const bearingDeg = normaliseBearing(aim.bearingDeg + kit.declinationDeg);
  const sigmaDeg = compassSigmaDeg(aim.method);
  const inputs = [
    ['read on the compass', degrees(aim.bearingDeg, 1)],
    ['declination, east positive', degrees(kit.declinationDeg, 1)],
    ['side-step', metres(sidestepM, 2)],
  ] as const;
  const result = { value: degrees(bearingDeg, 3), sigma: plusMinus(sigmaDeg, '°') };
  const steps = [step(['bearing', 'Bearing by compass', 'θ = compass + declination'], inputs, result)];
  const from = sidestep(site.stance.place, bearingDeg, sidestepM);
  return { ok: true, from, bearingDeg, sigmaDeg, markRangeM: null, steps };
}

function compassSigmaDeg(method: Extract<Aim, { by: 'compass' }>['method']): number {
  switch (method) {
    case 'compass_phone':
      return SIGMA.compassPhoneDeg;
    case 'compass_sighting':
      return SIGMA.compassSightingDeg;
    case 'estimated':
      return SIGMA.estimatedBearingDeg;
  }
}

function sidestep(place: LonLat, facingDeg: number, rightM: number): LonLat {
  return rightM === 0 ? place : geodesicAlong(place, facingDeg + 90, rightM);
}

/** What share of a side-step reaches the spot: 1 − S/R over a mark, all of it by compass. */
export function sidestepShare(spotRangeM: number, markRangeM: number | null): number {
  return markRangeM === null ? 1 : Math.abs(1 - spotRangeM / markRangeM);
}
