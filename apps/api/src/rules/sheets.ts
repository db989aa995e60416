import type { RuleAcknowledgement } from '@mereward/db/entities/rules/rule-acknowledgement';
import { RuleSheet } from '@mereward/db/entities/rules/rule-sheet';
import { changesWords } from '@mereward/shared/rules/rule-changes';
import type { RulesView, SheetList, SheetView } from '@mereward/shared/rules/sheet-contract';
import { holdsAny, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { notFound } from '../http/deny';
import { isMember, isStaff } from '../lakes/policy';
import { RULE_PUBLISHERS, RULE_WRITERS } from './policy';
import { asPublished, changesSince, sheetInForce, sheetView } from './sheet-view';

type ReadRow = { major: number; minor: number; at: Date; method: RuleAcknowledgement['method'] };

const NEWEST_READ = `
  SELECT s.major, s.minor, r.device_at AS at, r.method
    FROM rule_acknowledgement r JOIN rule_sheet s ON s.id = r.rule_sheet_id
   WHERE r.account_id = $1 AND s.fishery_id = $2
   ORDER BY s.major DESC, s.minor DESC LIMIT 1`;

/** The rules in force, and what changed since the reader read them. */
export async function rulesView({ tx, actor }: Ctx, fisheryId: string): Promise<RulesView> {
  const fishery = await fisheryFound(tx, fisheryId);
  const sheet = await sheetInForce(tx, fisheryId);
  const accountId = actor.kind === 'account' ? actor.id : null;
  const [read]: ReadRow[] = accountId ? await tx.query(NEWEST_READ, [accountId, fisheryId]) : [];
  const isNewest = read && sheet && read.major === sheet.major && read.minor === sheet.minor;
  return {
    fisheryId,
    fisheryName: fishery.name,
    sheet: sheet && sheetView(sheet),
    read: read ? { ...read, at: read.at.toISOString() } : null,
    since: sheet && (await changesSince(tx, sheet, read ?? null)),
    may: {
      acknowledge: accountId !== null && sheet !== null && !isNewest,
      versions: maySeeVersions(actor, fisheryId) || read !== undefined,
      write: holdsAny(actor, fisheryId, RULE_WRITERS),
      publish: holdsAny(actor, fisheryId, RULE_PUBLISHERS),
      readers: isStaff(actor, fisheryId),
    },
  };
}

const maySeeVersions = isMember;

/** Whether somebody with no part in the fishery may see a version: they accepted it. */
const ACCEPTED = `EXISTS (
  SELECT 1 FROM rule_acknowledgement r LEFT JOIN booking b ON b.id = r.booking_id
   WHERE r.rule_sheet_id = s.id AND (r.account_id = $2 OR b.account_id = $2))`;

/** Every version with what changed in it, the newest first; to visitors those they have read. */
export async function sheetList({ tx, actor }: Ctx, fisheryId: string): Promise<SheetList> {
  await fisheryFound(tx, fisheryId);
  const all = maySeeVersions(actor, fisheryId);
  const rows: { id: string; readers: number }[] = await tx.query(
    `SELECT s.id, (SELECT count(*)::int FROM rule_acknowledgement a WHERE a.rule_sheet_id = s.id) AS readers
       FROM rule_sheet s WHERE s.fishery_id = $1 AND s.status = 'published' AND ($3 OR ${ACCEPTED})
      ORDER BY s.major DESC, s.minor DESC LIMIT 500`,
    [fisheryId, actor.kind === 'account' ? actor.id : null, all],
  );
  const sheets = await tx.findBy(RuleSheet, { fisheryId, status: 'published' });
  const byId = new Map(sheets.map((sheet) => [sheet.id, asPublished(sheet)]));
  return {
    versions: rows.flatMap(({ id, readers }) => {
      const sheet = byId.get(id);
      if (!sheet) return [];
      const { major, minor, weight, publishedAt, changes } = sheet;
      const words = changes ? changesWords(changes) : 'The first version';
      const seen = isStaff(actor, fisheryId) ? readers : null;
      return [{ id, major, minor, weight, publishedAt: publishedAt.toISOString(), words, readers: seen }];
    }),
  };
}

/** One published version: the one in force to anybody, others to those who may see the history or accepted it. */
export async function publishedSheet(
  { tx, actor }: Ctx,
  sheetId: string,
): Promise<SheetView & { fisheryId: string }> {
  const row = await tx.findOneBy(RuleSheet, { id: sheetId, status: 'published' });
  if (!row) throw notFound('version of the rules');
  const sheet = asPublished(row);
  const inForce = await sheetInForce(tx, sheet.fisheryId);
  if (inForce?.id !== sheet.id && !maySeeVersions(actor, sheet.fisheryId)) {
    const accepted: unknown[] = await tx.query(`SELECT 1 FROM rule_sheet s WHERE s.id = $1 AND ${ACCEPTED}`, [
      sheetId,
      actor.kind === 'account' ? actor.id : null,
    ]);
    if (accepted.length === 0) throw notFound('version of the rules');
  }
  return { ...sheetView(sheet), fisheryId: sheet.fisheryId };
}
