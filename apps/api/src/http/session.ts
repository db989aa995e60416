import { FisheryRole } from '@mereward/db/entities/fisheries/fishery-role';
import type { Role } from '@mereward/shared/accounts/contract';
import { Problem } from '@mereward/shared/problems/problem';
import type { Request } from 'express';
import jwt from 'jsonwebtoken';
import { createSecretKey, type KeyObject } from 'node:crypto';
import type { EntityManager } from 'typeorm';
import { z } from 'zod';
import type { Config } from '../config';
import { STRANGER, type Actor } from '../ctx';
import { serverOf } from './server';

/** How long an access token opens doors; the refresh cookie brings the next. */
export const ACCESS_TOKEN_S = 600;

const Claims = z.object({ sub: z.uuid() });
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
  const issuedAt = Math.floor(now.getTime() / 1000);
  return jwt.sign({ sub: accountId, iat: issuedAt, exp: issuedAt + ACCESS_TOKEN_S }, keyOf(config), {
    algorithm: 'HS256',
  });
}

function accountIn(req: Request): string | null {
  const header = req.get('authorization');
  if (!header) return null;
  const { config, clock } = serverOf(req);
  try {
    const token = header.replace(/^Bearer /, '');
    const clockTimestamp = Math.floor(clock().getTime() / 1000);
    return Claims.parse(jwt.verify(token, keyOf(config), { algorithms: ['HS256'], clockTimestamp })).sub;
  } catch {
    throw new Problem('not-signed-in', 'Your sign-in has run out', { detail: 'Sign in again to go on.' });
  }
}

/** The actor of a request, with the roles as they stand now: a role taken away closes doors at once. */
export async function actorOf(req: Request, tx: EntityManager): Promise<Actor> {
  const id = accountIn(req);
  if (!id) return STRANGER;
  const rows = await tx.find(FisheryRole, { where: { accountId: id } });
  const roles = new Map<string, Set<Role>>();
  for (const { fisheryId, role } of rows) {
    const held = roles.get(fisheryId) ?? new Set<Role>();
    roles.set(fisheryId, held.add(role));
  }
  return { kind: 'account', id, roles };
}
