import { Problem, ProblemBody } from '@mereward/shared/problems/problem';
import type { z } from 'zod';
import { apiUrl, refreshSession } from '@/lib/api';
import { sessionStore } from '@/lib/session-store';

type Terms<T> = {
  path: string;
  form: FormData;
  schema: z.ZodType<T>;
  /** Share of the bytes that have left this device, 0 to 1. */
  onShare: (share: number) => void;
  signal?: AbortSignal | undefined;
};

const jsonOf = (text: string): unknown => {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
};

function refusal(status: number, body: unknown): Problem {
  const parsed = ProblemBody.safeParse(body);
  if (!parsed.success)
    return new Problem(status === 413 ? 'too-large' : 'internal', `The server answered ${String(status)}`);
  const { kind, title, detail, errors, instance } = parsed.data;
  return new Problem(kind, title, {
    ...(detail === undefined ? {} : { detail }),
    ...(errors === undefined ? {} : { errors }),
    ...(instance === undefined ? {} : { instance }),
  });
}

/** Posts a form with a file, telling how much of it has gone: `fetch` can't. No signal is a `TypeError`, as a fetch's. */
export async function sendFile<T>({ path, form, schema, onShare, signal }: Terms<T>): Promise<T> {
  if (sessionStore.token(Date.now()) === null) await refreshSession();
  const token = sessionStore.token(Date.now());
  return new Promise<T>((resolve, reject) => {
    const request = new XMLHttpRequest();
    request.open('POST', apiUrl(path));
    request.setRequestHeader('Accept', 'application/json');
    request.setRequestHeader('X-Mereward', '1');
    if (token) request.setRequestHeader('Authorization', `Bearer ${token}`);
    request.upload.onprogress = ({ loaded, total }) => {
      if (total > 0) onShare(loaded / total);
    };
    request.onerror = () => reject(new TypeError('The file did not get through'));
    request.onabort = () => reject(new DOMException('Stopped', 'AbortError'));
    request.onload = () => {
      const body = jsonOf(request.responseText);
      const parsed = schema.safeParse(body);
      if (request.status >= 400) reject(refusal(request.status, body));
      else if (parsed.success) resolve(parsed.data);
      else reject(new Problem('internal', 'The server’s answer could not be read'));
    };
    signal?.addEventListener('abort', () => request.abort());
    request.send(form);
  });
}
