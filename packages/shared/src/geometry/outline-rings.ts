import { geodesicBetween, geodesicRing, openRing, type LonLat } from './geodesic';
import { finding, isRefused, type OutlineFinding } from './outline-finding';
import { fromPlane, toPlane, type Point } from './plane';
import { insideRing, signedAreaM2 } from './polygon';
import { ringCrossings, type Crossing } from './ring-crossings';

/** Closed rings of [lon, lat], shore first counter-clockwise, islands clockwise; null when refused. */
export type RingsChecked = { rings: LonLat[][] | null; areaM2: number | null; findings: OutlineFinding[] };

const MOST_POINTS = 20_000;
const SMALLEST_AREA_M2 = 1;

const ringName = (index: number): string => (index === 0 ? 'The shore' : `Island ${index}`);

/**
 * Checks rings of [lon, lat], shore first, and mends what has only one sensible meaning: a ring left open is
 * closed, a ring that runs the wrong way is turned, a position repeated at once is dropped. Anything that would
 * make area or "is this on the water" wrong is refused, saying where.
 */
export function checkRings(given: readonly (readonly LonLat[])[]): RingsChecked {
  const findings: OutlineFinding[] = [];
  const refused = (): RingsChecked => ({ rings: null, areaM2: null, findings });
  const points = given.reduce((sum, ring) => sum + ring.length, 0);
  if (points > MOST_POINTS) {
    const words = `The outline has ${points} positions; at most ${MOST_POINTS} can be read. Simplify it first`;
    findings.push(finding(['refused', 'too-many'], words));
    return refused();
  }
  given.forEach((ring, index) => findings.push(...rangeFindings(ring, ringName(index))));
  const origin = given[0]?.[0];
  if (isRefused(findings)) return refused();
  const open = given.map((ring, index) => openedRing(ring, ringName(index), findings));
  if (isRefused(findings) || !origin) return refused();
  const plane = open.map((ring) => ring.map((place) => toPlane(origin, place)));
  findings.push(...shapeFindings(plane, origin));
  if (isRefused(findings)) return refused();
  const rings = open.map((ring, index) => closedTurned(ring, index, findings));
  const areaM2 = rings.reduce((sum, ring) => sum + geodesicRing(ring).areaM2, 0);
  return { rings, areaM2, findings };
}

function rangeFindings(ring: readonly LonLat[], name: string): OutlineFinding[] {
  const bad = ring.find(([lon, lat]) => !(Math.abs(lon) <= 180 && Math.abs(lat) <= 90));
  if (!bad) return [];
  return [outOfRange(bad, name)];
}

/** Why a position can't be on Earth, with the usual cause when it shows. */
export function outOfRange([lon, lat]: LonLat, name: string): OutlineFinding {
  if (!Number.isFinite(lon) || !Number.isFinite(lat)) {
    return finding(['refused', 'bad-position'], `${name} holds a position that is not a number`);
  }
  const swapped = Math.abs(lat) > 90 && Math.abs(lon) <= 90;
  const hint = swapped
    ? ': longitude comes first in GeoJSON, and these look the other way round'
    : ': if these are eastings and northings, export again as WGS 84 longitude and latitude';
  const words = `${name} holds longitude ${lon}, latitude ${lat}, which is not on Earth${hint}`;
  return finding(['refused', 'out-of-range'], words);
}

function openedRing(ring: readonly LonLat[], name: string, findings: OutlineFinding[]): LonLat[] {
  const opened = openRing(ring);
  const first = ring[0];
  const last = ring[ring.length - 1];
  const kept = opened.filter((place, i) => {
    const before = opened[i - 1];
    return !before || before[0] !== place[0] || before[1] !== place[1];
  });
  if (new Set(kept.map(([lon, lat]) => `${lon},${lat}`)).size < 3) {
    const words = `${name} has ${ring.length} ${ring.length === 1 ? 'position' : 'positions'}; a ring needs at least four, the last the same as the first`;
    findings.push(finding(['refused', 'too-few'], words, first ?? null));
    return [...kept];
  }
  if (opened.length === ring.length && first && last) {
    const gapM = geodesicBetween(last, first).distanceM;
    const words = `${name} was not closed; a straight side of ${gapM.toFixed(1)} m now joins its last position to its first`;
    findings.push(finding(['mended', 'unclosed'], words, first));
  }
  const dropped = opened.length - kept.length;
  if (dropped > 0) {
    const words = `${name} repeated ${dropped} ${dropped === 1 ? 'position' : 'positions'}; ${dropped === 1 ? 'it is' : 'they are'} dropped`;
    findings.push(finding(['mended', 'repeated'], words));
  }
  return kept;
}

function closedTurned(ring: readonly LonLat[], index: number, findings: OutlineFinding[]): LonLat[] {
  const counterClockwise = geodesicRing(ring).areaM2 > 0;
  const wanted = index === 0;
  const first = ring[0];
  if (!first) return [];
  if (counterClockwise === wanted) return [...ring, first];
  const way = wanted ? 'counter-clockwise' : 'clockwise';
  findings.push(finding(['mended', 'turned'], `${ringName(index)} ran the wrong way; it now runs ${way}`));
  return [first, ...ring.slice(1).reverse(), first];
}

function shapeFindings(plane: readonly Point[][], origin: LonLat): OutlineFinding[] {
  const crossings = ringCrossings(plane);
  if (!crossings) {
    const words =
      'The outline runs to and fro so often that it can’t be checked for crossings; draw it along the shore, or simplify it first';
    return [finding(['refused', 'too-winding'], words)];
  }
  if (crossings.length > 0) return crossings.map((crossing) => crossingFinding(crossing, origin));
  const findings: OutlineFinding[] = [];
  const [shore = [], ...islands] = plane;
  plane.forEach((ring, index) => {
    if (Math.abs(signedAreaM2(ring)) < SMALLEST_AREA_M2) {
      findings.push(finding(['refused', 'no-area'], `${ringName(index)} encloses less than a square metre`));
    }
  });
  islands.forEach((island, i) => {
    const corner = island[0];
    if (!corner) return;
    if (!insideRing(shore, corner)) {
      const words = `Island ${i + 1} lies outside the shore; remove it, or draw it as a lake of its own`;
      findings.push(finding(['refused', 'island-outside'], words, fromPlane(origin, corner)));
    }
    const host = islands.findIndex((other, j) => j !== i && insideRing(other, corner));
    if (host >= 0) {
      const words = `Island ${i + 1} lies on island ${host + 1}; remove one of them`;
      findings.push(finding(['refused', 'islands-overlap'], words, fromPlane(origin, corner)));
    }
  });
  return findings;
}

function crossingFinding({ rings: [p, q], at }: Crossing, origin: LonLat): OutlineFinding {
  const place = fromPlane(origin, at);
  if (p === q) {
    const words = `${ringName(p)} crosses or touches itself; move the positions there so that it doesn't`;
    return finding(['refused', 'self-crossing'], words, place);
  }
  const [low, high] = p < q ? [p, q] : [q, p];
  const code = low === 0 ? 'island-outside' : 'islands-overlap';
  const other = low === 0 ? 'the shore' : `island ${low}`;
  return finding(['refused', code], `Island ${high} crosses or touches ${other}; move one of them`, place);
}
