import type { DepthUnit } from './log-contract';
import { FATHOM_M, FOOT_M } from '../units/length';

export type DecimalMark = 'point' | 'comma';

const POINTED = /^[+-]?(\d+\.?\d*|\.\d+)$/;
const COMMAED = /^[+-]?(\d+,?\d*|,\d+)$/;
/** What may be thousands as well as decimals: 1,234. A nought before the comma leaves no doubt. */
const EITHER = /^[+-]?[1-9]\d{0,2},\d{3}$/;

/** A number written with this mark for its decimals, and without marks for thousands; anything else is null. */
export function numberWith(text: string, mark: DecimalMark): number | null {
  if (mark === 'point') return POINTED.test(text) ? Number(text) : null;
  return COMMAED.test(text) ? Number(text.replace(',', '.')) : null;
}

/** The marks of a table's places and of its depths; `doubt` is a depth that may be read both ways. */
export type MarksFound = { places: DecimalMark; depths: DecimalMark | null; doubt: string };

/**
 * Which mark the numbers of a file use for decimals. Places can't be thousands, so a comma in one settles it for all; a
 * depth such as 1,234 beside places with points may be 1.234 or 1234 and is not guessed at.
 */
export function decimalMarksOf(places: Iterable<string>, depths: Iterable<string>): MarksFound {
  for (const text of places) if (text.includes(',')) return { places: 'comma', depths: 'comma', doubt: '' };
  let doubt = '';
  for (const text of depths) {
    if (EITHER.test(text)) doubt ||= text;
    else if (text.includes(',')) return { places: 'point', depths: 'comma', doubt: '' };
  }
  return { places: 'point', depths: doubt === '' ? 'point' : null, doubt };
}

const METRES: Readonly<Record<DepthUnit, number>> = { m: 1, ft: FOOT_M, fathom: FATHOM_M };

export const depthInMetres = (value: number, unit: DepthUnit): number => value * METRES[unit];

/** The unit a heading or a name states: depth_ft, Depth (feet), depth m; null when it states none. */
export function unitInName(name: string): DepthUnit | null {
  const words = name.toLowerCase().split(/[^a-z]+/);
  if (words.some((word) => word === 'ft' || word === 'feet' || word === 'foot')) return 'ft';
  if (words.some((word) => word === 'fathom' || word === 'fathoms' || word === 'fm')) return 'fathom';
  return words.some((word) => word === 'm' || word === 'metres' || word === 'meters' || word === 'metre')
    ? 'm'
    : null;
}

export const unitNamed = (unit: DepthUnit): string =>
  unit === 'm' ? 'metres' : unit === 'ft' ? 'feet' : 'fathoms';

const LONGEST_ANGLE = 40;

/**
 * Degrees from decimal degrees, degrees and minutes, or degrees, minutes and seconds, with a sign or a hemisphere
 * before or after: −1.1427, 52°21.906′N, N 52 21 54.4, 1° 8' 33.7" W. Null when it is none of them.
 */
export function angleIn(
  text: string,
  { axis, mark }: { axis: 'lat' | 'lon'; mark: DecimalMark },
): number | null {
  if (text.length > LONGEST_ANGLE) return null;
  const letters = text.match(/[a-z]/gi) ?? [];
  if (letters.length > 1) return null;
  const hemisphere = (letters[0] ?? '').toUpperCase();
  if (hemisphere !== '' && !(axis === 'lat' ? 'NS' : 'EW').includes(hemisphere)) return null;
  const plain = text
    .replace(/[a-z]/gi, ' ')
    .replace(/\u2212/g, '-')
    .trim();
  const signed = /^[+-]/.test(plain);
  if (signed && hemisphere !== '') return null;
  const parts = plain
    .replace(/^[+-]\s*/, '')
    .split(/[\s°ºd'′’"″”:]+/)
    .filter((part) => part !== '');
  const numbers = parts.map((part) => numberWith(part, mark));
  if (numbers.length < 1 || numbers.length > 3 || numbers.includes(null)) return null;
  const [degrees = 0, minutes = 0, seconds = 0] = numbers.map((each) => each ?? 0);
  if (/[+-]/.test(parts.join(''))) return null;
  const whole = numbers.slice(0, -1).every((each) => Number.isInteger(each));
  if (!whole || minutes >= 60 || seconds >= 60) return null;
  const angle = degrees + minutes / 60 + seconds / 3600;
  if (angle > (axis === 'lat' ? 90 : 180)) return null;
  return plain.startsWith('-') || hemisphere === 'S' || hemisphere === 'W' ? -angle : angle;
}

const INSTANT = /^(\d{4})-(\d\d)-(\d\d)[T ](\d\d):(\d\d)(?::(\d\d)(\.\d{1,9})?)?\s*(Z|[+-]\d\d:?\d\d)?$/i;

/** Unix time from ISO 8601; without a zone it is taken as UTC and says so. Null when it is no time. */
export function instantIn(text: string): { ms: number; zoned: boolean } | null {
  const parts = INSTANT.exec(text);
  if (!parts) return null;
  const [, year, month, day, hour, minute, second = '0', share = '0', zone] = parts;
  const ms = Date.UTC(
    Number(year),
    Number(month) - 1,
    Number(day),
    Number(hour),
    Number(minute),
    Number(second),
  );
  const at = new Date(ms);
  if (at.getUTCDate() !== Number(day) || at.getUTCMonth() !== Number(month) - 1) return null; // no such day
  if (Number(hour) > 23 || Number(minute) > 59 || Number(second) > 59) return null;
  const offset = /^([+-])(\d\d):?(\d\d)$/.exec(zone ?? '');
  const offsetMs = offset ? (Number(offset[2]) * 60 + Number(offset[3])) * 60_000 : 0;
  return {
    ms: ms + Number(share) * 1000 - (offset?.[1] === '-' ? -offsetMs : offsetMs),
    zoned: zone !== undefined,
  };
}
