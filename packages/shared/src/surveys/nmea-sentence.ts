import { FATHOM_M, FOOT_M } from '../units/length';

/** What one sentence of NMEA 0183 says, as far as soundings need it. */
export type NmeaSentence =
  | { kind: 'fix'; secondS: number; dayMs: number | null; lon: number; lat: number; quality: number }
  | { kind: 'clock'; secondS: number; dayMs: number | null } // a time without a place
  | { kind: 'depth'; depthM: number; from: 'surface' | 'transducer' }
  | { kind: 'nothing' } // good, but of something else, or no bottom was found
  | { kind: 'fault'; detail: string };

/** Of a sentence, its line end left off: `$` to checksum. Receivers with seven decimals of a minute write longer fixes. */
const LONGEST = 80;
const LONGEST_FIX = 110;

const fault = (detail: string): NmeaSentence => ({ kind: 'fault', detail });
const NOTHING: NmeaSentence = { kind: 'nothing' };

/**
 * Reads one line of a log. Layouts of GGA, RMC, GLL, ZDA, DPT, DBT and DBS as commonly documented (the standard is not
 * public). The checksum is the exclusive or of all between `$` and `*`, and must be there: a damaged digit of a depth
 * looks like a depth. Depths in metres, from the surface where the sentence states how deep the transducer is.
 */
export function readSentence(line: string): NmeaSentence {
  if (!line.startsWith('$') && !line.startsWith('!'))
    return fault('A sentence begins with “$”; this line does not. It was left out.');
  const star = line.lastIndexOf('*');
  if (star < 0) return fault('The checksum is missing, so damage could not be seen. The line was left out.');
  if (!/^[0-9A-Fa-f]{2}$/.test(line.slice(star + 1)))
    return fault('The checksum is not two hexadecimal digits. The line was left out.');
  const body = line.slice(1, star);
  const sum = checksumOf(body);
  if (sum !== parseInt(line.slice(star + 1), 16))
    return fault(`The checksum should be ${hex(sum)}: the line was damaged. It was left out.`);
  const fields = body.split(',');
  const type = (fields[0] ?? '').slice(-3);
  const longest = type === 'GGA' || type === 'RMC' || type === 'GLL' ? LONGEST_FIX : LONGEST;
  if (line.length > longest)
    return fault(
      `The line has ${line.length} characters; a sentence has ${longest} at most. It was left out.`,
    );
  return readType(type, fields);
}

function readType(type: string, fields: readonly string[]): NmeaSentence {
  switch (type) {
    case 'GGA':
      return readGga(fields);
    case 'RMC':
      return readRmc(fields);
    case 'GLL':
      return readGll(fields);
    case 'ZDA':
      return readZda(fields);
    case 'DPT':
      return readDpt(fields);
    case 'DBT':
      return readDepthBelow(fields, 'transducer');
    case 'DBS':
      return readDepthBelow(fields, 'surface');
    default:
      return NOTHING;
  }
}

export function checksumOf(body: string): number {
  let sum = 0;
  for (let i = 0; i < body.length; i++) sum ^= body.charCodeAt(i);
  return sum;
}

const hex = (sum: number): string => sum.toString(16).toUpperCase().padStart(2, '0');

const NUMBER = /^[+-]?(\d+\.?\d*|\.\d+)$/;
const numberIn = (text: string | undefined): number | null =>
  text !== undefined && NUMBER.test(text) ? Number(text) : null;

/** Seconds of the day from hhmmss.ss; null when it is no time. */
function secondOf(text: string | undefined): number | null {
  const parts = /^(\d\d)(\d\d)(\d\d(?:\.\d*)?)$/.exec(text ?? '');
  if (!parts) return null;
  const [hours, minutes, seconds] = [Number(parts[1]), Number(parts[2]), Number(parts[3])];
  return hours < 24 && minutes < 60 && seconds < 61 ? hours * 3600 + minutes * 60 + seconds : null;
}

/** Unix time of the day's beginning; null when there is no such day. */
function dayOf(year: number, month: number, day: number): number | null {
  const ms = Date.UTC(year, month - 1, day);
  const at = new Date(ms);
  return at.getUTCMonth() === month - 1 && at.getUTCDate() === day ? ms : null;
}

function rmcDay(text: string | undefined): number | null {
  const parts = /^(\d\d)(\d\d)(\d\d)$/.exec(text ?? '');
  if (!parts) return null;
  const year = Number(parts[3]);
  return dayOf(year < 80 ? 2000 + year : 1900 + year, Number(parts[2]), Number(parts[1]));
}

/** Degrees from ddmm.mmm and a hemisphere; null when there is no such place. */
function degreesOf(text: string | undefined, hemisphere: string | undefined, most: 90 | 180): number | null {
  const [positive, negative] = most === 90 ? ['N', 'S'] : ['E', 'W'];
  const parts = (most === 90 ? /^(\d\d)(\d\d(?:\.\d*)?)$/ : /^(\d\d\d)(\d\d(?:\.\d*)?)$/).exec(text ?? '');
  if (!parts || (hemisphere !== positive && hemisphere !== negative)) return null;
  const minutes = Number(parts[2]);
  const degrees = Number(parts[1]) + minutes / 60;
  if (minutes >= 60 || degrees > most) return null;
  return hemisphere === negative ? -degrees : degrees;
}

type FixFields = {
  time: string | undefined;
  dayMs: number | null;
  place: readonly (string | undefined)[]; // latitude, hemisphere, longitude, hemisphere
  quality: number;
};

function readFix({ time, dayMs, place, quality }: FixFields): NmeaSentence {
  const secondS = secondOf(time);
  if (time === '' || time === undefined) return NOTHING;
  if (secondS === null) return fault(`“${time}” is not a time of day. The line was left out.`);
  if (quality === 0 || place.every((part) => part === '' || part === undefined))
    return { kind: 'clock', secondS, dayMs };
  const lat = degreesOf(place[0], place[1], 90);
  const lon = degreesOf(place[2], place[3], 180);
  if (lat === null || lon === null)
    return fault(`“${place.join(' ')}” is not a place on Earth. The line was left out.`);
  return { kind: 'fix', secondS, dayMs, lon, lat, quality };
}

/** 6 is dead reckoning, 7 typed in, 8 simulated: none of them was measured. */
const isMeasured = (quality: number): boolean => quality >= 1 && quality <= 5;

function readGga(fields: readonly string[]): NmeaSentence {
  const quality = numberIn(fields[6]);
  if (quality === null) return fault(`“${fields[6] ?? ''}” is not a quality of fix. The line was left out.`);
  return readFix({
    time: fields[1],
    dayMs: null,
    place: fields.slice(2, 6),
    quality: isMeasured(quality) ? quality : 0,
  });
}

/** A: valid. The mode of later editions: A plain, D differential, F and R of real-time kinematics; others not measured. */
const MODE_QUALITY: Readonly<Record<string, number>> = { '': 1, A: 1, D: 2, P: 2, F: 5, R: 4 };

function readRmc(fields: readonly string[]): NmeaSentence {
  const dayMs = rmcDay(fields[9]);
  if (fields[9] !== '' && dayMs === null)
    return fault(`“${fields[9] ?? ''}” is not a day. The line was left out.`);
  const mode = fields[12] ?? '';
  const quality = fields[2] === 'A' ? (MODE_QUALITY[mode] ?? 0) : 0;
  return readFix({ time: fields[1], dayMs, place: fields.slice(3, 7), quality });
}

function readGll(fields: readonly string[]): NmeaSentence {
  const quality = fields[6] === 'A' ? (MODE_QUALITY[fields[7] ?? ''] ?? 0) : 0;
  return readFix({ time: fields[5], dayMs: null, place: fields.slice(1, 5), quality });
}

function readZda(fields: readonly string[]): NmeaSentence {
  if ((fields[1] ?? '') === '') return NOTHING;
  const secondS = secondOf(fields[1]);
  const [day, month, year] = [numberIn(fields[2]), numberIn(fields[3]), numberIn(fields[4])];
  const dayMs = day === null || month === null || year === null ? null : dayOf(year, month, day);
  if (secondS === null || dayMs === null) return fault('The day or time is not one. The line was left out.');
  return { kind: 'clock', secondS, dayMs };
}

/** DPT: depth below the transducer; a positive offset is how deep the transducer lies, a negative one reaches to the keel. */
function readDpt(fields: readonly string[]): NmeaSentence {
  if ((fields[1] ?? '') === '') return NOTHING;
  const depthM = numberIn(fields[1]);
  const offsetM = (fields[2] ?? '') === '' ? 0 : numberIn(fields[2]);
  if (depthM === null || offsetM === null) return fault('The depth is not a number. The line was left out.');
  if (depthM < 0) return fault('The depth is less than nought. The line was left out.');
  return offsetM > 0
    ? { kind: 'depth', depthM: depthM + offsetM, from: 'surface' }
    : { kind: 'depth', depthM, from: 'transducer' };
}

/** The three units of one depth differ by their rounding; more than this and one of them is of something else. */
const UNITS_DIFFER_M = 0.2;
const UNITS_DIFFER_SHARE = 0.05;

/** DBT and DBS: feet, metres, fathoms. The metres are taken, else the finer of the others. */
function readDepthBelow(fields: readonly string[], from: 'surface' | 'transducer'): NmeaSentence {
  const texts = [fields[3], fields[1], fields[5]];
  const factors = [1, FOOT_M, FATHOM_M];
  if (texts.every((text) => (text ?? '') === '')) return NOTHING; // the bottom was lost
  const depths = texts.map((text, i) => {
    const value = numberIn(text);
    return (text ?? '') === '' ? undefined : value === null ? null : value * (factors[i] ?? 1);
  });
  if (depths.includes(null)) return fault('The depth is not a number. The line was left out.');
  const depthM = depths.find((each) => each !== undefined && each !== null);
  if (depthM === undefined || depthM === null) return NOTHING;
  if (depthM < 0) return fault('The depth is less than nought. The line was left out.');
  const feet = depths[1];
  if (typeof feet === 'number') {
    const byM = Math.abs(feet - depthM);
    if (byM > UNITS_DIFFER_M && byM > UNITS_DIFFER_SHARE * depthM)
      return fault('Its feet and its metres are not the same depth. The line was left out.');
  }
  return { kind: 'depth', depthM, from };
}
