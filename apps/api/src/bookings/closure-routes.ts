import { ChoiceView, Choose } from '@mereward/shared/bookings/choosing-contract';
import {
  ClosurePreview,
  ClosureView,
  CloseWater,
  LiftClosure,
  PreviewClosure,
} from '@mereward/shared/closures/deeds-contract';
import type { Request } from 'express';
import { closureView } from '../closures/closure-views';
import { limitWrongTries } from '../http/limits';
import { deed, read, type Route } from '../http/route';
import { closeWater, previewClosure } from './close-water';
import { choiceView } from './closure-choices';
import { choose } from './choose';
import { liftWater } from './lift-water';

const signIn = 'needed';
const tokenOf = (req: Request): string => String(req.params.token);

/** Closing and lifting with all that hangs on it, and the page for those it hits. */
export const closureDeedRoutes: Route[] = [
  deed(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/closures',
      summary: 'Close water, and put every booking in the way to its choice',
      signIn,
      body: CloseWater,
      answer: ClosureView,
      status: 201,
    },
    async (ctx, { id, body }) => {
      await closeWater(ctx, id('fisheryId'), body);
      return closureView(ctx, body.id);
    },
  ),
  deed(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/closures/preview',
      summary: 'What a closure would hit',
      signIn,
      body: PreviewClosure,
      answer: ClosurePreview,
    },
    (ctx, { id, body }) => previewClosure(ctx, id('fisheryId'), body),
  ),
  deed(
    {
      method: 'post',
      path: '/closures/:closureId/lift',
      summary: 'Lift a closure',
      signIn,
      body: LiftClosure,
      answer: ClosureView,
    },
    async (ctx, { id, body }) => {
      await liftWater(ctx, id('closureId'), body);
      return closureView(ctx, id('closureId'));
    },
  ),
  read(
    {
      method: 'get',
      path: '/choices/:token',
      summary: 'What becomes of a booking that a closure lies over, for whoever holds the letter',
      signIn: 'open',
      answer: ChoiceView,
      guards: [limitWrongTries],
    },
    (ctx, { req }) => choiceView(ctx, tokenOf(req)),
  ),
  deed(
    {
      method: 'post',
      path: '/choices/:token',
      summary: 'Choose what becomes of such a booking',
      signIn: 'open',
      body: Choose,
      answer: ChoiceView,
      guards: [limitWrongTries],
    },
    async (ctx, { req, body }) => {
      await choose(ctx, tokenOf(req), body);
      return choiceView(ctx, tokenOf(req));
    },
  ),
];
