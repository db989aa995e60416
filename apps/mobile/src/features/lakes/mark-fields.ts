import { MarkDetails } from '@mereward/shared/lakes/contract';
import { z } from 'zod';
import type { Choice } from '@/components/choice-props';
import { typedNumber } from '@/lib/typed-schemas';
import { positionText, typedPosition } from '@/lib/position-text';

/** A far-bank mark as it is typed. */
export const TypedMark = MarkDetails.extend({
  code: z.string().trim().min(1, 'Give the mark a short code, such as M3.').max(30, 'At most 30 letters.'),
  name: z
    .string()
    .trim()
    .min(1, 'Say what it is, so that anybody finds it: “pump-house chimney”.')
    .max(120, 'At most 120 letters.'),
  position: typedPosition('Tap the mark on the lake, or type its latitude and longitude'),
  sigmaM: typedNumber({ what: 'How sure the place is', min: 0.05, max: 50, unit: 'm' }),
});
export type TypedMark = z.input<typeof TypedMark>;

export const NEW_MARK: TypedMark = {
  code: '',
  name: '',
  position: '',
  fixedBy: 'plan',
  sigmaM: '3',
  permanence: 'permanent',
  nightNote: '',
};

export const typedMark = (details: MarkDetails): TypedMark => ({
  ...details,
  position: positionText(details.position),
  sigmaM: String(details.sigmaM),
});

export const MARK_FIXES: readonly Choice<MarkDetails['fixedBy']>[] = [
  { key: 'plan', label: 'Plan or map', note: 'about 3 m' },
  { key: 'gnss', label: 'Survey receiver', note: 'centimetres' },
  { key: 'phone_gnss', label: 'Phone', note: 'about 5 m' },
  { key: 'estimated', label: 'By eye', note: '10 m and more' },
];

export const PERMANENCES: readonly Choice<MarkDetails['permanence']>[] = [
  { key: 'permanent', label: 'Built', note: 'stays for years' },
  { key: 'tree', label: 'Tree', note: 'grows, may fall' },
  { key: 'pole', label: 'Pole', note: 'may be moved' },
  { key: 'temporary', label: 'Put up', note: 'for a survey' },
];

export const permanenceWord = (key: MarkDetails['permanence']): string =>
  PERMANENCES.find((each) => each.key === key)?.label ?? '';
