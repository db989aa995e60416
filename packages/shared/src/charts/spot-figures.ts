import type { Units } from '../accounts/contract';
import { length, percent } from '../units/length-words';
import { formatWraps, metresToWraps } from '../units/wraps';
import type { SpotView } from './contract';
import { stickWords } from './spot-words';

/** "over the pump-house chimney", "4° left of the dead oak"; by bearing alone where no mark helps. */
export function aimWords({ mark, bearingDeg }: Pick<SpotView, 'mark' | 'bearingDeg'>): string {
  if (!mark) return `on ${String(Math.round(bearingDeg))}° true`;
  const off = Math.round(Math.abs(mark.offsetDeg));
  if (off === 0) return `over the ${mark.name}`;
  return `${String(off)}° ${mark.offsetDeg < 0 ? 'left' : 'right'} of the ${mark.name}`;
}

/** The count on the reader's own sticks: "14", "16 + 2 ft". */
export const ownCount = (spot: Pick<SpotView, 'lineOutM'>, units: Units): string =>
  formatWraps(metresToWraps(spot.lineOutM, units.stickSpacingM), units.length, units.stickSpacingM);

/** "14 wraps of 12 ft" on the reader's own sticks. */
export const ownCountWords = (spot: Pick<SpotView, 'lineOutM'>, units: Units): string =>
  `${ownCount(spot, units)} wraps of ${stickWords(units.stickSpacingM)}`;

/** How the survey counted its line, for whoever counts differently. */
export const countedWords = ({ wrapReference }: Pick<SpotView, 'wrapReference'>): string =>
  wrapReference === 'lead_to_clip'
    ? 'counted from the lead to the reel’s clip'
    : 'counted from the lead to the rod tip';

/** Half the depth's 95 % band, never finer than a tenth of a metre; beside what depth it belongs to. */
export function depthCaption(
  { depthSigmaM }: Pick<SpotView, 'depthSigmaM'>,
  when: string,
  units: Units,
): string {
  return depthSigmaM === null
    ? `deep ${when}`
    : `deep ${when}, ± ${length(Math.max(0.1, 1.96 * depthSigmaM), units)}`;
}

/** "grade A, 93 % sure" */
export function bottomCaption({
  grade,
  bottomConfidence,
}: Pick<SpotView, 'grade' | 'bottomConfidence'>): string {
  const parts = [
    grade && `grade ${grade}`,
    bottomConfidence !== null && `${sureWords(bottomConfidence)} sure`,
  ];
  return parts.filter(Boolean).join(', ') || 'bottom';
}

/** Nothing on a lake bed is wholly sure. */
const sureWords = (share: number): string => (share > 0.99 ? `over ${percent(0.99)}` : percent(share));

/** What a spot's figures are quoted from, and how its line was counted. */
export function provenance(spot: Pick<SpotView, 'quotedFrom' | 'wrapReference'>): string {
  const parts = [
    spot.quotedFrom === 'cast'
      ? 'From a cast that landed here'
      : spot.quotedFrom === 'chart'
        ? 'Read off the chart'
        : null,
    countedWords(spot),
  ];
  return `${parts.filter(Boolean).join(', ')}.`;
}
