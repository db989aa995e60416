import { expect, type Page } from '@playwright/test';
import { z } from 'zod';

const Caught = z.object({ mails: z.array(z.object({ to: z.string(), text: z.string() })) });

/** The newest mailed link to `screen` for `email`, as a path on this site. */
export async function mailedPath(page: Page, email: string, screen: string): Promise<string> {
  const link = new RegExp(`https?://[^/\\s]+(/${screen}\\?token=\\S+)`);
  const find = async (): Promise<string> => {
    const { mails } = Caught.parse(await (await page.request.get('/demo/mail.json')).json());
    const found = mails.filter(({ to }) => to.includes(email)).map(({ text }) => link.exec(text)?.[1]);
    return found.find((path) => path !== undefined) ?? '';
  };
  await expect.poll(find, { timeout: 20_000 }).not.toBe('');
  return find();
}
