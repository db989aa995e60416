import { request, type APIRequestContext, type BrowserContext, type Page } from '@playwright/test';
import { SignedIn } from '@mereward/shared/accounts/contract';
import type { z } from 'zod';
import { expect, test as siteTest, type Site } from './site';

/** The demo's people by first name, and their password. */
export type Somebody = 'marian' | 'idris' | 'joan' | 'tom' | 'priya' | 'colin' | 'sofia';
const PASSWORD = 'heron by the sluice';
const signInOf = (who: Somebody) => ({ email: `${who}@ostlemere.example`, password: PASSWORD });

type Multipart = Record<string, string | { name: string; mimeType: string; buffer: Buffer }>;

/** Asks the API in somebody's name: what a journey needs to be there before it begins. */
export class Asking {
  private constructor(
    private readonly asked: APIRequestContext,
    readonly accountId: string,
  ) {}

  static async as(who: Somebody, site: Site): Promise<Asking> {
    const first = await request.newContext({ baseURL: site.url });
    const answer = await first.post('/api/accounts/session', { data: signInOf(who) });
    const signedIn = SignedIn.parse(await answer.json());
    await first.dispose();
    const extraHTTPHeaders = { Authorization: `Bearer ${signedIn.accessToken}` };
    return new Asking(await request.newContext({ baseURL: site.url, extraHTTPHeaders }), signedIn.account.id);
  }

  /** Fails unless the deed was done. Paths start below `/api`. */
  async do(method: 'POST' | 'PUT' | 'DELETE', path: string, data?: unknown): Promise<void> {
    const answer = await this.asked.fetch(`/api${path}`, { method, ...(data === undefined ? {} : { data }) });
    expect(answer.ok(), `${method} ${path}: ${await answer.text()}`).toBe(true);
  }

  /** Sends a form with one text file in it. */
  async send(
    path: string,
    fields: Record<string, string>,
    file: { field: string; name: string; text: string },
  ) {
    const upload = { name: file.name, mimeType: 'text/plain', buffer: Buffer.from(file.text) };
    await this.upload(path, { ...fields, [file.field]: upload });
  }

  /** Sends a file as a form does; fails unless it was taken. */
  async upload(path: string, multipart: Multipart): Promise<void> {
    const answer = await this.asked.post(`/api${path}`, { multipart });
    expect(answer.ok(), `POST ${path}: ${await answer.text()}`).toBe(true);
  }

  async get<T>(path: string, schema: z.ZodType<T>): Promise<T> {
    const answer = await this.asked.get(`/api${path}`);
    expect(answer.ok(), `GET ${path}: ${String(answer.status())}`).toBe(true);
    return schema.parse(await answer.json());
  }
}

/** Signs in on a page the quick way: the cookie by the API, then the page finds it as after a reload. */
async function enter(page: Page, who: Somebody): Promise<void> {
  const answer = await page.request.post('/api/accounts/session', { data: signInOf(who) });
  const { account } = SignedIn.parse(await answer.json());
  await page.addInitScript((kept) => {
    if (sessionStorage.getItem('entered')) return;
    sessionStorage.setItem('entered', 'yes');
    localStorage.setItem('mereward.account', kept);
  }, JSON.stringify(account));
}

type Wishes = { who?: Somebody; now?: string };

/** `pageOf`: a browser of somebody's own, signed in unless a stranger; its clock stands at `now` when one is given. */
export const test = siteTest.extend<{ pageOf: (wishes?: Wishes) => Promise<Page> }>({
  pageOf: async ({ browser }, use) => {
    const opened: BrowserContext[] = [];
    await use(async ({ who, now } = {}) => {
      const context = await browser.newContext();
      opened.push(context);
      const page = await context.newPage();
      if (now !== undefined) await page.clock.setFixedTime(now);
      if (who !== undefined) await enter(page, who);
      return page;
    });
    await Promise.all(opened.map((context) => context.close()));
  },
});

/** Signs in as people do, by the form. */
export async function signIn(page: Page, who: Somebody, next: string): Promise<void> {
  await page.goto(`/sign-in?next=${encodeURIComponent(next)}`);
  await fillSignIn(page, who);
}

/** Fills in and sends the form for signing in that stands on the page. */
export async function fillSignIn(page: Page, who: Somebody): Promise<void> {
  const { email, password } = signInOf(who);
  await page.getByLabel('E-mail').fill(email);
  await page.getByLabel('Password').fill(password);
  await page.keyboard.press('Enter');
  await expect(page).not.toHaveURL(/sign-in/);
}
