import { bearingDifferenceDeg, normaliseBearing, type LonLat } from '../geometry/geodesic';
import { outlineInPlane } from '../geometry/outline';
import { toPlane } from '../geometry/plane';
import { distanceToShoreM, waterRunM } from '../geometry/shore-distance';
import type { LakePolygon, PegDetails } from './contract';
import { isUnderLine, OVERHEAD_LIMIT_M, type OverheadLine } from './overhead-line';

/** A peg's origin lies at the water; farther from the shore than this it belongs to another lake, or is mistyped. */
const OFF_SHORE_M = 30;
const NARROWEST_ARC_DEG = 2;

type Arc = { arcFromDeg: number; arcToDeg: number };

/** Degrees from the left limit clockwise to the right one, 0 ≤ width < 360. */
export const arcWidthDeg = ({ arcFromDeg, arcToDeg }: Arc): number => normaliseBearing(arcToDeg - arcFromDeg);

/** Middle of the peg's arc, degrees true. */
export const facingDeg = (arc: Arc): number => normaliseBearing(arc.arcFromDeg + arcWidthDeg(arc) / 2);

/** Does a true bearing lie inside the peg's arc, its limits included? */
export const inArc = (arc: Arc, bearingDeg: number): boolean =>
  Math.abs(bearingDifferenceDeg(facingDeg(arc), bearingDeg)) <= arcWidthDeg(arc) / 2 + 1e-9;

export type PegFault = { field: string; words: string };
export type LakeShape = { origin: LonLat; outline: LakePolygon };

/** Everything about a peg that can't be so, in words, each with the field it belongs to (a JSON pointer's end). */
export function pegFaults(details: PegDetails, lake: LakeShape): PegFault[] {
  return [...placeFaults(details, lake), ...overheadFaults(details.overheadLine), ...statusFaults(details)];
}

function placeFaults(details: PegDetails, lake: LakeShape): PegFault[] {
  const outline = outlineInPlane(lake.origin, lake.outline);
  const places = [
    ['position', 'This peg’s place at the water', details.position],
    ['origin', 'The place to stand', details.origin],
  ] as const;
  const far = places.flatMap(([field, what, place]) => {
    const offM = distanceToShoreM(outline, toPlane(lake.origin, place));
    if (offM <= OFF_SHORE_M) return [];
    const words = `${what} lies ${distanceWords(offM)} from the shore of this lake; it may be at most ${OFF_SHORE_M} m. Look whether longitude and latitude are the right way round.`;
    return [{ field, words }];
  });
  if (arcWidthDeg(details) < NARROWEST_ARC_DEG) {
    const words =
      'The left and the right limit of the arc are the same. Give the bearings between which this peg’s water lies.';
    return [...far, { field: 'arcToDeg', words }];
  }
  if (far.length > 0) return far;
  const standing = toPlane(lake.origin, details.origin);
  const ray = { bearingDeg: facingDeg(details), limitM: 2 * OFF_SHORE_M, marginM: OFF_SHORE_M };
  if (waterRunM(outline, standing, ray)) return [];
  const words = `The middle of the arc (${Math.round(facingDeg(details))}°) looks over land. The arc runs clockwise from its left limit to its right limit, as seen looking over the water: look whether they are swapped.`;
  return [{ field: 'arcFromDeg', words }];
}

const distanceWords = (lengthM: number): string =>
  lengthM < 2000 ? `${Math.round(lengthM)} m` : `${(lengthM / 1000).toFixed(0)} km`;

function overheadFaults(line: OverheadLine): PegFault[] {
  if (line.fishing !== 'ok' || !isUnderLine(line)) return [];
  if (line.distanceM === null) {
    const words = `Measure how far the overhead line is, level from its outer wire. Until then fishing here can’t be “ok”: choose restricted or no fishing.`;
    return [{ field: 'overheadLine/distanceM', words }];
  }
  const words = `An overhead line ${line.distanceM} m away is nearer than ${OVERHEAD_LIMIT_M} m, so fishing here can’t be “ok”. Choose no fishing, or restricted with the assessment that is on file. Ask the network operator.`;
  return [{ field: 'overheadLine/fishing', words }];
}

function statusFaults(details: PegDetails): PegFault[] {
  if (details.status === 'open' || details.statusReason !== '') return [];
  return [{ field: 'statusReason', words: 'Say why the peg is not open: visitors read it here.' }];
}

/** Why no ticket may be written for this peg at all, in words; null when nothing stands against it. */
export function whyNotLet({ overheadLine }: Pick<PegDetails, 'overheadLine'>): string | null {
  if (overheadLine.fishing === 'no_fishing') return 'No fishing from this peg: an overhead line is too near.';
  if (!isUnderLine(overheadLine) || (overheadLine.document ?? '') !== '') return null;
  return `An overhead line is nearer than ${OVERHEAD_LIMIT_M} m, or not measured, and no assessment is on file: this peg can’t be let.`;
}
