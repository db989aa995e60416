import { z } from 'zod';
import { Substrate } from '@mereward/shared/surveys/contract';
import { BookedTicket } from '@mereward/shared/bookings/contract';
import { Clock } from '@mereward/shared/tickets/contract';

/** One ticket somebody is about to ask for, before it has a name on it. */
export const PartyMember = BookedTicket.pick({
  pegId: true,
  ticketTypeId: true,
  kind: true,
  rods: true,
  people: true,
});
export type PartyMember = z.infer<typeof PartyMember>;

/** What an address of the search says; what it says wrongly is left out. */
export type FindChoice = {
  fisheryId: string | null;
  day: string | null;
  kindId: string | null;
  start: string | null;
  rods: number | null;
  pegId: string | null; // whose sheet is open
  party: readonly PartyMember[];
  filters: PegFilters;
};

/** Which pegs are wanted. Empty: any. */
export type PegFilters = {
  lakeId: string | null;
  bottom: Substrate | null;
  leastDepthM: number | null;
  mostDepthM: number | null;
  fromParkingM: number | null;
  barrow: boolean;
  stepFree: boolean; // looked at and found suitable, or with help
};

export const NO_FILTERS: PegFilters = {
  lakeId: null,
  bottom: null,
  leastDepthM: null,
  mostDepthM: null,
  fromParkingM: null,
  barrow: false,
  stepFree: false,
};

export const filterCount = (filters: PegFilters): number =>
  Object.values(filters).filter((value) => value !== null && value !== false).length;

/** An address's query as the router gives it. */
export type Params = Readonly<Record<string, string | string[] | undefined>>;
const Count = z.coerce.number().int().min(1).max(10);
const LengthM = z.coerce.number().min(0).max(10_000);

function read<T>(schema: z.ZodType<T>, value: string | string[] | undefined): T | null {
  return typeof value === 'string' && value !== '' ? (schema.safeParse(value).data ?? null) : null;
}

const clockOf = (value: string | string[] | undefined) =>
  typeof value === 'string' ? value.replace('.', ':') : value;

export function choiceOf(params: Params): FindChoice {
  const text = params['party'];
  return {
    fisheryId: read(z.uuid(), params['fisheryId']),
    day: read(z.iso.date(), params['day']),
    kindId: read(z.uuid(), params['kind']),
    start: read(Clock, clockOf(params['start'])),
    rods: read(Count, params['rods']),
    pegId: read(z.uuid(), params['peg']),
    party: typeof text === 'string' ? partyOf(text) : [],
    filters: {
      lakeId: read(z.uuid(), params['lake']),
      bottom: read(Substrate, params['bottom']),
      leastDepthM: read(LengthM, params['deep']),
      mostDepthM: read(LengthM, params['shallow']),
      fromParkingM: read(LengthM, params['walk']),
      barrow: params['barrow'] === 'yes',
      stepFree: params['stepFree'] === 'yes',
    },
  };
}

/** Tickets as an address keeps them: "peg.kind.g.2.1~…". */
export const partyText = (party: readonly PartyMember[]): string =>
  party
    .map(({ pegId, ticketTypeId, kind, rods, people }) =>
      [pegId ?? '', ticketTypeId, kind, String(rods), String(people)].join('.'),
    )
    .join('~');

function partyOf(text: string): PartyMember[] {
  return text.split('~').flatMap((one) => {
    const [pegId = '', ticketTypeId, kind, rods, people] = one.split('.');
    const read = PartyMember.safeParse({
      pegId: pegId === '' ? null : pegId,
      ticketTypeId,
      kind,
      rods: Number(rods),
      people: Number(people),
    });
    return read.success ? [read.data] : [];
  });
}

/** The query of an address with this choice; nothing chosen is left out. */
export function paramsOf(choice: FindChoice): Record<string, string> {
  const { filters } = choice;
  const all: Record<string, string | number | null> = {
    fisheryId: choice.fisheryId,
    day: choice.day,
    kind: choice.kindId,
    start: choice.start?.replace(':', '.') ?? null, // our sign-in passes no colon on
    rods: choice.rods,
    peg: choice.pegId,
    party: partyText(choice.party),
    lake: filters.lakeId,
    bottom: filters.bottom,
    deep: filters.leastDepthM,
    shallow: filters.mostDepthM,
    walk: filters.fromParkingM,
    barrow: filters.barrow ? 'yes' : null,
    stepFree: filters.stepFree ? 'yes' : null,
  };
  return Object.fromEntries(
    Object.entries(all).flatMap(([name, value]) =>
      value === null || value === '' ? [] : [[name, String(value)]],
    ),
  );
}

/** The address of the search with this choice, for whoever has to sign in on the way. */
export function findAddress(choice: FindChoice): string {
  const query = Object.entries(paramsOf(choice))
    .map(([name, value]) => `${name}=${encodeURIComponent(value)}`)
    .join('&');
  return query === '' ? '/tickets' : `/tickets?${query}`;
}

/** What the server is asked with: `FreeAsked` as a query. Null until the day is known. */
export function freeQuery({ day, kindId, start, rods, filters }: FindChoice): string | null {
  if (day === null) return null;
  const query = new URLSearchParams({ day });
  const put = (name: string, value: string | number | null): void => {
    if (value !== null) query.set(name, String(value));
  };
  put('ticketTypeId', kindId);
  put('start', start);
  put('rods', rods);
  put('lakeId', filters.lakeId);
  put('bottom', filters.bottom);
  put('leastDepthM', filters.leastDepthM);
  put('mostDepthM', filters.mostDepthM);
  put('fromParkingM', filters.fromParkingM);
  put('barrow', filters.barrow ? 'yes' : null);
  put('stepFree', filters.stepFree ? 'assisted' : null);
  return query.toString();
}
