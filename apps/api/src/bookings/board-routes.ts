import {
  BlockList,
  BlockPegs,
  BlockView,
  BoardAsked,
  BoardView,
  FreeAsked,
  FreePegs,
} from '@mereward/shared/bookings/availability-contract';
import { parse } from '../http/parse';
import { deed, raw, read, type Route } from '../http/route';
import { idIn } from '../http/route-id';
import { serverOf } from '../http/server';
import { reading } from '../http/transaction';
import { fisheryFound } from '../fisheries/found';
import { availability } from './availability';
import { blockOf, blockPegs, blocksOf, unblockPegs } from './blocks';
import { boardText } from './board';
import { boardStreamsOf } from './board-streams';

export const boardRoutes: Route[] = [
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/free',
      summary: 'Which pegs are free for a day, a stay or a kind of ticket',
      signIn: 'open',
      query: FreeAsked,
      answer: FreePegs,
    },
    (ctx, { id, query }) => availability(ctx, id('fisheryId'), query),
  ),
  raw(
    {
      method: 'get',
      path: '/lakes/:lakeId/board',
      summary: 'The pegs of a lake and what takes their time, for up to 31 days',
      signIn: 'open',
      query: BoardAsked,
      answer: BoardView,
    },
    async (req, res) => {
      const asked = parse(BoardAsked, req.query);
      const text = await reading(req, (ctx) => boardText(ctx, idIn(req, 'lakeId'), asked));
      res.type('application/json').send(text);
    },
  ),
  deed(
    {
      method: 'post',
      path: '/fisheries/:fisheryId/blocks',
      summary: 'Keep pegs back for a while, all of them or none',
      signIn: 'needed',
      body: BlockPegs,
      answer: BlockView,
      status: 201,
    },
    async (ctx, { id, body }) => {
      await blockPegs(ctx, id('fisheryId'), body);
      return blockOf(ctx, id('fisheryId'), body.id);
    },
  ),
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/blocks',
      summary: 'Pegs kept back from now on, for staff',
      signIn: 'needed',
      answer: BlockList,
    },
    (ctx, { id }) => blocksOf(ctx, id('fisheryId')),
  ),
  deed(
    {
      method: 'delete',
      path: '/fisheries/:fisheryId/blocks/:blockId',
      summary: 'Give pegs that were kept back to everybody again',
      signIn: 'needed',
    },
    (ctx, { id }) => unblockPegs(ctx, { fisheryId: id('fisheryId'), blockId: id('blockId') }),
  ),
  raw(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/board/events',
      summary: 'A stream that tells which lake’s calendar changed',
      signIn: 'open',
      answerType: 'text/event-stream',
    },
    async (req, res) => {
      const { id } = await reading(req, ({ tx }) => fisheryFound(tx, idIn(req, 'fisheryId')));
      const failed = (err: unknown) => req.log.error({ err }, 'the board’s stream failed');
      boardStreamsOf(serverOf(req), failed).open(req, res, id);
    },
  ),
];
