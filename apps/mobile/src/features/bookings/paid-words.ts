import type { BookingView } from '@mereward/shared/bookings/contract';
import { money } from '@/lib/format';

/** What is paid of it and what is not: "£28.00 to pay", "£28.00 paid, £14.00 back". */
export function paidWords({
  grossPence,
  paidPence,
  refundedPence,
  currency,
}: Pick<BookingView, 'grossPence' | 'paidPence' | 'refundedPence' | 'currency'>): string {
  if (grossPence === 0) return 'nothing to pay';
  const left = grossPence - paidPence;
  const parts = [
    ...(paidPence > 0 ? [`${money(paidPence, currency)} paid`] : []),
    ...(refundedPence > 0 ? [`${money(refundedPence, currency)} back`] : []),
    ...(left > 0 ? [`${money(left, currency)} to pay`] : []),
  ];
  return parts.join(', ');
}
