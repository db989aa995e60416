import {
  CastAsked,
  CastReading,
  ChangesAsked,
  ChartChanges,
  ChartFeatures,
  NextCasts,
  SameSpotAsked,
  SameSpotView,
  SimilarPegs,
  StandOutPatches,
} from '@mereward/shared/charts/chart-answers';
import { read, type Route } from '../http/route';
import { castReading } from './cast-reading';
import { changesSince } from './changes';
import { sameSpotFrom } from './same-spot-view';
import { similarPegs } from './similar-pegs';
import { chartFeatures, chartNextCasts, chartPatches } from './tellings';

export const tellingRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/charts/:chartId/features',
      summary: 'Bars, shelves, gullies and holes of a chart',
      signIn: 'open',
      answer: ChartFeatures,
    },
    (ctx, { id }) => chartFeatures(ctx, id('chartId')),
  ),
  read(
    {
      method: 'get',
      path: '/charts/:chartId/patches',
      summary: 'Small areas whose bottom stands out',
      signIn: 'open',
      answer: StandOutPatches,
    },
    (ctx, { id }) => chartPatches(ctx, id('chartId')),
  ),
  read(
    {
      method: 'get',
      path: '/charts/:chartId/next-casts',
      summary: 'Where to cast next, peg by peg',
      signIn: 'needed',
      answer: NextCasts,
    },
    (ctx, { id }) => chartNextCasts(ctx, id('chartId')),
  ),
  read(
    {
      method: 'get',
      path: '/pegs/:pegId/cast-reading',
      summary: 'Depth and bottom where a counted cast lands',
      signIn: 'open',
      query: CastAsked,
      answer: CastReading,
    },
    (ctx, { id, query }) => castReading(ctx, id('pegId'), query),
  ),
  read(
    {
      method: 'get',
      path: '/pegs/:pegId/same-spot',
      summary: 'A spot or place as reached from this peg',
      signIn: 'open',
      query: SameSpotAsked,
      answer: SameSpotView,
    },
    (ctx, { id, query }) => sameSpotFrom(ctx, id('pegId'), query),
  ),
  read(
    {
      method: 'get',
      path: '/charts/:chartId/changes',
      summary: 'What really changed since an earlier version',
      signIn: 'open',
      query: ChangesAsked,
      answer: ChartChanges,
    },
    (ctx, { id, query }) => changesSince(ctx, id('chartId'), query),
  ),
  read(
    {
      method: 'get',
      path: '/pegs/:pegId/similar',
      summary: 'Pegs most like this one',
      signIn: 'open',
      answer: SimilarPegs,
    },
    (ctx, { id }) => similarPegs(ctx, id('pegId')),
  ),
];
