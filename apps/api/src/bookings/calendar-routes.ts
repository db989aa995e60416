import { CalendarList, CalendarMade, MakeCalendar } from '@mereward/shared/bookings/calendar-contract';
import { z } from 'zod';
import { limitPages, limitWrongTries } from '../http/limits';
import { notFound } from '../http/deny';
import { deed, raw, read, type Route } from '../http/route';
import { reading } from '../http/transaction';
import { calendarAt, makeCalendar, myCalendars, revokeCalendar } from './calendars';

const signIn = 'needed';
const Asked = z.string().regex(/^[A-Za-z0-9_-]{43}\.ics$/);

export const calendarRoutes: Route[] = [
  deed(
    {
      method: 'post',
      path: '/calendars',
      summary: 'Make a secret address for a calendar program',
      signIn,
      body: MakeCalendar,
      answer: CalendarMade,
      status: 201,
    },
    (ctx, { body }) => makeCalendar(ctx, body),
  ),
  read(
    {
      method: 'get',
      path: '/calendars',
      summary: 'One’s own calendar addresses',
      signIn,
      answer: CalendarList,
    },
    (ctx) => myCalendars(ctx),
  ),
  deed(
    { method: 'delete', path: '/calendars/:calendarId', summary: 'Take a calendar address away', signIn },
    (ctx, { id }) => revokeCalendar(ctx, id('calendarId')),
  ),
  raw(
    {
      method: 'get',
      path: '/calendars/:token',
      summary: 'The calendar at a secret address, <token>.ics',
      signIn: 'open',
      answerType: 'text/calendar',
      guards: [limitPages, limitWrongTries],
    },
    async (req, res) => {
      const asked = Asked.safeParse(req.params.token);
      if (!asked.success) throw notFound('calendar');
      const text = await reading(req, (ctx) => calendarAt(ctx, asked.data.slice(0, -'.ics'.length)));
      res
        .set({ 'Cache-Control': 'private, max-age=300', 'X-Robots-Tag': 'noindex' })
        .type('text/calendar; charset=utf-8')
        .send(text);
    },
  ),
];
