import { calendarText, calendarUid } from '@mereward/shared/writing/calendar';
import { Problem } from '@mereward/shared/problems/problem';
import type { Ctx } from '../ctx';
import { standingThread } from '../jobs/standing-thread';
import type { Enclosed } from '../mail/send';
import { reachBooking } from './access';
import type { TicketSheet } from './ticket-pdf';
import { ticketPaper, type TicketPaper } from './ticket-paper';
import {
  cancellationLines,
  cautionLines,
  codeWords,
  emergencyFacts,
  factLine,
  gateFacts,
  placeWords,
  priceLines,
  ticketFacts,
} from './ticket-words';

const draw = standingThread<TicketSheet>('bookings/ticket');

const GOOD: ReadonlySet<string> = new Set(['confirmed', 'checked_in', 'completed', 'no_show']);
const CANCELLED: ReadonlySet<string> = new Set(['cancelled_by_angler', 'cancelled_by_fishery']);

const sheetOf = (paper: TicketPaper): TicketSheet => ({
  fisheryName: paper.fisheryName,
  title: paper.lakeName ?? 'Ticket',
  code: paper.code,
  qr: paper.qr,
  changedAt: paper.changedAt,
  notYet: paper.notYet,
  facts: ticketFacts(paper),
  parts: [
    { title: 'Price', lines: priceLines(paper) },
    { title: 'If you can’t come', lines: cancellationLines(paper) },
    { title: 'Getting in', lines: gateFacts(paper).map(factLine) },
    { title: 'In an emergency', lines: emergencyFacts(paper).map(factLine) },
    { title: 'Before you fish', lines: cautionLines(paper) },
  ].filter(({ lines }) => lines.length > 0),
});

const pdfOf = async (paper: TicketPaper): Promise<Enclosed> => ({
  filename: `ticket-${paper.code}.pdf`,
  contentType: 'application/pdf',
  content: await draw(sheetOf(paper)),
});

/** The ticket for a calendar; a cancelled one takes itself out again. The UID is the booking’s for ever. */
function calendarOf(paper: TicketPaper, publicUrl: string): Enclosed {
  const cancelled = CANCELLED.has(paper.status);
  const method = cancelled ? 'CANCEL' : 'PUBLISH';
  const place = placeWords(paper);
  const text = calendarText({
    name: `${paper.fisheryName}: ticket ${codeWords(paper)}`,
    method,
    zone: paper.zone,
    events: [
      {
        uid: calendarUid('booking', paper.id, new URL(publicUrl).hostname),
        sequence: paper.version,
        stampedAt: paper.changedAt,
        from: paper.from,
        until: paper.until,
        summary: `Fishing: ${place}`,
        description: [`Ticket ${codeWords(paper)}`, ...emergencyFacts(paper).map(factLine)].join('\n'),
        location: [paper.fisheryName, paper.fishery.address, paper.fishery.postcode]
          .filter(Boolean)
          .join(', '),
        status: cancelled ? 'cancelled' : 'confirmed',
        url: paper.url,
      },
    ],
  });
  return {
    filename: `ticket-${paper.code}.ics`,
    contentType: `text/calendar; charset=utf-8; method=${method}`,
    content: Buffer.from(text),
  };
}

/** What goes with a letter about a ticket, as it stands when the letter leaves. */
export async function ticketEnclosed(
  ctx: Pick<Ctx, 'tx' | 'publicUrl'>,
  bookingId: string,
): Promise<Enclosed[]> {
  const paper = await ticketPaper(ctx, bookingId);
  if (CANCELLED.has(paper.status)) return [calendarOf(paper, ctx.publicUrl)];
  if (!GOOD.has(paper.status)) return [];
  return [await pdfOf(paper), calendarOf(paper, ctx.publicUrl)];
}

/** For its holder and the staff who see it. What isn't a ticket, or is none any more, has no paper. */
export async function ticketPdf(ctx: Ctx, bookingId: string): Promise<Enclosed> {
  await reachBooking(ctx, bookingId);
  const paper = await ticketPaper(ctx, bookingId);
  if (!GOOD.has(paper.status)) throw noTicket();
  return pdfOf(paper);
}

export async function ticketCalendar(ctx: Ctx, bookingId: string): Promise<Enclosed> {
  await reachBooking(ctx, bookingId);
  const paper = await ticketPaper(ctx, bookingId);
  if (!GOOD.has(paper.status) && !CANCELLED.has(paper.status)) throw noTicket();
  return calendarOf(paper, ctx.publicUrl);
}

const noTicket = (): Problem =>
  new Problem('conflict', 'This booking is no ticket', {
    detail: 'There is something to print once it is confirmed, and nothing once it is cancelled.',
  });
