import { DisputeList } from '@mereward/shared/payments/refund-contract';
import {
  DaysAsked,
  LedgerView,
  ReceiptList,
  TakingsAsked,
  TakingsView,
} from '@mereward/shared/payments/takings-contract';
import { raw, read, type Route } from '../http/route';
import { idIn } from '../http/route-id';
import { reading } from '../http/transaction';
import { disputesOf } from './office-queue';
import { PAPER_POLICY, receiptPaper, receiptsIn } from './receipt-paper';
import { ledgerOf, takings } from './takings-of';

const signIn = 'needed';

export const paymentRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/takings',
      summary: 'What was sold and given back, added up',
      signIn,
      query: TakingsAsked,
      answer: TakingsView,
    },
    (ctx, { id, query }) => takings(ctx, id('fisheryId'), query),
  ),
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/receipts',
      summary: 'Receipts and credit notes of some days',
      signIn,
      query: DaysAsked,
      answer: ReceiptList,
    },
    async (ctx, { id, query }) => ({ receipts: await receiptsIn(ctx, id('fisheryId'), query) }),
  ),
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/ledger',
      summary: 'What stands on each account',
      signIn,
      answer: LedgerView,
    },
    (ctx, { id }) => ledgerOf(ctx, id('fisheryId')),
  ),
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/disputes',
      summary: 'Payments anglers dispute with their bank',
      signIn,
      answer: DisputeList,
    },
    async (ctx, { id }) => ({ disputes: await disputesOf(ctx, id('fisheryId')) }),
  ),
  raw(
    {
      method: 'get',
      path: '/receipts/:receiptId/paper',
      summary: 'A receipt to print',
      signIn,
      answerType: 'text/html',
    },
    async (req, res) => {
      const page = await reading(req, (ctx) => receiptPaper(ctx, idIn(req, 'receiptId')));
      res.set('Content-Security-Policy', PAPER_POLICY).type('html').send(page);
    },
  ),
];
