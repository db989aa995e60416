import { RuleSheet } from '@mereward/db/entities/rules/rule-sheet';
import { Problem } from '@mereward/shared/problems/problem';
import { nextNumber, ruleChanges, weightOf } from '@mereward/shared/rules/rule-changes';
import type { PublishDraft } from '@mereward/shared/rules/sheet-contract';
import { accountOf, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { staleVersion } from '../repeat';
import { rulesChangedLetter } from './letters';
import { post } from '../mail/send';
import { RULE_PUBLISHERS } from './policy';
import { bookingsToCome } from './readers';
import { asPublished, sheetInForce, type Published } from './sheet-view';

/**
 * Puts the draft in force under the next number, frozen. A change on which somebody's safety hangs is told to everybody
 * with a booking still to come, once each, with the words before and after. Sent again it changes nothing.
 */
export async function publishDraft(ctx: Ctx, fisheryId: string, input: PublishDraft): Promise<void> {
  const { tx, actor, now } = ctx;
  await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, RULE_PUBLISHERS);
  await tx.query('SELECT id FROM fishery WHERE id = $1 FOR NO KEY UPDATE', [fisheryId]);
  const draft = await tx.findOneBy(RuleSheet, { id: input.draftId, fisheryId });
  if (!draft) throw notFound('draft');
  if (draft.status === 'published') return refuseUnless(draft.weight === input.weight);
  if (draft.version !== input.version) throw staleVersion();
  const inForce = await sheetInForce(tx, fisheryId);
  const changes = ruleChanges(inForce?.rules ?? [], draft.rules);
  refuseEmpty(draft, changes.length);
  const { least } = weightOf(changes);
  if (input.weight === 'minor' && least !== 'minor')
    throw new Problem('invalid', 'This is more than a wording put right', {
      detail: 'A rule was added, taken away or means something else. Publish it as a change, or as safety.',
      errors: [{ pointer: '/weight', detail: 'Choose “change” or “safety”.' }],
    });
  const number = nextNumber(inForce, input.weight);
  await tx.update(
    RuleSheet,
    { id: draft.id, status: 'draft' },
    {
      ...number,
      status: 'published',
      weight: input.weight,
      changes: inForce ? changes : null,
      publishedBy: accountOf(actor),
      publishedAt: now,
    },
  );
  const published = asPublished(await tx.findOneByOrFail(RuleSheet, { id: draft.id }));
  if (input.weight === 'safety') await tellUpcoming(ctx, published);
}

function refuseUnless(same: boolean): void {
  if (same) return;
  throw new Problem('conflict', 'This draft is published already', {
    detail: 'What is published stays as it is. Begin a new draft to change it.',
  });
}

function refuseEmpty({ rules }: RuleSheet, changes: number): void {
  if (rules.length === 0)
    throw new Problem('conflict', 'There is no rule in this draft', {
      detail: 'Write one at least, then publish.',
    });
  if (changes === 0)
    throw new Problem('conflict', 'Nothing differs from the rules in force', {
      detail: 'Nothing was published. Change a rule first, or throw the draft away.',
    });
}

async function tellUpcoming(ctx: Ctx, sheet: Published): Promise<void> {
  const { name: fishery } = await fisheryFound(ctx.tx, sheet.fisheryId);
  const told = new Set<string>();
  for (const { bookingId, holder, email } of await bookingsToCome(ctx.tx, sheet.fisheryId, ctx.now)) {
    if (email === null || told.has(email)) continue;
    told.add(email);
    const url = `${ctx.publicUrl}/tickets/bookings/${bookingId}`;
    await post(ctx, rulesChangedLetter({ name: holder, email }, { fishery, sheet }, url));
  }
}
