import { fromMetres } from '@mereward/shared/units/length';
import { figure, type LengthWish } from '@mereward/shared/units/length-words';
import { ACRE_M2, HECTARE_M2 } from '@mereward/shared/units/measures';
import { formatWraps, metresToWraps } from '@mereward/shared/units/wraps';

export { figure, length, lengthWithin, percent } from '@mereward/shared/units/length-words';

const JOIN = '\u00A0'; // a figure and its unit stay on one line

/** Area in square metres as hectares or acres: "6.4 ha". Below a tenth of a hectare, in square metres. */
export function area(areaM2: number, units: LengthWish): string {
  if (units.length === 'ft') return `${figure(areaM2 / ACRE_M2, 1)}${JOIN}acres`;
  return areaM2 < HECTARE_M2 / 10
    ? `${figure(areaM2)}${JOIN}m²`
    : `${figure(areaM2 / HECTARE_M2, 1)}${JOIN}ha`;
}

export const volume = (volumeM3: number): string => `${figure(volumeM3)}${JOIN}m³`;

/** A length of line counted on sticks so far apart, without the word: "14", "9 + 4 ft". */
export const wraps = (lengthM: number, spacingM: number, units: LengthWish): string =>
  formatWraps(metresToWraps(lengthM, spacingM), units.length, spacingM);

/** What the sticks are called: "12 ft sticks", "2 m sticks". */
export function sticks(spacingM: number): string {
  const feet = fromMetres(spacingM, 'ft');
  const whole = Math.abs(feet - Math.round(feet * 2) / 2) < 0.005;
  return whole
    ? `${figure(feet, feet % 1 ? 1 : 0)}${JOIN}ft sticks`
    : `${figure(spacingM, 2)}${JOIN}m sticks`;
}

/** Whole pence: "£12.50". The only place where money becomes words. */
export const money = (pence: number, currency = 'GBP'): string =>
  (pence / 100).toLocaleString('en-GB', { style: 'currency', currency });
