import type { Units } from '@mereward/shared/accounts/contract';
import type { SoundingMissView } from '@mereward/shared/charts/sounding-miss';
import { length } from '@/lib/format';

type Length = Pick<Units, 'length'>;

/** "Cast 12, peg 7". */
export const castTitle = ({ castNumber, pegNumber }: Pick<SoundingMissView, 'castNumber' | 'pegNumber'>) =>
  `Cast ${String(castNumber)}, ${pegNumber === null ? 'a peg that is gone' : `peg ${pegNumber}`}`;

/** "42.1 m of line on 128° true". */
export const castPlaceWords = (
  { rangeM, bearingDeg }: Pick<SoundingMissView, 'rangeM' | 'bearingDeg'>,
  units: Length,
): string => `${length(rangeM, units)} of line on ${String(Math.round(bearingDeg) % 360)}° true`;

/** "0.84 m deeper", "0.30 m shallower": the cast against its neighbours. */
export const outByWords = ({ errorM }: Pick<SoundingMissView, 'errorM'>, units: Length): string =>
  `${length(Math.abs(errorM), units, 2)} ${errorM < 0 ? 'deeper' : 'shallower'}`;
