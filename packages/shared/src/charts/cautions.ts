import type { PegDetails } from '../lakes/contract';
import { OVERHEAD_LIMIT_M } from '../lakes/overhead-line';
import { dayWords } from '../time/civil-day';
import type { SurveyedBy } from './chart-log-view';

type Surveyed = {
  surveyedFrom: string;
  surveyedTo: string;
  datumM: number;
  surveyedBy?: SurveyedBy | undefined; // absent: by casts
};

const COME_FROM: Readonly<Record<SurveyedBy, string>> = {
  casts: 'Bottom and depth come from casting',
  logs: 'Depths come from an echo sounder',
  both: 'Bottom and depth come from casting and from an echo sounder',
};

/** Stands on every chart, peg page, card and print. */
export function chartCaution({ surveyedFrom, surveyedTo, datumM, surveyedBy = 'casts' }: Surveyed): string {
  const when =
    surveyedFrom === surveyedTo
      ? `on ${dayWords(surveyedFrom)}`
      : `between ${dayWords(surveyedFrom)} and ${dayWords(surveyedTo)}`;
  return `${COME_FROM[surveyedBy]} ${when}, given at level ${datumM.toFixed(2)} m. They change. Not for boating, wading, swimming or diving.`;
}

/** What must be said of a power line over or near a peg; null when there is none near. */
export function overheadCaution({ overheadLine }: Pick<PegDetails, 'overheadLine'>): string | null {
  const { kind, distanceM, fishing } = overheadLine;
  if (kind === 'unknown')
    return 'Whether a power line is near this peg has not been looked at. Look up before you set up.';
  if (kind === 'none') return null;
  const near = distanceM === null || distanceM < OVERHEAD_LIMIT_M;
  const where =
    distanceM === null
      ? 'A power line passes this peg'
      : `A power line passes ${Math.round(distanceM)} m from this peg`;
  const act =
    fishing === 'no_fishing'
      ? 'Do not fish here.'
      : near || fishing === 'restricted'
        ? 'Restricted: ask the fishery first.'
        : '';
  return [`${where}.`, act, 'Look up. Carry rods flat. Current can jump to a rod without touch.']
    .filter(Boolean)
    .join(' ');
}

/** In every footer. */
export const EMERGENCY =
  'In an emergency ring 999 or 112. Reach or throw to somebody in the water; don’t go in.';
