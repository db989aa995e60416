import type { SpotView } from '@mereward/shared/charts/contract';
import { stickWords } from '@mereward/shared/charts/spot-words';
import type { Units } from '@mereward/shared/accounts/contract';
import { wraps } from '@/lib/format';

/** "over the pump-house chimney", "4° left of the dead oak"; by bearing alone where no mark helps. */
export function aimWords({ mark, bearingDeg }: Pick<SpotView, 'mark' | 'bearingDeg'>): string {
  if (!mark) return `on ${String(Math.round(bearingDeg))}° true`;
  const off = Math.round(Math.abs(mark.offsetDeg));
  if (off === 0) return `over the ${mark.name}`;
  return `${String(off)}° ${mark.offsetDeg < 0 ? 'left' : 'right'} of the ${mark.name}`;
}

/** The count on the reader's own sticks: "14", "16 + 2 ft". */
export const ownCount = (spot: Pick<SpotView, 'lineOutM'>, units: Units): string =>
  wraps(spot.lineOutM, units.stickSpacingM, units);

/** "14 wraps of 12 ft" on the reader's own sticks. */
export const ownCountWords = (spot: Pick<SpotView, 'lineOutM'>, units: Units): string =>
  `${ownCount(spot, units)} wraps of ${stickWords(units.stickSpacingM)}`;

/** How the survey counted its line, for whoever counts differently. */
export const countedWords = ({ wrapReference }: Pick<SpotView, 'wrapReference'>): string =>
  wrapReference === 'lead_to_clip'
    ? 'counted from the lead to the reel’s clip'
    : 'counted from the lead to the rod tip';
