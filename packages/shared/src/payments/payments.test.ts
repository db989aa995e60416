import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { sumPence } from '../money/money';
import { vatLine, vatOfGross } from '../money/vat';
import { balances, postingsFor, type MoneyDeed } from './ledger';
import { onCaptured, paymentFrom, refundablePence, type PaymentEvent } from './payment-state';
import {
  bankReceiptNumber,
  readReceiptNumber,
  receiptFaults,
  receiptFields,
  receiptNumber,
  type Receipt,
} from './receipt';
import { takingsBy, takingsSum, type Taking } from './takings';

const amount = fc.integer({ min: 1, max: 10_000_000 });

describe('where a payment stands', () => {
  const story: PaymentEvent[] = [
    { kind: 'failed', attempt: 1 },
    { kind: 'requires_action', attempt: 2 },
    { kind: 'authorised', attempt: 2 },
    { kind: 'captured', amountPence: 2800 },
  ];

  test('goes step by step', () => {
    const states = story.map((_, index) => paymentFrom(story.slice(0, index + 1)).state);
    expect(states).toEqual(['failed', 'requires_action', 'authorised', 'captured']);
    expect(paymentFrom([]).state).toBe('created');
    expect(paymentFrom([{ kind: 'cancelled' }, { kind: 'authorised', attempt: 1 }]).state).toBe('cancelled');
    expect(paymentFrom([{ kind: 'cancelled' }, { kind: 'captured', amountPence: 1 }]).state).toBe('captured');
  });

  test('is the same in any order and however often an event is told', () => {
    const id = fc.constantFrom('one', 'two', 'three');
    const attempt = fc.integer({ min: 1, max: 3 });
    const event: fc.Arbitrary<PaymentEvent> = fc.oneof(
      fc.record({
        kind: fc.constantFrom('requires_action' as const, 'authorised' as const, 'failed' as const),
        attempt,
      }),
      fc.record({ kind: fc.constant('captured' as const), amountPence: amount }),
      fc.constant({ kind: 'cancelled' as const }),
      fc.record({ kind: fc.constant('refunded' as const), refundId: id, amountPence: amount }),
      fc.record({ kind: fc.constant('refund_failed' as const), refundId: id }),
      fc.record({ kind: fc.constant('dispute_opened' as const), disputeId: id, amountPence: amount }),
      fc.record({ kind: fc.constantFrom('dispute_won' as const, 'dispute_lost' as const), disputeId: id }),
    );
    const told = fc
      .array(event, { maxLength: 12 })
      .chain((events) =>
        fc.tuple(
          fc.constant(events),
          fc.shuffledSubarray(events, { minLength: events.length }),
          fc.shuffledSubarray(events),
        ),
      );
    fc.assert(
      fc.property(told, ([events, shuffled, repeated]) => {
        const payment = paymentFrom(events);
        expect(paymentFrom([...repeated, ...shuffled])).toEqual(payment);
        expect(refundablePence(payment)).toBeGreaterThanOrEqual(0);
      }),
    );
  });

  test('tells what was given back and what was not', () => {
    const taken: PaymentEvent = { kind: 'captured', amountPence: 2800 };
    const part: PaymentEvent = { kind: 'refunded', refundId: 'r1', amountPence: 1600 };
    expect(paymentFrom([taken])).toMatchObject({ refund: 'none', refundedPence: 0 });
    expect(paymentFrom([part, taken, part])).toMatchObject({ refund: 'part', refundedPence: 1600 });
    expect(paymentFrom([taken, part, { ...part, refundId: 'r2', amountPence: 1200 }]).refund).toBe('full');
    const failed = paymentFrom([taken, { kind: 'refund_failed', refundId: 'r1' }, part]);
    expect(failed).toMatchObject({ refund: 'none', refundedPence: 0, failedRefunds: ['r1'] });
    expect(refundablePence(failed)).toBe(2800);
    const disputed = paymentFrom([taken, { kind: 'dispute_opened', disputeId: 'd', amountPence: 2800 }]);
    expect([disputed.disputedPence, refundablePence(disputed)]).toEqual([2800, 0]);
  });

  test('money for a peg that is gone is given back', () => {
    expect([onCaptured('waiting'), onCaptured('ran_out_peg_free'), onCaptured('ran_out_peg_gone')]).toEqual([
      'confirm',
      'confirm',
      'refund_all',
    ]);
  });
});

describe('the ledger', () => {
  const lines = fc.array(
    fc.tuple(amount, fc.constantFrom(0, 500, 2000)).map(([gross, rate]) => vatLine(gross, rate)),
    { minLength: 1, maxLength: 5 },
  );
  const paid = fc.constantFrom(
    'card_online' as const,
    'card_reader' as const,
    'cash' as const,
    'bank_transfer' as const,
    'credit_note' as const,
  );
  const deed: fc.Arbitrary<MoneyDeed> = fc.oneof(
    fc.record({ kind: fc.constantFrom('sale' as const, 'refund' as const), method: paid, lines }),
    fc.record({ kind: fc.constant('credit_note' as const), lines }),
    fc.record({
      kind: fc.constantFrom(
        'card_fee' as const,
        'payout' as const,
        'cash_banked' as const,
        'dispute_opened' as const,
        'dispute_won' as const,
        'dispute_lost' as const,
      ),
      amountPence: amount,
    }),
    fc.record({ kind: fc.constant('cash_counted' as const), expectedPence: amount, countedPence: amount }),
  );

  test('adds up to nought after every deed', () => {
    fc.assert(
      fc.property(fc.array(deed, { maxLength: 20 }), (deeds) => {
        const postings = deeds.map(postingsFor);
        for (const entry of postings) expect(sumPence(entry.map(({ amountPence }) => amountPence))).toBe(0);
        expect(sumPence(Object.values(balances(postings.flat())))).toBe(0);
      }),
    );
  });

  test('a refund of all undoes its sale on every account', () => {
    fc.assert(
      fc.property(paid, lines, (method, sold) => {
        const both = [
          ...postingsFor({ kind: 'sale', method, lines: sold }),
          ...postingsFor({ kind: 'refund', method, lines: sold }),
        ];
        expect(Object.values(balances(both)).every((each) => each === 0)).toBe(true);
      }),
    );
  });

  test('24 hours for £28.00 by card is £23.33 sold and £4.67 of VAT owed', () => {
    const sale = postingsFor({ kind: 'sale', method: 'card_online', lines: [vatLine(2800, 2000)] });
    expect(sale).toEqual([
      { account: 'card_money_coming', amountPence: 2800 },
      { account: 'ticket_sales', amountPence: -2333 },
      { account: 'vat_owed', amountPence: -467 },
    ]);
    expect(postingsFor({ kind: 'sale', method: 'complimentary', lines: [vatLine(0, 2000)] })).toEqual([]);
    expect(() => postingsFor({ kind: 'sale', method: 'complimentary', lines: [vatLine(1, 0)] })).toThrow(
      RangeError,
    );
    expect(() => postingsFor({ kind: 'payout', amountPence: -1 })).toThrow(RangeError);
  });

  test('a tin that is £2.00 short says so', () => {
    const counted = postingsFor({ kind: 'cash_counted', expectedPence: 6600, countedPence: 6400 });
    expect(balances(counted)).toMatchObject({ cash_tin: -200, cash_differences: 200 });
  });

  test('credit given is credit to spend', () => {
    const line = [vatLine(1200, 2000)];
    const given = postingsFor({ kind: 'credit_note', lines: line });
    expect(balances(given)).toMatchObject({ credit_owed: -1200, ticket_sales: 1000, vat_owed: 200 });
    const spent = postingsFor({ kind: 'sale', method: 'credit_note', lines: line });
    expect(Object.values(balances([...given, ...spent])).every((each) => each === 0)).toBe(true);
  });
});

describe('a receipt', () => {
  const seller = {
    legalName: 'Ostlemere Waters Ltd',
    address: 'Vale of Wend',
    vatStatus: 'registered',
    vatNumber: 'GB 000 0000 00',
  } as const;
  const receipt = (gross: number): Receipt => ({
    number: receiptNumber(2027, 418),
    taxPoint: '2027-07-16',
    currency: 'GBP',
    lines: [{ ...vatLine(gross, 2000), words: '24 hours' }],
    buyer: null,
  });

  test('is numbered by year, or from a block on the bank', () => {
    expect(receiptNumber(2027, 418)).toBe('2027-000418');
    expect(bankReceiptNumber(3, 7)).toBe('B3-0007');
    expect(readReceiptNumber('2027-000418')).toEqual({ year: 2027, count: 418 });
    expect(readReceiptNumber(' b3-0007')).toEqual({ block: 3, count: 7 });
    expect(readReceiptNumber('2027-418')).toBeNull();
    expect(() => receiptNumber(2027, 0)).toThrow(RangeError);
    expect(() => receiptNumber(2027, 1_000_000)).toThrow(RangeError);
  });

  test('is a short VAT invoice up to £250', () => {
    expect(receiptFields(seller, receipt(2800))).toEqual([
      { term: 'Receipt', fact: '2027-000418' },
      { term: 'From', fact: 'Ostlemere Waters Ltd' },
      { term: 'Address', fact: 'Vale of Wend' },
      { term: 'VAT number', fact: 'GB 000 0000 00' },
      { term: 'Day of supply', fact: 'Fri 16 July 2027' },
      { term: '24 hours', fact: '£28.00' },
      { term: 'VAT at 20 %', fact: '£4.67 of £28.00' },
      { term: 'Total, VAT included', fact: '£28.00' },
    ]);
    expect(receiptFaults(seller, receipt(25_000))).toEqual([]);
    expect(receiptFields(seller, receipt(25_000)).some(({ term }) => term.startsWith('Net'))).toBe(false);
  });

  test('above that names the buyer and the net', () => {
    expect(receiptFaults(seller, receipt(25_001))).toEqual(['The buyer’s name and address is missing.']);
    const named = { ...receipt(25_001), buyer: { name: 'Sofia Marsh', address: 'Wend' } };
    expect(receiptFaults(seller, named)).toEqual([]);
    expect(receiptFields(seller, named)).toContainEqual({ term: 'Net at 20 %', fact: '£208.34' });
    expect(receiptFields(seller, named)).toContainEqual({ term: 'To', fact: 'Sofia Marsh, Wend' });
  });

  test('says nothing of VAT where none is charged, and refuses to charge it', () => {
    const small = { ...seller, vatStatus: 'not_registered' as const };
    const free = { ...receipt(1200), lines: [{ ...vatLine(1200, 0), words: 'Day' }] };
    expect(receiptFields(small, free).some(({ term }) => term.includes('VAT'))).toBe(false);
    expect(receiptFaults(small, free)).toEqual([]);
    expect(receiptFaults(small, receipt(1200))).toHaveLength(1);
  });
});

describe('takings', () => {
  const taking = (grossPence: number, more: Partial<Taking> = {}): Taking => ({
    day: '2027-07-17',
    lakeId: 'far',
    ticketTypeId: 'day',
    method: 'card_online',
    rateBp: 2000,
    grossPence,
    vatPence: vatOfGross(grossPence, 2000),
    ...more,
  });

  test('are added up by day, kind and method, refunds taken off', () => {
    const list = [taking(1200), taking(-1200, { day: '2027-07-18' }), taking(2800, { method: 'cash' })];
    expect(takingsBy(list, 'day').map(({ key, keptPence }) => [key, keptPence])).toEqual([
      ['2027-07-17', 4000],
      ['2027-07-18', -1200],
    ]);
    expect(takingsSum(list)).toEqual({
      key: '',
      sales: 2,
      soldPence: 4000,
      refundedPence: 1200,
      keptPence: 2800,
      vatPence: 467,
      netPence: 2333,
    });
  });

  test('come to the same however they are grouped', () => {
    const takings = fc.array(
      fc
        .record({
          gross: fc.integer({ min: -5000, max: 5000 }),
          day: fc.constantFrom('2027-07-17', '2027-08-01'),
          lakeId: fc.constantFrom('far', 'pool'),
          method: fc.constantFrom('cash' as const, 'card_online' as const),
        })
        .map(({ gross, ...more }) => taking(gross, more)),
    );
    fc.assert(
      fc.property(
        takings,
        fc.constantFrom('day' as const, 'month' as const, 'lake' as const, 'method' as const),
        (list, by) => {
          const groups = takingsBy(list, by);
          const whole = takingsSum(list);
          expect(sumPence(groups.map(({ keptPence }) => keptPence))).toBe(whole.keptPence);
          expect(sumPence(groups.map(({ refundedPence }) => refundedPence))).toBe(whole.refundedPence);
          expect(whole.netPence + whole.vatPence).toBe(whole.keptPence);
        },
      ),
    );
  });
});
