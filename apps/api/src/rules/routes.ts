import {
  AcknowledgeRules,
  DraftAnswer,
  PublishDraft,
  PutDraft,
  ReadersView,
  RulesToReadView,
  RulesView,
  SheetList,
  SheetView,
  WitnessReading,
} from '@mereward/shared/rules/sheet-contract';
import type { Request } from 'express';
import { deed, read, type Route } from '../http/route';
import { acknowledgeRules, witnessReading } from './acknowledge';
import { rulesToRead } from './booking-read';
import { draftAnswer, dropDraft, putDraft } from './draft';
import { publishDraft } from './publish';
import { readersView } from './readers';
import { publishedSheet, rulesView, sheetList } from './sheets';

const signIn = 'needed';
const LONGEST_DEVICE = 200;

/** What the device calls itself, for a dispute: the browser's own name, cut short. */
const deviceOf = (req: Request): string => (req.get('user-agent') ?? '').slice(0, LONGEST_DEVICE);

export const ruleRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/rules',
      summary: 'The rules in force, with what changed since the reader read them',
      signIn: 'open',
      answer: RulesView,
    },
    (ctx, { id }) => rulesView(ctx, id('fisheryId')),
  ),
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/rules/versions',
      summary: 'Every version of the rules, the newest first',
      signIn,
      answer: SheetList,
    },
    (ctx, { id }) => sheetList(ctx, id('fisheryId')),
  ),
  read(
    {
      method: 'get',
      path: '/rule-sheets/:sheetId',
      summary: 'One version of the rules',
      signIn: 'open',
      answer: SheetView,
    },
    (ctx, { id }) => publishedSheet(ctx, id('sheetId')),
  ),
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/rules/draft',
      summary: 'The draft of the rules, with what it would change',
      signIn,
      answer: DraftAnswer,
    },
    (ctx, { id }) => draftAnswer(ctx, id('fisheryId')),
  ),
  deed(
    {
      method: 'put',
      path: '/fisheries/:fisheryId/rules/draft',
      summary: 'Begin or change the draft of the rules',
      signIn,
      body: PutDraft,
      answer: DraftAnswer,
    },
    async (ctx, { id, body }) => {
      await putDraft(ctx, id('fisheryId'), body);
      return draftAnswer(ctx, id('fisheryId'));
    },
  ),
  deed(
    {
      method: 'delete',
      path: '/fisheries/:fisheryId/rules/draft',
      summary: 'Throw the draft of the rules away',
      signIn,
    },
    (ctx, { id }) => dropDraft(ctx, id('fisheryId')),
  ),
  deed(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/rules/publish',
      summary: 'Put the draft of the rules in force',
      signIn,
      body: PublishDraft,
      answer: RulesView,
    },
    async (ctx, { id, body }) => {
      await publishDraft(ctx, id('fisheryId'), body);
      return rulesView(ctx, id('fisheryId'));
    },
  ),
  deed(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/rules/acknowledge',
      summary: 'Say that one has read the rules in force',
      signIn,
      body: AcknowledgeRules,
      answer: RulesView,
    },
    async (ctx, { id, body, req }) => {
      await acknowledgeRules(ctx, id('fisheryId'), { ...body, device: deviceOf(req) });
      return rulesView(ctx, id('fisheryId'));
    },
  ),
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/rules/readers',
      summary: 'Who of those still to come has read the rules, for staff',
      signIn,
      answer: ReadersView,
    },
    (ctx, { id }) => readersView(ctx, id('fisheryId')),
  ),
  read(
    {
      method: 'get',
      path: '/bookings/:bookingId/rules',
      summary: 'What is to be read for a booking, or was',
      signIn,
      answer: RulesToReadView,
    },
    (ctx, { id }) => rulesToRead(ctx, id('bookingId')),
  ),
  deed(
    {
      method: 'post',
      path: '/bookings/:bookingId/rules/witnessed',
      summary: 'Keep that the rules were read out, or signed on paper, before a witness',
      signIn,
      body: WitnessReading,
      answer: RulesToReadView,
    },
    async (ctx, { id, body, req }) => {
      await witnessReading(ctx, id('bookingId'), { ...body, device: deviceOf(req) });
      return rulesToRead(ctx, id('bookingId'));
    },
  ),
];
