import { z } from 'zod';

/** The closed list of ways a request can fail, each with its HTTP status. */
export const PROBLEM_STATUS = {
  invalid: 400,
  'not-signed-in': 401,
  forbidden: 403,
  'not-found': 404,
  conflict: 409,
  'too-large': 413,
  'too-many': 429,
  internal: 500,
} as const;

export const ProblemKind = z.enum([
  'invalid',
  'not-signed-in',
  'forbidden',
  'not-found',
  'conflict',
  'too-large',
  'too-many',
  'internal',
]);
export type ProblemKind = z.infer<typeof ProblemKind>;

/** One thing wrong with a request: where (RFC 6901 pointer into the body) and what, in words for a reader. */
export const ProblemError = z.object({ pointer: z.string(), detail: z.string() });
export type ProblemError = z.infer<typeof ProblemError>;

/** RFC 9457 body, as it travels. `type` ends in the kind. */
export const ProblemBody = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number(),
  kind: ProblemKind,
  detail: z.string().optional(),
  instance: z.string().optional(),
  errors: z.array(ProblemError).optional(),
});
export type ProblemBody = z.infer<typeof ProblemBody>;

/** A refusal meant for the reader: `title` says what was wrong, `detail` what to do about it. */
export class Problem extends Error {
  override readonly name = 'Problem';
  readonly detail: string | undefined;
  readonly errors: readonly ProblemError[];
  readonly instance: string | undefined;

  constructor(
    readonly kind: ProblemKind,
    readonly title: string,
    more: { detail?: string; errors?: readonly ProblemError[]; instance?: string } = {},
  ) {
    super(title);
    this.detail = more.detail;
    this.errors = more.errors ?? [];
    this.instance = more.instance;
  }

  get status(): number {
    return PROBLEM_STATUS[this.kind];
  }
}
