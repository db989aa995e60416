import type { PegPageView } from '@mereward/shared/charts/contract';
import { PegDetails } from '@mereward/shared/lakes/contract';

/** A peg's own facts out of its page; null when a newer server writes them in a way this program can't read. */
export function pegDetailsOf(page: Pick<PegPageView, 'details'>): PegDetails | null {
  const read = PegDetails.safeParse(page.details);
  return read.success ? read.data : null;
}
