import {
  DisputeList,
  OfficeQueue,
  type AskRefundAgain,
  type DecideRefund,
} from '@mereward/shared/payments/refund-contract';
import { RefundView } from '@mereward/shared/payments/contract';
import {
  LedgerView,
  ReceiptList,
  TakingsView,
  type TakingsKey,
} from '@mereward/shared/payments/takings-contract';
import { keepPreviousData, useMutation, useQuery } from '@tanstack/react-query';
import { api } from '@/lib/api';
import { queryClient } from '@/lib/queries';

/** Days at the fishery, both counted. */
export type Period = { from: string; until: string };

const paymentKeys = {
  all: ['payments'] as const,
  queue: (fisheryId: string) => ['payments', 'queue', fisheryId] as const,
};
const dayRange = ({ from, until }: Period): string => `from=${from}&until=${until}`;
const PRIVATE = { keep: false } as const;

/** What was sold and given back over a period, added up by one key. */
export const useTakings = (fisheryId: string, period: Period, by: TakingsKey) =>
  useQuery({
    queryKey: [...paymentKeys.all, 'takings', fisheryId, period, by],
    queryFn: ({ signal }) =>
      api.get(`/fisheries/${fisheryId}/takings?${dayRange(period)}&by=${by}`, TakingsView, signal),
    placeholderData: keepPreviousData,
    meta: PRIVATE,
  });

export const useReceipts = (fisheryId: string, period: Period) =>
  useQuery({
    queryKey: [...paymentKeys.all, 'receipts', fisheryId, period],
    queryFn: ({ signal }) =>
      api.get(`/fisheries/${fisheryId}/receipts?${dayRange(period)}`, ReceiptList, signal),
    placeholderData: keepPreviousData,
    meta: PRIVATE,
  });

/** What stands on each account now. */
export const useLedger = (fisheryId: string) =>
  useQuery({
    queryKey: [...paymentKeys.all, 'ledger', fisheryId],
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/ledger`, LedgerView, signal),
    meta: PRIVATE,
  });

/** What waits for somebody in the office. */
export const useOfficeQueue = (fisheryId: string) =>
  useQuery({
    queryKey: paymentKeys.queue(fisheryId),
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/office-queue`, OfficeQueue, signal),
    refetchInterval: 60_000,
    meta: PRIVATE,
  });

export const useDisputes = (fisheryId: string) =>
  useQuery({
    queryKey: [...paymentKeys.all, 'disputes', fisheryId],
    queryFn: ({ signal }) => api.get(`/fisheries/${fisheryId}/disputes`, DisputeList, signal),
    meta: PRIVATE,
  });

/** What may be done with a refund that waits. */
export type RefundDeed =
  | { deed: 'decision'; body: DecideRefund }
  | { deed: 'again'; body: AskRefundAgain }
  | { deed: 'given' | 'seen'; body: undefined };

export const useRefundDeed = (refundId: string) =>
  useMutation({
    mutationFn: ({ deed, body }: RefundDeed) => api.post(`/refunds/${refundId}/${deed}`, body, RefundView),
    onSettled: () => {
      void queryClient.invalidateQueries({ queryKey: paymentKeys.all });
      void queryClient.invalidateQueries({ queryKey: ['bookings', 'one'] });
    },
  });
