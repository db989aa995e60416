import { RuleSheet } from '@mereward/db/entities/rules/rule-sheet';
import { dayAndClock } from '@mereward/shared/time/day-names';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { notFound } from '../http/deny';
import { DRAFT_READERS } from './policy';
import type { SheetPaper } from './sheet-paper';
import { asPublished, sheetView } from './sheet-view';
import { publishedSheet } from './sheets';

export type ReadyPaper = { filename: string; paper: SheetPaper };

/** A version to print, for whoever may read it. */
export async function sheetToPrint(ctx: Ctx, sheetId: string, large: boolean): Promise<ReadyPaper> {
  const sheet = await publishedSheet(ctx, sheetId);
  const { name, zone } = await fisheryFound(ctx.tx, sheet.fisheryId);
  const paper = { fishery: name, zone, sheet, large, printedAt: ctx.now, proof: null };
  return { filename: `rules-${sheet.major}-${sheet.minor}${large ? '-large' : ''}.pdf`, paper };
}

type Row = {
  fisheryId: string;
  sheetId: string;
  accountId: string | null;
  name: string;
  code: string | null;
  method: 'online' | 'paper' | 'verbal';
  witness: string | null;
  deviceAt: Date;
  at: Date;
  device: string;
  language: string;
};

const READING = `
  SELECT s.fishery_id AS "fisheryId", s.id AS "sheetId", coalesce(r.account_id, b.account_id) AS "accountId",
         coalesce(a.name, b.holder_name, '') AS name, b.code, r.method, w.name AS witness,
         r.device_at AS "deviceAt", r.at, r.device, r.language
    FROM rule_acknowledgement r
    JOIN rule_sheet s ON s.id = r.rule_sheet_id
    LEFT JOIN booking b ON b.id = r.booking_id
    LEFT JOIN account a ON a.id = r.account_id
    LEFT JOIN account w ON w.id = r.witness
   WHERE r.id = $1`;

const METHODS = {
  online: 'read and accepted on a screen',
  paper: 'signed on paper before a witness',
  verbal: 'read out by a witness',
} as const;

/** Exactly what somebody accepted and when: for the office in a dispute, and for themselves. */
export async function proofToPrint({ tx, actor, now }: Ctx, readingId: string): Promise<ReadyPaper> {
  const accountId = accountOf(actor);
  const [row]: Row[] = await tx.query(READING, [readingId]);
  if (!row || (row.accountId !== accountId && !holdsAny(actor, row.fisheryId, DRAFT_READERS)))
    throw notFound('reading');
  const sheet = sheetView(asPublished(await tx.findOneByOrFail(RuleSheet, { id: row.sheetId })));
  const { name, zone } = await fisheryFound(tx, row.fisheryId);
  const proof: [string, string][] = [
    ['Who', row.code === null ? row.name : `${row.name}, booking ${row.code}`],
    ['How', METHODS[row.method]],
    ['When, by the device', dayAndClock(row.deviceAt.toISOString(), zone)],
    ['Known to the fishery since', dayAndClock(row.at.toISOString(), zone)],
    ['Language', row.language],
    ...(row.witness === null ? [] : [['Witness', row.witness] satisfies [string, string]]),
    ...(row.device === '' ? [] : [['Device', row.device] satisfies [string, string]]),
  ];
  const paper = { fishery: name, zone, sheet, large: false, printedAt: now, proof };
  return { filename: `rules-accepted-${sheet.major}-${sheet.minor}.pdf`, paper };
}
