import { Position } from '@mereward/shared/fisheries/contract';
import type { LonLat } from '@mereward/shared/geometry/plane';
import { z } from 'zod';

const DECIMALS = 7; // about a centimetre

/** A place as it is typed and shown: latitude first, as maps and phones write it. "52.3661000, -1.1417000" */
export const positionText = ([lon, lat]: LonLat): string =>
  `${lat.toFixed(DECIMALS)}, ${lon.toFixed(DECIMALS)}`;

const NUMBER = String.raw`([+-]?\d{1,3}(?:\.\d+)?)\s*°?\s*`;
const SHAPE = new RegExp(`^${NUMBER}([NS]?)\\s*[,;\\s]\\s*${NUMBER}([EW]?)$`, 'i');

const signed = (figure: string, letter: string): number =>
  /[SW]/i.test(letter) ? -Math.abs(Number(figure)) : Number(figure);

/** Reads "52.3661, -1.1417" or "52.3661° N, 1.1417° W" as [lon, lat]; null when it is no place on Earth. */
export function readPosition(text: string): [number, number] | null {
  const match = SHAPE.exec(text.trim().replaceAll('\u2212', '-'));
  if (!match) return null;
  const [, lat = '', northSouth = '', lon = '', eastWest = ''] = match;
  const place: [number, number] = [signed(lon, eastWest), signed(lat, northSouth)];
  return Position.safeParse(place).success ? place : null;
}

const HOW = 'Type latitude, then longitude, in degrees, such as 52.36610, -1.14170';

/** A place typed as text, for a form's schema; `whenEmpty` says what to do when nothing is there yet. */
export const typedPosition = (whenEmpty: string) =>
  z.string().transform((text, context): [number, number] => {
    const place = readPosition(text);
    if (place) return place;
    context.issues.push({ code: 'custom', message: text.trim() === '' ? whenEmpty : HOW, input: text });
    return z.NEVER;
  });
