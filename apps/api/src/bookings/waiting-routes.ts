import { JoinWaiting, WaitingList, WaitingView } from '@mereward/shared/bookings/waiting-contract';
import { deed, read, type Route } from '../http/route';
import { joinWaiting, leaveWaiting, myWaiting, passOffer, waitingView } from './waiting';

const signIn = 'needed';

export const waitingRoutes: Route[] = [
  deed(
    {
      method: 'post',
      path: '/lakes/:lakeId/waiting',
      summary: 'Join the line for a day on which nothing is free',
      signIn,
      body: JoinWaiting,
      answer: WaitingView,
      status: 201,
    },
    async (ctx, { id, body }) => {
      await joinWaiting(ctx, id('lakeId'), body);
      return waitingView(ctx, body.id);
    },
  ),
  read(
    { method: 'get', path: '/waiting/mine', summary: 'The lines one stands in', signIn, answer: WaitingList },
    (ctx) => myWaiting(ctx),
  ),
  deed({ method: 'delete', path: '/waiting/:waitingId', summary: 'Leave a line', signIn }, (ctx, { id }) =>
    leaveWaiting(ctx, id('waitingId')),
  ),
  deed(
    {
      method: 'post',
      path: '/waiting/:waitingId/pass',
      summary: 'Let an offer go by and keep the place in the line',
      signIn,
    },
    (ctx, { id }) => passOffer(ctx, id('waitingId')),
  ),
];
