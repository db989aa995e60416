import compression from 'compression';
import cookieParser from 'cookie-parser';
import express, { Router, type Express, type RequestHandler } from 'express';
import helmet from 'helmet';
import type pino from 'pino';
import { lightPages } from './charts/light/light-pages';
import { demoMail } from './demo/mail-page';
import { health } from './http/health';
import { limitAll } from './http/limits';
import { logRequests } from './http/logging';
import { openapi } from './http/openapi';
import { answerProblem, nothingHere } from './http/problem';
import type { Route } from './http/route';
import { standOn, type Server } from './http/server';
import { serveWeb } from './http/web';
import type { Capture } from './mail/capture';
import { routes as ourRoutes } from './routes';

/** What an application may be made with: mail it caught, which the demo alone shows; other routes, for a measurement. */
type With = { capture?: Capture | null; routes?: readonly Route[] };

/** The whole server as one Express application; nothing listens yet. */
export function makeApp(server: Server, logger: pino.Logger, made: With = {}): Express {
  const { capture, routes = ourRoutes } = made;
  const app = express();
  standOn(app, server);
  app.set('trust proxy', server.config.trustProxy);
  app.disable('x-powered-by');
  app.use(
    helmet({
      contentSecurityPolicy: {
        directives: {
          defaultSrc: ["'self'"],
          scriptSrc: ["'self'"],
          styleSrc: ["'self'", "'unsafe-inline'"], // react-native-web writes its rules into the page
          imgSrc: ["'self'", 'data:', 'blob:'],
          workerSrc: ["'self'"], // the worker that keeps the program for when there is no signal
          manifestSrc: ["'self'"],
          upgradeInsecureRequests: null, // the demo is plain http on loopback
        },
      },
    }),
  );
  app.use(logRequests(logger));
  app.use('/api', apiRouter(routes));
  app.use('/p', lightPages());
  if (capture && server.config.demo) app.use('/demo', demoMail(capture));
  app.use(serveWeb(server.config.webDir), nothingHere, answerProblem);
  return app;
}

function apiRouter(routes: readonly Route[]): Router {
  const api = Router();
  const document = JSON.stringify(openapi(routes));
  api.use(health());
  api.use((_req, res, next) => {
    res.set('Cache-Control', 'private, no-cache'); // what one reader may see is nobody else's; a route may say otherwise
    next();
  });
  api.use(limitAll(), compression(), cookieParser());
  api.use('/payments/webhook', express.raw({ type: () => true, limit: '1mb' })); // signed over its very bytes
  api.use(express.json({ limit: '6mb' }));
  api.get('/openapi.json', (_req, res) => void res.type('application/json').send(document));
  api.use(byFirstWord(routes));
  api.use(nothingHere, answerProblem);
  return api;
}

/** Express tries its routes one by one: only those that begin with the same word need to be tried. */
function byFirstWord(routes: readonly Route[]): RequestHandler {
  const routers = new Map<string, Router>();
  for (const route of routes) {
    const word = route.path.split('/')[1] ?? '';
    const router = routers.get(word) ?? Router();
    routers.set(word, router);
    route.attach(router);
  }
  return (req, res, next) => {
    const router = routers.get(req.path.split('/')[1] ?? '');
    if (router) router(req, res, next);
    else next();
  };
}
