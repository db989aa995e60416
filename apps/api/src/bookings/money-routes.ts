import { BookingView, PaymentPage, TakeMoney } from '@mereward/shared/bookings/contract';
import { RefundView } from '@mereward/shared/payments/contract';
import {
  AskRefund,
  AskRefundAgain,
  DecideRefund,
  GiveByHand,
  OfficeQueue,
  RefundList,
} from '@mereward/shared/payments/refund-contract';
import { DaysAsked } from '@mereward/shared/payments/takings-contract';
import { Problem } from '@mereward/shared/problems/problem';
import type { Request } from 'express';
import { parse } from '../http/parse';
import { deed, raw, read, type Route } from '../http/route';
import { idIn } from '../http/route-id';
import { serverOf } from '../http/server';
import { inTransaction, reading } from '../http/transaction';
import { heardFrom } from '../payments/heard';
import { providerOf, readMessage, type Provider } from '../payments/provider';
import { bookingView } from './booking-view';
import { bookingsFile } from './bookings-file';
import { askAgain, askForRefund, decideRefund, giveByHand, seeRefund } from './give-back';
import { hear } from './hear';
import { byItself, lookAt } from './look';
import { openPayment, pageOf } from './payment-page';
import { officeQueue } from '../payments/office-queue';
import { takeMoney } from './take-money';
import { termsOf } from './terms';

const signIn = 'needed';

async function providerHere(req: Request): Promise<Provider> {
  const provider = await providerOf(serverOf(req).config);
  if (provider) return provider;
  throw new Problem('not-found', 'No cards are taken here on the web', {
    detail: 'Ask the fishery’s office how to pay.',
  });
}

export const moneyRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/office-queue',
      summary: 'What waits for somebody in the office',
      signIn,
      answer: OfficeQueue,
    },
    async (ctx, { id }) => {
      const fisheryId = id('fisheryId');
      const { officeRefundPence: limitPence } = await termsOf(ctx.tx, fisheryId);
      return officeQueue(ctx, { fisheryId, limitPence });
    },
  ),
  raw(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/bookings.csv',
      summary: 'Bookings of some days, for a spreadsheet',
      signIn,
      query: DaysAsked,
      answerType: 'text/csv',
    },
    async (req, res) => {
      const days = parse(DaysAsked, req.query);
      const text = await reading(req, (ctx) => bookingsFile(ctx, idIn(req, 'fisheryId'), days));
      res.attachment(`bookings-${days.from}-to-${days.until}.csv`).type('text/csv').send(text);
    },
  ),
  raw(
    {
      method: 'post',
      path: '/bookings/:bookingId/page',
      summary: 'Open the card provider’s page to pay on',
      signIn,
      answer: PaymentPage,
    },
    async (req, res) => {
      const payment = await inTransaction(req, (ctx) => openPayment(ctx, idIn(req, 'bookingId')));
      res.json({ url: await pageOf(serverOf(req), await providerHere(req), payment) });
    },
  ),
  raw(
    {
      method: 'post',
      path: '/bookings/:bookingId/look',
      summary: 'Ask the card provider how the payment stands',
      signIn,
      answer: BookingView,
    },
    async (req, res) => {
      const bookingId = idIn(req, 'bookingId');
      await reading(req, (ctx) => bookingView(ctx, bookingId)); // refuses whom it is not for
      const provider = await providerOf(serverOf(req).config);
      if (provider) await lookAt(serverOf(req), provider, bookingId);
      res.json(await reading(req, (ctx) => bookingView(ctx, bookingId)));
    },
  ),
  raw(
    {
      method: 'post',
      path: '/payments/webhook',
      summary: 'Where the card provider says what happened, signed',
      signIn: 'open',
    },
    async (req, res) => {
      const provider = await providerHere(req);
      const body: unknown = req.body;
      const message = Buffer.isBuffer(body)
        ? readMessage(provider, { body, signature: req.get('stripe-signature') ?? '' })
        : null;
      if (!message)
        throw new Problem('invalid', 'This message is not signed as the card provider signs', {
          detail: 'Nothing was done. See that the signing secret of the endpoint is the one set here.',
        });
      const heard = heardFrom(message);
      if (heard) await byItself(serverOf(req), (ctx) => hear(ctx, heard));
      res.status(204).end();
    },
  ),
  deed(
    {
      method: 'post',
      path: '/bookings/:bookingId/taken',
      summary: 'Take money at the lodge',
      signIn,
      body: TakeMoney,
      answer: BookingView,
      status: 201,
    },
    async (ctx, { id, body }) => {
      await takeMoney(ctx, id('bookingId'), body);
      return bookingView(ctx, id('bookingId'));
    },
  ),
  deed(
    {
      method: 'post',
      path: '/bookings/:bookingId/refunds',
      summary: 'Give money back, or ask that it be given',
      signIn,
      body: AskRefund,
      answer: RefundList,
      status: 201,
    },
    async (ctx, { id, body }) => ({ refunds: await askForRefund(ctx, id('bookingId'), body) }),
  ),
  deed(
    {
      method: 'post',
      path: '/refunds/:refundId/decision',
      summary: 'Give or decline a refund somebody else proposed',
      signIn,
      body: DecideRefund,
      answer: RefundView,
    },
    (ctx, { id, body }) => decideRefund(ctx, id('refundId'), body),
  ),
  deed(
    {
      method: 'post',
      path: '/refunds/:refundId/again',
      summary: 'Ask for a failed refund once more, or give it by hand',
      signIn,
      body: AskRefundAgain,
      answer: RefundView,
    },
    (ctx, { id, body }) => askAgain(ctx, id('refundId'), body),
  ),
  deed(
    {
      method: 'post',
      path: '/refunds/:refundId/given',
      summary: 'Say that a refund was handed over',
      signIn,
      body: GiveByHand,
      answer: RefundView,
    },
    (ctx, { id, body }) => giveByHand(ctx, id('refundId'), body),
  ),
  deed(
    {
      method: 'post',
      path: '/refunds/:refundId/seen',
      summary: 'Note a payment that came too late',
      signIn,
      answer: RefundView,
    },
    (ctx, { id }) => seeRefund(ctx, id('refundId')),
  ),
];
