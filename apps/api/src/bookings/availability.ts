import type {
  FreeAsked,
  FreePeg,
  FreePegs,
  PegGround,
} from '@mereward/shared/bookings/availability-contract';
import {
  pegStanding,
  placesLeft,
  type PegStanding,
  type PegWish,
} from '@mereward/shared/bookings/peg-standing';
import type { Room } from '@mereward/shared/bookings/peg-room';
import type { PegDetails } from '@mereward/shared/lakes/contract';
import { whyNotLet } from '@mereward/shared/lakes/peg-rules';
import { civilDay } from '@mereward/shared/time/civil-day';
import { addDays, DAY_MS } from '@mereward/shared/time/zoned';
import type { EntityManager } from 'typeorm';
import type { Ctx } from '../ctx';
import { fisheryFound } from '../fisheries/found';
import { notFound } from '../http/deny';
import { closedWords, closuresOver, type ClosureFound } from './closures-over';
import { passes } from './free-filters';
import { lakeHours, lakesOf, whyNotLake, type LakeHours, type LetLake } from './lake-hours';
import { groundsOf } from './peg-grounds';
import { pegsWithSpans, spansOnLakes, type PegOfLake } from './peg-spans';
import { cheapestPence, openKinds, soldKinds, type SoldKind } from './sold-kinds';
import type { PegSpan } from '@mereward/shared/bookings/peg-standing';

/** How far ahead the next free day is looked for, and how long a wish may be at most with its turnaround. */
const LOOK_AHEAD_DAYS = 31;
const FARTHEST_MS = (LOOK_AHEAD_DAYS + 8) * DAY_MS;

/** Which pegs of a fishery are free for the hours somebody asks for. Open to everybody: never who has a peg. */
export async function availability(ctx: Ctx, fisheryId: string, asked: FreeAsked): Promise<FreePegs> {
  const { tx, now } = ctx;
  const { zone } = await fisheryFound(tx, fisheryId);
  const kinds = await soldKinds(tx, fisheryId);
  const kind = asked.ticketTypeId === undefined ? null : kinds.find(({ id }) => id === asked.ticketTypeId);
  if (kind === undefined) throw notFound('kind of ticket');
  const currency = (kind ?? kinds[0])?.type.currency ?? 'GBP';
  const none = (whyNot: string): FreePegs => ({
    ...{ zone, currency, whyNot, from: null, until: null, words: '', lakes: [], pegs: [] },
  });
  if (kind?.type.duration.kind === 'season')
    return none('A season ticket takes no peg, so there is none to choose.');
  const lakes = await lakesAsked(tx, { fisheryId, lakeId: asked.lakeId, kind });
  const hours = lakes.map((lake) => lakeHours(lake, { asked, kind, zone }));
  const [first] = hours;
  if (!first) return none('There is no lake to fish here yet.');
  if ('refused' in first) return none(first.refused);
  const wish = first.wishIn(0);
  if (!wish || wish.hours.until <= now) return none('That time is over. Choose a later day.');
  const there = hours.flatMap((each) => ('refused' in each ? [] : [each]));
  const views = await readLakes(ctx, {
    fisheryId,
    zone,
    asked,
    there,
    prices: kind ? [kind] : openKinds(kinds),
  });
  return {
    zone,
    currency,
    whyNot: null,
    from: wish.hours.from.toISOString(),
    until: wish.hours.until.toISOString(),
    words: first.words,
    lakes: views.map(({ lake }) => lake),
    pegs: views.flatMap(({ pegs }) => pegs),
  };
}

type LakesAsked = { fisheryId: string; lakeId: string | undefined; kind: SoldKind | null };

async function lakesAsked(tx: EntityManager, { fisheryId, lakeId, kind }: LakesAsked): Promise<LetLake[]> {
  const lakes = await lakesOf(tx, fisheryId);
  if (lakeId !== undefined && !lakes.some(({ id }) => id === lakeId)) throw notFound('lake');
  return lakes.filter(
    ({ id }) => (lakeId === undefined || id === lakeId) && (kind?.type.lakeIds.includes(id) ?? true),
  );
}

type Reading = {
  fisheryId: string;
  zone: string;
  asked: FreeAsked;
  there: readonly LakeHours[];
  prices: readonly SoldKind[];
};

/** What is known of one lake’s time, and what is asked of it. */
type AtLake = Omit<Reading, 'fisheryId' | 'there'> & {
  at: LakeHours;
  closures: readonly ClosureFound[];
  onLake: readonly PegSpan[];
  grounds: ReadonlyMap<string, PegGround>;
};

type LakeRead = { lake: FreePegs['lakes'][number]; pegs: FreePeg[] };

async function readLakes(ctx: Ctx, { fisheryId, there, ...reading }: Reading): Promise<LakeRead[]> {
  const { tx, now } = ctx;
  const starts = there.flatMap(({ wishIn }) => wishIn(0)?.hours.from.getTime() ?? []);
  const from = new Date(Math.min(...starts));
  const lakeIds = there.map(({ lake }) => lake.id);
  const stretch = { lakeIds, from, until: new Date(from.getTime() + FARTHEST_MS), now };
  const closures = await closuresOver(tx, fisheryId, stretch);
  const limited = there.filter(({ lake }) => lake.maxPeople !== null || lake.maxRods !== null);
  const onLakes = await spansOnLakes(tx, { ...stretch, lakeIds: limited.map(({ lake }) => lake.id) });
  const grounds = await groundsOf(
    ctx,
    there.map(({ lake }) => lake),
  );
  const pegs = await pegsWithSpans(tx, stretch);
  return there.map((at) =>
    readLake(
      { ...reading, at, closures, onLake: onLakes.get(at.lake.id) ?? [], grounds },
      pegs.filter(({ lakeId }) => lakeId === at.lake.id),
    ),
  );
}

function readLake(here: AtLake, pegs: readonly PegOfLake[]): LakeRead {
  const { at, asked, zone, closures, grounds } = here;
  const wish = at.wishIn(0);
  if (!wish) throw new RangeError('A lake without hours is left out before.');
  const { hours } = wish;
  const against = whyNotLake(at.lake, wish, here);
  const limits = asked.ticketTypeId === undefined ? null : (here.prices[0]?.type.pegIds ?? null);
  const reached = pegs
    .filter(({ id }) => limits?.includes(id) ?? true)
    .map((peg) => ({ peg, standing: against ?? standingOf(peg, wish, zone) }));
  return {
    lake: {
      id: at.lake.id,
      name: at.lake.name,
      from: hours.from.toISOString(),
      until: hours.until.toISOString(),
      free: reached.filter(({ standing }) => standing.state === 'free').length,
      whyNot: against?.whyNot ?? null,
      closed: closedWords(closures, { lakeId: at.lake.id, hours, zone }),
    },
    pegs: reached
      .filter(({ peg: { id, details } }) => passes({ details, ground: grounds.get(id) ?? null }, asked))
      .map(({ peg, standing }) => freePeg(here, { peg, wish, standing })),
  };
}

const roomOf = ({ people, rods, letting }: PegDetails): Room => ({
  people,
  rods,
  exclusive: letting !== 'by_place',
});

/** How a peg stands for some hours, its own state and the lines over it first. */
function standingOf({ details, spans }: PegOfLake, wish: PegWish, zone: string): PegStanding {
  const under = whyNotLet(details);
  if (under !== null) return { state: 'closed', whyNot: under };
  const { status, statusUntil, statusReason } = details;
  const firstDay = civilDay(wish.hours.from, zone);
  if (status === 'closed' && (statusUntil === null || firstDay <= statusUntil))
    return { state: 'closed', whyNot: statusReason };
  return pegStanding(roomOf(details), spans, wish);
}

type Standing = { peg: PegOfLake; wish: PegWish; standing: PegStanding };

function freePeg(here: AtLake, { peg, wish, standing }: Standing): FreePeg {
  const { id, lakeId, number, details, spans } = peg;
  const { asked, prices, grounds } = here;
  const { access, people, rods } = details;
  return {
    pegId: id,
    lakeId,
    number,
    name: details.name,
    state: standing.state,
    whyNot: standing.whyNot,
    nextFree: standing.state === 'free' ? null : nextFree(here, peg),
    position: details.position,
    people,
    rods,
    placesLeft: details.letting === 'by_place' ? placesLeft(roomOf(details), spans, wish) : null,
    fromParkingM: access.fromParkingM,
    steps: access.steps,
    surface: access.surface,
    barrow: access.barrow,
    stepFree: details.stepFree,
    ground: grounds.get(id) ?? null,
    priceFromPence: cheapestPence(prices, { pegId: id, lakeId }, asked),
  };
}

/** The first later day on which a peg that is not free for the hours asked is. */
function nextFree(here: AtLake, peg: PegOfLake): FreePeg['nextFree'] {
  if (whyNotLet(peg.details) !== null) return null;
  for (let days = 1; days <= LOOK_AHEAD_DAYS; days += 1) {
    const wish = here.at.wishIn(days);
    if (wish && !whyNotLake(here.at.lake, wish, here) && standingOf(peg, wish, here.zone).state === 'free')
      return { day: addDays(here.asked.day, days), from: wish.hours.from.toISOString() };
  }
  return null;
}
