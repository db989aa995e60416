import compression from 'compression';
import cookieParser from 'cookie-parser';
import express, { Router, type Express } from 'express';
import helmet from 'helmet';
import type pino from 'pino';
import { demoMail } from './demo/mail-page';
import { health } from './http/health';
import { limitAll } from './http/limits';
import { logRequests } from './http/logging';
import { openapi } from './http/openapi';
import { answerProblem, nothingHere } from './http/problem';
import { standOn, type Server } from './http/server';
import { serveWeb } from './http/web';
import type { Capture } from './mail/capture';
import { routes } from './routes';

/** The whole server as one Express application; nothing listens yet. Caught mail is shown by the demo alone. */
export function makeApp(server: Server, logger: pino.Logger, capture: Capture | null = null): Express {
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
          upgradeInsecureRequests: null, // the demo is plain http on loopback
        },
      },
    }),
  );
  app.use(logRequests(logger));
  app.use('/api', apiRouter());
  if (capture && server.config.demo) app.use('/demo', demoMail(capture));
  app.use(serveWeb(server.config.webDir), nothingHere, answerProblem);
  return app;
}

function apiRouter(): Router {
  const api = Router();
  const document = JSON.stringify(openapi(routes));
  api.use(health());
  api.use(limitAll(), compression(), cookieParser(), express.json({ limit: '6mb' }));
  api.get('/openapi.json', (_req, res) => void res.type('application/json').send(document));
  for (const route of routes) route.attach(api);
  api.use(nothingHere, answerProblem);
  return api;
}
