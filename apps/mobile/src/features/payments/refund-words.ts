import type { RefundStatus } from '@mereward/shared/payments/contract';
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
