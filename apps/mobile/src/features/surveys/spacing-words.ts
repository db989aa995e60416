import { sticks } from '@/lib/format';

/** How far apart sticks stand, or how long a pull is, as it is said on the bank: "12 ft", "1 ft", "2.00 m". */
export const spacingWords = (spacingM: number): string => sticks(spacingM).replace(' sticks', '');
