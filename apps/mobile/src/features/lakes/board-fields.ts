import { GaugeBoardDetails } from '@mereward/shared/lakes/contract';
import { z } from 'zod';
import type { Choice } from '@/components/choice-props';
import { typedNumberOrNothing } from '@/lib/typed-schemas';
import { positionText, typedPosition } from '@/lib/position-text';

const levelOrNothing = (what: string) => typedNumberOrNothing({ what, min: -100, max: 9000, unit: 'm' });

/** A gauge board as it is typed. Limits are metres, as the board reads. */
export const TypedBoard = GaugeBoardDetails.extend({
  code: z.string().trim().min(1, 'Give the board a short code, such as GB1.').max(30, 'At most 30 letters.'),
  position: typedPosition('Tap the board on the lake, or type its latitude and longitude'),
  normalLowM: levelOrNothing('The usual low level'),
  normalHighM: levelOrNothing('The usual high level'),
  alarmLowM: levelOrNothing('The low alarm'),
  alarmHighM: levelOrNothing('The high alarm'),
  lastCleanedOn: z.string().transform((day, context): string | null => {
    if (day === '' || z.iso.date().safeParse(day).success) return day || null;
    context.issues.push({ code: 'custom', message: 'Choose a day, or leave it empty', input: day });
    return z.NEVER;
  }),
});
export type TypedBoard = z.input<typeof TypedBoard>;

export const NEW_BOARD: TypedBoard = {
  code: '',
  kind: 'board',
  position: '',
  unit: 'm',
  higherNumberHigherWater: true,
  normalLowM: '',
  normalHighM: '',
  alarmLowM: '',
  alarmHighM: '',
  lastCleanedOn: '',
  isDatumBoard: false,
};

const text = (value: number | null): string => (value === null ? '' : String(value));

export const typedBoard = (details: GaugeBoardDetails): TypedBoard => ({
  ...details,
  position: positionText(details.position),
  normalLowM: text(details.normalLowM),
  normalHighM: text(details.normalHighM),
  alarmLowM: text(details.alarmLowM),
  alarmHighM: text(details.alarmHighM),
  lastCleanedOn: details.lastCleanedOn ?? '',
});

export const BOARD_KINDS: readonly Choice<GaugeBoardDetails['kind']>[] = [
  { key: 'board', label: 'Gauge board', note: 'a ruler in the water' },
  { key: 'painted_mark', label: 'Painted mark', note: 'on a pier or wall' },
];

export const BOARD_UNITS: readonly Choice<GaugeBoardDetails['unit']>[] = [
  { key: 'm', label: 'Metres' },
  { key: 'ft', label: 'Feet' },
];
