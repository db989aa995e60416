import type { PlaceWater } from '@mereward/shared/lakes/peg-water-contract';
import type { Point } from '@mereward/shared/geometry/plane';
import { reachFrom, type Reachable } from '@mereward/shared/lakes/peg-waters';
import { stanceOf } from '../lakes/peg-waters';
import type { PlaceAsked } from './place-reading';

export function reachOfPeg({ ground, waters }: PlaceAsked, place: Point): Reachable {
  return reachFrom(waters.outline, stanceOf(ground.lake, ground.peg))(place);
}

/** What stands against a cast from this peg to a place on the water, in words; none is a refusal. */
export function reachWarnings(at: PlaceAsked, place: Point, water: PlaceWater): string[] {
  const { inArc, inRange, inSight } = reachOfPeg(at, place);
  const { reachM } = stanceOf(at.ground.lake, at.ground.peg);
  return [
    water.own ? null : `${water.words} Ask the fishery before you cast there.`,
    inArc ? null : 'Outside this peg’s arc.',
    inRange ? null : `Farther than this peg casts (${reachM.toFixed(0)} m).`,
    inSight ? null : 'Land lies between this peg and the place.',
  ].filter((words) => words !== null);
}
