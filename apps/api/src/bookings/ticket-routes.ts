import type { Response } from 'express';
import { limitDrawings } from '../http/limits';
import { raw, type Route } from '../http/route';
import { idIn } from '../http/route-id';
import { reading } from '../http/transaction';
import type { Enclosed } from '../mail/send';
import { ticketCalendar, ticketPdf } from './ticket-files';

/** A ticket is its holder's alone: nothing on the way keeps it. */
function send(res: Response, { filename, contentType, content }: Enclosed): void {
  res.setHeader('content-disposition', `inline; filename="${filename}"`);
  res.setHeader('content-type', contentType);
  res.setHeader('cache-control', 'private, no-store').send(content);
}

/** A ticket to take away. */
export const ticketPaperRoutes: Route[] = [
  raw(
    {
      method: 'get',
      path: '/bookings/:bookingId/ticket.pdf',
      summary: 'A ticket to print, A5, for its holder and staff',
      signIn: 'needed',
      answerType: 'application/pdf',
      guards: [limitDrawings],
    },
    async (req, res) => send(res, await reading(req, (ctx) => ticketPdf(ctx, idIn(req, 'bookingId')))),
  ),
  raw(
    {
      method: 'get',
      path: '/bookings/:bookingId/ticket.ics',
      summary: 'A ticket for a calendar, for its holder and staff',
      signIn: 'needed',
      answerType: 'text/calendar',
    },
    async (req, res) => send(res, await reading(req, (ctx) => ticketCalendar(ctx, idIn(req, 'bookingId')))),
  ),
];
