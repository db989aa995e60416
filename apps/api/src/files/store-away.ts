import { Problem } from '@mereward/shared/problems/problem';

/** What a reader is told when files can't be kept or fetched just now; what went wrong stays its cause, for the log. */
export function storeAway(cause: unknown): Problem {
  const problem = new Problem('internal', 'The store of pictures can’t be reached just now', {
    detail: 'Nothing was kept. Try again in a minute; what you chose is still here.',
  });
  problem.cause = cause;
  return problem;
}
