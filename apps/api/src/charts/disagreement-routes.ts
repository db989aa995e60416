import {
  DecideDisagreement,
  Disagree,
  DisagreementForReview,
  DisagreementList,
  DisagreementReviewList,
  DisagreementView,
  TakeBackDisagreement,
} from '@mereward/shared/charts/disagreement';
import { limitReports } from '../http/limits';
import { deed, read, type Route } from '../http/route';
import { decideDisagreement } from './decide-disagreement';
import { disagree } from './disagree';
import { takeBackDisagreement } from './take-back-disagreement';
import { disagreementForReview, disagreementsOfLake, myDisagreement, myDisagreements } from './disagreements';

const signIn = 'needed';

export const disagreementRoutes: Route[] = [
  deed(
    {
      method: 'post',
      path: '/pegs/:pegId/disagreements',
      summary: 'Tell that the water is not as charted',
      signIn,
      body: Disagree,
      answer: DisagreementView,
      status: 201,
      guards: [limitReports],
    },
    async (ctx, { id, body }) => {
      await disagree(ctx, id('pegId'), body);
      return myDisagreement(ctx, body.id);
    },
  ),
  read(
    {
      method: 'get',
      path: '/disagreements/mine',
      summary: 'What the reader told of, and what became of it',
      signIn,
      answer: DisagreementList,
    },
    (ctx) => myDisagreements(ctx),
  ),
  read(
    {
      method: 'get',
      path: '/lakes/:lakeId/disagreements',
      summary: 'Reports of a lake beside the soundings they doubt',
      signIn,
      answer: DisagreementReviewList,
    },
    (ctx, { id }) => disagreementsOfLake(ctx, id('lakeId')),
  ),
  deed(
    {
      method: 'post',
      path: '/disagreements/:disagreementId/decide',
      summary: 'Accept or decline a report',
      signIn,
      body: DecideDisagreement,
      answer: DisagreementForReview,
    },
    async (ctx, { id, body }) => {
      await decideDisagreement(ctx, id('disagreementId'), body);
      return disagreementForReview(ctx, id('disagreementId'));
    },
  ),
  deed(
    {
      method: 'post',
      path: '/disagreements/:disagreementId/take-back',
      summary: 'Take back that a report was accepted',
      signIn,
      body: TakeBackDisagreement,
      answer: DisagreementForReview,
    },
    async (ctx, { id, body }) => {
      await takeBackDisagreement(ctx, id('disagreementId'), body);
      return disagreementForReview(ctx, id('disagreementId'));
    },
  ),
];
