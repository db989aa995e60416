import { z } from 'zod';

// The parts of OpenAPI 3.1.0 (§4.8) that the document uses, strictly: a field that is not the standard's is refused.
const Schema = z.record(z.string(), z.unknown());
const Media = z.strictObject({ schema: Schema.optional() });
const Content = z.record(z.string().regex(/^[a-z]+\/[\w.+*-]+$/), Media);

const Parameter = z.strictObject({
  name: z.string().min(1),
  in: z.enum(['path', 'query']),
  required: z.boolean(),
  schema: Schema,
});

const Operation = z.strictObject({
  summary: z.string().min(3),
  parameters: z.array(Parameter),
  security: z.array(z.record(z.string(), z.array(z.string()))).optional(),
  requestBody: z.strictObject({ required: z.boolean(), content: Content }).optional(),
  responses: z.record(
    z.string().regex(/^([1-5]\d\d|default)$/),
    z.strictObject({ description: z.string().min(1), content: Content.optional() }),
  ),
});

export const OpenapiDocument = z.strictObject({
  openapi: z.string().regex(/^3\.1\.\d+$/),
  info: z.strictObject({ title: z.string().min(1), version: z.string().min(1) }),
  servers: z.array(z.strictObject({ url: z.string() })),
  paths: z.record(
    z.string().startsWith('/'),
    z.partialRecord(z.enum(['get', 'post', 'put', 'patch', 'delete']), Operation),
  ),
  components: z.strictObject({
    schemas: z.record(z.string().regex(/^[\w.-]+$/), Schema),
    securitySchemes: z.record(
      z.string(),
      z.strictObject({ type: z.literal('http'), scheme: z.string(), bearerFormat: z.string().optional() }),
    ),
  }),
});

/** Every `$ref` anywhere in a document, with the piece of JSON it stands in as its root. */
export function referencesIn(value: unknown): string[] {
  if (Array.isArray(value)) return value.flatMap(referencesIn);
  if (typeof value !== 'object' || value === null) return [];
  return Object.entries(value).flatMap(([key, inner]) =>
    key === '$ref' && typeof inner === 'string' ? [inner] : referencesIn(inner),
  );
}
