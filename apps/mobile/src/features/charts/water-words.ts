import type { Units } from '@mereward/shared/accounts/contract';
import { ACRE_M2 } from '@mereward/shared/units/measures';
import { figure } from '@/lib/format';

/** The size of a peg’s water, all in one unit so that they compare: "1,970 m²", "0.49 acres". */
export const waterArea = (areaM2: number, { length }: Pick<Units, 'length'>): string =>
  length === 'ft' ? `${figure(areaM2 / ACRE_M2, 2)}\u00A0acres` : `${figure(areaM2)}\u00A0m²`;
