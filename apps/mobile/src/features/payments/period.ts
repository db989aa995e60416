import { addDays, daysBetween } from '@mereward/shared/time/zoned';
import type { Period } from '@/features/payments/api';

export const MOST_DAYS = 400;
const DAY = /^\d{4}-\d\d-\d\d$/;

/** The periods an office asks for most. */
export const PERIODS = [
  { key: 'today', label: 'Today' },
  { key: 'week', label: 'Seven days' },
  { key: 'month', label: 'This month' },
  { key: 'last_month', label: 'Last month' },
] as const;
export type PeriodName = (typeof PERIODS)[number]['key'];

/** A named period as days, both counted, seen from a day. */
export function periodOf(name: PeriodName, today: string): Period {
  const first = `${today.slice(0, 7)}-01`;
  switch (name) {
    case 'today':
      return { from: today, until: today };
    case 'week':
      return { from: addDays(today, -6), until: today };
    case 'month':
      return { from: first, until: today };
    case 'last_month': {
      const until = addDays(first, -1);
      return { from: `${until.slice(0, 7)}-01`, until };
    }
  }
}

/** Why a period can't be asked for, in words; null when it can. */
export function periodFault({ from, until }: Period): string | null {
  if (!DAY.test(from) || !DAY.test(until)) return 'Choose both days.';
  if (until < from) return 'The last day comes before the first.';
  return daysBetween(from, until) >= MOST_DAYS ? `At most ${String(MOST_DAYS)} days at once.` : null;
}
