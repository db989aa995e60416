import type { Kit } from '@mereward/shared/surveys/contract';
import type { LeadCalibration } from '@mereward/shared/surveys/lead-fall';
import { figure } from '@/lib/format';

export const LEAD_SHAPES: readonly { key: Kit['leadShape']; label: string }[] = [
  { key: 'smooth_ball', label: 'smooth' },
  { key: 'ribbed', label: 'ribbed' },
  { key: 'pronged', label: 'pronged' },
  { key: 'other', label: 'other' },
];

export const LINE_TYPES: readonly { key: Kit['lineType']; label: string }[] = [
  { key: 'braid', label: 'braid' },
  { key: 'mono', label: 'nylon' },
  { key: 'other', label: 'other' },
];

const labelOf = (choices: readonly { key: string; label: string }[], key: string): string =>
  choices.find((choice) => choice.key === key)?.label ?? key;

/** "1.42 ± 0.05 m a second" */
export const rateWords = ({ rateMPerS, rateSigmaMPerS }: LeadCalibration): string =>
  `${figure(rateMPerS, 2)} ± ${figure(rateSigmaMPerS, 2)} m a second`;

/** "85 g smooth on braid" */
export const leadWords = ({
  leadG,
  leadShape,
  lineType,
}: Pick<Kit, 'leadG' | 'leadShape' | 'lineType'>): string =>
  `${figure(leadG)} g ${labelOf(LEAD_SHAPES, leadShape)} on ${labelOf(LINE_TYPES, lineType)}`;
