import { monthsBetween } from '../time/civil-day';

export type ChartAge = 'current' | 'ageing' | 'old' | 'changed';

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
