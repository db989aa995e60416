import {
  ChangeTicketType,
  SaveTicketType,
  TicketTypeList,
  TicketTypeView,
} from '@mereward/shared/tickets/contract';
import { QuoteDraft, QuoteQuery, TicketQuoteAnswer } from '@mereward/shared/tickets/quote-contract';
import { deed, read, type Route } from '../http/route';
import { quote, quoteDraft } from './quote';
import {
  changeTicketType,
  makeTicketType,
  ticketType,
  ticketTypes,
  withdrawTicketType,
} from './ticket-types';

const signIn = 'needed';

export const ticketRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/ticket-types',
      summary: 'What a fishery sells, for everybody',
      signIn: 'open',
      answer: TicketTypeList,
    },
    (ctx, { id }) => ticketTypes(ctx, id('fisheryId')),
  ),
  deed(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/ticket-types',
      summary: 'Make a kind of ticket',
      signIn,
      body: SaveTicketType,
      answer: TicketTypeView,
      status: 201,
    },
    async (ctx, { id, body }) => {
      await makeTicketType(ctx, id('fisheryId'), body);
      return ticketType(ctx, body.id);
    },
  ),
  deed(
    {
      method: 'put',
      path: '/ticket-types/:ticketTypeId',
      summary: 'Change a kind of ticket; what was sold stays as it was',
      signIn,
      body: ChangeTicketType,
      answer: TicketTypeView,
    },
    async (ctx, { id, body }) => {
      await changeTicketType(ctx, id('ticketTypeId'), body);
      return ticketType(ctx, id('ticketTypeId'));
    },
  ),
  deed(
    {
      method: 'delete',
      path: '/ticket-types/:ticketTypeId',
      summary: 'Take a kind of ticket off sale',
      signIn,
    },
    (ctx, { id }) => withdrawTicketType(ctx, id('ticketTypeId')),
  ),
  read(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/ticket-quote',
      summary: 'What a ticket still being written would cost and when it would end',
      signIn,
      body: QuoteDraft,
      answer: TicketQuoteAnswer,
    },
    (ctx, { id, body }) => quoteDraft(ctx, id('fisheryId'), body),
  ),
  read(
    {
      method: 'get',
      path: '/ticket-types/:ticketTypeId/quote',
      summary: 'What a ticket would cost and when it would end',
      signIn: 'open',
      query: QuoteQuery,
      answer: TicketQuoteAnswer,
    },
    (ctx, { id, query }) => quote(ctx, id('ticketTypeId'), query),
  ),
];
