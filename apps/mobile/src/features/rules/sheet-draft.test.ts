import { expect, test } from 'vitest';
import { freshRule, ruleOfTyped, typedRule, withRule } from './sheet-draft';
import { RULE_TEMPLATES } from './rule-templates';
import { RuleSheet } from '@mereward/shared/rules/contract';

test('a fresh rule takes the number after the last', () => {
  const first = freshRule([]);
  expect(first.number).toBe(1);
  expect(freshRule([{ ...first, number: 19 }]).number).toBe(20);
});

test('what is typed comes back as it was, its scope of pegs kept', () => {
  const pegId = '5f0f7a53-5f9e-4b1c-9d3b-0c5c7d5e5a11';
  const rule = {
    ...freshRule([]),
    text: 'No fires.',
    scope: { lakeIds: null, pegIds: [pegId], ticketTypeIds: null },
  };
  expect(ruleOfTyped(typedRule(rule))).toEqual(rule);
});

test('a changed rule stays one rule and finds its place by number', () => {
  const [a, b] = [freshRule([]), { ...freshRule([]), number: 2 }];
  expect(withRule([a, b], { ...a, number: 3 }).map(({ number }) => number)).toEqual([2, 3]);
});

test('every template makes a sheet that may be published', () => {
  const rules = RULE_TEMPLATES.map((template, i) => ({ ...freshRule([]), ...template, number: i + 1 }));
  expect(RuleSheet.safeParse({ rules }).success).toBe(true);
});
