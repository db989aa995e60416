import type { LogOptions } from './log-contract';
import { refuseFile, type LogFaults, type LogPoint, type LogRead } from './log-point';
import { readTrack, type NmeaTrack, type TrackFix } from './nmea-track';

export type LogText = { name: string; text: string };

/** `visitDayMs`, Unix time of the beginning of the visit's day, dates a log without a day of its own. */
export type NmeaGround = {
  visitDayMs: number;
  faults: LogFaults;
  tell: (file: number, share: number) => void; // how much of a file is read
};

/** One σ of a place, metres, by the kind of fix a GGA states. Common practice, no published source. */
const SIGMA_OF_QUALITY: Readonly<Record<number, number>> = { 1: 3, 2: 1.5, 3: 1.5, 4: 0.1, 5: 0.5 };
const QUALITY_WORDS: Readonly<Record<number, string>> = {
  1: 'plain satellite fixes',
  2: 'differential fixes',
  3: 'differential fixes',
  4: 'real-time kinematic fixes',
  5: 'real-time kinematic fixes, floating',
};
/** A kind of fix that makes up less than this of the log does not set its σ. */
const RARE_SHARE = 0.1;

/**
 * Soundings from NMEA 0183: every depth at the place between the two fixes round its time, in a straight line, when
 * those are no more than `gapS` apart. A file with fixes of its own is placed by them; one with depths alone by the
 * fixes of all the others. Depths from the transducer get `transducerM` added.
 */
export function readNmeaLog(
  files: readonly LogText[],
  options: LogOptions,
  { faults, visitDayMs, tell }: NmeaGround,
): LogRead {
  const tracks = files.map((file, i) => readTrack(file, faults, (share) => tell(i, share)));
  const dated = tracks.some(({ baseMs }) => baseMs !== null);
  const unix = tracks.map((track) => fixesInTime(track, baseOf(track, tracks, visitDayMs)));
  const all = sorted(unix.flat());
  if (all.length === 0) refuseNoFix(tracks);
  if (tracks.every(({ depths }) => depths.length === 0)) refuseNoDepth(tracks);
  const points: LogPoint[] = [];
  let withoutPlace = 0;
  tracks.forEach((track, file) => {
    const own = unix[file] ?? [];
    const place = placer(own.length > 0 ? sorted(own) : all, options.gapS * 1000);
    const baseMs = baseOf(track, tracks, visitDayMs);
    for (const { ms, depthM, from, line } of track.depths) {
      const atMs = ms === null ? null : baseMs + ms;
      const at = atMs === null ? null : place(atMs);
      if (at === null || atMs === null) withoutPlace += 1;
      else {
        const depth = from === 'surface' ? depthM : depthM + options.transducerM;
        points.push({ ...at, depthM: depth, atMs: Math.round(atMs), file, at: line });
      }
    }
  });
  const quality = qualityOf(all);
  return {
    format: 'nmea',
    points,
    withoutPlace,
    fileWords: tracks.map(trackWords),
    joined: `Each depth lies on the straight line between the fixes before and after it, no more than ${options.gapS} s apart.`,
    cautions: dated ? [] : ['The log states no day; the day of the visit was taken.'],
    asks: [],
    depthChoices: [],
    heading: [],
    guessed: { ...options, positionSigmaM: options.positionSigmaM ?? SIGMA_OF_QUALITY[quality] ?? 3 },
  };
}

/** A file without a day takes that of another of the same log, else the visit's. */
function baseOf({ baseMs }: NmeaTrack, tracks: readonly NmeaTrack[], visitDayMs: number): number {
  return baseMs ?? tracks.find((track) => track.baseMs !== null)?.baseMs ?? visitDayMs;
}

const fixesInTime = ({ fixes }: NmeaTrack, baseMs: number): TrackFix[] =>
  fixes.map((fix) => ({ ...fix, ms: baseMs + fix.ms }));

function sorted(fixes: readonly TrackFix[]): TrackFix[] {
  return [...fixes].sort((a, b) => a.ms - b.ms);
}

/** Finds the place at an instant; null when no two fixes near enough in time stand round it. */
function placer(
  fixes: readonly TrackFix[],
  gapMs: number,
): (ms: number) => { lon: number; lat: number } | null {
  return (ms) => {
    const after = firstAtOrAfter(fixes, ms);
    const b = fixes[after];
    if (b && b.ms - ms < 1) return { lon: b.lon, lat: b.lat };
    const a = fixes[after - 1];
    if (!a) return null;
    if (ms - a.ms < 1) return { lon: a.lon, lat: a.lat };
    if (!b || b.ms - a.ms > gapMs) return null;
    const share = (ms - a.ms) / (b.ms - a.ms);
    const eastward = ((((b.lon - a.lon + 180) % 360) + 360) % 360) - 180; // the short way round
    return { lon: a.lon + share * eastward, lat: a.lat + share * (b.lat - a.lat) };
  };
}

function firstAtOrAfter(fixes: readonly TrackFix[], ms: number): number {
  let low = 0;
  let high = fixes.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((fixes[middle]?.ms ?? Infinity) < ms) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** The least sure kind of fix of which there are more than a few. */
function qualityOf(fixes: readonly TrackFix[]): number {
  const counts = new Map<number, number>();
  for (const { quality } of fixes) counts.set(quality, (counts.get(quality) ?? 0) + 1);
  const usual = [...counts]
    .filter(([, count]) => count >= RARE_SHARE * fixes.length)
    .map(([quality]) => quality);
  const sigmaOf = (quality: number): number => SIGMA_OF_QUALITY[quality] ?? 3;
  return usual.reduce((worst, each) => (sigmaOf(each) > sigmaOf(worst) ? each : worst), usual[0] ?? 1);
}

function trackWords({ lines, fixes, depths }: NmeaTrack): string {
  const kind = fixes.length > 0 ? ` (${QUALITY_WORDS[qualityOf(fixes)] ?? 'fixes'})` : '';
  return `NMEA 0183, ${lines} lines: ${fixes.length} places${kind}, ${depths.length} depths`;
}

function refuseNoFix(tracks: readonly NmeaTrack[]): never {
  refuseFile(
    namesOf(tracks),
    'No line states a place (GGA, RMC or GLL with a fix). If the places are in another file, bring both together.',
  );
}

function refuseNoDepth(tracks: readonly NmeaTrack[]): never {
  refuseFile(
    namesOf(tracks),
    'No line states a depth (DPT, DBT or DBS). If the depths are in another file, bring both together.',
  );
}

const namesOf = (tracks: readonly NmeaTrack[]): string => tracks.map(({ name }) => name).join(', ');
