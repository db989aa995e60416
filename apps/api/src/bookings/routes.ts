import { BookingList, TicketList, TicketView, WriteTicket } from '@mereward/shared/bookings/contract';
import { deed, read, type Route } from '../http/route';
import { myBookings } from './booking-lists';
import { myTickets, ticketsOfPeg, ticketView } from './queries';
import { writeTicket } from './service';

const signIn = 'needed';

export const bookingRoutes: Route[] = [
  deed(
    {
      method: 'post',
      path: '/pegs/:pegId/bookings',
      summary: 'Write a ticket at the lodge',
      signIn,
      body: WriteTicket,
      answer: TicketView,
      status: 201,
    },
    async (ctx, { id, body }) => {
      await writeTicket(ctx, id('pegId'), body);
      return ticketView(ctx, body.id);
    },
  ),
  read(
    {
      method: 'get',
      path: '/pegs/:pegId/bookings',
      summary: 'Tickets of a peg, for staff',
      signIn,
      answer: TicketList,
    },
    (ctx, { id }) => ticketsOfPeg(ctx, id('pegId')),
  ),
  read(
    {
      method: 'get',
      path: '/bookings/mine',
      summary: 'One’s own tickets',
      signIn,
      answer: BookingList.extend(TicketList.shape),
    },
    async (ctx) => ({ ...(await myTickets(ctx)), ...(await myBookings(ctx)) }),
  ),
];
