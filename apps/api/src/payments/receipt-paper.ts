import { Receipt } from '@mereward/db/entities/payments/receipt';
import type { ReceiptListItem } from '@mereward/shared/payments/takings-contract';
import { receiptFields, receiptNumber } from '@mereward/shared/payments/receipt';
import { createHash } from 'node:crypto';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { allowOnly, notFound } from '../http/deny';
import { Markup, markup } from '../http/markup';
import { currencyOf } from './currency';
import { receiptView } from './money-of';
import { MONEY_READERS } from './policy';
import { spanOf } from './takings-of';

type Whose = { code: string; holder: string; accountId: string | null };

/** Receipts and credit notes given out on some days, the newest first. */
export async function receiptsIn(
  { tx, actor }: Ctx,
  fisheryId: string,
  asked: { from: string; until: string },
): Promise<ReceiptListItem[]> {
  allowOnly(actor, { fisheryId, what: 'fishery' }, MONEY_READERS);
  const { from, until } = await spanOf(tx, fisheryId, asked);
  const rows: (Whose & { id: string })[] = await tx.query(
    `SELECT r.id, b.code, b.holder_name AS holder FROM receipt r JOIN booking b ON b.id = r.booking_id
      WHERE r.fishery_id = $1 AND r.issued_at >= $2 AND r.issued_at < $3
      ORDER BY r.issued_at DESC, r.number DESC LIMIT 2000`,
    [fisheryId, from, until],
  );
  const receipts = await tx
    .createQueryBuilder(Receipt, 'r')
    .where('r.id = ANY (:ids)', { ids: rows.map(({ id }) => id) })
    .getMany();
  const byId = new Map(receipts.map((receipt) => [receipt.id, receipt]));
  return rows.flatMap(({ id, code, holder }) => {
    const receipt = byId.get(id);
    return receipt
      ? [{ ...receiptView(receipt), bookingId: receipt.bookingId, bookingCode: code, holder }]
      : [];
  });
}

const STYLE = `body{margin:0;padding:24px 16px;background:#fff;color:#16211f;font:17px/1.5 'Source Sans 3',system-ui,sans-serif}
main{max-width:34em;margin:0 auto}h1{font-size:1.5em}dl{display:grid;grid-template-columns:max-content 1fr;gap:6px 24px}
dt{font-weight:600}dd{margin:0}@media print{body{padding:0}}`;
const DIGEST = createHash('sha256').update(STYLE).digest('base64');
export const PAPER_POLICY = `default-src 'none'; style-src 'sha256-${DIGEST}'; frame-ancestors 'none'; base-uri 'none'; form-action 'none'`;

/** A receipt or credit note as a page to print: its holder's and the office's. What it says was kept when it was given. */
export async function receiptPaper({ tx, actor }: Ctx, receiptId: string): Promise<string> {
  const me = accountOf(actor);
  const receipt = await tx.findOneBy(Receipt, { id: receiptId });
  if (!receipt) throw notFound('receipt');
  const rows: Whose[] = await tx.query(
    `SELECT code, holder_name AS holder, account_id AS "accountId" FROM booking WHERE id = $1`,
    [receipt.bookingId],
  );
  const [whose] = rows;
  if (!whose || (whose.accountId !== me && !holdsAny(actor, receipt.fisheryId, MONEY_READERS)))
    throw notFound('receipt');
  const { details } = await fisheryFound(tx, receipt.fisheryId);
  const { told, kind } = receipt;
  const fields = receiptFields(
    {
      legalName: told.seller.name,
      address: told.seller.address,
      vatStatus: told.seller.vatNumber === '' ? 'not_registered' : 'registered',
      vatNumber: told.seller.vatNumber,
    },
    {
      number: receiptNumber(receipt.year, receipt.number),
      taxPoint: receipt.taxPoint,
      currency: currencyOf(told.currency),
      lines: told.lines.map((line) => ({ ...line, netPence: line.grossPence - line.vatPence })),
      buyer: { name: whose.holder, address: '' },
    },
  );
  const title = kind === 'receipt' ? 'Receipt' : 'Credit note';
  return markup`<!doctype html>
<html lang="en-GB"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><title>${title} ${fields[0]?.fact ?? ''}</title><style>${new Markup(STYLE)}</style></head>
<body><main><h1>${title}, ${details.name}</h1><p>${told.description}</p><p>Booking ${whose.code}</p>
<dl>${fields.map(({ term, fact }) => markup`<dt>${term === 'Receipt' ? title : term}</dt><dd>${fact}</dd>`)}</dl></main></body></html>`
    .text;
}
