import AxeBuilder from '@axe-core/playwright';
import { expect, type Page } from '@playwright/test';

const TAGS = ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'];
const OF_COLOUR = ['color-contrast', 'link-in-text-block'];

/**
 * Every WCAG 2.2 A and AA fault that axe finds on the page as it stands: rule, place and reason. `colours` looks at those
 * rules alone that another theme can break.
 */
export async function axeFaults(page: Page, look: 'all' | 'colours' = 'all'): Promise<string[]> {
  const axe = new AxeBuilder({ page }).setLegacyMode(); // there are no frames, for which it would open a page each time
  axe.options({ resultTypes: ['violations'] });
  const { violations } = await (look === 'all' ? axe.withTags(TAGS) : axe.withRules(OF_COLOUR)).analyze();
  return violations.flatMap(({ id, nodes }) =>
    nodes.map((node) => `${id}: ${node.target.join(' ')}: ${node.failureSummary ?? ''}`),
  );
}

export async function expectNoAxeFaults(page: Page): Promise<void> {
  expect(await axeFaults(page), page.url()).toEqual([]);
}
