import type { BottomTableVersion } from '@mereward/shared/surveys/bottom-table-contract';
import { dayAndTime } from '@/lib/format-time';

const KIND_WORDS = { usual: 'built-in', edited: 'edited', learnt: 'learnt' } as const;

/** "Version 3, learnt" */
export const versionTitle = ({ version, kind }: BottomTableVersion): string =>
  version === 0 ? 'The built-in table' : `Version ${String(version)}, ${KIND_WORDS[kind]}`;

/** Who, when and why. */
export const versionNote = (
  { reason, madeBy, madeAt, confirmedCasts }: BottomTableVersion,
  zone: string,
): string =>
  [
    reason,
    madeBy ?? '',
    madeAt ? dayAndTime(madeAt, zone) : '',
    confirmedCasts > 0 ? `holds ${String(confirmedCasts)} casts over confirmed bottoms` : '',
  ]
    .filter((words) => words !== '')
    .join(' · ');
