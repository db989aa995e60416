import type { SurveyVisit } from '@mereward/db/entities/surveys/survey-visit';

/** Clocks at the water are set by hand, and to another zone: half a day out is common, a day is not. */
export const CLOCK_OUT_MS = 86_400_000;

/** Why a cast can't have been made then, in words; null when it can. A chart takes its survey days from its casts. */
export function castTimeFault(
  { startedAt }: Pick<SurveyVisit, 'startedAt'>,
  observedAt: Date,
  now: Date,
): string | null {
  if (observedAt.getTime() > now.getTime() + CLOCK_OUT_MS)
    return 'This would be in the future. Look at the date and the time on the phone.';
  if (observedAt.getTime() < startedAt.getTime() - CLOCK_OUT_MS)
    return 'This would be more than a day before the visit began. Look at the date and the time.';
  return null;
}
