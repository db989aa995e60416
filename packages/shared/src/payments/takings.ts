import { sumPence } from '../money/money';
import type { PaymentMethod } from './payment-state';

/** A sale or a refund as it is counted: a refund’s amounts are below nought. */
export type Taking = {
  day: string; // civil day at the fishery on which it was taken or given back
  lakeId: string;
  ticketTypeId: string;
  method: PaymentMethod;
  rateBp: number;
  grossPence: number;
  vatPence: number;
};

export type TakingsSum = {
  key: string;
  sales: number; // how many
  soldPence: number; // gross
  refundedPence: number; // gross, above nought
  keptPence: number; // gross sold less refunded
  vatPence: number;
  netPence: number;
};

export const TAKINGS_KEYS = {
  day: ({ day }: Taking): string => day,
  month: ({ day }: Taking): string => day.slice(0, 7),
  lake: ({ lakeId }: Taking): string => lakeId,
  ticketType: ({ ticketTypeId }: Taking): string => ticketTypeId,
  method: ({ method }: Taking): string => method,
  vatRate: ({ rateBp }: Taking): string => String(rateBp).padStart(5, '0'),
} as const;

/** Takings added up by day, month, lake, kind of ticket, method or rate of VAT, in the order of the key. Pence. */
export function takingsBy(takings: readonly Taking[], by: keyof typeof TAKINGS_KEYS): TakingsSum[] {
  const groups = new Map<string, Taking[]>();
  for (const taking of takings) {
    const key = TAKINGS_KEYS[by](taking);
    groups.set(key, [...(groups.get(key) ?? []), taking]);
  }
  return [...groups]
    .map(([key, group]) => takingsSum(group, key))
    .sort((a, b) => (a.key < b.key ? -1 : a.key > b.key ? 1 : 0));
}

/** All of the takings added up. */
export function takingsSum(takings: readonly Taking[], key = ''): TakingsSum {
  const sold = takings.filter(({ grossPence }) => grossPence >= 0);
  const soldPence = sumPence(sold.map(({ grossPence }) => grossPence));
  const keptPence = sumPence(takings.map(({ grossPence }) => grossPence));
  const vatPence = sumPence(takings.map((each) => each.vatPence));
  return {
    key,
    sales: sold.length,
    soldPence,
    refundedPence: soldPence - keptPence,
    keptPence,
    vatPence,
    netPence: keptPence - vatPence,
  };
}
