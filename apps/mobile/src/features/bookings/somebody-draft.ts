import type { BookForSomebody } from '@mereward/shared/bookings/contract';
import { z } from 'zod';
import { typedNumber } from '@/lib/typed-schemas';

const whole = (what: string, min: number, max: number) =>
  typedNumber({ what, min, max }).pipe(z.int('A whole number.'));

/** A peg chosen on arrival, as the form names it. */
export const ON_ARRIVAL = 'on-arrival';

const TypedTicket = z.object({
  ticketTypeId: z.uuid('Choose a ticket'),
  pegId: z.string().refine((id) => id === ON_ARRIVAL || z.uuid().safeParse(id).success, 'Choose a peg'),
  rods: whole('Rods', 0, 10),
  people: whole('People', 1, 20),
  name: z.string().trim().max(120, 'At most 120 letters'),
  bornOn: z.union([z.literal(''), z.iso.date('Choose a day')]),
});
export type TypedTicket = z.input<typeof TypedTicket>;

/** A ticket for somebody at the lodge or on the phone, as it is typed. */
export const SomebodyDraft = z.object({
  lakeId: z.uuid('Choose a lake'),
  day: z.iso.date('Choose a day'),
  start: z.string(),
  holder: z.object({
    name: z.string().trim().min(1, 'Whose ticket is it?').max(120, 'At most 120 letters'),
    email: z.union([z.literal(''), z.email('This is no e-mail address')]),
  }),
  vehicle: z.string().trim().max(20, 'At most 20 letters'),
  note: z.string().trim().max(500, 'At most 500 letters'),
  tickets: z.array(TypedTicket).min(1, 'One ticket at least').max(40, 'At most 40 tickets'),
});
export type TypedSomebody = z.input<typeof SomebodyDraft>;
export type Somebody = z.output<typeof SomebodyDraft>;

export const FIRST_TICKET: TypedTicket = {
  ticketTypeId: '',
  pegId: '',
  rods: '2',
  people: '1',
  name: '',
  bornOn: '',
};

type Facts = { id: string; starts: readonly string[]; juniorTypes: ReadonlySet<string> };

/**
 * What is asked of the API. The first ticket is the holder's own unless it is a junior's or another's name stands on
 * it; a start that the ticket does not leave open is none.
 */
export function bookingFor(typed: Somebody, { id, starts, juniorTypes }: Facts): BookForSomebody {
  const { holder, start, tickets, ...rest } = typed;
  return {
    ...rest,
    id,
    start: starts.includes(start) ? start : (starts[0] ?? null),
    holder: { name: holder.name, email: holder.email === '' ? null : holder.email },
    tickets: tickets.map(({ pegId, bornOn, name, ...ticket }, at) => {
      const junior = juniorTypes.has(ticket.ticketTypeId);
      const own = at === 0 && !junior && (name === '' || name === holder.name);
      return {
        ...ticket,
        pegId: pegId === ON_ARRIVAL ? null : pegId,
        kind: junior ? 'junior' : own ? 'holder' : 'guest',
        name: own ? holder.name : name,
        bornOn: bornOn === '' ? null : bornOn,
      };
    }),
  };
}
