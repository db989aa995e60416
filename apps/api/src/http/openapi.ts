import { ProblemBody } from '@mereward/shared/problems/problem';
import { z } from 'zod';
import type { Route, RouteSpec } from './route';

const json = (schema: z.ZodType, io: 'input' | 'output') => ({
  'application/json': { schema: z.toJSONSchema(schema, { io, unrepresentable: 'any' }) },
});

function parameters(spec: RouteSpec) {
  const inPath = [...spec.path.matchAll(/:(\w+)/g)].map(([, name]) => ({
    name,
    in: 'path',
    required: true,
    schema: { type: 'string' },
  }));
  if (!(spec.query instanceof z.ZodObject)) return inPath;
  const inQuery = Object.entries(spec.query.shape).map(([name, schema]) => ({
    name,
    in: 'query',
    required: !z.safeParse(schema, undefined).success,
    schema: z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any' }),
  }));
  return [...inPath, ...inQuery];
}

function operation(spec: RouteSpec) {
  const status = spec.status ?? (spec.answer || spec.answerType ? 200 : 204);
  const content = spec.answer
    ? { content: json(spec.answer, 'output') }
    : spec.answerType
      ? { content: { [spec.answerType]: {} } }
      : {};
  return {
    summary: spec.summary,
    parameters: parameters(spec),
    ...(spec.signIn === 'needed' ? { security: [{ accessToken: [] }] } : {}),
    ...(spec.body ? { requestBody: { required: true, content: json(spec.body, 'input') } } : {}),
    responses: {
      [status]: { description: 'Done', ...content },
      default: {
        description: 'A problem, in words',
        content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
      },
    },
  };
}

/** The OpenAPI 3.1 document, made from the schemas that guard the routes. */
export function openapi(routes: readonly Route[]) {
  const paths: Record<string, Record<string, unknown>> = {};
  for (const route of routes) {
    const path = route.path.replace(/:(\w+)/g, '{$1}');
    (paths[path] ??= {})[route.method] = operation(route);
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Mereward', version: '0.1.0' },
    servers: [{ url: '/api' }],
    paths,
    components: {
      schemas: { Problem: z.toJSONSchema(ProblemBody) },
      securitySchemes: { accessToken: { type: 'http', scheme: 'bearer', bearerFormat: 'JWT' } },
    },
  };
}
