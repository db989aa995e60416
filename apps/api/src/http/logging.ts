import { randomUUID } from 'node:crypto';
import pino from 'pino';
import { pinoHttp } from 'pino-http';
import type { Config } from '../config';
import { plainError } from './plain-error';

/** Lines of JSON to standard output, or to `into`. */
export const makeLogger = (config: Config, into: pino.DestinationStream = pino.destination(1)) =>
  pino({ level: config.logLevel, serializers: { err: plainError } }, into);

/** One line a request: method, path without its query, status, time, id. No address, no name, no body. */
export function logRequests(logger: pino.Logger) {
  return pinoHttp({
    logger,
    genReqId: (_req, res) => {
      const id = randomUUID();
      res.setHeader('X-Request-Id', id);
      return id;
    },
    wrapSerializers: false, // the wrapped ones would add headers and addresses
    serializers: {
      err: plainError,
      req: (req: { id: string; method: string; url: string; originalUrl?: string }) => ({
        id: req.id,
        method: req.method,
        path: withoutSecrets(req.originalUrl ?? req.url),
      }),
      res: (res: { statusCode: number }) => ({ status: res.statusCode }),
    },
    customLogLevel: (_req, res, error) => (error || res.statusCode >= 500 ? 'error' : 'info'),
  });
}

/** A mailed token stands in the path or the query of a link: neither may reach a log. */
export const withoutSecrets = (url: string): string =>
  (url.split('?')[0] ?? '').replace(/\/(invitations|choices|choose|calendars)\/[^/]{20,}/, '/$1/…');
