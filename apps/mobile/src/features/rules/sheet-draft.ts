import { Rule, RuleCategory } from '@mereward/shared/rules/contract';
import { z } from 'zod';
import { newId } from '@/lib/new-id';

/** One rule as it is typed; its scope travels along untouched unless lakes are chosen. */
export const RuleTyped = z.object({
  id: z.uuid(),
  number: z
    .string()
    .trim()
    .regex(/^[1-9]\d{0,2}$/, 'A number from 1 to 999'),
  text: z.string().trim().min(1, 'Word the rule').max(1000),
  reason: z.string().trim().max(400),
  category: RuleCategory,
  severity: Rule.shape.severity,
  basis: Rule.shape.basis,
  link: z.string().trim().max(300),
  lakeIds: z.array(z.string()),
  scope: Rule.shape.scope,
});
export type RuleTyped = z.infer<typeof RuleTyped>;

export const typedRule = (rule: Rule): RuleTyped => ({
  ...rule,
  number: String(rule.number),
  lakeIds: rule.scope.lakeIds ?? [],
});

export const ruleOfTyped = ({ lakeIds, number, scope, ...rule }: RuleTyped): Rule => ({
  ...rule,
  number: Number(number),
  scope: { ...scope, lakeIds: lakeIds.length > 0 ? lakeIds : null },
});

export const freshRule = (rules: readonly Rule[]): Rule => ({
  id: newId(),
  number: Math.max(0, ...rules.map(({ number }) => number)) + 1,
  text: '',
  reason: '',
  category: 'conduct',
  scope: { lakeIds: null, pegIds: null, ticketTypeIds: null },
  basis: 'fishery',
  link: '',
  severity: 'warn',
});

/** The rules with one put in or changed, in the order of their numbers. */
export const withRule = (rules: readonly Rule[], rule: Rule): Rule[] =>
  [...rules.filter(({ id }) => id !== rule.id), rule].sort((a, b) => a.number - b.number);
