import type { Request, Response } from 'express';
import { z } from 'zod';
import { serverOf } from '../http/server';
import type { Config } from '../config';
import { SIGNED_IN_FOR_S } from './sign-in';

const Cookies = z.record(z.string(), z.string());

// Cookies know no ports: two copies of the server on one machine must not sign each other's people out.
function cookieName({ publicUrl }: Config): string {
  const { port } = new URL(publicUrl);
  return port ? `mereward_refresh_${port}` : 'mereward_refresh';
}

/** Out of reach of scripts and of other sites, and sent only where it is needed. */
const guarded = ({ publicUrl }: Config) =>
  ({
    httpOnly: true,
    sameSite: 'strict',
    secure: publicUrl.startsWith('https:'),
    path: '/api/accounts',
  }) as const;

export function refreshTokenOf(req: Request): string | null {
  const cookies = Cookies.safeParse(req.cookies);
  return (cookies.success && cookies.data[cookieName(serverOf(req).config)]) || null;
}

export function setRefreshCookie(res: Response, config: Config, token: string): void {
  res.cookie(cookieName(config), token, { ...guarded(config), maxAge: SIGNED_IN_FOR_S * 1000 });
}

export function clearRefreshCookie(res: Response, config: Config): void {
  res.clearCookie(cookieName(config), guarded(config));
}
