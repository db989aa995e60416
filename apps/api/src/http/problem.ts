import { Problem, type ProblemBody } from '@mereward/shared/problems/problem';
import type { ErrorRequestHandler, RequestHandler } from 'express';
import { z } from 'zod';

const BodyParserError = z.object({ type: z.string(), status: z.number() });

function asProblem(error: unknown): Problem | null {
  if (error instanceof Problem) return error;
  const parsed = BodyParserError.safeParse(error);
  if (!parsed.success) return null;
  if (parsed.data.type === 'entity.too.large')
    return new Problem('too-large', 'That is more than one request may hold', {
      detail: 'Send it in smaller parts.',
    });
  if (parsed.data.status === 400)
    return new Problem('invalid', 'The request could not be read as JSON', {
      detail: 'Nothing was kept. Send it again; if it keeps happening, reload the page.',
    });
  return null;
}

/** The one place where a failure becomes an answer (RFC 9457). What is not meant for a reader is logged, not told. */
export const answerProblem: ErrorRequestHandler = (error, req, res, next) => {
  if (res.headersSent) {
    next(error);
    return;
  }
  const instance = String(req.id);
  const problem =
    asProblem(error) ??
    new Problem('internal', 'Something went wrong here', {
      detail: `It has been written down as ${instance}. Nothing was kept; try once more.`,
    });
  if (problem.kind === 'internal') req.log.error({ err: error }, 'internal');
  const body: ProblemBody = {
    type: `urn:mereward:problem:${problem.kind}`,
    title: problem.title,
    status: problem.status,
    kind: problem.kind,
    instance,
    ...(problem.detail === undefined ? {} : { detail: problem.detail }),
    ...(problem.errors.length === 0 ? {} : { errors: [...problem.errors] }),
  };
  res.status(problem.status).type('application/problem+json').send(JSON.stringify(body));
};

export const nothingHere: RequestHandler = () => {
  throw new Problem('not-found', 'There is nothing at this address');
};
