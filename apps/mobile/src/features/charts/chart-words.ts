import type { ChartListItem } from '@mereward/shared/charts/contract';
import { dayRange } from '@/lib/format-time';

/** "2027.1, Spring survey", or the title alone before it has a number. */
export const chartName = ({ version, title }: Pick<ChartListItem, 'version' | 'title'>): string =>
  version === null ? title : `${version}, ${title}`;

export const surveyedWords = ({
  surveyedFrom,
  surveyedTo,
}: Pick<ChartListItem, 'surveyedFrom' | 'surveyedTo'>): string =>
  surveyedFrom === null || surveyedTo === null ? 'not known' : dayRange(surveyedFrom, surveyedTo);
