import type { Request, RequestHandler, Response, Router } from 'express';
import type { z } from 'zod';
import type { Ctx } from '../ctx';
import { parse } from './parse';
import { idIn } from './route-id';
import { signedInOnly } from './session';
import { inTransaction, reading } from './transaction';

type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

/** What the OpenAPI document says of a route; the same schemas guard the way in. */
export type RouteSpec = {
  method: Method;
  path: string; // Express form: /lakes/:lakeId
  summary: string;
  signIn: 'open' | 'needed';
  body?: z.ZodType;
  query?: z.ZodType;
  answer?: z.ZodType; // absent: no content, or another type of content
  answerType?: string; // default application/json
  status?: number;
  /** Stand before the route, made anew for each application: limits, the header that shows a page of ours asks. */
  guards?: readonly (() => RequestHandler)[];
};

const guarded = ({ signIn, guards = [] }: RouteSpec): RequestHandler[] => [
  ...(signIn === 'needed' ? [signedInOnly] : []),
  ...guards.map((guard) => guard()),
];

export type Route = RouteSpec & { attach: (router: Router) => void };

type Output<S> = S extends z.ZodType ? z.output<S> : undefined;

export type Asked<Spec extends RouteSpec> = {
  body: Output<Spec['body']>;
  query: Output<Spec['query']>;
  /** A path parameter that must be an id; anything else finds nothing. */
  id: (name: string) => string;
  req: Request;
};

function asked<Spec extends RouteSpec>(spec: Spec, req: Request): Asked<Spec> {
  return {
    body: (spec.body ? parse(spec.body, req.body) : undefined) as Output<Spec['body']>,
    query: (spec.query ? parse(spec.query, req.query) : undefined) as Output<Spec['query']>,
    id: (name) => idIn(req, name),
    req,
  };
}

function answer(spec: RouteSpec, res: Response, value: unknown): void {
  if (spec.answer === undefined) res.status(spec.status ?? 204).end();
  else res.status(spec.status ?? 200).json(value);
}

/** A route that changes something: parsed, run in one transaction, answered by its contract. */
export function deed<const Spec extends RouteSpec>(
  spec: Spec,
  run: (ctx: Ctx, request: Asked<Spec>) => Promise<Output<Spec['answer']> | void>,
): Route {
  return {
    ...spec,
    attach: (router) =>
      router[spec.method](spec.path, ...guarded(spec), async (req, res) => {
        const request = asked(spec, req);
        answer(spec, res, await inTransaction(req, (ctx) => run(ctx, request)));
      }),
  };
}

/** A route that only reads. */
export function read<const Spec extends RouteSpec>(
  spec: Spec,
  run: (ctx: Ctx, request: Asked<Spec>) => Promise<Output<Spec['answer']>>,
): Route {
  return {
    ...spec,
    attach: (router) =>
      router[spec.method](spec.path, ...guarded(spec), async (req, res) => {
        const request = asked(spec, req);
        answer(spec, res, await reading(req, (ctx) => run(ctx, request)));
      }),
  };
}

/** A route that answers by itself: cookies, files, streams, multipart. */
export function raw(spec: RouteSpec, run: (req: Request, res: Response) => Promise<void>): Route {
  return { ...spec, attach: (router) => router[spec.method](spec.path, ...guarded(spec), run) };
}
