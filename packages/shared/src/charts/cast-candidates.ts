import { normaliseBearing } from '../geometry/bearing';
import { pointAlong } from '../geometry/point';
import type { PegStance } from '../lakes/peg-waters';
import type { SpotKit } from '../surveys/same-spot';
import { groundRange } from '../surveys/ground-range';
import { lineAWrapM, stretchOf } from '../surveys/line-out';
import { RING_WRAPS, SECTOR_DEG } from '../surveys/peg-arc';

/** A cast from a peg that could be made: whole wraps on the survey's sticks, in the middle of a sector of the arc. */
export type CastCandidate = {
  xM: number;
  yM: number;
  bearingDeg: number;
  rangeM: number;
  wrapsWhole: number;
  lineOutM: number;
};

/** More than this from one peg would only slow the choice; rings are then taken farther apart. */
const MOST_OF_A_PEG = 60;

type Ground = {
  isOwn: (xM: number, yM: number) => boolean; // is the place this peg's water?
  depthM: (xM: number, yM: number) => number; // to slope the line; a guess where nobody measured
};

/**
 * Every cast from a stance on a net of rings two wraps apart and sectors of at most 10° that lands on the peg's own water
 * within its reach. Bearings are the plane's. The depth slopes the line; it is taken where the line would lie flat, a
 * step that moves a place by centimetres.
 */
export function castCandidates(stance: PegStance, kit: SpotKit, ground: Ground): CastCandidate[] {
  for (let ringWraps = RING_WRAPS; ; ringWraps += RING_WRAPS) {
    const candidates = netOf(stance, kit, { ...ground, ringWraps });
    if (candidates.length <= MOST_OF_A_PEG) return candidates;
  }
}

function netOf(stance: PegStance, kit: SpotKit, net: Ground & { ringWraps: number }): CastCandidate[] {
  const { at, arcFromDeg, arcToDeg, reachM } = stance;
  const widthDeg = normaliseBearing(arcToDeg - arcFromDeg);
  const sectors = Math.max(1, Math.ceil(widthDeg / SECTOR_DEG - 1e-9));
  const wrapM = lineAWrapM(kit) * (1 + stretchOf(kit).share);
  const candidates: CastCandidate[] = [];
  for (
    let wrapsWhole = net.ringWraps;
    wrapsWhole * wrapM <= reachM + kit.lineAlongRodM;
    wrapsWhole += net.ringWraps
  ) {
    for (let sector = 0; sector < sectors; sector++) {
      const bearingDeg = normaliseBearing(arcFromDeg + ((sector + 0.5) * widthDeg) / sectors);
      const lineOutM = wrapsWhole * wrapM;
      const flat = pointAlong(at, bearingDeg, lineOutM);
      const range = groundRange(lineOutM, {
        reference: kit.wrapReference,
        lineAlongRodM: kit.lineAlongRodM,
        reelHeightM: kit.reelHeightM,
        rodElevationDeg: kit.rodElevationDeg,
        depthM: net.depthM(flat.xM, flat.yM),
      });
      if (!range.ok || range.rangeM > reachM) continue;
      const place = pointAlong(at, bearingDeg, range.rangeM);
      if (!net.isOwn(place.xM, place.yM)) continue;
      candidates.push({ ...place, bearingDeg, rangeM: range.rangeM, wrapsWhole, lineOutM });
    }
  }
  return candidates;
}
