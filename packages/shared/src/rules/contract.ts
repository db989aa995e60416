import { z } from 'zod';

const words = (max: number) => z.string().trim().max(max);

export const RuleCategory = z.enum([
  'safety',
  'fish_welfare',
  'tackle',
  'bait',
  'conduct',
  'access',
  'juniors',
  'night',
  'boats',
  'cars',
  'matches',
]);
export type RuleCategory = z.infer<typeof RuleCategory>;

/** What a rule holds for; null is all of them. */
export const RuleScope = z.strictObject({
  lakeIds: z.array(z.uuid()).min(1).max(50).nullable(),
  pegIds: z.array(z.uuid()).min(1).max(500).nullable(),
  ticketTypeIds: z.array(z.uuid()).min(1).max(100).nullable(),
});
export type RuleScope = z.infer<typeof RuleScope>;

/** One numbered rule. Its id stays when it is worded anew or numbered differently. */
export const Rule = z.strictObject({
  id: z.uuid(),
  number: z.int().min(1).max(999),
  text: words(1000).min(1),
  reason: words(400),
  category: RuleCategory,
  scope: RuleScope,
  basis: z.enum(['byelaw', 'fishery', 'advice']), // where it comes from
  link: words(300), // to the byelaw or the reason; ''
  severity: z.enum(['warn', 'remove', 'ban']), // what breaking it may lead to
});
export type Rule = z.infer<typeof Rule>;

export const RuleSheet = z
  .strictObject({ rules: z.array(Rule).max(300) })
  .superRefine(({ rules }, context) => {
    rules.forEach((rule, index) => {
      const before = rules.slice(0, index);
      if (before.some(({ number }) => number === rule.number))
        context.addIssue({
          code: 'custom',
          path: ['rules', index, 'number'],
          message: `There are two rules ${rule.number}`,
        });
      if (before.some(({ id }) => id === rule.id))
        context.addIssue({
          code: 'custom',
          path: ['rules', index, 'id'],
          message: 'The same rule is here twice',
        });
    });
  });
export type RuleSheet = z.infer<typeof RuleSheet>;

/** How much a new version matters: a wording put right, a change, or one that somebody’s safety hangs on. */
export const ChangeWeight = z.enum(['minor', 'change', 'safety']);
export type ChangeWeight = z.infer<typeof ChangeWeight>;

/** 7 is major 7, minor 0; 7.1 the first wording put right since. */
export const SheetNumber = z.strictObject({
  major: z.int().min(1).max(9999),
  minor: z.int().min(0).max(999),
});
export type SheetNumber = z.infer<typeof SheetNumber>;

/** When a sheet must have been read: for the ticket to be good, before coming, or it is only told. */
export const ReadingMode = z.enum(['must_ack_before_ticket_valid', 'must_ack_before_arrival', 'notice_only']);
export type ReadingMode = z.infer<typeof ReadingMode>;

/** That somebody has read a version: on a screen, on paper, or read out by a bailiff as witness. */
export const Acknowledgement = z.strictObject({
  id: z.uuid(),
  version: SheetNumber,
  method: z.enum(['online', 'paper', 'verbal']),
  at: z.iso.datetime(), // by the device; the server keeps when it heard beside it
  language: words(20), // BCP 47, like en-GB
});
export type Acknowledgement = z.infer<typeof Acknowledgement>;
