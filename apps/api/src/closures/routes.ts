import { ClosureList, ClosuresAsked, ClosureView } from '@mereward/shared/closures/deeds-contract';
import { read, type Route } from '../http/route';
import { closureList, closureView } from './closure-views';

export const closureRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/closures',
      summary: 'What is closed and will be, and for staff what was',
      signIn: 'open',
      query: ClosuresAsked,
      answer: ClosureList,
    },
    (ctx, { id, query }) => closureList(ctx, id('fisheryId'), query.all === 'yes'),
  ),
  read(
    {
      method: 'get',
      path: '/closures/:closureId',
      summary: 'One closure',
      signIn: 'open',
      answer: ClosureView,
    },
    (ctx, { id }) => closureView(ctx, id('closureId')),
  ),
];
