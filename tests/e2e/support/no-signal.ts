import type { Page } from '@playwright/test';
import { typeCast, type Typed } from './cast-form';
import { Asking, test as peopleTest } from './people';
import { expect } from './site';
import { anOpenVisit, aStoryWater, type StoryWater } from './story-water';

type Opening = {
  /** A lake of the journey's own. */
  water: StoryWater;
  joan: Asking;
  /** A visit of Joan's there, opened just now. */
  visitId: string;
  /** Joan's phone, with the program and the lake on it: the signal may go. */
  packed: Page;
};

export const test = peopleTest.extend<Opening>({
  water: async ({ site }, use) => use(await aStoryWater(await Asking.as('marian', site))),
  joan: async ({ site }, use) => use(await Asking.as('joan', site)),
  visitId: async ({ joan, water }, use) =>
    use(await anOpenVisit(joan, water, { startedAt: new Date().toISOString() })),
  packed: async ({ pageOf, water }, use) => {
    const page = await pageOf({ who: 'joan' });
    await packBeforeTheSignalGoes(page, water.lakeId);
    await use(page);
  },
});

export const CAST: Typed = {
  wraps: '14',
  landed: 'sharp crack',
  drags: 'fine rattle',
  back: 'nothing',
  pulls: '8',
};

/** Opens the form of a visit's first cast. */
export async function firstCast(page: Page, visitId: string): Promise<void> {
  await page.goto(`/bank/surveys/${visitId}/cast`);
  await expect(page.getByRole('heading', { level: 1 })).toHaveText('Cast 1');
}

/** Keeps casts one after another with no signal; each is said to wait. */
export async function castWithoutSignal(page: Page, wraps: readonly string[], first = 1): Promise<void> {
  for (const [i, count] of wraps.entries()) {
    const seq = String(first + i);
    await typeCast(page, { ...CAST, wraps: count });
    await expect(page.getByRole('status').filter({ hasText: 'grade' })).toContainText(/Gravel \d+\s%/);
    await page.getByRole('button', { name: `Keep cast ${seq}` }).click();
    await expect(page.getByText(`Cast ${seq} is kept on this phone and waits to be sent.`)).toBeVisible();
  }
}

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
