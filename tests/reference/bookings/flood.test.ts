/**
 * Source: the trade's acceptance story of a flood with forty bookings, its sums worked by hand there: £1,116.00 taken,
 * £362.00 given back in full and £96.00 in part, £658.00 kept. Cancellation steps, a hold of ten minutes and a claim of
 * thirty are common practice, no published source. Exact in pence.
 */
import { refundFor, USUAL_CANCELLATION } from '@mereward/shared/bookings/cancellation';
import { moveMoney } from '@mereward/shared/bookings/moving';
import { sumPence } from '@mereward/shared/money/money';
import { balances, postingsFor } from '@mereward/shared/payments/ledger';
import { vatLine } from '@mereward/shared/money/vat';
import { expect, test } from 'vitest';

const times = { start: new Date('2027-02-12T12:00:00Z'), now: new Date('2027-02-12T07:10:00Z') };
const closed = (takenPence: number): number =>
  refundFor(USUAL_CANCELLATION, 'fishery', { takenPence, refundedPence: 0, ...times, seasonBoughtAt: null })
    .refundPence;
const toDayTicket = (): number =>
  moveMoney('closure', { paidPence: 2800, newPence: 1200, sameKind: false }).refundPence;

test('a flood gives back £458.00 of £1,116.00', () => {
  const paid = [
    ...Array<number>(22).fill(2800),
    ...Array<number>(10).fill(5000),
    ...Array<number>(8).fill(0),
  ];
  const full = [...Array<number>(4).fill(2800), ...Array<number>(5).fill(5000)].map(closed);
  const part = Array.from({ length: 6 }, toDayTicket);
  expect([sumPence(paid), sumPence(full), sumPence(part)]).toEqual([111_600, 36_200, 9_600]);
  const sales = paid.map((gross) =>
    postingsFor({ kind: 'sale', method: 'card_online', lines: [vatLine(gross, 2000)] }),
  );
  const refunds = [...full, ...part].map((gross) =>
    postingsFor({ kind: 'refund', method: 'card_online', lines: [vatLine(gross, 2000)] }),
  );
  const after = balances([...sales, ...refunds].flat());
  expect(after.card_money_coming).toBe(65_800);
  expect(after.ticket_sales + after.vat_owed).toBe(-65_800);
});

test('a match called off gives back £126.00 in fourteen refunds', () => {
  expect(sumPence(Array.from({ length: 14 }, () => closed(900)))).toBe(12_600);
});
