import { SheetPaperAsked } from '@mereward/shared/rules/sheet-contract';
import type { Response } from 'express';
import { limitDrawings } from '../http/limits';
import { parse } from '../http/parse';
import { idIn } from '../http/route-id';
import { raw, type Route } from '../http/route';
import { reading } from '../http/transaction';
import { drawRulesPaper } from './draw-rules-paper';
import { proofToPrint, sheetToPrint, type ReadyPaper } from './proof';

const guards = [limitDrawings];

async function send(res: Response, { filename, paper }: ReadyPaper): Promise<void> {
  const pdf = await drawRulesPaper(paper);
  res.setHeader('content-disposition', `inline; filename="${filename}"`);
  res.type('application/pdf').setHeader('cache-control', 'private, no-store').send(pdf);
}

/** The rules on paper: to hang up, to sign, and what somebody accepted. */
export const rulePaperRoutes: Route[] = [
  raw(
    {
      method: 'get',
      path: '/rule-sheets/:sheetId/sheet.pdf',
      summary: 'A version of the rules to print, in large print if asked',
      signIn: 'open',
      query: SheetPaperAsked,
      answerType: 'application/pdf',
      guards,
    },
    async (req, res) => {
      const { print } = parse(SheetPaperAsked, req.query);
      await send(
        res,
        await reading(req, (ctx) => sheetToPrint(ctx, idIn(req, 'sheetId'), print === 'large')),
      );
    },
  ),
  raw(
    {
      method: 'get',
      path: '/rule-readings/:readingId/proof.pdf',
      summary: 'What somebody accepted and when, word for word',
      signIn: 'needed',
      answerType: 'application/pdf',
      guards,
    },
    async (req, res) => send(res, await reading(req, (ctx) => proofToPrint(ctx, idIn(req, 'readingId')))),
  ),
];
