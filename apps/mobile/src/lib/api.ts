import { SignedIn } from '@mereward/shared/accounts/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { z } from 'zod';
import { problemOf } from '@/lib/answer';
import { oneAtATime } from '@/lib/one-at-a-time';
import { sessionStore } from '@/lib/session-store';

/** The answer of a deed whose answer does not matter; a newer server may say more than nothing. */
export const nothing = z.unknown();

type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';
export type Ask = { method: Method; body?: unknown; signal?: AbortSignal | undefined };

/** On the web the program and its API share an address; a phone's build names it. */
const ORIGIN = process.env.EXPO_PUBLIC_API_URL ?? '';

/** The address of something under the API, for links and pictures: `apiUrl('/pegs/…/card.pdf')`. */
export const apiUrl = (path: string): string => `${ORIGIN}/api${path}`;

function send(path: string, { method, body, signal }: Ask): Promise<Response> {
  const token = sessionStore.token(Date.now());
  const form = typeof FormData !== 'undefined' && body instanceof FormData;
  return fetch(apiUrl(path), {
    method,
    credentials: 'same-origin',
    headers: {
      Accept: 'application/json',
      'X-Mereward': '1', // a page of another site cannot set this without asking first
      ...(token ? { Authorization: `Bearer ${token}` } : {}),
      ...(body === undefined || form ? {} : { 'Content-Type': 'application/json' }),
    },
    ...(body === undefined ? {} : { body: form ? body : JSON.stringify(body) }),
    ...(signal ? { signal } : {}),
  });
}

let refreshing: Promise<boolean> | null = null;

async function askAnew(): Promise<boolean> {
  const response = await send('/accounts/session/refresh', { method: 'POST' });
  if (response.ok) {
    sessionStore.enter(SignedIn.parse(await response.json()), Date.now());
    return true;
  }
  const problem = await problemOf(response);
  if (problem.kind !== 'not-signed-in') throw problem; // the server is in trouble: nobody is signed out for that
  sessionStore.leave();
  return false;
}

/** Gets a fresh access token from the cookie; false when there is no sign-in any more. Many callers, one request. */
export function refreshSession(): Promise<boolean> {
  refreshing ??= oneAtATime('mereward.refresh', askAnew).finally(() => {
    refreshing = null;
  });
  return refreshing;
}

/**
 * Sends a request with a good token where there is a sign-in, and once more when the token turns out stale: with a
 * fresh one, or as a stranger when the sign-in is over, for what is open to everybody stays open.
 */
async function ask(path: string, request: Ask): Promise<Response> {
  const known = sessionStore.get().account !== null;
  if (known && sessionStore.token(Date.now()) === null) await refreshSession();
  const withToken = sessionStore.token(Date.now()) !== null;
  const response = await send(path, request);
  if (response.status !== 401 || !withToken) return response;
  sessionStore.forgetToken();
  await refreshSession();
  return send(path, request);
}

/**
 * Sends something in the name of one account and no other. Null when that account is not signed in here (any more): a
 * token that belongs to whoever came since is never used for it.
 */
export async function askAs(accountId: string, path: string, request: Ask): Promise<Response | null> {
  for (let tries = 0; tries < 2; tries += 1) {
    if (sessionStore.token(Date.now()) === null) await refreshSession();
    const { state, account } = sessionStore.get();
    if (state !== 'signed-in' || account.id !== accountId) return null;
    const response = await send(path, request);
    if (response.status !== 401) return response;
    sessionStore.forgetToken();
  }
  return null;
}

/** An answer's content. What is no JSON at all, such as a hotel's sign-in page, is left for the schema to refuse. */
function contentOf(text: string): unknown {
  if (text === '') return undefined;
  try {
    return JSON.parse(text);
  } catch {
    return text;
  }
}

async function answer<T>(path: string, schema: z.ZodType<T>, request: Ask): Promise<T> {
  const response = await ask(path, request);
  if (!response.ok) throw await problemOf(response);
  const parsed = schema.safeParse(contentOf(await response.text()));
  if (parsed.success) return parsed.data;
  throw new Problem('internal', 'The server’s answer could not be read', {
    detail: 'This page may be older than the server, or something stands between. Load the page again.',
  });
}

/**
 * The API, typed by its contracts: `api.get('/lakes', LakeList)`. Paths start below `/api`. A refusal is thrown as
 * a `Problem`; no signal at all as the fetch's own TypeError. For an answer without content pass `nothing`.
 */
export const api = {
  get: <T>(path: string, schema: z.ZodType<T>, signal?: AbortSignal) =>
    answer(path, schema, { method: 'GET', signal }),
  post: <T>(path: string, body: unknown, schema: z.ZodType<T>) =>
    answer(path, schema, { method: 'POST', body }),
  put: <T>(path: string, body: unknown, schema: z.ZodType<T>) =>
    answer(path, schema, { method: 'PUT', body }),
  patch: <T>(path: string, body: unknown, schema: z.ZodType<T>) =>
    answer(path, schema, { method: 'PATCH', body }),
  del: <T>(path: string, schema: z.ZodType<T>) => answer(path, schema, { method: 'DELETE' }),
  /** A file, such as a card or an export, which a plain link could not fetch without the token. */
  file: async (path: string): Promise<Blob> => {
    const response = await ask(path, { method: 'GET' });
    if (!response.ok) throw await problemOf(response);
    return response.blob();
  },
};
