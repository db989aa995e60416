import { RuleSheet } from '@mereward/db/entities/rules/rule-sheet';
import type { DraftAnswer, PutDraft } from '@mereward/shared/rules/sheet-contract';
import { changesWords, ruleChanges, weightOf } from '@mereward/shared/rules/rule-changes';
import { Problem } from '@mereward/shared/problems/problem';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce, plain, staleVersion } from '../repeat';
import { isDeepStrictEqual } from 'node:util';
import { DRAFT_READERS, RULE_PUBLISHERS, RULE_WRITERS } from './policy';
import { bookingsToCome } from './readers';
import { sheetInForce, sheetView } from './sheet-view';

/** The fishery's draft with what it changes and how much that weighs, beside what is in force. */
export async function draftAnswer({ tx, actor, now }: Ctx, fisheryId: string): Promise<DraftAnswer> {
  await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, DRAFT_READERS);
  const draft = await tx.findOneBy(RuleSheet, { fisheryId, status: 'draft' });
  const inForce = await sheetInForce(tx, fisheryId);
  const may = {
    write: holdsAny(actor, fisheryId, RULE_WRITERS),
    publish: holdsAny(actor, fisheryId, RULE_PUBLISHERS),
  };
  if (!draft) return { draft: null, inForce: inForce && sheetView(inForce), may };
  const changes = ruleChanges(inForce?.rules ?? [], draft.rules);
  const upcoming = (await bookingsToCome(tx, fisheryId, now)).length;
  return {
    draft: {
      id: draft.id,
      rules: draft.rules,
      version: draft.version,
      changes,
      words: changesWords(changes),
      ...weightOf(changes),
      upcoming,
    },
    inForce: inForce && sheetView(inForce),
    may,
  };
}

/** Begins the fishery's draft or changes it. There is one at a time; a version behind is told so. */
export async function putDraft(ctx: Ctx, fisheryId: string, input: PutDraft): Promise<void> {
  const { tx, actor, now } = ctx;
  await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, RULE_WRITERS);
  const { id, sheet, version } = input;
  if (version === null) {
    const row = { id, fisheryId, status: 'draft' as const, rules: sheet.rules, version: 1 };
    const made = await insertOnce(tx, RuleSheet, { ...row, madeBy: accountOf(actor), madeAt: now });
    if (made) return;
  }
  const kept = await tx.findOneBy(RuleSheet, { fisheryId, status: 'draft' });
  if (!kept) throw version === null ? idTaken() : notFound('draft');
  const same = isDeepStrictEqual(plain(kept.rules), plain(sheet.rules));
  if (kept.id !== id || version === null) {
    if (kept.id === id && same) return;
    throw new Problem('conflict', 'Somebody has begun a draft meanwhile', {
      detail: 'Yours was not saved. Reload to see theirs, then make your change in it.',
    });
  }
  const changed = await tx.update(
    RuleSheet,
    { id, fisheryId, status: 'draft', version },
    { rules: sheet.rules, version: version + 1 },
  );
  if (changed.affected === 1) return;
  if (kept.version === version + 1 && same) return;
  throw staleVersion();
}

const idTaken = (): Problem =>
  new Problem('conflict', 'This draft was published or thrown away already', {
    detail: 'Nothing was saved. Reload and begin a new one.',
  });

/** Throws the draft away; the version in force stays. */
export async function dropDraft({ tx, actor }: Ctx, fisheryId: string): Promise<void> {
  await fisheryFound(tx, fisheryId);
  allowOnly(actor, { fisheryId, what: 'fishery' }, RULE_WRITERS);
  const gone = await tx.delete(RuleSheet, { fisheryId, status: 'draft' });
  if (gone.affected === 0) throw notFound('draft');
}
