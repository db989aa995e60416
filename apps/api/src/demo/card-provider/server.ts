import express, { type Express, type RequestHandler, type Response } from 'express';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { setTimeout as pause } from 'node:timers/promises';
import { z } from 'zod';
import { declinedWords } from '../../payments/declined-words';
import * as deeds from './deeds';
import { NO_FAULTS, openDeliveries, type Faults } from './deliveries';
import { openKept, type Kept, type Session } from './kept';
import { bankPage, closedPage, noSuchPage, payPage, policyFor } from './pages';

type Wishes = {
  key: string;
  webhookSecret: string;
  /** Where messages go; null: nowhere yet. */
  webhookUrl: string | null;
  file: string | null;
  port?: number;
  host?: string;
  /** The address the pages are reached by; loopback where it isn't told. */
  publicUrl?: string;
};

export type CardProvider = {
  url: string;
  faults: Faults;
  kept: Kept;
  ground: deeds.Ground;
  sendTo: (webhookUrl: string | null) => void;
  close: () => Promise<void>;
};

const FaultWish = z.strictObject({
  slowMs: z.int().min(0).max(60_000).optional(),
  failing: z.int().min(0).max(1000).optional(),
  failingAfter: z.int().min(0).max(1000).optional(),
  loseMessages: z.boolean().optional(),
  duplicate: z.int().min(0).max(20).optional(),
  reorder: z.boolean().optional(),
  refundsFail: z.boolean().optional(),
});

/**
 * A card provider that takes no card: it speaks Stripe's API as far as this program asks, shows a page to pay on, and
 * sends signed messages until they are heard. What goes wrong with a real one can be switched on at /control.
 */
export async function openCardProvider(wishes: Wishes): Promise<CardProvider> {
  const { kept, save } = openKept(wishes.file);
  const faults: Faults = { ...NO_FAULTS };
  let webhookUrl = wishes.webhookUrl;
  let url = '';
  const deliveries = openDeliveries({
    kept,
    save,
    faults,
    secret: wishes.webhookSecret,
    to: () => webhookUrl,
  });
  const ground: deeds.Ground = {
    kept,
    save,
    deliver: deliveries.deliver,
    nowS: () => Math.floor(Date.now() / 1000),
    address: () => url,
    refundsFail: () => faults.refundsFail,
  };
  const http = createServer(appOf(ground, faults, wishes.key));
  const host = wishes.host ?? '127.0.0.1';
  await new Promise<void>((listening, failed) => {
    http.once('error', failed);
    http.listen(wishes.port ?? 0, host, listening);
  });
  const { port } = http.address() as AddressInfo;
  url = wishes.publicUrl ?? `http://127.0.0.1:${port}`;
  return {
    url,
    faults,
    kept,
    ground,
    sendTo: (to) => void (webhookUrl = to),
    async close() {
      deliveries.close();
      http.closeAllConnections();
      await new Promise((closed) => http.close(closed));
      save();
    },
  };
}

function appOf(ground: deeds.Ground, faults: Faults, key: string): Express {
  const app = express();
  app.disable('x-powered-by');
  app.use(express.urlencoded({ extended: true, limit: '100kb' }), express.json({ limit: '100kb' }));
  app.get('/ready', (_req, res) => void res.json({ ready: true }));
  app.use('/pay', paying(ground));
  app.use('/control', keyed(key), controls(ground, faults));
  app.use('/v1', keyed(key), misbehave(faults), repeats(ground, faults), api(ground));
  app.use(
    (_req, res) =>
      void res
        .status(404)
        .json({ error: { type: 'invalid_request_error', message: 'Unrecognised address' } }),
  );
  return app;
}

/** Answers what a deed comes to, or how the provider says no. */
function say(res: Response, deed: () => unknown): void {
  try {
    res.json(deed());
  } catch (error) {
    if (!(error instanceof deeds.Refusal)) throw error;
    res
      .status(error.status)
      .json({ error: { type: 'invalid_request_error', code: error.code, message: error.message } });
  }
}

const keyed =
  (key: string): RequestHandler =>
  (req, res, next) => {
    if (req.get('authorization') === `Bearer ${key}`) next();
    else res.status(401).json({ error: { type: 'invalid_request_error', message: 'Invalid API key' } });
  };

const broken = (res: Response) =>
  res.status(500).json({ error: { type: 'api_error', message: 'Something went wrong at the provider' } });

const misbehave =
  (faults: Faults): RequestHandler =>
  async (_req, res, next) => {
    if (faults.slowMs > 0) await pause(faults.slowMs);
    if (faults.failing === 0) return next();
    faults.failing -= 1;
    broken(res);
  };

/** The same idempotency key gets the same answer; with another request it is refused. */
const repeats =
  ({ kept, save }: deeds.Ground, faults: Faults): RequestHandler =>
  (req, res, next) => {
    const key = req.method === 'POST' ? req.get('idempotency-key') : undefined;
    const asked = JSON.stringify([req.path, req.body]);
    const before = key === undefined ? undefined : kept.answers[key];
    if (before && before.asked !== asked)
      return void res.status(400).json({
        error: { type: 'idempotency_error', message: 'This key was used for another request.' },
      });
    if (before) return void res.status(before.status).set('idempotent-replayed', 'true').json(before.body);
    const json = res.json.bind(res);
    res.json = (body: unknown) => {
      if (key !== undefined && res.statusCode < 500) {
        kept.answers[key] = { asked, status: res.statusCode, body: structuredClone(body) };
        save();
      }
      if (faults.failingAfter === 0 || req.method !== 'POST') return json(body);
      faults.failingAfter -= 1;
      return json.call(res.status(500), { error: { type: 'api_error', message: 'The answer got lost' } });
    };
    next();
  };

function api(ground: deeds.Ground): express.Router {
  const to = express.Router();
  const asked = (body: unknown): deeds.Asked =>
    typeof body === 'object' && body !== null ? { ...body } : {};
  to.post('/checkout/sessions', (req, res) => say(res, () => deeds.makeSession(ground, asked(req.body))));
  to.get('/checkout/sessions/:id', (req, res) => {
    const expanded = JSON.stringify(req.query.expand ?? '').includes('payment_intent');
    say(res, () => {
      const session = deeds.sessionOf(ground, req.params.id);
      if (!expanded || session.payment_intent === null) return session;
      return { ...session, payment_intent: deeds.intentOf(ground, session.payment_intent) };
    });
  });
  to.post('/checkout/sessions/:id/expire', (req, res) =>
    say(res, () => deeds.expireSession(ground, req.params.id)),
  );
  to.get('/payment_intents/:id', (req, res) => say(res, () => deeds.intentOf(ground, req.params.id)));
  to.post('/refunds', (req, res) => say(res, () => deeds.makeRefund(ground, asked(req.body))));
  to.get('/refunds/:id', (req, res) => say(res, () => deeds.refundOf(ground, req.params.id)));
  to.get('/events', (req, res) => {
    const created = typeof req.query.created === 'object' ? asked(req.query.created) : {};
    const since = Number(created.gte ?? 0);
    const newest = [...ground.kept.messages].reverse().filter((each) => each.created >= since);
    const after = newest.findIndex(({ id }) => id === req.query.starting_after);
    const limit = Math.min(100, Number(req.query.limit ?? 10));
    const some = newest.slice(after + 1, after + 1 + limit);
    res.json({ object: 'list', url: '/v1/events', has_more: after + 1 + limit < newest.length, data: some });
  });
  return to;
}

function controls(ground: deeds.Ground, faults: Faults): express.Router {
  const to = express.Router();
  to.post('/faults', (req, res) => {
    const wish = FaultWish.safeParse(req.body);
    if (!wish.success) return void res.status(400).json({ error: { message: wish.error.message } });
    Object.assign(faults, wish.data);
    res.json(faults);
  });
  to.post('/refunds/:id/return', (req, res) => say(res, () => deeds.returnRefund(ground, req.params.id)));
  to.post('/disputes', (req, res) => say(res, () => deeds.tellDispute(ground, { ...req.body })));
  return to;
}

function paying(ground: deeds.Ground): express.Router {
  const to = express.Router();
  const show = (res: Response, id: string, html: (session: Session) => string): void => {
    const session = ground.kept.sessions[id] ?? null;
    res.status(session ? 200 : 404).set({
      'Content-Security-Policy': policyFor(session),
      'X-Content-Type-Options': 'nosniff',
      'Referrer-Policy': 'no-referrer',
      'Cache-Control': 'no-store',
    });
    res
      .type('html')
      .send(session ? (session.status === 'open' ? html(session) : closedPage(session)) : noSuchPage());
  };
  const onwards = (res: Response, id: string, end: 'paid' | 'ask' | 'refused'): void => {
    const session = deeds.sessionOf(ground, id);
    if (end === 'paid') res.redirect(303, session.success_url);
    else res.redirect(303, end === 'ask' ? `/pay/${id}/bank` : `/pay/${id}`);
  };
  const isOpen = (id: string): boolean => ground.kept.sessions[id]?.status === 'open';
  to.get('/:id', (req, res) =>
    show(res, req.params.id, (session) => {
      const intent = session.payment_intent === null ? null : deeds.intentOf(ground, session.payment_intent);
      const error = intent?.last_payment_error;
      return payPage(session, error ? declinedWords(error.decline_code ?? error.code) : '');
    }),
  );
  to.get('/:id/bank', (req, res) => show(res, req.params.id, bankPage));
  to.post('/:id', (req, res) => {
    const { id } = req.params;
    const card: unknown = req.body?.card;
    if (!isOpen(id) || !deeds.isCard(card)) return res.redirect(303, `/pay/${id}`);
    onwards(res, id, deeds.tryCard(ground, id, card));
  });
  to.post('/:id/bank', (req, res) => {
    const { id } = req.params;
    if (!isOpen(id)) return res.redirect(303, `/pay/${id}`);
    onwards(res, id, deeds.answerBank(ground, id, req.body?.answer === 'yes'));
  });
  return to;
}
