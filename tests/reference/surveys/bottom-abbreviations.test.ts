/**
 * Source: fixtures/13_bottom.json, abbreviations of IHO INT 1 section J and its qualifying terms. Exact.
 */
import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { z } from 'zod';
import { BOTTOM_ABBREVIATION, SUBSTRATE_ABBREVIATION } from '@mereward/shared/surveys/bottom-abbreviation';

const Term = z.object({ abbr: z.string(), term: z.string() });
const { int1_types, int1_qualifiers } = z
  .object({ int1_types: z.array(Term), int1_qualifiers: z.array(Term) })
  .parse(JSON.parse(readFileSync(new URL('../fixtures/13_bottom.json', import.meta.url), 'utf8')));
const termOf = (terms: z.infer<typeof Term>[], abbreviation: string) =>
  terms.find(({ abbr }) => abbr === abbreviation)?.term;

describe('chart abbreviations', () => {
  test.each(Object.entries(SUBSTRATE_ABBREVIATION))('%s is printed %s', (substrate, abbreviation) => {
    expect(termOf(int1_types, abbreviation)).toBe(substrate);
  });

  test.each([
    ['gravel', /^gravel$/],
    ['clay', /^clay$/],
    ['sand', /^sand$/],
    ['weed_low', /^weed/],
    ['weed_thick', /^weed/],
    ['shell', /^shells$/],
  ] as const)('the label %s stands for INT 1’s own term', (bottom, term) => {
    expect(termOf(int1_types, BOTTOM_ABBREVIATION[bottom] ?? '')).toMatch(term);
  });

  test.each([
    ['silt_firm', 'stiff'],
    ['silt_deep', 'soft'],
  ] as const)('%s is %s silt', (bottom, qualifier) => {
    const abbreviation = BOTTOM_ABBREVIATION[bottom] ?? '';
    expect(termOf(int1_qualifiers, abbreviation.slice(0, 2))).toBe(qualifier);
    expect(termOf(int1_types, abbreviation.slice(2))).toBe('silt');
  });

  test.each(['leaf', 'snag', 'unknown'] as const)('%s has no abbreviation there and gets none', (bottom) => {
    expect(BOTTOM_ABBREVIATION[bottom]).toBeNull();
  });
});
