import { Role } from '@mereward/shared/accounts/contract';
import { Problem } from '@mereward/shared/problems/problem';
import type { Request, RequestHandler } from 'express';
import jwt from 'jsonwebtoken';
import { createSecretKey, type KeyObject } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { z } from 'zod';
import type { Config } from '../config';
import { STRANGER, type Actor } from '../ctx';
import { serverOf } from './server';

/** How long an access token opens doors; the refresh cookie brings the next. */
export const ACCESS_TOKEN_S = 600;

const Claims = z.object({ sub: z.uuid(), iat: z.number() });
const keys = new WeakMap<Config, KeyObject>();

// A key object, made once: jsonwebtoken turns a string secret into one on every call, at thirty times the cost.
function keyOf(config: Config): KeyObject {
  const known = keys.get(config);
  if (known) return known;
  const key = createSecretKey(config.accessTokenSecret);
  keys.set(config, key);
  return key;
}

export function signAccessToken(config: Config, accountId: string, now: Date): string {
  const issuedAt = now.getTime() / 1000; // with its milliseconds: what ended just before stays told from what began just after
  return jwt.sign({ sub: accountId, iat: issuedAt, exp: issuedAt + ACCESS_TOKEN_S }, keyOf(config), {
    algorithm: 'HS256',
  });
}

const runOut = () =>
  new Problem('not-signed-in', 'Your sign-in has run out', { detail: 'Sign in again to go on.' });

/** The claims of a compact JWS signed by this key with HS256 and not run out; throws for anything else. */
export function verifiedClaims(key: KeyObject, token: string, now: Date): unknown {
  const clockTimestamp = Math.floor(now.getTime() / 1000);
  return jwt.verify(token, key, { algorithms: ['HS256'], clockTimestamp });
}

function claimsIn(req: Request): z.infer<typeof Claims> | null {
  const header = req.get('authorization');
  if (!header) return null;
  const { config, clock } = serverOf(req);
  try {
    return Claims.parse(verifiedClaims(keyOf(config), header.replace(/^Bearer /, ''), clock()));
  } catch {
    throw runOut();
  }
}

/** Before a route that nobody may use without a sign-in: turned away before a body is read. */
export const signedInOnly: RequestHandler = (req, _res, next) => {
  if (!claimsIn(req)) throw new Problem('not-signed-in', 'Sign in first');
  next();
};

const Held = z.object({
  tokens_from: z.date().nullable(),
  fishery_id: z.string().nullable(),
  role: Role.nullable(),
});

const HELD = `
  SELECT account.tokens_from, held.fishery_id, held.role
  FROM account LEFT JOIN fishery_role held ON held.account_id = account.id
  WHERE account.id = $1`;

/** The actor of a request, with the roles as they stand now: a role or a sign-in taken away closes doors at once. */
export async function actorOf(req: Request, tx: EntityManager): Promise<Actor> {
  const claims = claimsIn(req);
  if (!claims) return STRANGER;
  const rows = z.array(Held).parse(await tx.query(HELD, [claims.sub]));
  const from = rows[0]?.tokens_from;
  if (rows.length === 0 || (from && claims.iat * 1000 < from.getTime())) throw runOut();
  const roles = new Map<string, Set<Role>>();
  for (const { fishery_id: fisheryId, role } of rows) {
    if (!fisheryId || !role) continue;
    roles.set(fisheryId, (roles.get(fisheryId) ?? new Set<Role>()).add(role));
  }
  return { kind: 'account', id: claims.sub, roles };
}
