import { ChartReview } from '@mereward/shared/charts/contract';
import { ChartCastList, LeaveOut } from '@mereward/shared/charts/left-out-contract';
import { deed, read, type Route } from '../http/route';
import { chartCastList } from './chart-cast-list';
import { leaveOut, putBack } from './leave-out';
import { chartReview } from './review';

const signIn = 'needed';

export const leftOutRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/charts/:chartId/casts',
      summary: 'Every cast of a chart’s visits, and how it stands in the chart',
      signIn,
      answer: ChartCastList,
    },
    (ctx, { id }) => chartCastList(ctx, id('chartId')),
  ),
  deed(
    {
      method: 'post',
      path: '/charts/:chartId/left-out',
      summary: 'Leave a cast, or a part of a log, out of a draft',
      signIn,
      body: LeaveOut,
      answer: ChartReview,
    },
    async (ctx, { id, body }) => {
      await leaveOut(ctx, id('chartId'), body);
      return chartReview(ctx, id('chartId'));
    },
  ),
  deed(
    {
      method: 'post',
      path: '/charts/:chartId/left-out/:leftOutId/put-back',
      summary: 'Take in again what was left out of a draft',
      signIn,
      answer: ChartReview,
    },
    async (ctx, { id }) => {
      await putBack(ctx, id('chartId'), id('leftOutId'));
      return chartReview(ctx, id('chartId'));
    },
  ),
];
