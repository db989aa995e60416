import type { LogOptions } from './log-contract';
import { DepthChoices, depthMeant } from './log-depth';
import { instantIn, numberWith } from './log-numbers';
import { UNIT_OF, type LogFaults, type LogRead } from './log-point';

/** A waypoint, track or route point as its text stands in the file; null: not given. */
export type GpxPointText = {
  line: number;
  lat: string | null;
  lon: string | null;
  ele: string | null;
  time: string | null;
  depth: string | null; // of the first extension named depth, in whichever namespace
};
export type GpxFile = { name: string; points: GpxPointText[]; cautions: string[] };

const EXTENSION = 'depth';
const HEIGHT = 'ele';

/**
 * Soundings from GPX points. An extension named depth is taken for one; `<ele>` is the height of the ground or of
 * the boat unless the surveyor says that it is a depth or the bed's height.
 */
export function readGpxLog(files: readonly GpxFile[], options: LogOptions, faults: LogFaults): LogRead {
  const choices = new DepthChoices();
  for (const { points } of files)
    for (const { depth, ele } of points) {
      if (depth !== null) choices.add(EXTENSION);
      if (ele !== null) choices.add(HEIGHT);
    }
  const total = files.reduce((sum, { points }) => sum + points.length, 0);
  const from = options.depthFrom ?? (choices.count(EXTENSION) > 0 ? EXTENSION : null);
  const unit = options.depthUnit ?? 'm';
  const read: LogRead = {
    format: 'gpx',
    points: [],
    withoutPlace: 0,
    fileWords: files.map(({ points }) => wordsOf(points)),
    joined: 'Each point is one sounding.',
    cautions: files.flatMap(({ cautions }) => cautions),
    asks: from === null && total > 0 ? [{ option: 'depthFrom', words: askWords(choices.count(HEIGHT)) }] : [],
    depthChoices: choices.list((key) => (key === HEIGHT ? 'the height <ele>' : 'the extension named depth')),
    heading: [],
    guessed: { ...options, depthFrom: from, depthUnit: unit, positionSigmaM: options.positionSigmaM ?? 3 },
  };
  files.forEach(({ name, points }, file) => {
    for (const point of points) {
      const answer = pointIn(point, from);
      if ('detail' in answer) faults.add({ file: name, unit: UNIT_OF.gpx, at: point.line, ...answer });
      else if (answer.value !== null)
        read.points.push({
          lon: answer.lon,
          lat: answer.lat,
          depthM: depthMeant(answer.value, unit, options),
          atMs: answer.atMs,
          file,
          at: point.line,
        });
    }
  });
  return read;
}

function askWords(heights: number): string {
  return heights > 0
    ? 'No point has an extension named depth. Are the heights <ele> depths, or heights of the bed? Say it below, or bring another file.'
    : 'The points state places but no depths: export them with their depths.';
}

type Answer =
  { lon: number; lat: number; value: number | null; atMs: number | null } | { value: string; detail: string };

function pointIn({ lat, lon, ele, time, depth }: GpxPointText, from: string | null): Answer {
  const said = `${lat ?? 'nothing'}, ${lon ?? 'nothing'}`;
  if (lat === null || lon === null)
    return { value: said, detail: 'The point has no latitude or no longitude. It was left out.' };
  if (lat.includes(',') || lon.includes(','))
    return { value: said, detail: 'GPX writes decimals with a point, not a comma. The point was left out.' };
  const latDeg = numberWith(lat.trim(), 'point');
  const lonDeg = numberWith(lon.trim(), 'point');
  if (latDeg === null || lonDeg === null)
    return { value: said, detail: 'The latitude or longitude is not a number. The point was left out.' };
  if (Math.abs(latDeg) > 90 || lonDeg < -180 || lonDeg >= 180)
    return {
      value: said,
      detail: 'This is not on Earth as GPX counts it (−90 to 90, −180 to below 180). The point was left out.',
    };
  const text = from === HEIGHT ? ele : from === EXTENSION ? depth : null;
  const at = time === null ? null : instantIn(time.trim());
  if (text === null) return from === null ? empty(lonDeg, latDeg) : { value: said, detail: noDepth(from) };
  const value = numberWith(text.trim(), 'point');
  if (value === null)
    return { value: text, detail: 'The depth is not a number with a decimal point. The point was left out.' };
  if (time !== null && at === null)
    return { value: time, detail: 'This is not a time like 2027-04-03T09:40:00Z. The point was left out.' };
  return { lon: lonDeg, lat: latDeg, value, atMs: at?.ms ?? null };
}

const empty = (lon: number, lat: number): Answer => ({ lon, lat, value: null, atMs: null });

const noDepth = (from: string): string =>
  `The point has no ${from === HEIGHT ? 'height' : 'depth'}. It was left out.`;

const wordsOf = (points: readonly GpxPointText[]): string =>
  `GPX, ${points.length} points, ${points.filter(({ depth }) => depth !== null).length} with a depth`;
