import type { Kit } from '@mereward/shared/surveys/contract';
import { FOOT_M, fromMetres, toMetres, YARD_M } from '@mereward/shared/units/length';
import { USUAL_SPACING_M } from '@mereward/shared/units/wraps';
import { z } from 'zod';
import { typedNumber, typedNumberOrNothing } from '@/lib/typed-schemas';

/** Lengths that are chosen by name; `other` is typed in metres. Spacings in use: common practice, no published source. */
export const STICKS = [
  { key: '12ft', label: '12 ft', lengthM: USUAL_SPACING_M },
  { key: '10ft', label: '10 ft', lengthM: 10 * FOOT_M },
  { key: '13ft', label: '13 ft', lengthM: 13 * FOOT_M },
  { key: '1yd', label: '1 yd', lengthM: YARD_M },
  { key: '2m', label: '2 m', lengthM: 2 },
  { key: 'other', label: 'another', lengthM: null },
] as const;
export const PULLS = [
  { key: '1ft', label: '1 ft', lengthM: FOOT_M },
  { key: '2ft', label: '2 ft', lengthM: 2 * FOOT_M },
  { key: '50cm', label: '0.5 m', lengthM: 0.5 },
  { key: 'other', label: 'another', lengthM: null },
] as const;
export const RODS = [
  { key: '0', label: 'level' },
  { key: '45', label: 'half up' },
  { key: '80', label: 'upright' },
] as const;

const stickLength = typedNumberOrNothing({ what: 'The spacing', min: 0.3, max: 10, unit: 'm' });
const percentage = (what: string) => typedNumber({ what, min: 0, max: 30, unit: '%' });

/** What the casts of a visit are made with, as typed; sticks and rod in the units of the trade, the rest in metres. */
export const KitDraft = z
  .object({
    sticks: z.enum(['12ft', '10ft', '13ft', '1yd', '2m', 'other']),
    stickSpacingM: stickLength, // when another
    stickMeasured: z.enum(['along_line', 'centres']),
    stickDiameterMm: typedNumberOrNothing({ what: 'The thickness', min: 0, max: 100, unit: 'mm' }),
    stickCheckedOn: z.union([z.literal(''), z.iso.date('Give the day of the tape check.')]),
    wrapReference: z
      .enum(['lead_to_rod_tip', 'lead_to_clip'])
      .nullable()
      .refine((reference) => reference !== null, 'Choose one. It moves every cast by a rod’s length.'),
    rodLengthFt: typedNumber({ what: 'The rod', min: 3.3, max: 19.6, unit: 'ft' }),
    lineAlongRodM: typedNumber({ what: 'Line along the rod', min: 0, max: 6, unit: 'm' }),
    reelHeightM: typedNumber({ what: 'The reel', min: 0, max: 6, unit: 'm' }),
    rod: z.enum(['0', '45', '80']),
    lineType: z.enum(['braid', 'mono', 'other']),
    stretchPercent: percentage('Stretch'),
    stretchSigmaPercent: percentage('The doubt'),
    wrapSigmaShare: typedNumber({ what: 'A careless count', min: 0.005, max: 1, unit: 'of a wrap' }),
    pull: z.enum(['1ft', '2ft', '50cm', 'other']),
    pullM: typedNumberOrNothing({ what: 'A pull', min: 0.05, max: 2, unit: 'm' }), // when another
    floatOffsetM: typedNumber({ what: 'The float set-up', min: 0, max: 2, unit: 'm' }),
    leadG: typedNumber({ what: 'The lead', min: 5, max: 500, unit: 'g' }),
    leadShape: z.enum(['smooth_ball', 'ribbed', 'pronged', 'other']),
    leadId: z.string(), // '': no calibrated lead
    declinationDeg: typedNumber({ what: 'Declination', min: -90, max: 90, unit: '°' }),
  })
  .refine(({ sticks, stickSpacingM }) => sticks !== 'other' || stickSpacingM !== null, {
    path: ['stickSpacingM'],
    message: 'How far apart do the sticks stand, in metres?',
  })
  .refine(({ pull, pullM }) => pull !== 'other' || pullM !== null, {
    path: ['pullM'],
    message: 'How long is one pull, in metres?',
  });
export type TypedKit = z.input<typeof KitDraft>;
export type ReadKit = z.output<typeof KitDraft>;

/**
 * A usual kit: 12 ft sticks and rod, braid, a 3 oz smooth lead, pulls of a foot. Common practice, no published
 * source. What a wrap is read to is never taken as read.
 */
export const USUAL_KIT: TypedKit = {
  sticks: '12ft',
  stickSpacingM: '',
  stickMeasured: 'along_line',
  stickDiameterMm: '',
  stickCheckedOn: '',
  wrapReference: null,
  rodLengthFt: '12',
  lineAlongRodM: '3',
  reelHeightM: '1.2',
  rod: '0',
  lineType: 'braid',
  stretchPercent: '0',
  stretchSigmaPercent: '0.5',
  wrapSigmaShare: '0.25',
  pull: '1ft',
  pullM: '',
  floatOffsetM: '0.25',
  leadG: '85',
  leadShape: 'smooth_ball',
  leadId: '',
  declinationDeg: '0',
};

type Named = readonly { key: string; lengthM: number | null }[];
const named = <T extends Named>(choices: T, lengthM: number): T[number]['key'] =>
  choices.find((choice) => choice.lengthM !== null && Math.abs(choice.lengthM - lengthM) < 1e-6)?.key ??
  'other';
const lengthOf = (choices: Named, key: string, typedM: number | null): number =>
  dustless(choices.find((choice) => choice.key === key)?.lengthM ?? typedM ?? 0);

/** Free of floating dust: a tenth of a micrometre is no length of line. */
const dustless = (lengthM: number): number => Math.round(lengthM * 1e7) / 1e7;

const text = (value: number): string => String(Number(value.toFixed(6)));
const rodOf = (deg: number): TypedKit['rod'] => (deg < 23 ? '0' : deg < 63 ? '45' : '80');

/** A kit laid into the form. */
export function typedKit(kit: Kit): TypedKit {
  return {
    sticks: named(STICKS, kit.stickSpacingM),
    stickSpacingM: text(kit.stickSpacingM),
    stickMeasured: kit.stickMeasured,
    stickDiameterMm: kit.stickDiameterM === null ? '' : text(kit.stickDiameterM * 1000),
    stickCheckedOn: kit.stickCheckedOn ?? '',
    wrapReference: kit.wrapReference,
    rodLengthFt: text(Number(fromMetres(kit.rodLengthM, 'ft').toFixed(4))),
    lineAlongRodM: text(kit.lineAlongRodM),
    reelHeightM: text(kit.reelHeightM),
    rod: rodOf(kit.rodElevationDeg),
    lineType: kit.lineType,
    stretchPercent: text(kit.stretchShare * 100),
    stretchSigmaPercent: text(kit.stretchSigmaShare * 100),
    wrapSigmaShare: text(kit.wrapSigmaShare),
    pull: named(PULLS, kit.pullM),
    pullM: text(kit.pullM),
    floatOffsetM: text(kit.floatOffsetM),
    leadG: text(kit.leadG),
    leadShape: kit.leadShape,
    leadId: kit.leadId ?? '',
    declinationDeg: text(kit.declinationDeg),
  };
}

/** The kit of the last visit to go on with; what wraps are read to is asked afresh, for it is the dearest mistake. */
export const kitToStartFrom = (last: Kit | null): TypedKit =>
  last === null ? USUAL_KIT : { ...typedKit(last), wrapReference: null };

const stands = { '0': 0, '45': 45, '80': 80 } as const;

/** The kit as it is kept. Throws for a kit whose wrap reference was not chosen: the schema refuses it before. */
export function kitOf(read: ReadKit): Kit {
  if (read.wrapReference === null) throw new RangeError('what the wraps are read to is not chosen');
  return {
    stickSpacingM: lengthOf(STICKS, read.sticks, read.stickSpacingM),
    stickMeasured: read.stickMeasured,
    stickDiameterM: read.stickDiameterMm === null ? null : read.stickDiameterMm / 1000,
    stickCheckedOn: read.stickCheckedOn === '' ? null : read.stickCheckedOn,
    wrapReference: read.wrapReference,
    rodLengthM: dustless(toMetres(read.rodLengthFt, 'ft')),
    lineAlongRodM: read.lineAlongRodM,
    reelHeightM: read.reelHeightM,
    rodElevationDeg: stands[read.rod],
    lineType: read.lineType,
    stretchShare: read.stretchPercent / 100,
    stretchSigmaShare: read.stretchSigmaPercent / 100,
    wrapSigmaShare: read.wrapSigmaShare,
    pullM: lengthOf(PULLS, read.pull, read.pullM),
    floatOffsetM: read.floatOffsetM,
    leadG: read.leadG,
    leadShape: read.leadShape,
    ...(read.leadId === '' ? {} : { leadId: read.leadId }),
    declinationDeg: read.declinationDeg,
  };
}
