import { monthsBetween } from './civil-day';

/** Whole years of age on a civil day, both YYYY-MM-DD. Who was born on 29 February is a year older on 1 March. */
export const ageOnDay = (bornOn: string, day: string): number => Math.floor(monthsBetween(bornOn, day) / 12);
