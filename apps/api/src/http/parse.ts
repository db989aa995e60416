import { lettersFault } from '@mereward/shared/problems/letters';
import { plainWords } from '@mereward/shared/problems/plain-words';
import { Problem, type ProblemError } from '@mereward/shared/problems/problem';
import type { z } from 'zod';

/** More than a person puts right at once; a request of nothing but faults is not answered with a book. */
const MOST_ERRORS = 100;

/** A request's part as its contract says, or a Problem that names every fault. */
export function parse<S extends z.ZodType>(schema: S, value: unknown): z.output<S> {
  if (value === undefined)
    throw new Problem('invalid', 'Nothing came that could be read', {
      detail: 'Send it as JSON, with the header Content-Type: application/json.',
    });
  const parsed = schema.safeParse(value, { error: plainWords });
  const errors: ProblemError[] = parsed.success
    ? strangeLetters(parsed.data, [])
    : parsed.error.issues.map(({ path, message }) => ({ pointer: pointerTo(path), detail: message }));
  if (parsed.success && errors.length === 0) return parsed.data;
  throw new Problem('invalid', 'Something in what was sent is not right', {
    detail: 'See each field named below, put it right and send again.',
    errors: errors.slice(0, MOST_ERRORS),
  });
}

/** RFC 6901: the whole is the empty pointer. */
const pointerTo = (path: readonly PropertyKey[]): string =>
  path.map((step) => `/${String(step).replace(/~/g, '~0').replace(/\//g, '~1')}`).join('');

/** Looked at by whoever reads a whole file; and a password is whatever its holder types. */
const LEFT_ALONE: ReadonlySet<string> = new Set(['/text', '/password']);

/** Letters that no row can keep, or that would let one name pass for another, wherever in the request they stand. */
function strangeLetters(value: unknown, path: readonly PropertyKey[]): ProblemError[] {
  if (typeof value === 'string') {
    const pointer = pointerTo(path);
    const detail = LEFT_ALONE.has(pointer) ? null : lettersFault(value);
    return detail === null ? [] : [{ pointer, detail }];
  }
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) =>
    typeof inner === 'number' ? [] : strangeLetters(inner, [...path, key]),
  );
}
