import { z } from 'zod';

/**
 * POST /api/calendars: a secret address for a calendar program. `lakeId` null: one’s own bookings; else the lake’s
 * calendar without names, for its staff. The address is told once and can’t be shown again.
 */
export const MakeCalendar = z.strictObject({ id: z.uuid(), lakeId: z.uuid().nullable() });
export type MakeCalendar = z.infer<typeof MakeCalendar>;

/** DELETE /api/calendars/:calendarId: the address finds nothing any more. */
export const CalendarView = z.object({
  id: z.uuid(),
  lakeId: z.uuid().nullable(),
  lakeName: z.string().nullable(),
  madeAt: z.iso.datetime(),
});
export type CalendarView = z.infer<typeof CalendarView>;

/** Answer of POST: `url` is GET /api/calendars/<token>.ics, text/calendar. Whoever has it reads the calendar. */
export const CalendarMade = CalendarView.extend({ url: z.string() });
export type CalendarMade = z.infer<typeof CalendarMade>;

/** GET /api/calendars: one’s own, the newest first. */
export const CalendarList = z.object({ calendars: z.array(CalendarView) });
export type CalendarList = z.infer<typeof CalendarList>;
