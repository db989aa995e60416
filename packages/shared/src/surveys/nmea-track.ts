import { UNIT_OF, type LogFaults } from './log-point';
import { readSentence } from './nmea-sentence';

/** A place at an instant: milliseconds since the file's own first day began (`NmeaTrack.baseMs` makes it Unix time). */
export type TrackFix = { ms: number; lon: number; lat: number; quality: number };
export type TrackDepth = { ms: number | null; depthM: number; from: 'surface' | 'transducer'; line: number };

/** One file of a log: its fixes and depths in the order they were written, each with its time. */
export type NmeaTrack = {
  name: string;
  fixes: TrackFix[];
  depths: TrackDepth[];
  baseMs: number | null; // Unix time of the first day; null when no sentence states a day
  lines: number;
};

const DAY_MS = 86_400_000;
const TOLD_EVERY = 20_000; // lines
const HALF_DAY_MS = DAY_MS / 2;

/**
 * The day of each time of day in one file. RMC and ZDA state it; between them a clock that falls back by more than
 * twelve hours has passed midnight.
 */
class DayCount {
  baseMs: number | null = null;
  private days = 0;
  private lastMs = 0; // of the day

  at(secondS: number, dayMs: number | null): number {
    const ofDayMs = Math.round(secondS * 1000);
    if (dayMs !== null && this.baseMs !== null) this.days = (dayMs - this.baseMs) / DAY_MS;
    else if (ofDayMs < this.lastMs - HALF_DAY_MS) this.days += 1;
    if (dayMs !== null && this.baseMs === null) this.baseMs = dayMs - this.days * DAY_MS;
    this.lastMs = ofDayMs;
    return this.days * DAY_MS + ofDayMs;
  }
}

/**
 * Times of depths, which state none: those between two times of the file are spread evenly from the first on, so that a
 * single one stands at the fix before it. Those before any time have none.
 */
class DepthClock {
  private sinceMs: number | null = null;
  private spanMs = 1000; // of the stretch before, for the last one
  private waiting: TrackDepth[] = [];

  add(depth: TrackDepth): void {
    this.waiting.push(depth);
  }

  tick(ms: number): void {
    if (ms === this.sinceMs) return;
    const spanMs = this.sinceMs === null ? 0 : ms - this.sinceMs;
    if (spanMs > 0) this.spanMs = spanMs;
    this.spread(Math.max(0, spanMs));
    this.sinceMs = ms;
  }

  end(): void {
    this.spread(Math.min(1000, this.spanMs));
  }

  private spread(spanMs: number): void {
    const { sinceMs, waiting } = this;
    if (sinceMs !== null) waiting.forEach((depth, k) => (depth.ms = sinceMs + (k * spanMs) / waiting.length));
    this.waiting = [];
  }
}

/** Reads one file of sentences. Faulty lines are told and left out. */
export function readTrack(
  { name, text }: { name: string; text: string },
  faults: LogFaults,
  tell: (share: number) => void,
): NmeaTrack {
  const track: NmeaTrack = { name, fixes: [], depths: [], baseMs: null, lines: 0 };
  const days = new DayCount();
  const clock = new DepthClock();
  for (const { line, at, to } of linesOf(text)) {
    track.lines = at;
    if (at % TOLD_EVERY === 0) tell(to / text.length);
    if (line === '') continue;
    const read = readSentence(line);
    if (read.kind === 'fault')
      faults.add({ file: name, unit: UNIT_OF.nmea, at, value: line, detail: read.detail });
    else if (read.kind === 'depth') {
      const depth = { ms: null, depthM: read.depthM, from: read.from, line: at };
      track.depths.push(depth);
      clock.add(depth);
    } else if (read.kind !== 'nothing') {
      const ms = days.at(read.secondS, read.dayMs);
      clock.tick(ms);
      if (read.kind === 'fix')
        addFix(track.fixes, { ms, lon: read.lon, lat: read.lat, quality: read.quality });
    }
  }
  clock.end();
  track.baseMs = days.baseMs;
  return track;
}

/** Several sentences tell one fix; the one that knows its quality best is kept. */
function addFix(fixes: TrackFix[], fix: TrackFix): void {
  const last = fixes.at(-1);
  if (last?.ms !== fix.ms) fixes.push(fix);
  else if (fix.quality > last.quality) fixes[fixes.length - 1] = fix;
}

/** The lines of a text with their numbers from 1, without line ends of any kind and spaces round them. */
export function* linesOf(text: string): Generator<{ line: string; at: number; to: number }> {
  let from = 0;
  for (let at = 1; from < text.length; at++) {
    let to = text.indexOf('\n', from);
    if (to < 0) to = text.length;
    yield { line: text.slice(from, to).trim(), at, to };
    from = to + 1;
  }
}
