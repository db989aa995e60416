import type { Page } from '@playwright/test';

export type Typed = {
  wraps: string;
  beside?: string;
  landed: string;
  drags: string;
  draggedM?: string;
  back: string;
  pulls: string;
};

const fold = (page: Page, name: RegExp) => page.getByRole('button', { name });

/** Types one cast from where the form stands; what the last cast left carried forward is typed over. */
export async function typeCast(page: Page, typed: Typed): Promise<void> {
  const beside = page.getByLabel(/^Beside the mark/);
  if ((await beside.count()) === 0) await fold(page, /^Aim, from peg/).click();
  await beside.first().fill(typed.beside ?? '0');
  await page.getByLabel('Wraps of 12 ft', { exact: true }).fill(typed.wraps);
  await page.getByLabel('left over', { exact: true }).fill('0');
  const landed = page.getByRole('group', { name: 'How it landed' });
  await landed.getByRole('radio', { name: typed.landed, exact: true }).check();
  const drags = page.getByRole('group', { name: 'How it drags' });
  await drags.getByRole('radio', { name: typed.drags, exact: true }).check();
  const back = page.getByRole('checkbox', { name: typed.back, exact: true });
  if ((await back.count()) === 0) await fold(page, /^What came back/).click();
  await back.check();
  await page.getByLabel('Float, pulls of 1 ft').fill(typed.pulls);
  if (typed.draggedM === undefined) return;
  await fold(page, /^More of this cast/).click();
  await page.getByLabel('Dragged for').fill(typed.draggedM);
}

/** Keeps the cast that stands typed, and waits until it is said to be kept. */
export async function keepCast(page: Page, seq: number): Promise<void> {
  await page.getByRole('button', { name: `Keep cast ${String(seq)}` }).click();
  await page.getByText(`Cast ${String(seq)} is kept.`).waitFor();
}
