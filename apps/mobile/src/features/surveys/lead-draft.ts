import { calibrateLead, type KnownFall, type LeadCalibration } from '@mereward/shared/surveys/lead-fall';
import { z } from 'zod';
import { typedNumber } from '@/lib/typed-schemas';

export const MOST_FALLS = 40;

const depth = typedNumber({ what: 'The depth', min: 0.1, max: 60, unit: 'm' });
const seconds = typedNumber({ what: 'The count', min: 0.1, max: 60, unit: 's' });

/** A lead's falls as typed: one row a spot; rows with nothing in them are not counted. */
export const LeadDraft = z.object({
  name: z.string().trim().min(1, 'Give the lead a name it is known by.').max(80, 'At most 80 letters.'),
  leadG: typedNumber({ what: 'The lead', min: 5, max: 500, unit: 'g' }),
  leadShape: z.enum(['smooth_ball', 'ribbed', 'pronged', 'other']),
  lineType: z.enum(['braid', 'mono', 'other']),
  calibratedOn: z.iso.date('Give the day it was counted.'),
  note: z.string().trim().max(300, 'At most 300 letters.'),
  falls: z
    .array(
      z.object({ depthM: z.string(), seconds: z.string() }).transform((row, context): KnownFall | null => {
        if (row.depthM.trim() === '' && row.seconds.trim() === '') return null;
        const read = z.object({ depthM: depth, seconds }).safeParse(row);
        if (read.success) return read.data;
        for (const { path, message } of read.error.issues)
          context.issues.push({ code: 'custom', message, input: row, path: [...path] });
        return z.NEVER;
      }),
    )
    .transform((rows) => rows.filter((row) => row !== null)),
});
export type LeadTyped = z.input<typeof LeadDraft>;
export type LeadRead = z.output<typeof LeadDraft>;

/** The rows that are whole so far. */
const wholeFalls = (rows: readonly { depthM: string; seconds: string }[]): KnownFall[] =>
  rows.flatMap((row) => {
    const read = z.object({ depthM: depth, seconds }).safeParse(row);
    return read.success ? [read.data] : [];
  });

/** What the typed rows come to: a rate, or what is still wanting, in words. */
export function typedCalibration(
  rows: readonly { depthM: string; seconds: string }[],
): { ok: true; calibration: LeadCalibration } | { ok: false; words: string } {
  const answer = calibrateLead(wholeFalls(rows));
  return answer.ok ? answer : { ok: false, words: `${answer.reason}. ${answer.remedy}.` };
}
