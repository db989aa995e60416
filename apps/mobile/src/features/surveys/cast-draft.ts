import {
  CameBack,
  CastFlag,
  Drag,
  Drop,
  type Aim,
  type CastObservation,
} from '@mereward/shared/surveys/contract';
import { fromMetres, toMetres } from '@mereward/shared/units/length';
import { z } from 'zod';
import { typedNumberOrNothing } from '@/lib/typed-schemas';

/** Aiming by compass stands beside the marks in one list. */
export const BY_COMPASS = 'compass';

const METHODS = ['compass_phone', 'compass_sighting', 'estimated'] as const;

/** In what the line left over beside whole wraps is measured, in the order the form turns through them. */
export const REMAINDER_UNITS = ['ft', 'in', 'mm'] as const;
export type RemainderUnit = (typeof REMAINDER_UNITS)[number];
const MOST_LEFT_OVER_M = 10; // no sticks stand farther apart

/** What is typed for one reading of one throw. Numbers are as typed; nothing typed means nothing known. */
export const CastDraft = z
  .object({
    pegId: z.string().min(1, 'Choose the peg you stand on.'),
    aim: z.string().min(1, 'Choose what you aim over.'),
    offsetDeg: z.number().min(-90).max(90).nullable(),
    compassDeg: typedNumberOrNothing({ min: 0, max: 359.9, unit: '°', what: 'The bearing' }),
    compassMethod: z.enum(METHODS),
    sidestepM: typedNumberOrNothing({ min: -10, max: 10, unit: 'm', what: 'The side-step' }),
    wrapsWhole: z
      .int('Wraps are whole; what is left over goes beside them.')
      .min(0)
      .max(120, 'More than 120 wraps is no cast.')
      .nullable(),
    remainder: typedNumberOrNothing({ min: 0, max: 10_000, what: 'What is left over' }),
    remainderUnit: z.enum(REMAINDER_UNITS),
    rod: z.enum(['0', '45', '80']),
    drop: Drop.nullable(),
    dropCountS: typedNumberOrNothing({ min: 0, max: 60, unit: 'seconds', what: 'The count' }),
    drag: Drag.nullable(),
    dragLengthM: typedNumberOrNothing({ min: 0, max: 20, unit: 'm', what: 'The drag' }),
    cameBack: z.array(CameBack), // nothing chosen: nobody looked
    smell: z.enum(['none', 'bad_eggs']).nullable(),
    pulls: typedNumberOrNothing({ min: 0.5, max: 200, what: 'Pulls' }),
    pullsAgain: typedNumberOrNothing({ min: 0.5, max: 200, what: 'Pulls' }),
    floatSight: z.enum(['good', 'poor']).nullable(),
    flags: z.array(CastFlag),
    note: z.string().max(500, 'At most 500 letters.'),
    lineId: z.string(), // '': a new throw; else the throw this reading is closer in on
    castId: z.string(), // '' until it is first sent: a second try goes under the same id
    sentAt: z.string(), // and at the same time
  })
  .refine(({ remainder, remainderUnit }) => toMetres(remainder ?? 0, remainderUnit) <= MOST_LEFT_OVER_M, {
    path: ['remainder'],
    message: 'More is left over than any sticks stand apart. Is the unit right?',
  });
export type CastTyped = z.input<typeof CastDraft>;
export type CastRead = z.output<typeof CastDraft>;

export const EMPTY_CAST: CastTyped = {
  pegId: '',
  aim: '',
  offsetDeg: 0,
  compassDeg: '',
  compassMethod: 'compass_phone',
  sidestepM: '',
  wrapsWhole: null,
  remainder: '',
  remainderUnit: 'ft',
  rod: '0',
  drop: null,
  dropCountS: '',
  drag: null,
  dragLengthM: '',
  cameBack: [],
  smell: null,
  pulls: '',
  pullsAgain: '',
  floatSight: null,
  flags: [],
  note: '',
  lineId: '',
  castId: '',
  sentAt: '',
};

/** What was felt and counted belongs to one reading; where one stands and aims carries forward. */
const UNFELT = {
  drop: null,
  dropCountS: '',
  drag: null,
  dragLengthM: '',
  cameBack: [],
  smell: null,
  pulls: '',
  pullsAgain: '',
  floatSight: null,
  flags: [],
  note: '',
  castId: '',
  sentAt: '',
} satisfies Partial<CastTyped>;

const FELT = ['drop', 'dropCountS', 'drag', 'dragLengthM', 'smell', 'pulls', 'pullsAgain', 'note'] as const;

/** Has anything of this reading been typed yet, beyond what was carried forward? */
export const isBegun = (typed: CastTyped): boolean =>
  FELT.some((field) => typed[field] !== null && typed[field] !== '') ||
  typed.cameBack.length > 0 ||
  typed.flags.length > 0;

/** The next throw: same peg, same aim, same wraps, nothing felt yet. */
export const nextThrow = (typed: CastTyped): CastTyped => ({ ...typed, ...UNFELT, lineId: '' });

/** A reading closer in on the same throw: two wraps less, nothing felt yet. */
export const closerIn = (typed: CastTyped, lineId: string): CastTyped => ({
  ...typed,
  ...UNFELT,
  wrapsWhole: typed.wrapsWhole === null ? null : Math.max(1, typed.wrapsWhole - 2),
  remainder: '',
  lineId,
});

const ROD_DEG = { '0': 0, '45': 45, '80': 80 } as const;

const rodOf = (elevationDeg: number): CastTyped['rod'] =>
  elevationDeg < 23 ? '0' : elevationDeg < 63 ? '45' : '80';

/** A kept cast back in the form, to go on from. */
export function typedAgain(cast: { pegId: string; observation: CastObservation }): CastTyped {
  const { aim, wrapsWhole, remainderM, remainderStated, rodElevationDeg } = cast.observation;
  const unit = unitOf(cast.observation.lineText);
  return {
    ...EMPTY_CAST,
    pegId: cast.pegId,
    aim: aim.by === 'mark' ? aim.markId : BY_COMPASS,
    offsetDeg: aim.by === 'mark' ? aim.offsetDeg : 0,
    compassDeg: aim.by === 'compass' ? String(aim.bearingDeg) : '',
    compassMethod: aim.by === 'compass' ? aim.method : 'compass_phone',
    wrapsWhole,
    remainder: remainderStated ? String(Number(fromMetres(remainderM, unit).toFixed(2))) : '',
    remainderUnit: unit,
    rod: rodOf(rodElevationDeg),
  };
}

/** The unit a count was typed in, as its text tells. */
const unitOf = (lineText: string): RemainderUnit =>
  REMAINDER_UNITS.find((unit) => lineText.endsWith(` ${unit}`)) ?? 'ft';

export type Incomplete = { field: keyof CastTyped; words: string };

/** What is still missing before a cast can be reduced or kept. */
export function incomplete(read: CastRead): Incomplete[] {
  const missing: Incomplete[] = [];
  if (read.wrapsWhole === null) missing.push({ field: 'wrapsWhole', words: 'How many wraps were out?' });
  if (read.aim === BY_COMPASS && read.compassDeg === null)
    missing.push({ field: 'compassDeg', words: 'What bearing did the compass read?' });
  return missing;
}

/** The observation as it is kept; null while something is missing. */
export function observationOf(read: CastRead): CastObservation | null {
  if (incomplete(read).length > 0 || read.wrapsWhole === null) return null;
  const { remainder, remainderUnit, wrapsWhole } = read;
  return {
    aim: aimOf(read),
    sidestepM: read.sidestepM ?? 0,
    wrapsWhole,
    remainderM: toMetres(remainder ?? 0, remainderUnit),
    remainderStated: remainder !== null,
    lineText: remainder === null ? `${wrapsWhole}` : `${wrapsWhole} + ${remainder} ${remainderUnit}`,
    rodElevationDeg: ROD_DEG[read.rod],
    drop: read.drop,
    dropCountS: read.dropCountS,
    drag: read.drag,
    dragLengthM: read.dragLengthM,
    cameBack: read.cameBack.length === 0 ? null : read.cameBack,
    smell: read.smell,
    pulls: read.pulls,
    pullsAgain: read.pullsAgain,
    floatSight: read.floatSight,
    flags: read.flags,
    note: read.note.trim(),
  };
}

function aimOf({ aim, offsetDeg, compassDeg, compassMethod }: CastRead): Aim {
  return aim === BY_COMPASS
    ? { by: 'compass', bearingDeg: compassDeg ?? 0, method: compassMethod }
    : { by: 'mark', markId: aim, offsetDeg: offsetDeg ?? 0 };
}

/** Line out as typed, metres, for the small line under the wraps; null while not known. */
export function typedLineM(read: CastRead, wrapM: number): number | null {
  const observation = observationOf(read);
  return observation ? observation.wrapsWhole * wrapM + observation.remainderM : null;
}
