import { Peg } from '@mereward/db/entities/lakes/peg';
import type { PegPageView } from '@mereward/shared/charts/contract';
import { PEG_CODE_LENGTH, PEG_CODE_LETTERS, readPegCode } from '@mereward/shared/lakes/peg-code';
import compression from 'compression';
import { Router, type Request, type Response } from 'express';
import { createHash } from 'node:crypto';
import type { Ctx } from '../../ctx';
import { ctxOf } from '../../http/ctx-of';
import { limitPages } from '../../http/limits';
import { markup } from '../../http/markup';
import { answering } from '../../http/problem';
import { serverOf } from '../../http/server';
import { lightDocument, type LightDocument } from './light-frame';
import { lightPeg } from './light-peg';
import { lightWish, type LightWish } from './light-wish';
import { pegPage } from '../peg-page';

/**
 * The pages behind the codes on peg cards, `/p/K7M3XD`: written here, without a script, and for everybody alike: what a
 * stranger may not see isn't on them, whoever asks.
 */
export function lightPages(): Router {
  return Router({ strict: false })
    .use(limitPages(), compression())
    .get('/', (req, res) => {
      const typed = typeof req.query['code'] === 'string' ? req.query['code'].slice(0, 40) : '';
      const code = readPegCode(typed);
      if (code) res.redirect(303, `/p/${code}`);
      else send(res, typed === '' ? 200 : 404, askPage(typed));
    })
    .get('/:code', async (req, res) => {
      const code = readPegCode(req.params.code);
      const ctx = strangersCtx(req);
      const peg = code && (await ctx.tx.findOne(Peg, { select: { id: true }, where: { code } }));
      if (!peg) return send(res, 404, askPage(req.params.code));
      res.set('Cache-Control', 'public, max-age=60');
      send(res, 200, drawnLately(await pegPage(ctx, peg.id), lightWish(req.query)));
    })
    .use(answerInWords);
}

/** Pages drawn lately, by all that they are drawn from; the drawing costs as much as everything before it. */
const lately = new Map<string, LightDocument>();
const MOST_KEPT = 200; // at some forty kilobytes each

function drawnLately(page: PegPageView, wish: LightWish): LightDocument {
  const key = createHash('sha256')
    .update(JSON.stringify([page, wish]))
    .digest('base64');
  const drawn = lately.get(key) ?? lightPeg(page, wish);
  lately.delete(key); // set again as the newest of all
  lately.set(key, drawn);
  for (const oldest of lately.keys()) if (lately.size > MOST_KEPT) lately.delete(oldest);
  return drawn;
}

function strangersCtx(req: Request): Ctx {
  const server = serverOf(req);
  return ctxOf(server, server.source.manager);
}

function send(res: Response, status: number, { text, policy }: LightDocument): void {
  res.status(status).set('Content-Security-Policy', policy).type('html').send(text);
}

/** A code that is no peg's, or none at all: what codes look like, a place to type one, and the way on. */
function askPage(typed: string): LightDocument {
  const title = typed === '' ? 'Find a peg by its code' : 'No peg has this code';
  return lightDocument({
    title,
    over: 'Mereward',
    body: markup`<h1>${title}</h1>
${typed !== '' && markup`<p>Nothing is kept under “${typed.slice(0, 40)}”. A slip in it is likely, or the card is of a peg that is gone.</p>`}
<p>A peg’s code stands on its card beside the square pattern: ${PEG_CODE_LENGTH} letters and figures out of ${[...PEG_CODE_LETTERS].join(' ')}. Small letters do as well.</p>
<form method="get" action="/p"><label for="code">Code on the card</label>
<input id="code" name="code" autocomplete="off" autocapitalize="characters" maxlength="12"><button>Find the peg</button></form>
<p><a class="go" href="/water">All fisheries and their pegs</a></p>`,
  });
}

/** A failure as a page of the same kind, for a reader who followed a card's code. */
const answerInWords = answering((problem, _req, res) => {
  res.set('Cache-Control', 'no-store');
  send(
    res,
    problem.status,
    lightDocument({
      title: problem.title,
      over: 'Mereward',
      body: markup`<h1>${problem.title}</h1>
${problem.detail !== undefined && markup`<p>${problem.detail}</p>`}
<p><a class="go" href="">Try again</a></p>`,
    }),
  );
});
