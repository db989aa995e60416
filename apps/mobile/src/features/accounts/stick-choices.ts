import { FOOT_M } from '@mereward/shared/units/length';
import { USUAL_SPACING_M } from '@mereward/shared/units/wraps';

export const lengthChoices = [
  { key: 'm', label: 'Metres' },
  { key: 'ft', label: 'Feet' },
] as const;

/** Common spacings of distance sticks; any other can be typed. */
export const stickChoices = [
  { key: '12ft', label: '12 ft', spacingM: USUAL_SPACING_M },
  { key: '10ft', label: '10 ft', spacingM: 10 * FOOT_M },
  { key: '2m', label: '2 m', spacingM: 2 },
  { key: 'other', label: 'Another', spacingM: null },
] as const;

export type StickKey = (typeof stickChoices)[number]['key'];

/** Which of the common spacings this is. */
export const stickKeyOf = (spacingM: number): StickKey =>
  stickChoices.find((choice) => choice.spacingM !== null && Math.abs(choice.spacingM - spacingM) < 1e-6)
    ?.key ?? 'other';
