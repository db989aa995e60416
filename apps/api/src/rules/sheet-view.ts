import { RuleSheet } from '@mereward/db/entities/rules/rule-sheet';
import type { SheetNumber } from '@mereward/shared/rules/contract';
import { ruleChanges } from '@mereward/shared/rules/rule-changes';
import type { RuleChangeView, SheetView } from '@mereward/shared/rules/sheet-contract';
import type { EntityManager } from 'typeorm';

export type Published = RuleSheet & SheetNumber & { publishedAt: Date; weight: SheetView['weight'] };

/** A published row, its number and day certain; the database vouches for them. */
export function asPublished(sheet: RuleSheet): Published {
  const { major, minor, publishedAt, weight } = sheet;
  if (major === null || minor === null || publishedAt === null || weight === null)
    throw new RangeError('This sheet is no published one.');
  return { ...sheet, major, minor, publishedAt, weight };
}

export const sheetView = (sheet: Published): SheetView => ({
  id: sheet.id,
  major: sheet.major,
  minor: sheet.minor,
  weight: sheet.weight,
  publishedAt: sheet.publishedAt.toISOString(),
  rules: [...sheet.rules].sort((a, b) => a.number - b.number),
  changes: sheet.changes,
});

/** The newest published version of a fishery, or null before its first. */
export async function sheetInForce(tx: EntityManager, fisheryId: string): Promise<Published | null> {
  const sheet = await tx.findOne(RuleSheet, {
    where: { fisheryId, status: 'published' },
    order: { major: 'DESC', minor: 'DESC' },
  });
  return sheet && asPublished(sheet);
}

export async function sheetNumbered(
  tx: EntityManager,
  fisheryId: string,
  { major, minor }: SheetNumber,
): Promise<Published | null> {
  const sheet = await tx.findOneBy(RuleSheet, { fisheryId, status: 'published', major, minor });
  return sheet && asPublished(sheet);
}

/** What changed from a version somebody read to another; null where they read none. */
export async function changesSince(
  tx: EntityManager,
  sheet: Published,
  read: SheetNumber | null,
): Promise<RuleChangeView[] | null> {
  if (!read) return null;
  const before = await sheetNumbered(tx, sheet.fisheryId, read);
  return before && ruleChanges(before.rules, sheet.rules);
}
