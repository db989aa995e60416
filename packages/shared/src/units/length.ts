/** International yard and pound agreement, 1959: exact by definition, metres. */
export const INCH_M = 0.0254;
export const FOOT_M = 0.3048;
export const YARD_M = 0.9144;
export const FATHOM_M = 1.8288;
export const MILE_M = 1609.344;

export type LengthUnit = 'm' | 'cm' | 'mm' | 'ft' | 'in' | 'yd';

export const METRES_IN: Readonly<Record<LengthUnit, number>> = {
  m: 1,
  cm: 0.01,
  mm: 0.001,
  ft: FOOT_M,
  in: INCH_M,
  yd: YARD_M,
};

/** A length in `unit` as metres. */
export function toMetres(length: number, unit: LengthUnit): number {
  return unit === 'cm' ? length / 100 : unit === 'mm' ? length / 1000 : length * METRES_IN[unit];
}

/** Metres as a length in `unit`. */
export function fromMetres(lengthM: number, unit: LengthUnit): number {
  return unit === 'cm' ? lengthM * 100 : unit === 'mm' ? lengthM * 1000 : lengthM / METRES_IN[unit];
}

/** Whole feet and inches, to the nearest `stepIn` inches (halves up), carrying so that 12 in never appears. */
export function feetAndInches(lengthM: number, stepIn = 1): { feet: number; inches: number } {
  const steps = Math.floor(Math.abs(lengthM) / (INCH_M * stepIn) + 0.5 + 1e-9);
  const inches = steps * stepIn;
  const sign = lengthM < 0 && steps > 0 ? -1 : 1;
  return { feet: sign * Math.floor(inches / 12), inches: sign * (inches % 12) };
}
