import {
  BottomEvents,
  BottomEventView,
  RecordBottomEvent,
} from '@mereward/shared/surveys/bottom-event-contract';
import {
  AcceptLearning,
  BottomLearning,
  BottomTableThen,
  BottomTableView,
  KeepBottomTable,
} from '@mereward/shared/surveys/bottom-table-contract';
import {
  ConfirmBottom,
  ConfirmedBottoms,
  ConfirmedBottomView,
} from '@mereward/shared/surveys/confirmed-contract';
import { CalibrateLead, LeadList, LeadView } from '@mereward/shared/surveys/lead-contract';
import { deed, read, type Route } from '../http/route';
import { listBottomEvents, recordBottomEvent, takeBackEvent } from './bottom-events';
import { acceptLearning, readLearning } from './bottom-learning';
import { keepBottomTable, readBottomTable, readBottomTableThen } from './bottom-tables';
import { confirmBottom, listConfirmed, takeBackConfirmed } from './confirmed-bottoms';
import { keepLead, listLeads, putLeadAway } from './leads';

const signIn = 'needed';
const TABLE = '/fisheries/:fisheryId/bottom-table';

/** What a fishery knows of its bottoms beside its casts: the table of feels, confirmations, events, leads. */
export const bottomRoutes: Route[] = [
  read(
    { method: 'get', path: TABLE, summary: 'The table of feels in force', signIn, answer: BottomTableView },
    (ctx, { id }) => readBottomTable(ctx, id('fisheryId')),
  ),
  deed(
    {
      method: 'post',
      path: TABLE,
      summary: 'Put a new version of the table in force',
      signIn,
      body: KeepBottomTable,
      answer: BottomTableView,
      status: 201,
    },
    (ctx, { id, body }) => keepBottomTable(ctx, id('fisheryId'), body),
  ),
  read(
    {
      method: 'get',
      path: `${TABLE}/learning`,
      summary: 'What confirmed bottoms would make of the table',
      signIn,
      answer: BottomLearning,
    },
    (ctx, { id }) => readLearning(ctx, id('fisheryId')),
  ),
  deed(
    {
      method: 'post',
      path: `${TABLE}/learning`,
      summary: 'Take the learnt table up as a new version',
      signIn,
      body: AcceptLearning,
      answer: BottomTableView,
      status: 201,
    },
    (ctx, { id, body }) => acceptLearning(ctx, id('fisheryId'), body),
  ),
  read(
    {
      method: 'get',
      path: `${TABLE}/:version`,
      summary: 'One version of the table',
      signIn,
      answer: BottomTableThen,
    },
    (ctx, { id, req }) => readBottomTableThen(ctx, id('fisheryId'), String(req.params['version'])),
  ),
  read(
    {
      method: 'get',
      path: '/lakes/:lakeId/confirmed-bottoms',
      summary: 'Confirmed bottoms of a lake',
      signIn,
      answer: ConfirmedBottoms,
    },
    (ctx, { id }) => listConfirmed(ctx, id('lakeId')),
  ),
  deed(
    {
      method: 'post',
      path: '/lakes/:lakeId/confirmed-bottoms',
      summary: 'Keep a bottom that was made certain of',
      signIn,
      body: ConfirmBottom,
      answer: ConfirmedBottomView,
      status: 201,
    },
    (ctx, { id, body }) => confirmBottom(ctx, id('lakeId'), body),
  ),
  deed(
    {
      method: 'delete',
      path: '/confirmed-bottoms/:confirmedId',
      summary: 'Take a confirmed bottom back',
      signIn,
    },
    (ctx, { id }) => takeBackConfirmed(ctx, id('confirmedId')),
  ),
  read(
    {
      method: 'get',
      path: '/lakes/:lakeId/bottom-events',
      summary: 'What happened to a lake’s bottom',
      signIn,
      answer: BottomEvents,
    },
    (ctx, { id }) => listBottomEvents(ctx, id('lakeId')),
  ),
  deed(
    {
      method: 'post',
      path: '/lakes/:lakeId/bottom-events',
      summary: 'Record works or a season that ends old evidence',
      signIn,
      body: RecordBottomEvent,
      answer: BottomEventView,
      status: 201,
    },
    (ctx, { id, body }) => recordBottomEvent(ctx, id('lakeId'), body),
  ),
  deed(
    { method: 'delete', path: '/bottom-events/:eventId', summary: 'Take an event back', signIn },
    (ctx, { id }) => takeBackEvent(ctx, id('eventId')),
  ),
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/leads',
      summary: 'Leads and their rates of fall',
      signIn,
      answer: LeadList,
    },
    (ctx, { id }) => listLeads(ctx, id('fisheryId')),
  ),
  deed(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/leads',
      summary: 'Calibrate a lead by falls of known depth',
      signIn,
      body: CalibrateLead,
      answer: LeadView,
      status: 201,
    },
    (ctx, { id, body }) => keepLead(ctx, id('fisheryId'), body),
  ),
  deed(
    { method: 'post', path: '/leads/:leadId/put-away', summary: 'Take a lead out of the choice', signIn },
    (ctx, { id }) => putLeadAway(ctx, id('leadId')),
  ),
];
