import {
  BookingList,
  BookingsOfDay,
  BookingView,
  FillInBooking,
  HoldPegs,
} from '@mereward/shared/bookings/contract';
import { deed, read, type Route } from '../http/route';
import { allow, lockBooking } from './access';
import { bookingByCode, bookingsOfDay } from './booking-lists';
import { bookingView } from './booking-view';
import { confirmFree } from './confirm';
import { fillInBooking } from './fill-in';
import { holdPegs } from './hold';
import { letGoOfHold } from './let-go';

const signIn = 'needed';

/** From a hold to a ticket. */
export const lifeRoutes: Route[] = [
  deed(
    {
      method: 'post',
      path: '/bookings',
      summary: 'Hold pegs for some minutes, all of them or none',
      signIn,
      body: HoldPegs,
      answer: BookingView,
      status: 201,
    },
    async (ctx, { body }) => {
      await holdPegs(ctx, body);
      return bookingView(ctx, body.id);
    },
  ),
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/bookings',
      summary: 'Tickets of a day, for staff',
      signIn,
      query: BookingsOfDay,
      answer: BookingList,
    },
    (ctx, { id, query }) => bookingsOfDay(ctx, id('fisheryId'), query),
  ),
  read(
    {
      method: 'get',
      path: '/fisheries/:fisheryId/bookings/by-code/:code',
      summary: 'The ticket behind a code, for staff',
      signIn,
      answer: BookingView,
    },
    (ctx, { id, req }) => bookingByCode(ctx, String(req.params.code), id('fisheryId')),
  ),
  read(
    {
      method: 'get',
      path: '/bookings/by-code/:code',
      summary: 'The ticket behind a code, for its holder and staff',
      signIn,
      answer: BookingView,
    },
    (ctx, { req }) => bookingByCode(ctx, String(req.params.code)),
  ),
  read(
    { method: 'get', path: '/bookings/:bookingId', summary: 'One booking', signIn, answer: BookingView },
    (ctx, { id }) => bookingView(ctx, id('bookingId')),
  ),
  deed(
    {
      method: 'put',
      path: '/bookings/:bookingId/details',
      summary: 'Fill in who comes along and what is asked',
      signIn,
      body: FillInBooking,
      answer: BookingView,
    },
    async (ctx, { id, body }) => {
      await fillInBooking(ctx, id('bookingId'), body);
      return bookingView(ctx, id('bookingId'));
    },
  ),
  deed(
    {
      method: 'post',
      path: '/bookings/:bookingId/confirm',
      summary: 'Make a hold a ticket where nothing is to be paid now',
      signIn,
      answer: BookingView,
    },
    async (ctx, { id }) => {
      await confirmFree(ctx, id('bookingId'));
      return bookingView(ctx, id('bookingId'));
    },
  ),
  deed(
    { method: 'delete', path: '/bookings/:bookingId/hold', summary: 'Let go of a hold', signIn },
    async (ctx, { id }) => {
      const { stay, standing } = await lockBooking(ctx, id('bookingId'));
      allow(standing.holder || standing.writes, 'whoever holds it');
      await letGoOfHold(ctx, stay);
    },
  ),
];
