import { Problem } from '@mereward/shared/problems/problem';
import type { RequestHandler } from 'express';
import { rateLimit } from 'express-rate-limit';

const refuse: RequestHandler = () => {
  throw new Problem('too-many', 'Too many requests from here in a short time', {
    detail: 'Wait a minute, then go on. Nothing was lost.',
  });
};

const limit = (windowS: number, most: number): RequestHandler =>
  rateLimit({
    windowMs: windowS * 1000,
    limit: most,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    handler: refuse,
  });

/** For everything: far above what a person does, below what harms the rest. */
export const limitAll = (): RequestHandler => limit(60, 1200);

/** For what tries a secret or sends mail: sign-in, sign-up, reset, invitations. */
export const limitSecrets = (): RequestHandler => limit(15 * 60, 100);
