import { fromPlane, type Point } from '@mereward/shared/geometry/plane';
import type { Bed } from './bed';
import type { DemoLake } from './fishery';
import { normal } from './random';

type Boat = {
  lake: DemoLake;
  bed: (p: Point) => Bed | null;
  startedAt: Date;
  aboveDatumM: number;
  random: () => number;
};

const SPEED_MS = 3;
const ERROR_M = { depth: 0.03, place: 0.4 }; // one σ, of a small echo sounder and a differential receiver
const LINES_M = { from: -110, to: -33, apart: 7 };
const REACH_M = { south: -12, north: 42 };

/** A boat's log over the west end of Far Ostle's gully as its logger wrote it (NMEA 0183): a place and a depth each second. */
export function boatLog({ lake, bed, startedAt, aboveDatumM, random }: Boat): string {
  const lines: string[] = [];
  let second = 0;
  for (let xM = LINES_M.from, up = true; xM <= LINES_M.to; xM += LINES_M.apart, up = !up) {
    for (let alongM = REACH_M.south; alongM <= REACH_M.north; alongM += SPEED_MS, second++) {
      const there = { xM, yM: up ? alongM : REACH_M.north + REACH_M.south - alongM };
      const below = bed(there);
      if (!below) continue;
      const seen = {
        xM: there.xM + ERROR_M.place * normal(random),
        yM: there.yM + ERROR_M.place * normal(random),
      };
      const depthM = below.depthM + aboveDatumM + ERROR_M.depth * normal(random);
      lines.push(...sentences(lake, { seen, depthM, at: new Date(startedAt.getTime() + second * 1000) }));
    }
    second += 20; // turning
  }
  return `${lines.join('\r\n')}\r\n`;
}

type Fix = { seen: Point; depthM: number; at: Date };

function sentences(lake: DemoLake, { seen, depthM, at }: Fix): string[] {
  const [lon, lat] = fromPlane(lake.water.centre, seen);
  const place = `${angle(lat, 'NS', 2)},${angle(lon, 'EW', 3)}`;
  const iso = at.toISOString();
  const clock = `${iso.slice(11, 13)}${iso.slice(14, 16)}${iso.slice(17, 19)}.00`;
  const day = `${iso.slice(8, 10)}${iso.slice(5, 7)}${iso.slice(2, 4)}`;
  return [
    `GNRMC,${clock},A,${place},5.8,0.0,${day},,,D`,
    `GNGGA,${clock},${place},2,12,0.8,60.0,M,47.0,M,,`,
    `SDDPT,${depthM.toFixed(2)},0.00`,
  ].map(withChecksum);
}

/** "$…*hh": the exclusive or of all between the signs, in hexadecimal. */
function withChecksum(body: string): string {
  let sum = 0;
  for (const letter of body) sum ^= letter.charCodeAt(0);
  return `$${body}*${sum.toString(16).toUpperCase().padStart(2, '0')}`;
}

/** Degrees and minutes: "5336.01234,N". */
function angle(degrees: number, signs: string, digits: number): string {
  const size = Math.abs(degrees);
  const whole = Math.floor(size);
  const minutes = ((size - whole) * 60).toFixed(5).padStart(8, '0');
  return `${String(whole).padStart(digits, '0')}${minutes},${degrees < 0 ? signs.charAt(1) : signs.charAt(0)}`;
}
