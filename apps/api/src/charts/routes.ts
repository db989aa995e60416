import {
  ChartList,
  ChartReview,
  ChartView,
  DraftChart,
  PegPageView,
  PutSpot,
  SectionAsked,
  SectionView,
  SpotKept,
  WithdrawChart,
} from '@mereward/shared/charts/contract';
import type { Ctx } from '../ctx';
import { deed, read, type Route } from '../http/route';
import { chartView } from './chart-view';
import { cancelBuild, discardChart, draftChart, rebuildChart } from './draft-chart';
import { pegPage } from './peg-page';
import { approveChart, submitChart, withdrawChart } from './publish-chart';
import { chartReview, listCharts } from './review';
import { pegSection } from './section';
import { putSpot, removeSpot } from './spots';

/** A deed on a chart that is answered with the chart as it then stands before the staff. */
function chartDeed(path: string, summary: string, run: (ctx: Ctx, chartId: string) => Promise<void>): Route {
  return deed(
    { method: 'post', path: `/charts/:chartId/${path}`, summary, signIn: 'needed', answer: ChartReview },
    async (ctx, { id }) => {
      await run(ctx, id('chartId'));
      return chartReview(ctx, id('chartId'));
    },
  );
}

const chartRouteList: Route[] = [
  read(
    {
      method: 'get',
      path: '/lakes/:lakeId/charts',
      summary: 'Charts of a lake',
      signIn: 'open',
      answer: ChartList,
    },
    (ctx, { id }) => listCharts(ctx, id('lakeId')),
  ),
  deed(
    {
      method: 'post',
      path: '/lakes/:lakeId/charts',
      summary: 'Draft a chart and queue its building',
      signIn: 'needed',
      body: DraftChart,
      answer: ChartReview,
      status: 202,
    },
    async (ctx, { id, body }) => chartReview(ctx, await draftChart(ctx, id('lakeId'), body)),
  ),
  read(
    {
      method: 'get',
      path: '/charts/:chartId',
      summary: 'A chart as the reader may see it',
      signIn: 'open',
      answer: ChartView,
    },
    (ctx, { id }) => chartView(ctx, id('chartId')),
  ),
  read(
    {
      method: 'get',
      path: '/charts/:chartId/review',
      summary: 'Checks, quality and what may be done',
      signIn: 'needed',
      answer: ChartReview,
    },
    (ctx, { id }) => chartReview(ctx, id('chartId')),
  ),
  chartDeed('submit', 'Put a draft before those who approve', submitChart),
  chartDeed('approve', 'Publish a submitted chart', approveChart),
  chartDeed('rebuild', 'Build a draft again', rebuildChart),
  chartDeed('cancel-build', 'Stop a build', cancelBuild),
  deed(
    {
      method: 'post',
      path: '/charts/:chartId/withdraw',
      summary: 'Withdraw a published chart',
      signIn: 'needed',
      body: WithdrawChart,
      answer: ChartReview,
    },
    async (ctx, { id, body }) => {
      await withdrawChart(ctx, id('chartId'), body);
      return chartReview(ctx, id('chartId'));
    },
  ),
  deed(
    { method: 'delete', path: '/charts/:chartId', summary: 'Discard a draft', signIn: 'needed' },
    (ctx, { id }) => discardChart(ctx, id('chartId')),
  ),
];

const pegRouteList: Route[] = [
  read(
    {
      method: 'get',
      path: '/pegs/:pegId/page',
      summary: 'A peg before arrival',
      signIn: 'open',
      answer: PegPageView,
    },
    (ctx, { id }) => pegPage(ctx, id('pegId')),
  ),
  read(
    {
      method: 'get',
      path: '/pegs/:pegId/section',
      summary: 'Depth and bottom under a drawn cast',
      signIn: 'open',
      query: SectionAsked,
      answer: SectionView,
    },
    (ctx, { id, query }) => pegSection(ctx, id('pegId'), query),
  ),
  deed(
    {
      method: 'put',
      path: '/pegs/:pegId/spots/:spotId',
      summary: 'Make or change a spot',
      signIn: 'needed',
      body: PutSpot,
      answer: SpotKept,
    },
    (ctx, { id, body }) => putSpot(ctx, { pegId: id('pegId'), spotId: id('spotId') }, body),
  ),
  deed(
    { method: 'delete', path: '/pegs/:pegId/spots/:spotId', summary: 'Take a spot away', signIn: 'needed' },
    (ctx, { id }) => removeSpot(ctx, { pegId: id('pegId'), spotId: id('spotId') }),
  ),
];

export const chartRoutes: Route[] = [...chartRouteList, ...pegRouteList];
