import {
  ChangeLake,
  ChangePeg,
  LakeView,
  LevelRecorded,
  MakeLake,
  MakePeg,
  OrderPegs,
  OutlineRead,
  PegList,
  PegView,
  PutBoard,
  PutMark,
  ReadOutline,
  RecordLevel,
} from '@mereward/shared/lakes/contract';
import { accountOf } from '../ctx';
import { deed, read, type Route } from '../http/route';
import { putBoard } from './boards';
import { recordLevel, takeBackReading } from './levels';
import { changeLake, makeLake } from './make-lake';
import { putMark } from './marks';
import { readOutline } from './outlines';
import { changePeg, makePeg, orderPegs } from './pegs';
import { lakeView, pegView, pegViews } from './queries';

const signIn = 'needed';

export const lakeRoutes: Route[] = [
  deed(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/lakes',
      summary: 'Make a lake',
      signIn,
      body: MakeLake,
      answer: LakeView,
      status: 201,
    },
    async (ctx, { id, body }) => {
      await makeLake(ctx, id('fisheryId'), body);
      return lakeView(ctx, body.id);
    },
  ),
  read(
    {
      method: 'get',
      path: '/lakes/:lakeId',
      summary: 'A lake, its pegs in walking order, marks and boards',
      signIn: 'open',
      answer: LakeView,
    },
    (ctx, { id }) => lakeView(ctx, id('lakeId')),
  ),
  deed(
    {
      method: 'put',
      path: '/lakes/:lakeId',
      summary: 'Change a lake',
      signIn,
      body: ChangeLake,
      answer: LakeView,
    },
    async (ctx, { id, body }) => {
      await changeLake(ctx, id('lakeId'), body);
      return lakeView(ctx, id('lakeId'));
    },
  ),
  read(
    {
      method: 'get',
      path: '/lakes/:lakeId/pegs',
      summary: 'Every peg of a lake in full, in walking order',
      signIn: 'open',
      answer: PegList,
    },
    (ctx, { id }) => pegViews(ctx, id('lakeId')),
  ),
  deed(
    {
      method: 'post',
      path: '/lakes/:lakeId/pegs',
      summary: 'Make a peg',
      signIn,
      body: MakePeg,
      answer: PegView,
      status: 201,
    },
    async (ctx, { id, body }) => {
      await makePeg(ctx, id('lakeId'), body);
      return pegView(ctx, body.id);
    },
  ),
  deed(
    {
      method: 'put',
      path: '/lakes/:lakeId/peg-order',
      summary: 'Set the order in which the pegs are walked',
      signIn,
      body: OrderPegs,
      answer: LakeView,
    },
    async (ctx, { id, body }) => {
      await orderPegs(ctx, id('lakeId'), body);
      return lakeView(ctx, id('lakeId'));
    },
  ),
  read(
    { method: 'get', path: '/pegs/:pegId/details', summary: 'A peg', signIn: 'open', answer: PegView },
    (ctx, { id }) => pegView(ctx, id('pegId')),
  ),
  deed(
    {
      method: 'put',
      path: '/pegs/:pegId',
      summary: 'Change a peg',
      signIn,
      body: ChangePeg,
      answer: PegView,
    },
    async (ctx, { id, body }) => {
      await changePeg(ctx, id('pegId'), body);
      return pegView(ctx, id('pegId'));
    },
  ),
  deed(
    {
      method: 'put',
      path: '/lakes/:lakeId/marks/:markId',
      summary: 'Make or change a far-bank mark',
      signIn,
      body: PutMark,
      answer: LakeView,
    },
    async (ctx, { id, body }) => {
      await putMark(ctx, { lakeId: id('lakeId'), markId: id('markId') }, body);
      return lakeView(ctx, id('lakeId'));
    },
  ),
  deed(
    {
      method: 'put',
      path: '/lakes/:lakeId/boards/:boardId',
      summary: 'Make or change a gauge board',
      signIn,
      body: PutBoard,
      answer: LakeView,
    },
    async (ctx, { id, body }) => {
      await putBoard(ctx, { lakeId: id('lakeId'), boardId: id('boardId') }, body);
      return lakeView(ctx, id('lakeId'));
    },
  ),
  deed(
    {
      method: 'post',
      path: '/boards/:boardId/readings',
      summary: 'Record a level',
      signIn,
      body: RecordLevel,
      answer: LevelRecorded,
      status: 201,
    },
    (ctx, { id, body }) => recordLevel(ctx, id('boardId'), body),
  ),
  deed(
    { method: 'delete', path: '/readings/:readingId', summary: 'Take a misread level back', signIn },
    (ctx, { id }) => takeBackReading(ctx, id('readingId')),
  ),
  read(
    {
      method: 'post',
      path: '/outlines/read',
      summary: 'Read an outline from the text of a GeoJSON or GPX file',
      signIn,
      body: ReadOutline,
      answer: OutlineRead,
    },
    async ({ actor }, { body }) => {
      accountOf(actor);
      return readOutline(body);
    },
  ),
];
