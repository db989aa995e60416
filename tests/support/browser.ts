import request, { type Response } from 'supertest';
import type { TestServer } from './server';

/** One window of a browser: it holds the refresh cookie as a browser would. */
export type Browser = {
  /** The refresh cookie as it would be sent, `name=value`, or null. */
  cookie: () => string | null;
  holdCookie: (cookie: string) => void;
  signIn: (email: string, password: string) => Promise<Response>;
  refresh: () => Promise<Response>;
  signOut: () => Promise<Response>;
};

export function aBrowser({ app }: TestServer): Browser {
  let jar: string | null = null;
  const keep = (answer: Response): Response => {
    for (const line of answer.get('Set-Cookie') ?? []) {
      const [pair = ''] = line.split(';');
      jar = pair.endsWith('=') ? null : pair;
    }
    return answer;
  };
  const cookies = () => (jar ? { Cookie: jar } : {});
  return {
    cookie: () => jar,
    holdCookie: (cookie) => void (jar = cookie),
    signIn: async (email, password) =>
      keep(await request(app).post('/api/accounts/session').send({ email, password })),
    refresh: async () =>
      keep(
        await request(app)
          .post('/api/accounts/session/refresh')
          .set({ 'X-Mereward': '1', ...cookies() }),
      ),
    signOut: async () =>
      keep(
        await request(app)
          .delete('/api/accounts/session')
          .set({ 'X-Mereward': '1', ...cookies() }),
      ),
  };
}
