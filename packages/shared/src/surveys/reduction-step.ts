import type { ReductionStep } from './contract';

/** A quantity of a step, already in words. */
type Inputs = ReadonlyArray<readonly [name: string, value: string]>;

export const metres = (lengthM: number, digits = 3): string => `${lengthM.toFixed(digits)} m`;
export const degrees = (angleDeg: number, digits = 2): string => `${angleDeg.toFixed(digits)}°`;
export const plusMinus = (sigma: number, unit: 'm' | '°'): string =>
  unit === 'm' ? `± ${sigma.toFixed(2)} m` : `± ${sigma.toFixed(2)}°`;

/** One line of "how did you get this?". */
export function step(
  [key, name, formula]: readonly [string, string, string],
  inputs: Inputs,
  result: { value: string; sigma?: string },
): ReductionStep {
  return {
    key,
    name,
    formula,
    inputs: inputs.map(([inputName, value]) => ({ name: inputName, value })),
    value: result.value,
    sigma: result.sigma ?? null,
  };
}
