import { Problem } from '@mereward/shared/problems/problem';
import type { z } from 'zod';

/** A request's part as its contract says, or a Problem that names every fault. */
export function parse<S extends z.ZodType>(schema: S, value: unknown): z.output<S> {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  throw new Problem('invalid', 'Something in what was sent is not right', {
    detail: 'See each field named below, put it right and send again.',
    errors: parsed.error.issues.map((issue) => ({
      pointer:
        '/' + issue.path.map((step) => String(step).replace(/~/g, '~0').replace(/\//g, '~1')).join('/'),
      detail: issue.message,
    })),
  });
}
