import { Account } from '@mereward/db/entities/accounts/account';
import { Fishery } from '@mereward/db/entities/fisheries/fishery';
import { Lake } from '@mereward/db/entities/lakes/lake';
import { BottomEvent } from '@mereward/db/entities/surveys/bottom-event';
import { outlineFromRings, outlineInPlane } from '@mereward/shared/geometry/outline';
import { insideOutline, type Outline } from '@mereward/shared/geometry/polygon';
import type { LakePolygon } from '@mereward/shared/lakes/contract';
import { Problem } from '@mereward/shared/problems/problem';
import { eventWords } from '@mereward/shared/surveys/bottom-ending';
import type {
  BottomEvents,
  BottomEventView,
  RecordBottomEvent,
} from '@mereward/shared/surveys/bottom-event-contract';
import { civilDay } from '@mereward/shared/time/civil-day';
import { In } from 'typeorm';
import { accountOf, holdsAny, type Ctx } from '../ctx';
import { allowOnly, notFound } from '../http/deny';
import { originOfLake } from '../lakes/found';
import { insertOnce, mustRepeat } from '../repeat';
import { refuseDay } from './confirmed-bottoms';
import { eventsOf } from './endings';
import { EVENT_READERS, EVENT_RECORDERS } from './policy';

/** Records what happened to a bottom; from then on charts leave out what it ended, and published ones say so. */
export async function recordBottomEvent(
  ctx: Ctx,
  lakeId: string,
  input: RecordBottomEvent,
): Promise<BottomEventView> {
  const { tx, actor, now } = ctx;
  const lake = await lakeOfEvents(ctx, lakeId, 'record');
  const { zone } = await tx.findOneByOrFail(Fishery, { id: lake.fisheryId });
  const ends = [...input.ends].sort();
  const known = await tx.findOneBy(BottomEvent, { id: input.id });
  if (!known) {
    refuseDay(input.happenedOn, civilDay(now, zone), '/happenedOn');
    await insertOnce(tx, BottomEvent, {
      ...input,
      ends,
      area: input.area && areaOnWater(lake, input.area),
      lakeId,
      recordedBy: accountOf(actor),
      receivedAt: now,
      takenBackAt: null,
    });
  }
  const kept = known ?? (await tx.findOneByOrFail(BottomEvent, { id: input.id }));
  if (kept.lakeId !== lakeId) throw notFound('event');
  const content = (each: Omit<RecordBottomEvent, 'id' | 'area'>, area: boolean) => [
    each.kind,
    each.happenedOn,
    [...each.ends].sort(),
    each.note,
    area,
  ];
  mustRepeat(
    { by: accountOf(actor), content: content(input, input.area !== null) },
    { by: kept.recordedBy, content: content(kept, kept.area !== null) },
  );
  const [view] = await shape(ctx, [kept]);
  if (!view) throw notFound('event');
  return view;
}

/** The events of a lake, newest first. */
export async function listBottomEvents(ctx: Ctx, lakeId: string): Promise<BottomEvents> {
  const lake = await lakeOfEvents(ctx, lakeId, 'read');
  const events = await eventsOf(ctx.tx, lakeId);
  return {
    events: await shape(ctx, events.reverse()),
    may: { record: holdsAny(ctx.actor, lake.fisheryId, EVENT_RECORDERS) },
  };
}

/** Takes back an event that was wrongly recorded; charts built meanwhile keep what they were built from. */
export async function takeBackEvent(ctx: Ctx, eventId: string): Promise<void> {
  const { tx, actor, now } = ctx;
  accountOf(actor);
  const event = await tx.findOneBy(BottomEvent, { id: eventId });
  const lake = event && (await tx.findOneBy(Lake, { id: event.lakeId }));
  if (!event || !lake) throw notFound('event');
  allowOnly(actor, { fisheryId: lake.fisheryId, what: 'event' }, EVENT_RECORDERS);
  if (event.takenBackAt === null) await tx.update(BottomEvent, { id: eventId }, { takenBackAt: now });
}

async function lakeOfEvents(ctx: Ctx, lakeId: string, act: 'read' | 'record'): Promise<Lake> {
  accountOf(ctx.actor);
  const lake = await ctx.tx.findOneBy(Lake, { id: lakeId });
  if (!lake) throw notFound('lake');
  const roles = act === 'read' ? EVENT_READERS : EVENT_RECORDERS;
  allowOnly(ctx.actor, { fisheryId: lake.fisheryId, what: 'lake' }, roles);
  return lake;
}

/** The area as it is kept: rings in order, checked as any outline is, and over this lake's water. */
function areaOnWater(lake: Lake, area: LakePolygon): LakePolygon {
  const { outline, findings } = outlineFromRings(area.coordinates);
  const refused = (detail: string) =>
    new Problem('invalid', 'This area can’t be used', {
      detail: 'Draw it again: round the place, over the water, without crossing itself.',
      errors: [{ pointer: '/area', detail }],
    });
  if (!outline) throw refused(findings.find(({ kind }) => kind === 'refused')?.words ?? 'It is not an area.');
  const origin = originOfLake(lake);
  const water = outlineInPlane(origin, lake.details.outline);
  const drawn = outlineInPlane(origin, outline);
  if (!overlaps(water, drawn)) throw refused('None of it lies over the water of this lake.');
  return outline;
}

const overlaps = (a: Outline, b: Outline): boolean =>
  b.shore.some((p) => insideOutline(a, p)) || a.shore.some((p) => insideOutline(b, p));

async function shape({ tx }: Ctx, events: readonly BottomEvent[]): Promise<BottomEventView[]> {
  const people = await tx.findBy(Account, { id: In(events.map(({ recordedBy }) => recordedBy)) });
  return events.map((event) => ({
    id: event.id,
    kind: event.kind,
    area: event.area,
    happenedOn: event.happenedOn,
    ends: event.ends,
    note: event.note,
    by: people.find(({ id }) => id === event.recordedBy)?.name ?? '',
    words: eventWords(event),
  }));
}
