import { ConfirmedBy, type ConfirmBottom } from '@mereward/shared/surveys/confirmed-contract';
import { Cover, Substrate } from '@mereward/shared/surveys/contract';
import { z } from 'zod';
import { readPosition } from '@/lib/position-text';
import { typedNumber } from '@/lib/typed-schemas';

const NOT_SEEN = '' as const;

/** A confirmed bottom as typed. With a cast the place is the cast's own and `position` stays empty. */
export const ConfirmDraft = z
  .object({
    id: z.string(), // '' until first sent: a second try confirms it once
    castId: z.string(), // '': a place on the map
    position: z.string(),
    positionSigmaM: typedNumber({ what: 'The doubt', min: 0.1, max: 20, unit: 'm' }),
    substrate: z.union([z.literal(NOT_SEEN), Substrate]),
    cover: z.union([z.literal(NOT_SEEN), Cover]),
    method: ConfirmedBy.nullable().refine((method) => method !== null, 'Choose how it was seen.'),
    day: z.iso.date('Give the day it was seen.'),
    note: z.string().trim().max(500, 'At most 500 letters.'),
  })
  .refine(({ substrate, cover }) => substrate !== NOT_SEEN || cover !== NOT_SEEN, {
    path: ['substrate'],
    message: 'Say what the bottom is, what lies on it, or both.',
  })
  .refine(({ castId, position }) => castId !== '' || readPosition(position) !== null, {
    path: ['position'],
    message: 'Tap the place on the lake, or type it.',
  });
export type ConfirmTyped = z.input<typeof ConfirmDraft>;
export type ConfirmRead = z.output<typeof ConfirmDraft>;

/** As it is kept. Throws when no way was chosen: the schema refuses it before. */
export function confirmationOf(read: ConfirmRead, id: string): ConfirmBottom {
  if (read.method === null) throw new RangeError('how it was seen is not chosen');
  const { castId, positionSigmaM, substrate, cover, method, day, note } = read;
  return {
    id,
    castId: castId === '' ? null : castId,
    position: castId === '' ? readPosition(read.position) : null,
    positionSigmaM,
    substrate: substrate === NOT_SEEN ? null : substrate,
    cover: cover === NOT_SEEN ? null : cover,
    method,
    day,
    note,
  };
}
