import type { Page } from '@playwright/test';
import { expect } from './site';

/** How many rows a store of the device's own database holds. */
const rowsIn = (page: Page, store: string): Promise<string[]> =>
  page.evaluate(
    (name) =>
      new Promise<string[]>((resolve, reject) => {
        const asked = indexedDB.open('mereward');
        asked.onerror = () => reject(new Error('no database'));
        asked.onsuccess = () => {
          const keys = asked.result.transaction(name).objectStore(name).getAllKeys();
          keys.onsuccess = () => {
            asked.result.close();
            resolve(keys.result.map(String));
          };
        };
      }),
    store,
  );

/** Everything the device's own database holds, as text a curious finder could make of it. */
export const deviceText = (page: Page): Promise<string> =>
  page.evaluate(async () => {
    const asked = indexedDB.open('mereward');
    await new Promise((done) => (asked.onsuccess = done));
    const db = asked.result;
    const texts = await Promise.all(
      [...db.objectStoreNames].map(
        (name) =>
          new Promise<string>((resolve) => {
            const all = db.transaction(name).objectStore(name).getAll();
            all.onsuccess = () =>
              resolve(
                JSON.stringify(all.result, (_key, value: unknown) =>
                  value instanceof ArrayBuffer ? String.fromCharCode(...new Uint8Array(value)) : value,
                ),
              );
          }),
      ),
    );
    db.close();
    return texts.join('\n');
  });

/** Opens the bank with a signal, and waits until the program and a lake's pegs lie on the device. */
export async function packBeforeTheSignalGoes(page: Page, lakeId: string): Promise<void> {
  await page.goto('/bank');
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Bank');
  await page.evaluate(() => navigator.serviceWorker.ready.then(() => undefined));
  await expect.poll(() => page.evaluate(() => navigator.serviceWorker.controller !== null)).toBe(true);
  await waitUntilKept(page, 'surveys', 'pegs', lakeId);
  await expect.poll(() => rowsIn(page, 'keys')).toHaveLength(1);
}

/** Waits until a reading lies on the device. */
export const waitUntilKept = (page: Page, ...key: string[]): Promise<void> =>
  expect.poll(() => rowsIn(page, 'read')).toContain(JSON.stringify(key));

export const sending = (page: Page) => page.getByRole('region', { name: 'Sending' });
