import type { LonLat } from '../geometry/geodesic';
import { outlineInPlane } from '../geometry/outline';
import { toPlane } from '../geometry/plane';
import { distanceBetweenM, type Point } from '../geometry/point';
import { distanceToShoreM, nearestOnSegment } from '../geometry/shore-distance';
import { OVERHEAD_LIMIT_M, type OverheadLine } from './overhead-line';
import type { LakeShape, PegFault } from './peg-rules';
import type { LakePlace, LakePlaceKind, ShownPlace } from './place-contract';

/** Farther from the shore than this a place belongs to another lake, or is mistyped. Common practice, no published source. */
const OFF_SHORE_M = 1000;

/** What guards somebody from harm is nobody's secret. */
const FOR_EVERYBODY: readonly LakePlaceKind[] = ['throw_line', 'hazard', 'overhead_line'];

/** Everything about a lake's places that can't be so, in words, each with its field (a JSON pointer's end). */
export function lakePlaceFaults(places: readonly LakePlace[], lake: LakeShape): PegFault[] {
  const outline = outlineInPlane(lake.origin, lake.outline);
  const known = new Set<string>();
  return places.flatMap(({ id, kind, name, at, audience }, i): PegFault[] => {
    const fault = (field: string, words: string): PegFault => ({ field: `places/${i}/${field}`, words });
    const faults: PegFault[] = [];
    if (known.has(id)) faults.push(fault('id', 'Two places have the same id. Draw the second one again.'));
    known.add(id);
    if (kind === 'overhead_line' && at.length < 2)
      faults.push(fault('at', 'An overhead line needs two points or more: draw it from post to post.'));
    if (kind !== 'overhead_line' && at.length > 1)
      faults.push(fault('at', 'This is one place: give it one point.'));
    if (audience !== 'public' && FOR_EVERYBODY.includes(kind))
      faults.push(
        fault('audience', 'A hazard, a throw line and an overhead line are shown to everybody: choose that.'),
      );
    const farM = Math.min(...at.map((place) => distanceToShoreM(outline, toPlane(lake.origin, place))));
    if (farM > OFF_SHORE_M)
      faults.push(
        fault(
          'at',
          `“${name}” lies ${(farM / 1000).toFixed(1)} km from the shore of this lake. Look whether longitude and latitude are the right way round.`,
        ),
      );
    return faults;
  });
}

type Reader = { member: boolean; staff: boolean };

/** The places this reader is shown. */
export const placesFor = (places: readonly LakePlace[] | undefined, { member, staff }: Reader): LakePlace[] =>
  (places ?? []).filter(
    ({ audience }) => audience === 'public' || staff || (audience === 'members' && member),
  );

/** Laid in the lake's plane, to a centimetre. */
export const placesInPlane = (places: readonly LakePlace[], origin: LonLat): ShownPlace[] =>
  places.map(({ at, ...place }) => ({
    ...place,
    line: at.flatMap((each) => {
      const { xM, yM } = toPlane(origin, each);
      return [Math.round(xM * 100) / 100, Math.round(yM * 100) / 100];
    }),
  }));

/** What a lake’s drawing shows, and the origin of its plane. */
export type Drawn = { places?: readonly LakePlace[] | undefined; origin: LonLat };
type PegAt = { position: LonLat; origin: LonLat };

/**
 * How near the nearest drawn overhead line comes to a peg, metres: level, from its place at the water or where one stands,
 * whichever is nearer. Null where none is drawn.
 */
export function drawnLineM({ position, origin: stance }: PegAt, { places, origin }: Drawn): number | null {
  const stands = [toPlane(origin, position), toPlane(origin, stance)];
  let nearestM = Infinity;
  for (const { kind, at } of places ?? []) {
    if (kind !== 'overhead_line') continue;
    const line = at.map((each) => toPlane(origin, each));
    for (const stand of stands) nearestM = Math.min(nearestM, distanceToLineM(stand, line));
  }
  return Number.isFinite(nearestM) ? nearestM : null;
}

/** From a point to a line of one point or more, metres. */
export function distanceToLineM(from: Point, line: readonly Point[]): number {
  const [first] = line;
  if (!first) return Infinity;
  let nearestM = distanceBetweenM(from, first);
  for (let i = 0; i + 1 < line.length; i++)
    nearestM = Math.min(nearestM, distanceBetweenM(from, nearestOnSegment(from, line[i]!, line[i + 1]!)));
  return nearestM;
}

type PegLine = PegAt & { overheadLine: OverheadLine };

/**
 * The overhead line at a peg as it is told: what its own sheet says, and where a line drawn nearer than 30 m says worse,
 * that. Within 30 m fishing is never "ok", whoever forgot to write it down.
 */
export function toldLine(peg: PegLine, drawn: Drawn): OverheadLine {
  const own = peg.overheadLine;
  const drawnM = drawnLineM(peg, drawn);
  if (drawnM === null || drawnM >= OVERHEAD_LIMIT_M) return own;
  const ownM = own.kind === 'present' ? own.distanceM : null;
  return {
    ...own,
    kind: 'present',
    distanceM: ownM === null ? Math.round(drawnM) : Math.min(ownM, Math.round(drawnM)),
    fishing: own.fishing === 'ok' ? 'restricted' : own.fishing,
  };
}

/** Where a peg's own sheet says less of an overhead line than the lake's drawing, in words; null where both agree. */
export function overheadDispute(peg: PegLine, drawn: Drawn): string | null {
  const drawnM = drawnLineM(peg, drawn);
  if (drawnM === null || drawnM >= OVERHEAD_LIMIT_M) return null;
  const { kind, distanceM } = peg.overheadLine;
  const far = kind === 'present' && distanceM !== null && distanceM >= OVERHEAD_LIMIT_M;
  if (kind === 'present' && !far) return null;
  const says = far ? `says ${distanceM} m` : kind === 'none' ? 'says none' : 'says not looked at';
  return `An overhead line is drawn ${Math.round(drawnM)} m from this peg; the peg’s own sheet ${says}. Measure it, then put right whichever is wrong: nearer than ${OVERHEAD_LIMIT_M} m nobody fishes without an assessment.`;
}
