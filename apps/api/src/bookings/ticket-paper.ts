import type { BookedPeg, BookingDetails } from '@mereward/shared/bookings/contract';
import { ticketQr } from '@mereward/shared/bookings/booking-code';
import type { FisheryDetails } from '@mereward/shared/fisheries/contract';
import type { PegDetails } from '@mereward/shared/lakes/contract';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { moneyOf } from '../payments/money-of';
import { bookingRow, type BookingRow } from './booking-view';
import { notYetOf } from './not-yet';

/** A ticket with everything its paper, its letters and its place in a calendar say. */
export type TicketPaper = Pick<
  BookingRow,
  | 'id'
  | 'code'
  | 'fisheryId'
  | 'fisheryName'
  | 'jurisdiction'
  | 'zone'
  | 'accountId'
  | 'lakeId'
  | 'lakeName'
  | 'roving'
  | 'from'
  | 'until'
  | 'status'
  | 'holdUntil'
  | 'holder'
  | 'people'
  | 'rods'
  | 'grossPence'
  | 'paidPence'
  | 'currency'
  | 'version'
> & {
  email: string | null;
  details: BookingDetails;
  pegs: BookedPeg[];
  qr: string;
  url: string;
  soldAt: Date;
  changedAt: Date; // what is written of it here was last changed
  notYet: string[];
  receipts: string[]; // their numbers
  fishery: Pick<
    FisheryDetails,
    'address' | 'postcode' | 'gridReference' | 'opening' | 'meetingPoint' | 'dutyPhone' | 'officeContact'
  >;
  emergencyAccess: string;
  pegEmergency: PegDetails['emergency'] | null; // of its first peg
};

type Rest = Pick<TicketPaper, 'email' | 'soldAt' | 'changedAt' | 'fishery' | 'pegEmergency'> & {
  emergencyAccess: string | null;
};

export async function ticketPaper(
  { tx, publicUrl }: Pick<Ctx, 'tx' | 'publicUrl'>,
  bookingId: string,
): Promise<TicketPaper> {
  const row = await bookingRow(tx, bookingId);
  const { emergencyAccess, ...rest } = await restOf(tx, bookingId);
  const [yet] = await notYetOf({ tx }, [row]);
  const { receipts } = await moneyOf(tx, bookingId);
  return {
    ...row,
    ...rest,
    emergencyAccess: emergencyAccess ?? '',
    qr: ticketQr(publicUrl, row.code),
    url: `${publicUrl}/tickets/bookings/${bookingId}`,
    notYet: yet?.words ?? [],
    receipts: receipts.flatMap(({ kind, number }) => (kind === 'receipt' ? [number] : [])),
  };
}

async function restOf(tx: EntityManager, bookingId: string): Promise<Rest> {
  const rows: Rest[] = await tx.query(
    `SELECT b.holder_email AS email, b.written_at AS "soldAt", f.details AS fishery,
            l.details->>'emergencyAccess' AS "emergencyAccess",
            coalesce((SELECT max(at) FROM booking_event e WHERE e.booking_id = b.id), b.written_at) AS "changedAt",
            (SELECT p.details->'emergency' FROM peg_time t JOIN peg p ON p.id = t.peg_id
              WHERE t.booking_id = b.id ORDER BY p.walking_order LIMIT 1) AS "pegEmergency"
       FROM booking b JOIN fishery f ON f.id = b.fishery_id LEFT JOIN lake l ON l.id = b.lake_id WHERE b.id = $1`,
    [bookingId],
  );
  const [rest] = rows;
  if (!rest) throw new Error('A booking that was there is gone');
  const { address, postcode, gridReference, opening, meetingPoint, dutyPhone, officeContact } = rest.fishery;
  const fishery = { address, postcode, gridReference, opening, meetingPoint, dutyPhone, officeContact };
  return { ...rest, fishery }; // the gate's code stays behind
}
