import { feetAndInches, FOOT_M, toMetres, type LengthUnit } from './length';

/** A count of line round two sticks: whole stick-to-stick lengths and what was left over. */
export type Wraps = { whole: number; remainderM: number };

/** Sticks twelve feet apart, a rod's length: common practice, no published source. */
export const USUAL_SPACING_M = 12 * FOOT_M;

const SNAP_M = 1e-9; // a thousandth of a micron: swallows floating-point dust only

/** Line wound, metres. `spacingM`: line that one wrap takes, stick to stick once. */
export function wrapsToMetres({ whole, remainderM }: Wraps, spacingM: number): number {
  return whole * spacingM + remainderM;
}

/** The count that winds `lengthM` on sticks `spacingM` apart: 0 ≤ remainder < spacing. Inverse of `wrapsToMetres`. */
export function metresToWraps(lengthM: number, spacingM: number): Wraps {
  if (!(spacingM > 0) || !(lengthM >= 0))
    throw new RangeError('A length of line and a stick spacing are needed');
  const whole = Math.floor(lengthM / spacingM);
  const remainderM = lengthM - whole * spacingM;
  if (spacingM - remainderM < SNAP_M) return { whole: whole + 1, remainderM: 0 };
  return { whole, remainderM: remainderM < SNAP_M ? 0 : remainderM };
}

/** The same line on other sticks: 25 m on 10 ft sticks is 8 wraps and 0.616 m. */
export function convertWraps(wraps: Wraps, fromSpacingM: number, toSpacingM: number): Wraps {
  return metresToWraps(wrapsToMetres(wraps, fromSpacingM), toSpacingM);
}

/** "14", "14 + 3 ft", "14 + 3 ft 6 in" (nearest inch) or "8 + 0.62 m" (nearest centimetre). */
export function formatWraps(wraps: Wraps, unit: 'm' | 'ft', spacingM: number): string {
  const stepM = unit === 'm' ? 0.01 : INCH_STEP_M;
  const rounded = Math.round(wraps.remainderM / stepM) * stepM;
  const { whole, remainderM } =
    rounded >= spacingM - SNAP_M
      ? { whole: wraps.whole + 1, remainderM: 0 }
      : { ...wraps, remainderM: rounded };
  if (remainderM === 0) return `${whole}`;
  return unit === 'm' ? `${whole} + ${remainderM.toFixed(2)} m` : `${whole} + ${feetWords(remainderM)}`;
}

const INCH_STEP_M = FOOT_M / 12;

function feetWords(lengthM: number): string {
  const { feet, inches } = feetAndInches(lengthM);
  return [feet > 0 ? `${feet} ft` : '', inches > 0 ? `${inches} in` : ''].filter(Boolean).join(' ');
}

/**
 * A typed count. `remainderStated` is false when nothing was said of what was left over ("14", "14 and a bit") or it
 * was judged by eye as a share of a wrap ("14½", "14.5"); then the wider error of a count applies.
 */
export type WrapsRead = { ok: true; wraps: Wraps; remainderStated: boolean } | { ok: false; reason: string };

const SHARES: Readonly<Record<string, number>> = {
  '½': 1 / 2,
  '⅓': 1 / 3,
  '⅔': 2 / 3,
  '¼': 1 / 4,
  '¾': 3 / 4,
};
const LENGTH = String.raw`(\d+(?:[.,]\d+)?)\s*(mm|cm|m|metres?|ft|feet|foot|'|′|in|inch|inches|"|″|yd|yards?)`;
const LENGTHS = new RegExp(`^(?:${LENGTH})(?:\\s*(?:${LENGTH}))?$`, 'i');
const COUNT = /^(\d+)(?:\s*wraps?)?\s*(?:(?:\+|and|plus)\s*)?(.*)$/i;

/**
 * Reads a count as anglers type it: "14", "14 + 0", "14 + 3 ft", "14 + 3 ft 6 in", "14 + 0.9 m", "14½", "14 1/3",
 * "14.5", "14 and a bit"; or a length of line alone, "25 m". `spacingM` turns shares and lengths into wraps.
 */
export function readWraps(text: string, spacingM: number): WrapsRead {
  const typed = text.trim().replace(/\s+/g, ' ');
  const wholeLengthM = readLengths(typed);
  if (wholeLengthM !== null)
    return { ok: true, wraps: metresToWraps(wholeLengthM, spacingM), remainderStated: true };
  const decimal = /^(\d+)[.,](\d+)(?: ?wraps?)?$/i.exec(typed);
  if (decimal) return ofShare(Number(decimal[1]), Number(`0.${decimal[2]}`), spacingM);
  const count = COUNT.exec(typed);
  if (!count) return { ok: false, reason: `“${typed}” is not a count of wraps; type it like 14 + 3 ft` };
  return readRest(Number(count[1]), (count[2] ?? '').trim(), spacingM);
}

function readRest(whole: number, rest: string, spacingM: number): WrapsRead {
  if (rest === '' || /^(a )?bit$/i.test(rest))
    return { ok: true, wraps: { whole, remainderM: 0 }, remainderStated: false };
  if (/^0+([.,]0+)?$/.test(rest)) return { ok: true, wraps: { whole, remainderM: 0 }, remainderStated: true };
  const share = SHARES[rest] ?? readFraction(rest);
  if (share !== null) return ofShare(whole, share, spacingM);
  const remainderM = readLengths(rest);
  if (remainderM === null) {
    return { ok: false, reason: `“${rest}” after ${whole} wraps needs a unit, such as 3 ft or 0.9 m` };
  }
  if (remainderM >= spacingM) {
    const words = `The rest, ${remainderM.toFixed(2)} m, is a whole wrap or more (${spacingM.toFixed(2)} m); count again`;
    return { ok: false, reason: words };
  }
  return { ok: true, wraps: { whole, remainderM }, remainderStated: true };
}

function ofShare(whole: number, share: number, spacingM: number): WrapsRead {
  return { ok: true, wraps: { whole, remainderM: share * spacingM }, remainderStated: false };
}

function readFraction(text: string): number | null {
  const match = /^(\d+)\s*\/\s*(\d+)$/.exec(text);
  const top = Number(match?.[1]);
  const bottom = Number(match?.[2]);
  return match && top < bottom ? top / bottom : null;
}

function readLengths(text: string): number | null {
  const match = LENGTHS.exec(text);
  if (!match) return null;
  const [, first, firstUnit, second, secondUnit] = match;
  const lengthM = toMetres(number(first), unitOf(firstUnit));
  return second === undefined ? lengthM : lengthM + toMetres(number(second), unitOf(secondUnit));
}

const number = (text: string | undefined): number => Number((text ?? '').replace(',', '.'));

function unitOf(text: string | undefined): LengthUnit {
  const unit = (text ?? '').toLowerCase();
  if (unit === 'mm' || unit === 'cm') return unit;
  if (unit.startsWith('m')) return 'm';
  if (unit.startsWith('y')) return 'yd';
  return unit.startsWith('i') || unit === '"' || unit === '″' ? 'in' : 'ft';
}
