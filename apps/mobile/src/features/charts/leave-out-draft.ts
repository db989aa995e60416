import type { LeftOutWhat, LogCell } from '@mereward/shared/charts/left-out-contract';
import { z } from 'zod';

export const Reason = z
  .string()
  .trim()
  .min(1, 'Say why: whoever approves the chart reads it.')
  .max(300, 'At most 300 letters.');

export const CastDraft = z.object({ id: z.string(), reason: Reason });
export type CastTyped = z.input<typeof CastDraft>;
export type CastRead = z.output<typeof CastDraft>;

const seq = (what: string) =>
  z
    .string()
    .trim()
    .refine((text) => /^[1-9]\d{0,5}$/.test(text), `${what} is a whole number from 1.`);

/** A part of a log as typed: its cell, or soundings from one to another. */
export const LogPartDraft = z
  .object({
    id: z.string(),
    part: z.enum(['cell', 'run']),
    fromSeq: z.string(),
    toSeq: z.string(),
    reason: Reason,
  })
  .superRefine(({ part, fromSeq, toSeq }, check) => {
    if (part === 'cell') return;
    const first = seq('The first').safeParse(fromSeq);
    const last = seq('The last').safeParse(toSeq);
    for (const [path, read] of [
      ['fromSeq', first],
      ['toSeq', last],
    ] as const)
      if (!read.success)
        check.addIssue({ code: 'custom', path: [path], message: read.error.issues[0]?.message ?? '' });
    if (first.success && last.success && Number(toSeq) < Number(fromSeq))
      check.addIssue({ code: 'custom', path: ['toSeq'], message: 'The last lies before the first.' });
  });
export type LogPartTyped = z.input<typeof LogPartDraft>;
export type LogPartRead = z.output<typeof LogPartDraft>;

export function logPartOf(
  { part, fromSeq, toSeq }: LogPartRead,
  { logId, cell }: { logId: string; cell: LogCell | null },
): LeftOutWhat {
  if (part === 'cell' && cell) return cell;
  return { kind: 'run', logId, fromSeq: Number(fromSeq), toSeq: Number(toSeq) };
}
