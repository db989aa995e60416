import { Problem, type ProblemBody } from '@mereward/shared/problems/problem';
import type { ErrorRequestHandler, Request, RequestHandler, Response } from 'express';
import { z } from 'zod';
import { isDatabaseAway } from './database-away';

/** A request that could not even be read, as the body's reader and the router tell it. */
const Unreadable = z.object({ type: z.string().optional(), status: z.int().min(400).max(499) });

function asProblem(error: unknown): Problem | null {
  if (error instanceof Problem) return error;
  if (isDatabaseAway(error))
    return new Problem('internal', 'The database can’t be reached just now', {
      detail: 'Nothing was kept. Try again in a minute; what you typed is still here.',
    });
  const parsed = Unreadable.safeParse(error);
  if (!parsed.success) return null;
  const { type, status } = parsed.data;
  if (error instanceof URIError)
    return new Problem('invalid', 'This address can’t be read', {
      detail: 'A sign in it is broken. Go back and follow the link again, or type the address anew.',
    });
  if (type === 'entity.too.large')
    return new Problem('too-large', 'That is more than one request may hold', {
      detail: 'Send it in smaller parts.',
    });
  if (status === 415)
    return new Problem('invalid', 'The request came in a form that can’t be read here', {
      detail: 'Send JSON in UTF-8, as it is or packed with gzip, deflate or br.',
    });
  if (status === 400)
    return new Problem('invalid', 'The request could not be read as JSON', {
      detail: 'Nothing was kept. Send it again; if it keeps happening, reload the page.',
    });
  return null;
}

/** A failure as a reader may be told of it. What is not meant for a reader is logged. */
function problemOf(error: unknown, req: Request): Problem {
  const problem =
    asProblem(error) ??
    new Problem('internal', 'Something went wrong here', {
      detail: `It has been written down as ${String(req.id)}. Nothing was kept; try once more.`,
    });
  if (problem.kind === 'internal') req.log.error({ err: error }, 'internal');
  return problem;
}

type Say = (problem: Problem, req: Request, res: Response) => void;

/** Ends a router or the whole server: whatever failed is told in the way that is given. */
export const answering =
  (say: Say): ErrorRequestHandler =>
  (error, req, res, next) => {
    if (res.headersSent) next(error);
    else say(problemOf(error, req), req, res);
  };

/** The one place where a failure becomes an answer of the API (RFC 9457). */
export const answerProblem = answering((problem, req, res) => {
  const body: ProblemBody = {
    type: `urn:mereward:problem:${problem.kind}`,
    title: problem.title,
    status: problem.status,
    kind: problem.kind,
    instance: String(req.id),
    ...(problem.detail === undefined ? {} : { detail: problem.detail }),
    ...(problem.errors.length === 0 ? {} : { errors: [...problem.errors] }),
  };
  res.status(problem.status).type('application/problem+json').send(JSON.stringify(body));
});

export const nothingHere: RequestHandler = () => {
  throw new Problem('not-found', 'There is nothing at this address', {
    detail: 'Look at the address for a slip, or begin at the front page.',
  });
};
