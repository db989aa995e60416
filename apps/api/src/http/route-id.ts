import type { Request } from 'express';
import { z } from 'zod';

const Id = z.uuid();
const NOWHERE = '00000000-0000-0000-0000-000000000000';

/** A path parameter that must be an id, for routes that answer by themselves; anything else finds nothing. */
export const idIn = (req: Request, name: string): string => Id.safeParse(req.params[name]).data ?? NOWHERE;
