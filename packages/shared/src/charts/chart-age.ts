import type { Point } from '../geometry/point';
import { insideRing } from '../geometry/polygon';
import type { Grade } from '../surveys/contract';
import { monthsBetween } from '../time/civil-day';
import type { ChartChange } from './chart-change-contract';

export type ChartAge = 'current' | 'ageing' | 'old' | 'changed';

/** A chart's age, and what dates it: events newest first, and whether the water stood very low or in flood since. */
export type AgeNow = { age: ChartAge; changes: ChartChange[]; levelsMoved: boolean };

/** The water has stood this much below datum since the survey: shelves were dry, and edges may have slipped. */
export const DRAWDOWN_M = 0.5;

/**
 * How far a chart may be trusted by its age: under a year current, to two years ageing, then old; changed when
 * something known to move the bottom has happened since. Common practice, no published source.
 */
export function chartAge(surveyedTo: string, today: string, changedSince: boolean): ChartAge {
  if (changedSince) return 'changed';
  const months = monthsBetween(surveyedTo, today);
  if (months < 12) return 'current';
  return months < 24 ? 'ageing' : 'old';
}

export const AGE_WORDS: Readonly<Record<ChartAge, string>> = {
  current: 'Surveyed within the last twelve months',
  ageing: 'Surveyed between one and two years ago',
  old: 'Surveyed more than two years ago: changed since survey, take it as a hint',
  changed: 'Changed since survey: the water has been very low or in flood since',
};

const NAMED = 2;

/** The age in words, naming what happened and when. */
export function ageWords(age: ChartAge, changes: readonly Pick<ChartChange, 'words'>[] = []): string {
  if (age !== 'changed' || changes.length === 0) return AGE_WORDS[age];
  const named = changes.slice(0, NAMED).map(({ words }) => words.charAt(0).toLowerCase() + words.slice(1));
  const more = changes.length - NAMED;
  const rest = more > 0 ? [`and ${more} more`] : [];
  return `Changed since survey: ${[...named, ...rest].join('; ')}`;
}

const DROPPED: Readonly<Record<Grade, Grade>> = { A: 'B', B: 'C', C: 'C', D: 'D' };

/**
 * A cast's grade as it is told today: one lower where the bottom has changed since, or the chart is old. Never as low as D,
 * which would take the point off the reader's sheet in place of a warning.
 */
export function gradeNow(grade: Grade, place: Point, { age, changes, levelsMoved }: AgeNow): Grade {
  const touched = changes.some((change) => touches(change, place));
  return age === 'old' || levelsMoved || touched ? DROPPED[grade] : grade;
}

/** Whether something happened at a place: what happened to the whole lake happened there too. */
export const touches = ({ rings }: Pick<ChartChange, 'rings'>, place: Point): boolean =>
  rings === null || insideRings(rings, place);

function insideRings(rings: readonly (readonly number[])[], place: Point): boolean {
  const inside = rings.filter((ring) => insideRing(pointsOf(ring), place));
  return inside.length % 2 === 1; // a hole in an area is a ring inside a ring
}

const pointsOf = (ring: readonly number[]): Point[] =>
  Array.from({ length: Math.floor(ring.length / 2) }, (_, i) => ({
    xM: ring[2 * i] ?? 0,
    yM: ring[2 * i + 1] ?? 0,
  }));
