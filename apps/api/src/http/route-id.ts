import { Problem } from '@mereward/shared/problems/problem';
import type { Request } from 'express';
import { z } from 'zod';

const Id = z.uuid().toLowerCase(); // RFC 9562 reads either case; rows hold the lower

/** A path parameter that must be an id; anything else finds nothing. */
export function idIn(req: Request, name: string): string {
  const id = Id.safeParse(req.params[name]);
  if (!id.success)
    throw new Problem('not-found', 'There is nothing at this address', {
      detail: 'It may have been cut short. Go back and choose anew.',
    });
  return id.data;
}
