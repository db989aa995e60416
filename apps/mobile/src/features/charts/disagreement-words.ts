import type { Units } from '@mereward/shared/accounts/contract';
import { BOTTOM_WORDS } from '@mereward/shared/charts/bottom-words';
import type { DepthBy, DisagreementView, Found } from '@mereward/shared/charts/disagreement';
import { length } from '@/lib/format';

export const DEPTH_BY: Readonly<Record<DepthBy, string>> = {
  float: 'by marker float',
  lead_count: 'by counting the lead down',
  other: 'another way',
};

const WEED = { clear: 'clear of weed', low: 'low weed', thick: 'thick weed' } as const;

/** "1.2 m by marker float, gravel, low weed" */
export function foundWords(
  { depthM, depthBy, bottom, snag, weed }: Found,
  units: Pick<Units, 'length'>,
): string {
  const depth = depthM === null || depthBy === null ? null : `${length(depthM, units)} ${DEPTH_BY[depthBy]}`;
  return [depth, bottom && BOTTOM_WORDS[bottom], snag ? 'a snag' : null, weed && WEED[weed]]
    .filter(Boolean)
    .join(', ');
}

export const STATUS_LOOKS = {
  waiting: { shape: 'diamond', tone: 'amber', word: 'waits' },
  accepted: { shape: 'triangle', tone: 'reed', word: 'accepted' },
  declined: { shape: 'bar', tone: 'inkSoft', word: 'declined' },
  taken_back: { shape: 'cross', tone: 'inkSoft', word: 'taken back' },
} as const;

/** What became of a report, for the one who told. */
export function becameWords({ status, reason, grade, charts, takenBack }: DisagreementView): string {
  switch (status) {
    case 'waiting':
      return 'The fishery has not looked at it yet. The chart stays as it is until then.';
    case 'declined':
      return `Not taken up: ${reason}`;
    case 'taken_back':
      return `Accepted at first, then taken back: ${takenBack?.reason ?? ''}`;
    case 'accepted': {
      const versions = charts.flatMap(({ version }) => (version === null ? [] : [version]));
      const where = versions.length
        ? `It is in chart ${versions.join(' and ')}.`
        : grade === 'D'
          ? 'It is kept for the staff when they survey there.'
          : 'It counts in the next chart made.';
      return [`Accepted as grade ${grade ?? 'D'}.`, where, reason].filter(Boolean).join(' ');
    }
  }
}
