import { Problem } from '@mereward/shared/problems/problem';
import type { RequestHandler } from 'express';

/**
 * For what stands on a cookie alone: another site's form can't set a header, and its script may not without leave,
 * which is never given. Beside SameSite, so that one failing is not enough.
 */
export const fromOurPage = (): RequestHandler => (req, _res, next) => {
  if (req.get('x-mereward') === '1') next();
  else
    throw new Problem('forbidden', 'This can only be asked from a page of Mereward', {
      detail: 'The request must carry the header X-Mereward: 1.',
    });
};
