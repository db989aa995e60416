import { passwordHash } from '@mereward/api/accounts/password';
import { signAccessToken } from '@mereward/api/http/session';
import { Account } from '@mereward/db/entities/accounts/account';
import { FisheryRole } from '@mereward/db/entities/fisheries/fishery-role';
import type { Role } from '@mereward/shared/accounts/contract';
import { randomUUID } from 'node:crypto';
import request, { type Test } from 'supertest';
import type { TestServer } from './server';

/** Every built person's password. */
export const PASSWORD = 'four dull herons wade';

type Ask = (path: string) => Test;

/** Somebody who can ask the API for things; paths are given without `/api`. */
export type Asker = { get: Ask; post: Ask; put: Ask; patch: Ask; delete: Ask };

export type Person = Asker & { id: string; name: string; email: string };

type Held = { fisheryId: string; role: Role };

/** Asks without a sign-in. */
export function aStranger({ app }: TestServer): Asker {
  return asker(app, () => null);
}

let hash: Promise<string> | undefined;

/** An account with its address confirmed, signed in at whatever time the server's clock says. */
export async function aPerson(
  test: TestServer,
  wishes: { name?: string; email?: string; verified?: boolean; roles?: readonly Held[] } = {},
): Promise<Person> {
  const { config, source, clock } = test.server;
  const id = randomUUID();
  const email = wishes.email ?? `${id}@anglers.example`;
  const name = wishes.name ?? 'Robin Hale';
  const now = clock();
  await source.manager.insert(Account, {
    id,
    email,
    name,
    passwordHash: await (hash ??= passwordHash(PASSWORD)),
    emailVerifiedAt: wishes.verified === false ? null : now,
    units: { length: 'm', stickSpacingM: 3.66 },
    createdAt: now,
  });
  for (const { fisheryId, role } of wishes.roles ?? [])
    await source.manager.insert(FisheryRole, { fisheryId, accountId: id, role, givenBy: null, givenAt: now });
  return { id, name, email, ...asker(test.app, () => signAccessToken(config, id, clock())) };
}

/** A person holding one role at a fishery. */
export const signedIn = (test: TestServer, fisheryId: string, role: Role): Promise<Person> =>
  aPerson(test, { name: `The ${role.replace('_', ' ')}`, roles: [{ fisheryId, role }] });

function asker(app: TestServer['app'], token: () => string | null): Asker {
  const bear = (test: Test): Test => {
    const bearer = token();
    return bearer ? test.set('authorization', `Bearer ${bearer}`) : test;
  };
  const to = (path: string) => `/api${path}`;
  return {
    get: (path) => bear(request(app).get(to(path))),
    post: (path) => bear(request(app).post(to(path))),
    put: (path) => bear(request(app).put(to(path))),
    patch: (path) => bear(request(app).patch(to(path))),
    delete: (path) => bear(request(app).delete(to(path))),
  };
}
