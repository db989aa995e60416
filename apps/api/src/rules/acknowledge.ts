import { RuleAcknowledgement } from '@mereward/db/entities/rules/rule-acknowledgement';
import type { SheetNumber } from '@mereward/shared/rules/contract';
import { numberWords } from '@mereward/shared/rules/rule-changes';
import { isLater } from '@mereward/shared/rules/reading';
import type { AcknowledgeRules, WitnessReading } from '@mereward/shared/rules/sheet-contract';
import { Problem } from '@mereward/shared/problems/problem';
import { accountOf, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { insertOnce } from '../repeat';
import { refuseWrongClock } from '../wrong-clock';
import { bookingToRead } from './booking-read';
import { READING_WITNESSES } from './policy';
import { sheetInForce, sheetNumbered, type Published } from './sheet-view';

type By = Pick<RuleAcknowledgement, 'accountId' | 'bookingId' | 'method' | 'witness'>;

/** Keeps that the reader has read the version in force, on their own screen. */
export async function acknowledgeRules(
  ctx: Ctx,
  fisheryId: string,
  { device, ...input }: AcknowledgeRules & { device: string },
): Promise<void> {
  await fisheryFound(ctx.tx, fisheryId);
  const accountId = accountOf(ctx.actor);
  const by: By = { accountId, bookingId: null, method: 'online', witness: null };
  const sheet = await versionRead(ctx, fisheryId, input.version);
  // A newer one may have been published while this page was open. A wording put right asks nobody again.
  const inForce = await sheetInForce(ctx.tx, fisheryId);
  if (inForce && isLater(inForce, sheet) && inForce.major !== sheet.major)
    throw new Problem('conflict', `Version ${numberWords(inForce)} of the rules is in force by now`, {
      detail: 'Nothing was kept. Reload to read what changed.',
    });
  await keep(ctx, sheet, { input, by, device });
}

/**
 * Keeps that a bailiff read the rules to a booking's holder, or saw them sign on paper. The version is the one the
 * witness had with them; told late, when a newer one is in force, it still stands for what was read.
 */
export async function witnessReading(
  ctx: Ctx,
  bookingId: string,
  { device, ...input }: WitnessReading & { device: string },
): Promise<void> {
  const booking = await bookingToRead(ctx, bookingId);
  const { fisheryId, accountId } = booking;
  allowOnly(ctx.actor, { fisheryId, what: 'booking' }, READING_WITNESSES);
  const witness = accountOf(ctx.actor);
  if (accountId === witness)
    throw new Problem('forbidden', 'Nobody is the witness of their own reading', {
      detail: 'Read the rules on your own ticket, or ask another bailiff.',
    });
  const sheet = await versionRead(ctx, fisheryId, input.version);
  await keep(ctx, sheet, { input, by: { accountId, bookingId, method: input.method, witness }, device });
}

async function versionRead({ tx }: Ctx, fisheryId: string, version: SheetNumber): Promise<Published> {
  const sheet = await sheetNumbered(tx, fisheryId, version);
  if (!sheet) throw notFound('version of the rules');
  return sheet;
}

type Reading = { input: AcknowledgeRules; by: By; device: string };

async function keep({ tx, now }: Ctx, sheet: Published, { input, by, device }: Reading): Promise<void> {
  const deviceAt = new Date(input.at);
  refuseWrongClock({ at: deviceAt, now, pointer: '/at', what: 'reading' });
  const { id, language } = input;
  const made = await insertOnce(tx, RuleAcknowledgement, {
    id,
    ruleSheetId: sheet.id,
    ...by,
    language,
    deviceAt,
    at: now,
    device,
  });
  if (made) return;
  // The same person has read this version already, or the same reading is sent again: either is as it should be.
  const kept = await tx.findOneBy(RuleAcknowledgement, { id });
  if (!kept) return;
  if (kept.accountId === by.accountId && kept.bookingId === by.bookingId && kept.ruleSheetId === sheet.id)
    return;
  throw new Problem('conflict', 'Something else is kept under this id already', {
    detail: 'Nothing was changed. Reload to see what is kept, then send yours anew.',
  });
}
