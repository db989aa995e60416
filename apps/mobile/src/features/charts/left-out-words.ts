import type { ChartCastView, LeftOutView } from '@mereward/shared/charts/left-out-contract';
import { dayAndTime } from '@/lib/format-time';

/** "The float hung. Left out by Idris Penhale, 3 April 2027, 13:00." */
export const leftOutWords = ({ reason, by, at, putBack }: LeftOutView, zone: string): string => {
  const out = `${/[.!?]$/.test(reason) ? reason : `${reason}.`} Left out by ${by}, ${dayAndTime(at, zone)}.`;
  return putBack ? `${out} Put back by ${putBack.by}, ${dayAndTime(putBack.at, zone)}.` : out;
};

export const STANDS_WORDS = {
  charted: 'in the chart',
  left_out: 'left out',
  not_charted: 'not charted',
  not_built: 'not built yet',
} as const satisfies Record<ChartCastView['stands'], string>;
