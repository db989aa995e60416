import { fromMetres } from './length';

/** Which unit a reader likes lengths in. */
export type LengthWish = { length: 'm' | 'ft' };

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
export const length = (lengthM: number, units: LengthWish, decimals = 1): string =>
  `${figure(fromMetres(lengthM, units.length), decimals)}${JOIN}${units.length}`;

/** A length with its spread: "2.4 ± 0.2 m". */
export const lengthWithin = (lengthM: number, spreadM: number, units: LengthWish): string =>
  `${figure(fromMetres(lengthM, units.length), 1)} ± ${length(spreadM, units)}`;

/** A share from 0 to 1: "84 %". */
export const percent = (share: number, decimals = 0): string => `${figure(share * 100, decimals)}${JOIN}%`;
