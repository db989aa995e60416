import type { Units } from '@mereward/shared/accounts/contract';
import { fromMetres } from '@mereward/shared/units/length';
import { ACRE_M2, HECTARE_M2 } from '@mereward/shared/units/measures';
import { formatWraps, metresToWraps } from '@mereward/shared/units/wraps';

type Length = Pick<Units, 'length'>;

const JOIN = '\u00A0'; // a figure and its unit stay on one line
const MINUS = '\u2212';

/** A number with so many decimals, a true minus sign and thousands apart. */
export function figure(value: number, decimals = 0): string {
  const text = Math.abs(value).toLocaleString('en-GB', {
    minimumFractionDigits: decimals,
    maximumFractionDigits: decimals,
  });
  return value < 0 && Number(text.replaceAll(',', '')) !== 0 ? MINUS + text : text;
}

/** Depth or distance in metres, as the reader likes lengths: "2.4 m", "7.9 ft". */
export const length = (lengthM: number, units: Length, decimals = 1): string =>
  `${figure(fromMetres(lengthM, units.length), decimals)}${JOIN}${units.length}`;

/** A length with its spread: "2.4 ± 0.2 m". */
export const lengthWithin = (lengthM: number, spreadM: number, units: Length): string =>
  `${figure(fromMetres(lengthM, units.length), 1)} ± ${length(spreadM, units)}`;

/** Area in square metres as hectares or acres: "6.4 ha". Below a tenth of a hectare, in square metres. */
export function area(areaM2: number, units: Length): string {
  if (units.length === 'ft') return `${figure(areaM2 / ACRE_M2, 1)}${JOIN}acres`;
  return areaM2 < HECTARE_M2 / 10
    ? `${figure(areaM2)}${JOIN}m²`
    : `${figure(areaM2 / HECTARE_M2, 1)}${JOIN}ha`;
}

export const volume = (volumeM3: number): string => `${figure(volumeM3)}${JOIN}m³`;

/** A share from 0 to 1: "84 %". */
export const percent = (share: number, decimals = 0): string => `${figure(share * 100, decimals)}${JOIN}%`;

/** A length of line counted on sticks so far apart, without the word: "14", "9 + 4 ft". */
export const wraps = (lengthM: number, spacingM: number, units: Length): string =>
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
