import type { LogFault, LogFormat, LogOptions, LogPreview } from './log-contract';

/** One sounding as read: degrees of WGS 84, metres below the water of that hour, and where it stands in which file. */
export type LogPoint = {
  lon: number;
  lat: number;
  depthM: number;
  atMs: number | null; // Unix time; null when the file states none
  file: number; // counted from 0
  at: number; // line, row or feature, counted from 1
};

/** What the files of one log hold, before anything is left out. */
export type LogRead = {
  format: LogFormat;
  points: LogPoint[];
  withoutPlace: number; // depths with no fix near enough in time
  fileWords: string[]; // of each file, what was in it
  joined: string;
  cautions: string[];
  asks: LogPreview['asks'];
  depthChoices: LogPreview['depthChoices'];
  heading: string[];
  guessed: LogOptions;
};

/** A log that can't be read at all, in words for whoever brought it. */
export class LogRefusal extends RangeError {
  override readonly name = 'LogRefusal';
  constructor(readonly fault: LogFault) {
    super(faultWords(fault));
  }
}

/** "track.log, line 14: …" */
export function faultWords({ file, unit, at, detail }: LogFault): string {
  return `${whereWords({ file, unit, at })}: ${detail}`;
}

export function whereWords({ file, unit, at }: Pick<LogFault, 'file' | 'unit' | 'at'>): string {
  return unit === 'file' ? file : `${file}, ${unit} ${at}`;
}

export function refuseFile(file: string, detail: string): never {
  throw new LogRefusal({ file, unit: 'file', at: 0, value: '', detail });
}

const MOST_FAULTS = 1000;
const LONGEST_VALUE = 120;

/** Faults as they are met: all are counted, the first thousand kept to be shown. */
export class LogFaults {
  count = 0;
  readonly list: LogFault[] = [];

  add(fault: LogFault): void {
    this.count += 1;
    if (this.list.length < MOST_FAULTS)
      this.list.push({ ...fault, value: fault.value.slice(0, LONGEST_VALUE) });
  }
}

/** The unit a format counts its places in. */
export const UNIT_OF = {
  nmea: 'line',
  gpx: 'line',
  geojson: 'feature',
  csv: 'row',
} as const satisfies Record<LogFormat, LogFault['unit']>;
