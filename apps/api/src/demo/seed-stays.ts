import type { BookingDetails } from '@mereward/shared/bookings/contract';
import { vatByRate } from '@mereward/shared/money/vat';
import { postingsFor } from '@mereward/shared/payments/ledger';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { EntityManager } from 'typeorm';
import { OSTLEMERE, OSTLEMERE_ID } from './fishery';
import { DEMO_TERMS, type DemoTicketType } from './letting';
import { PRIYA } from './people';
import { demoId } from './random';
import { demoStays, type DemoStay } from './stays';

/**
 * Writes a year of tickets with their money in a few statements: asked of the services one by one it would take most of
 * a minute. Constraints and triggers hold them to the same rules.
 */
export async function seedStays(
  tx: EntityManager,
  { types, now }: { types: readonly DemoTicketType[]; now: Date },
): Promise<void> {
  const stays = demoStays(types, now);
  await insert(
    tx,
    BOOKING,
    stays.map((stay) => bookingRow(stay, now)),
  );
  await insert(tx, PEG_TIME, stays.filter(({ cancelledAt }) => cancelledAt === null).map(pegTimeRow));
  const paid = stays.filter(({ grossPence }) => grossPence > 0);
  const back = paid.filter(({ cancelledAt }) => cancelledAt !== null);
  await insert(tx, PAYMENT, paid.map(paymentRow));
  await insert(tx, REFUND, back.map(refundRow));
  const deeds = [
    ...paid.map((stay) => moneyOf(stay, 'sale')),
    ...back.map((stay) => moneyOf(stay, 'refund')),
  ].sort((a, b) => a.at.getTime() - b.at.getTime() || (a.id < b.id ? -1 : 1));
  await insert(tx, DEED, deeds.map(deedRow));
  await insert(tx, POSTING, deeds.flatMap(postingRows));
  await insert(tx, RECEIPT, numbered(deeds));
  await tx.query(
    `INSERT INTO receipt_counter (fishery_id, year, last)
     SELECT fishery_id, year, max(number) FROM receipt WHERE fishery_id = $1 GROUP BY fishery_id, year`,
    [OSTLEMERE_ID],
  );
}

const AT_ONCE = 500;

type Table = { name: string; columns: readonly string[] };

/** Rows into a table by one statement for each few hundred; columns are "name type". */
async function insert(tx: EntityManager, { name, columns }: Table, rows: readonly object[]): Promise<void> {
  const names = columns.map((column) => column.split(' ')[0]).join(', ');
  for (let first = 0; first < rows.length; first += AT_ONCE)
    await tx.query(
      `INSERT INTO ${name} (${names}) SELECT ${names} FROM jsonb_to_recordset($1::jsonb) AS r (${columns.join(', ')})`,
      [JSON.stringify(rows.slice(first, first + AT_ONCE))],
    );
}

const BOOKING: Table = {
  name: 'booking',
  columns: [
    ...[
      'id uuid',
      'fishery_id uuid',
      'lake_id uuid',
      'ticket_type_id uuid',
      'account_id uuid',
      'holder_name text',
    ],
    ...['holder_email text', 'during tstzrange', 'status text', 'people int', 'rods int', 'gross_pence int'],
    ...[
      'currency text',
      'source text',
      'details jsonb',
      'written_by uuid',
      'written_at timestamptz',
      'version int',
    ],
  ],
};

function bookingRow(stay: DemoStay, now: Date) {
  const { holder, type, from, until, cancelledAt } = stay;
  const status = cancelledAt
    ? 'cancelled_by_angler'
    : stay.cameToday || until <= now
      ? 'checked_in'
      : 'confirmed';
  return {
    id: stay.id,
    fishery_id: OSTLEMERE_ID,
    lake_id: stay.lakeId,
    ticket_type_id: type.id,
    account_id: holder.id,
    holder_name: holder.name,
    holder_email: holder.email,
    during: range(from, until),
    status,
    people: 1,
    rods: stay.rods,
    gross_pence: stay.grossPence,
    currency: type.details.currency,
    source: stay.method === 'card_online' ? 'web' : 'office',
    details: detailsOf(stay),
    written_by: holder.id ?? PRIYA.id,
    written_at: stay.bookedAt,
    version: 1,
  };
}

const range = (from: Date, until: Date): string => `[${from.toISOString()},${until.toISOString()})`;

function detailsOf({ type, day, start, pegId, rods, holder, lines }: DemoStay): BookingDetails {
  const { vatCode = 'standard' } = type.details.prices[0] ?? {};
  return {
    ticketName: type.details.name,
    day,
    start,
    tickets: [
      { ticketTypeId: type.id, pegId, rods, people: 1, kind: 'holder', name: holder.name, bornOn: null },
    ],
    lines: lines.map(({ words, grossPence, rateBp, vatPence }) => ({
      words,
      count: 1,
      grossPence,
      netPence: grossPence - vatPence,
      vatPence,
      vatCode,
      vatRateBp: rateBp,
    })),
    turnaroundMinutes: type.details.turnaroundMinutes,
    cancellation: DEMO_TERMS.cancellation,
    guardian: null,
    vehicle: '',
    emergencyContact: '',
    licence: null,
    note: '',
  };
}

const PEG_TIME: Table = {
  name: 'peg_time',
  columns: [
    ...[
      'lake_id uuid',
      'peg_id uuid',
      'during tstzrange',
      'turnaround interval',
      'lane bigint',
      'state text',
    ],
    ...['booking_id uuid', 'people int', 'rods int'],
  ],
};

/** A row of its own lane: any number will do that no other row has, far from where the database counts. */
function pegTimeRow({ id, lakeId, pegId, from, until, type, rods }: DemoStay, index: number) {
  const { turnaroundMinutes } = type.details;
  return {
    lake_id: lakeId,
    peg_id: pegId,
    during: range(from, new Date(until.getTime() + turnaroundMinutes * 60_000)),
    turnaround: `${turnaroundMinutes} minutes`,
    lane: -1 - index,
    state: 'taken',
    booking_id: id,
    people: 1,
    rods,
  };
}

const PAYMENT: Table = {
  name: 'payment',
  columns: [
    ...[
      'id uuid',
      'fishery_id uuid',
      'booking_id uuid',
      'method text',
      'amount_pence int',
      'currency text',
      'status text',
    ],
    ...[
      'provider_session text',
      'provider_intent text',
      'made_by uuid',
      'made_at timestamptz',
      'taken_at timestamptz',
    ],
    'fault text',
  ],
};

const paymentId = ({ id }: DemoStay): string => demoId(`payment ${id}`);
const refundId = ({ id }: DemoStay): string => demoId(`refund ${id}`);

function paymentRow(stay: DemoStay) {
  const { id, method, grossPence, type, holder, bookedAt } = stay;
  const online = method === 'card_online';
  return {
    id: paymentId(stay),
    fishery_id: OSTLEMERE_ID,
    booking_id: id,
    method,
    amount_pence: grossPence,
    currency: type.details.currency,
    status: 'captured',
    provider_session: online ? `demo_session_${id}` : null,
    provider_intent: online ? `pi_past_${id}` : null,
    made_by: online ? holder.id : PRIYA.id,
    made_at: bookedAt,
    taken_at: bookedAt,
    fault: '',
  };
}

const REFUND: Table = {
  name: 'refund',
  columns: [
    ...['id uuid', 'fishery_id uuid', 'booking_id uuid', 'payment_id uuid', 'amount_pence int', 'cause text'],
    ...[
      'reason text',
      'status text',
      'provider_ref text',
      'asked_at timestamptz',
      'done_at timestamptz',
      'fault text',
    ],
  ],
};

const refundRow = (stay: DemoStay) => ({
  id: refundId(stay),
  fishery_id: OSTLEMERE_ID,
  booking_id: stay.id,
  payment_id: paymentId(stay),
  amount_pence: stay.grossPence,
  cause: 'cancelled',
  reason: '7 days or more before the start all of it is given back.',
  status: 'done',
  provider_ref: stay.method === 'card_online' ? `demo_refund_${stay.id}` : null,
  asked_at: stay.cancelledAt,
  done_at: stay.cancelledAt,
  fault: '',
});

type MoneyDone = { id: string; kind: 'sale' | 'refund'; at: Date; stay: DemoStay };

const moneyOf = (stay: DemoStay, kind: MoneyDone['kind']): MoneyDone => ({
  id: demoId(`deed ${kind} ${stay.id}`),
  kind,
  at: kind === 'sale' ? stay.bookedAt : (stay.cancelledAt ?? stay.bookedAt),
  stay,
});

const DEED: Table = {
  name: 'ledger_deed',
  columns: [
    ...[
      'id uuid',
      'fishery_id uuid',
      'kind text',
      'about text',
      'payment_id uuid',
      'refund_id uuid',
      'booking_id uuid',
    ],
    'at timestamptz',
  ],
};

const deedRow = ({ id, kind, at, stay }: MoneyDone) => ({
  id,
  fishery_id: OSTLEMERE_ID,
  kind,
  about: kind === 'sale' ? paymentId(stay) : refundId(stay),
  payment_id: paymentId(stay),
  refund_id: kind === 'refund' ? refundId(stay) : null,
  booking_id: stay.id,
  at,
});

const POSTING: Table = {
  name: 'ledger_posting',
  columns: ['deed_id uuid', 'account text', 'amount_pence bigint', 'currency text', 'tags jsonb'],
};

const postingRows = ({ id, kind, stay }: MoneyDone) =>
  postingsFor({ kind, method: stay.method, lines: stay.lines }).map(({ account, amountPence }) => ({
    deed_id: id,
    account,
    amount_pence: amountPence,
    currency: stay.type.details.currency,
    tags: {
      lakeId: stay.lakeId,
      ticketTypeId: stay.type.id,
      method: stay.method,
      rateBp: String(stay.lines[0]?.rateBp ?? 0),
    },
  }));

const RECEIPT: Table = {
  name: 'receipt',
  columns: [
    ...[
      'id uuid',
      'fishery_id uuid',
      'year int',
      'number int',
      'kind text',
      'payment_id uuid',
      'refund_id uuid',
    ],
    ...['booking_id uuid', 'tax_point date', 'issued_at timestamptz', 'told jsonb'],
  ],
};

/** Receipts and credit notes in one row of numbers a year, in the order of their days. */
function numbered(deeds: readonly MoneyDone[]): object[] {
  const last = new Map<number, number>();
  return deeds.map(({ kind, at, stay }) => {
    const taxPoint = civilDay(at, OSTLEMERE.zone);
    const year = Number(taxPoint.slice(0, 4));
    const number = (last.get(year) ?? 0) + 1;
    last.set(year, number);
    return {
      id: demoId(`receipt ${kind} ${stay.id}`),
      fishery_id: OSTLEMERE_ID,
      year,
      number,
      kind: kind === 'sale' ? 'receipt' : 'credit_note',
      payment_id: kind === 'sale' ? paymentId(stay) : null,
      refund_id: kind === 'refund' ? refundId(stay) : null,
      booking_id: stay.id,
      tax_point: taxPoint,
      issued_at: at,
      told: {
        seller: {
          name: OSTLEMERE.legalEntity || OSTLEMERE.name,
          address: [OSTLEMERE.address, OSTLEMERE.postcode].filter((part) => part !== '').join(', '),
          vatNumber: OSTLEMERE.vatNumber,
        },
        description: `${stay.type.details.name}, ${stay.day}`,
        currency: stay.type.details.currency,
        lines: stay.lines,
        vat: vatByRate(stay.lines.map((line) => ({ ...line, netPence: line.grossPence - line.vatPence }))),
        grossPence: stay.grossPence,
        method: stay.method,
      },
    };
  });
}
