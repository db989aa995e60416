import { randomUUID } from 'node:crypto';
import { BookingView, type BookedTicket } from '@mereward/shared/bookings/contract';
import { FisheryList } from '@mereward/shared/fisheries/contract';
import { LakeView } from '@mereward/shared/lakes/contract';
import { addDays } from '@mereward/shared/time/zoned';
import { civilDay } from '@mereward/shared/time/civil-day';
import { TICKET_TEMPLATES } from '@mereward/shared/tickets/ticket-templates';
import { Asking } from './people';
import type { Site } from './site';

export type Sales = {
  fisheryId: string;
  lakeIds: Readonly<Record<'Far Ostle' | 'Sedge Cut', string>>;
  kindIds: Readonly<Record<'stay24' | 'junior', string>>;
  pegIds: ReadonlyMap<string, string>; // by number
  day: string; // one on which nothing of the demo's is let
};

const FAR_AHEAD_DAYS = 40; // the demo's own bookings lie nearer

/** Two kinds of ticket of a journey's own, sold at the demo's lakes. Their names can't meet the demo's. */
export async function sellTickets(site: Site): Promise<Sales> {
  const marian = await Asking.as('marian', site);
  const { fisheries } = await marian.get('/fisheries', FisheryList);
  const fishery = fisheries[0];
  const lakeOf = (name: string): string => fishery?.lakes.find((lake) => lake.name === name)?.id ?? '';
  const lakeIds = { 'Far Ostle': lakeOf('Far Ostle'), 'Sedge Cut': lakeOf('Sedge Cut') };
  const kindIds = { stay24: randomUUID(), junior: randomUUID() };
  const sell = (id: string, details: object): Promise<void> =>
    marian.do('POST', `/fisheries/${fishery?.id ?? ''}/ticket-types`, { id, details });
  const { stay24, junior } = TICKET_TEMPLATES;
  await sell(kindIds.stay24, { ...stay24, name: '24 hours of the journey', lakeIds: [lakeIds['Far Ostle']] });
  await sell(kindIds.junior, { ...junior, name: 'Junior of the journey', lakeIds: [lakeIds['Sedge Cut']] });
  const lakes = await Promise.all(Object.values(lakeIds).map((id) => marian.get(`/lakes/${id}`, LakeView)));
  return {
    fisheryId: fishery?.id ?? '',
    lakeIds,
    kindIds,
    pegIds: new Map(lakes.flatMap(({ pegs }) => pegs.map(({ number, id }) => [number, id] as const))),
    day: addDays(civilDay(new Date(), 'Europe/London'), FAR_AHEAD_DAYS),
  };
}

/** The address of the search for 24 hours from noon, with a peg's sheet open. */
export const pegAddress = ({ kindIds, pegIds, day }: Sales, number: string): string =>
  `/tickets?day=${day}&kind=${kindIds.stay24}&start=12.00&rods=2&peg=${pegIds.get(number) ?? ''}`;

/** A peg held by somebody for the day from noon; answers the booking's id. */
export async function holdFor(who: Asking, sales: Sales, number: string): Promise<string> {
  const id = randomUUID();
  const ticket: BookedTicket = {
    ticketTypeId: sales.kindIds.stay24,
    pegId: sales.pegIds.get(number) ?? '',
    rods: 2,
    people: 1,
    kind: 'holder',
    name: '',
    bornOn: null,
  };
  const hold = { id, lakeId: sales.lakeIds['Far Ostle'], day: sales.day, start: '12:00', tickets: [ticket] };
  await who.do('POST', '/bookings', hold);
  return id;
}

export const bookingOf = (who: Asking, id: string): Promise<BookingView> =>
  who.get(`/bookings/${id}`, BookingView);
