import { readLog, type LogFile } from '@mereward/api/surveys/read-log';
import { USUAL_LOG_OPTIONS, type LogOptions } from '@mereward/shared/surveys/log-contract';
import { LogRefusal } from '@mereward/shared/surveys/log-point';
import type { LogSifted } from '@mereward/shared/surveys/log-preview';

const HALF_M = 2000;
const DAY = Date.parse('2026-05-14T00:00:00Z');

/** A square water of 4 km about a place, visited on 14 May 2026: wide enough that nothing of a sample lies outside. */
export function wideGround(origin: readonly [number, number]) {
  const corner = (xM: number, yM: number) => ({ xM: xM * HALF_M, yM: yM * HALF_M });
  return {
    origin,
    outline: { shore: [corner(-1, -1), corner(1, -1), corner(1, 1), corner(-1, 1)], islands: [] },
    startedMs: DAY + 5 * 3_600_000,
    endedMs: null,
    nowMs: DAY + 86_400_000,
    visitDayMs: DAY,
  };
}

/** The place the samples of the fixtures lie about. */
export const SAMPLES_AT = [-1.1427, 52.3651] as const;

export type Reading = { ok: true; log: LogSifted } | { ok: false; words: string };

/** Reads files as the import does; a refusal is answered in its words, and any other fault thrown. */
export function readingOf(
  files: readonly LogFile[],
  options: Partial<LogOptions> = {},
  origin: readonly [number, number] = SAMPLES_AT,
): Reading {
  try {
    const source = { files, options: { ...USUAL_LOG_OPTIONS, ...options }, ground: wideGround(origin) };
    return { ok: true, log: readLog(source, () => undefined) };
  } catch (error) {
    if (!(error instanceof LogRefusal)) throw error;
    return { ok: false, words: error.message };
  }
}
