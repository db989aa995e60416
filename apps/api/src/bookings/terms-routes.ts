import { LettingTermsView, PutLettingTerms } from '@mereward/shared/bookings/letting-terms';
import { deed, read, type Route } from '../http/route';
import { lettingTerms, putLettingTerms } from './terms';

export const termsRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/letting-terms',
      summary: 'The terms pegs are let by, for everybody',
      signIn: 'open',
      answer: LettingTermsView,
    },
    (ctx, { id }) => lettingTerms(ctx, id('fisheryId')),
  ),
  deed(
    {
      method: 'put',
      path: '/fisheries/:fisheryId/letting-terms',
      summary: 'Set the terms pegs are let by',
      signIn: 'needed',
      body: PutLettingTerms,
      answer: LettingTermsView,
    },
    async (ctx, { id, body }) => {
      await putLettingTerms(ctx, id('fisheryId'), body);
      return lettingTerms(ctx, id('fisheryId'));
    },
  ),
];
