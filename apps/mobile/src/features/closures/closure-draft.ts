import {
  ClosureEffect,
  ClosureReason,
  type ClosureDetails,
  type ClosureScope,
} from '@mereward/shared/closures/contract';
import type { CloseWater } from '@mereward/shared/closures/deeds-contract';
import { z } from 'zod';
import { newId } from '@/lib/new-id';
import { instantOf } from '@/lib/zoned-time';

/** A closure as it is typed: times by the fishery's clock, empty for none; conditions a line each. */
export const ClosureDraft = z
  .object({
    what: z.enum(['fishery', 'lakes', 'pegs', 'method']),
    lakeIds: z.array(z.string()),
    pegIds: z.array(z.string()),
    method: z.enum(['keepnets', 'boats', 'night']),
    reason: ClosureReason,
    effect: ClosureEffect,
    from: z.string().min(1, 'Choose the day and the time'),
    until: z.string(),
    publicWords: z.string().trim().min(1, 'Say it to your visitors').max(400, 'At most 400 letters'),
    conditions: z.string(),
    dawns: z
      .string()
      .trim()
      .regex(/^$|^([1-9]|10)$/, 'A number from 1 to 10, or nothing'),
    moveToLakeId: z.string(),
    chooseUntil: z.string(),
  })
  .superRefine(({ what, lakeIds, pegIds, from, until }, context) => {
    const fault = (path: string, message: string) =>
      context.addIssue({ code: 'custom', path: [path], message });
    if (what === 'lakes' && lakeIds.length === 0) fault('lakeIds', 'Choose a lake');
    if (what === 'pegs' && lakeIds.length !== 1) fault('lakeIds', 'Choose the one lake they are on');
    if (what === 'pegs' && pegIds.length === 0) fault('pegIds', 'Choose a peg');
    if (until !== '' && until <= from) fault('until', 'It ends before it begins');
  });
export type ClosureDraft = z.infer<typeof ClosureDraft>;

/** Oxygen at dawn that is usual before a water is opened again, mg/l. Common practice, no published source. */
const LEAST_DAWN_MG_L = 5;

const at = (civil: string, zone: string): string => instantOf(civil, zone) ?? civil;

/** The conditions' own ids stay the same while the form is open, so that the same closure sent twice is one. */
export function closeOf(draft: ClosureDraft, { id, zone, conditionIds }: Made): CloseWater {
  const details: ClosureDetails = {
    scope: scopeOf(draft),
    reason: draft.reason,
    effect: draft.effect,
    from: at(draft.from, zone),
    until: draft.until === '' ? null : at(draft.until, zone),
    publicWords: draft.publicWords,
    liftConditions: [
      ...linesOf(draft.conditions).map((words, index) => ({
        kind: 'tick' as const,
        id: conditionIds[index] ?? newId(),
        words,
      })),
      ...(draft.dawns === ''
        ? []
        : [{ kind: 'dawn_oxygen' as const, leastMgL: LEAST_DAWN_MG_L, dawns: Number(draft.dawns) }]),
    ],
  };
  const moves = draft.effect === 'move' && draft.what !== 'method';
  return {
    id,
    details,
    moveToLakeId: moves && draft.moveToLakeId !== '' ? draft.moveToLakeId : null,
    chooseUntil: moves && draft.chooseUntil !== '' ? at(draft.chooseUntil, zone) : null,
  };
}

export type Made = { id: string; zone: string; conditionIds: readonly string[] };
export const MOST_CONDITIONS = 15;

const linesOf = (text: string): string[] =>
  text
    .split('\n')
    .map((line) => line.trim().slice(0, 200))
    .filter((line) => line !== '')
    .slice(0, MOST_CONDITIONS);

function scopeOf({ what, lakeIds, pegIds, method }: ClosureDraft): ClosureScope {
  switch (what) {
    case 'fishery':
      return { kind: 'fishery' };
    case 'lakes':
      return { kind: 'lakes', lakeIds };
    case 'pegs':
      return { kind: 'pegs', pegIds };
    case 'method':
      return { kind: 'method', method, lakeIds: lakeIds.length === 0 ? null : lakeIds };
  }
}
