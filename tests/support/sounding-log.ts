import { fromPlane, type Point } from '@mereward/shared/geometry/plane';
import { WATER_CENTRE } from './water-details';

const LONG_M = 150;
const WIDE_M = 62;
const SHORE_M = 4; // how near the boat comes to the bank

/** A made-up bed of the long water: a bowl of 3.5 m with a bar across it. Metres below the surface. */
export function boatDepthM({ xM, yM }: Point): number {
  const out = (xM / LONG_M) ** 2 + (yM / WIDE_M) ** 2; // 1 on the shore
  const bar = 0.9 * Math.exp(-(((xM - 20) / 9) ** 2));
  return Math.max(0.15, 3.5 * Math.sqrt(Math.max(0, 1 - out)) - bar);
}

export type BoatFix = Point & { second: number };

/** A boat going to and fro across the long water in straight lines, one place a second. */
export function aBoatTrack({ linesM = 10, speedMS = 2 } = {}): BoatFix[] {
  const track: BoatFix[] = [];
  let second = 0;
  for (let xM = -LONG_M + linesM, up = true; xM < LONG_M; xM += linesM, up = !up) {
    const halfM = WIDE_M * Math.sqrt(1 - (xM / LONG_M) ** 2) - SHORE_M;
    for (let alongM = -halfM; alongM <= halfM; alongM += speedMS)
      track.push({ xM, yM: up ? alongM : -alongM, second: second++ });
    second += 20; // turning
  }
  return track;
}

/** A sentence with its checksum. */
export function sentence(body: string): string {
  let sum = 0;
  for (const letter of body) sum ^= letter.charCodeAt(0);
  return `$${body}*${sum.toString(16).toUpperCase().padStart(2, '0')}`;
}

const two = (value: number): string => String(Math.floor(value)).padStart(2, '0');

function angle(degrees: number, [positive, negative]: [string, string], digits: number): string {
  const size = Math.abs(degrees);
  const whole = Math.floor(size);
  const minutes = ((size - whole) * 60).toFixed(5).padStart(8, '0');
  return `${String(whole).padStart(digits, '0')}${minutes},${degrees < 0 ? negative : positive}`;
}

type Wishes = { startS?: number; quality?: number; day?: string; offsetM?: number };

/** The sentences of one place: day, fix and depth. `startS` is the second of the day the track began. */
export function nmeaOf(
  { xM, yM, second }: BoatFix,
  { startS = 8 * 3600 + 600, quality = 2, day = '030427', offsetM = 0 }: Wishes = {},
): { rmc: string; gga: string; dpt: string } {
  const [lon, lat] = fromPlane(WATER_CENTRE, { xM, yM });
  const s = (startS + second) % 86_400;
  const time = `${two(s / 3600)}${two((s / 60) % 60)}${two(s % 60)}.00`;
  const place = `${angle(lat, ['N', 'S'], 2)},${angle(lon, ['E', 'W'], 3)}`;
  const depth = boatDepthM({ xM, yM }) - offsetM;
  return {
    rmc: sentence(`GNRMC,${time},A,${place},3.9,0.0,${day},,,D`),
    gga: sentence(`GNGGA,${time},${place},${quality},12,0.8,60.0,M,47.0,M,,`),
    dpt: sentence(`SDDPT,${depth.toFixed(2)},${offsetM.toFixed(2)}`),
  };
}

/** A whole log of the track as a logger on a boat writes it. */
export function nmeaLog(track: readonly BoatFix[], wishes: Wishes = {}): string {
  const lines = track.flatMap((fix, i) => {
    const { rmc, gga, dpt } = nmeaOf(fix, wishes);
    return i % 60 === 0 ? [rmc, gga, dpt] : [gga, dpt];
  });
  return lines.join('\r\n') + '\r\n';
}
