import type { RefundStatus } from '@mereward/shared/payments/contract';
import type { OfficeQueueKind } from '@mereward/shared/payments/refund-contract';
import type { ShapeName } from '@/components/shape';

type Look = { shape: ShapeName; tone: 'reed' | 'amber' | 'brick' | 'inkSoft'; word: string };

/** How a refund stands, by shape and word. */
export const REFUND_LOOKS = {
  proposed: { shape: 'diamond', tone: 'amber', word: 'proposed' },
  queued: { shape: 'diamond', tone: 'amber', word: 'on its way' },
  done: { shape: 'triangle', tone: 'reed', word: 'given back' },
  failed: { shape: 'cross', tone: 'brick', word: 'failed' },
  declined: { shape: 'bar', tone: 'inkSoft', word: 'declined' },
} as const satisfies Record<RefundStatus, Look>;

/** Why something waits in the office, by shape and word. */
export const QUEUE_LOOKS = {
  refund_proposed: { shape: 'diamond', tone: 'amber', word: 'Refund proposed' },
  refund_failed: { shape: 'cross', tone: 'brick', word: 'Refund failed' },
  give_back_by_hand: { shape: 'diamond', tone: 'amber', word: 'Give back by hand' },
  refund_slow: { shape: 'ring', tone: 'amber', word: 'No answer yet' },
  paid_too_late: { shape: 'ring', tone: 'amber', word: 'Paid too late' },
  dispute_open: { shape: 'cross', tone: 'brick', word: 'Disputed' },
} as const satisfies Record<OfficeQueueKind, Look>;
