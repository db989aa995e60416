import { routes } from '@mereward/api/routes';
import { afterAll, beforeAll, expect, test } from 'vitest';
import type { z } from 'zod';
import { aFishery, type TestFishery } from '../support/waters';
import { OpenapiDocument, referencesIn } from '../support/openapi-document';
import { aStranger } from '../support/people';
import { aServer, type TestServer } from '../support/server';

let here: TestServer;
let fishery: TestFishery;
let document: z.infer<typeof OpenapiDocument>;
beforeAll(async () => {
  here = await aServer();
  fishery = await aFishery(here);
  const answer = await aStranger(here).get('/openapi.json');
  expect(answer.type).toBe('application/json');
  document = OpenapiDocument.parse(answer.body);
});
afterAll(() => here.close());

test('the document has every route, and no other', () => {
  const documented = Object.entries(document.paths).flatMap(([path, methods]) =>
    Object.keys(methods).map((method) => `${method} ${path}`),
  );
  const served = routes.map(({ method, path }) => `${method} ${path.replace(/:(\w+)/g, '{$1}')}`);
  expect(documented.sort()).toEqual(served.sort());
  expect(new Set(served).size).toBe(served.length);
});

test('each path names its parameters, all of them required', () => {
  for (const [path, methods] of Object.entries(document.paths))
    for (const operation of Object.values(methods)) {
      const named = [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name);
      const inPath = operation?.parameters.filter((each) => each.in === 'path') ?? [];
      expect(
        inPath.map(({ name }) => name),
        path,
      ).toEqual(named);
      expect(
        inPath.every(({ required }) => required),
        path,
      ).toBe(true);
    }
});

test('each reference leads somewhere in its own schema or to a component', () => {
  const found = referencesIn(document);
  expect(found.length).toBeGreaterThan(0);
  for (const [name, methods] of Object.entries(document.paths))
    for (const operation of Object.values(methods))
      for (const body of bodies(operation))
        for (const reference of referencesIn(body))
          expect(leads(reference, body), `${name} ${reference}`).toBe(true);
});

type Methods = z.infer<typeof OpenapiDocument>['paths'][string];
type Operation = Methods[keyof Methods];

function bodies(operation: Operation): Record<string, unknown>[] {
  const contents = [
    operation?.requestBody?.content ?? {},
    ...Object.values(operation?.responses ?? {}).map(({ content }) => content ?? {}),
  ];
  return contents.flatMap((content) =>
    Object.values(content).flatMap(({ schema }) => (schema ? [schema] : [])),
  );
}

function leads(reference: string, schema: Record<string, unknown>): boolean {
  if (!reference.startsWith('#/')) return reference === '#';
  const walk = (root: unknown) =>
    reference
      .slice(2)
      .split('/')
      .reduce<unknown>(
        (at, step) => (at && typeof at === 'object' ? Reflect.get(at, step) : undefined),
        root,
      );
  return walk(document) !== undefined || walk(schema) !== undefined;
}

const needing = routes.filter(({ signIn }) => signIn === 'needed');

test.each(needing)('$method $path says that it needs a sign-in, and turns a stranger away', async (route) => {
  const { method, path } = route;
  const documented = document.paths[path.replace(/:(\w+)/g, '{$1}')]?.[method];
  expect(documented?.security).toEqual([{ accessToken: [] }]);
  const address = path.replace(/:\w+/g, '00000000-0000-4000-8000-000000000000');
  const bare = await aStranger(here)[method](address).set('X-Mereward', '1').send({});
  expect([bare.status, bare.body.kind]).toEqual([401, 'not-signed-in']);
  const junk = await aStranger(here)[method](address).set('authorization', 'Bearer junk').send({});
  expect([junk.status, junk.body.kind]).toEqual([401, 'not-signed-in']);
});

test('a problem as answered is the problem as documented', async () => {
  const answer = await fishery.people.owner.put(`/fisheries/${fishery.id}`).send({ version: 'one' });
  const schema = document.components.schemas.Problem ?? {};
  expect(answer.type).toBe('application/problem+json');
  expect(Object.keys(Object(schema.properties))).toEqual(expect.arrayContaining(Object.keys(answer.body)));
  for (const field of Array.isArray(schema.required) ? schema.required : [])
    expect(answer.body).toHaveProperty(String(field));
  expect(answer.body).toMatchObject({
    type: 'urn:mereward:problem:invalid',
    status: 400,
    kind: 'invalid',
    instance: answer.get('X-Request-Id'),
  });
});
