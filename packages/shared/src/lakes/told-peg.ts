import { planeBearingDeg, distanceBetweenM, type Point } from '../geometry/point';
import { toPlane, type LonLat } from '../geometry/plane';
import type { PegDetails } from './contract';
import { toldLine } from './lake-places';
import type { LakePlace, LakePlaceKind } from './place-contract';

/** A hazard drawn nearer to a peg than this is told there. Common practice, no published source. */
export const HAZARD_NEAR_M = 40;

const QUARTERS = [
  'north',
  'north-east',
  'east',
  'south-east',
  'south',
  'south-west',
  'west',
  'north-west',
] as const;

/** "12 m to the north-west". */
function awayWords(from: Point, to: Point): string {
  const quarter = QUARTERS[Math.round(planeBearingDeg(from, to) / 45) % 8] ?? 'north';
  return `${Math.round(distanceBetweenM(from, to))} m to the ${quarter}`;
}

type Drawn = { places: readonly LakePlace[]; origin: LonLat };

const MOST_WORDS = 120;
const MOST_HAZARDS = 30;

/**
 * A peg's details as they are told: with the overhead line, the hazards nearby, the nearest throw line, the gate and the
 * parking that stand on the lake's drawing. Its own words come first; what would not fit beside them is left to the chart.
 */
export function toldPeg(details: PegDetails, { places, origin }: Drawn): PegDetails {
  const stance = toPlane(origin, details.origin);
  const of = (kind: LakePlaceKind) =>
    places
      .filter((place) => place.kind === kind)
      .flatMap(({ at: [first], name }) => (first ? [{ name, at: toPlane(origin, first) }] : []))
      .sort((a, b) => distanceBetweenM(stance, a.at) - distanceBetweenM(stance, b.at));
  const near = (kind: LakePlaceKind): string[] =>
    of(kind)
      .slice(0, 1)
      .map(({ name, at }) => `${name}, ${awayWords(stance, at)}`);
  const hazards = of('hazard')
    .filter(({ at }) => distanceBetweenM(stance, at) <= HAZARD_NEAR_M)
    .map(({ name, at }) => `${name}, ${awayWords(stance, at)}`)
    .filter((words) => words.length <= MOST_WORDS);
  const { emergency, parking } = details;
  return {
    ...details,
    overheadLine: toldLine(details, { places, origin }),
    hazards: [...details.hazards, ...hazards].slice(0, MOST_HAZARDS),
    emergency: {
      ...emergency,
      throwLine: joined(emergency.throwLine, near('throw_line'), MOST_WORDS),
      ambulanceGate: joined(emergency.ambulanceGate, near('gate'), MOST_WORDS),
    },
    parking: { ...parking, bay: joined(parking.bay, near('parking'), MOST_BAY) },
  };
}

const MOST_BAY = 60;

/** What is written and what is drawn, as far as both fit: what is written goes first. */
function joined(written: string, drawn: readonly string[], most: number): string {
  const both = [written, ...drawn].filter(Boolean).join('; drawn: ');
  return both.length <= most ? both : written || (drawn[0] ?? '').slice(0, most);
}
