import { Problem } from '@mereward/shared/problems/problem';
import type { Request, RequestHandler } from 'express';
import { rateLimit } from 'express-rate-limit';
import { createHash } from 'node:crypto';
import { z } from 'zod';

type Limit = { windowS: number; most: number; onlyRefused?: boolean; key?: (req: Request) => string };

/** Counts in this process; `onlyRefused` counts what was answered with a problem. */
function limit({ windowS, most, onlyRefused = false, key }: Limit): RequestHandler {
  return rateLimit({
    windowMs: windowS * 1000,
    limit: most,
    standardHeaders: 'draft-7', // the next draft hashes the caller anew for every answer
    legacyHeaders: false,
    skipSuccessfulRequests: onlyRefused,
    ...(key ? { keyGenerator: key } : {}),
    handler: (_req, _res, next) =>
      next(
        new Problem('too-many', 'Too many tries in a short time', {
          detail: `Wait ${windowS > 60 ? 'a quarter of an hour' : 'a minute'}, then go on. Nothing was lost.`,
        }),
      ),
  });
}

/** For what is drawn anew for each asking, such as a printed card, by network address. */
export const limitDrawings = (): RequestHandler => limit({ windowS: 60, most: 60 });

/** For what a person types and sends for others to read, by network address: a lodge full of anglers shares one. */
export const limitReports = (): RequestHandler => limit({ windowS: 60, most: 60 });

/** For pages written here, which cost more than an answer does; a lodge full of anglers shares one address. */
export const limitPages = (): RequestHandler => limit({ windowS: 60, most: 240 });

const QUARTER_S = 15 * 60;

/** For everything: far above what a person does, below what harms the rest. */
export const limitAll = (): RequestHandler => limit({ windowS: 60, most: 1200 });

/** For what mails a link, by network address: a lodge full of anglers shares one. */
export const limitSecrets = (): RequestHandler => limit({ windowS: QUARTER_S, most: 100 });

/** For what tries a secret, by network address: only wrong tries count. */
export const limitWrongTries = (): RequestHandler =>
  limit({ windowS: QUARTER_S, most: 100, onlyRefused: true });

const Aimed = z.object({ email: z.string() });

/** For sign-in, by the account aimed at, from wherever: only wrong tries count. */
export const limitWrongTriesAtOne = (): RequestHandler =>
  limit({
    windowS: QUARTER_S,
    most: 20,
    onlyRefused: true,
    key: (req) => {
      const aimed = Aimed.safeParse(req.body);
      return createHash('sha256')
        .update(aimed.success ? aimed.data.email.trim().toLowerCase() : '')
        .digest('base64');
    },
  });
