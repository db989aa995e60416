import {
  CastView,
  CloseVisit,
  VisitView,
  type ArcCoverage,
  type Reduced,
  type VisitList,
  type VisitWithCasts,
} from '@mereward/shared/surveys/contract';
import { z } from 'zod';
import type { OutboxEntry } from '@/lib/outbox-event';
import { visitGroup } from '@/features/surveys/visit-events';

export type Standing = 'waiting' | 'refused';

/** A visit as the server has it with what this device has still to send laid over it. */
export type VisitShown = VisitWithCasts & {
  /** Casts that are on this device only, by their id. */
  unsent: Readonly<Record<string, Standing>>;
  /** How the opening and the closing stand; null when the server has them or there is none. */
  opening: Standing | null;
  closing: Standing | null;
};

type Placed = Pick<OutboxEntry, 'seq' | 'kind' | 'group' | 'state' | 'body' | 'shown'>;

const TakenBack = z.object({ castId: z.string() });
const standingOf = ({ state }: Placed): Standing | null => (state === 'sent' ? null : state);

export const ofVisit = <E extends Placed>(entries: readonly E[], visitId: string): E[] =>
  entries.filter(({ group }) => group === visitGroup(visitId)).sort((a, b) => a.seq - b.seq);

type Of = Pick<VisitWithCasts, 'visit' | 'casts' | 'reducing'>;

/** What this device can work out by itself; null where it has not read what that takes. */
export type WorkedOutHere = {
  reduce: (cast: CastView, of: Of) => Reduced | null;
  cover: (pegId: string, of: Of) => ArcCoverage | null;
};

const NOTHING: WorkedOutHere = { reduce: () => null, cover: () => null };

/**
 * A visit with its queue laid over it: casts numbered on from the last, what is taken back gone, the visit closed when it
 * was closed here. Casts are reduced and coverage is worked out on this device, or left as they were where it can't. What
 * an older program left here and this one can't read is left to the queue.
 */
export function visitShown(
  known: VisitWithCasts,
  queue: readonly Placed[],
  here: WorkedOutHere = NOTHING,
): VisitShown {
  const own = ofVisit(queue, known.visit.id);
  const unsent: Record<string, Standing> = {};
  let { visit } = known;
  let casts = [...known.casts];
  let last = Math.max(0, ...casts.map(({ seq }) => seq));
  let opening: Standing | null = null;
  let closing: Standing | null = null;
  for (const entry of own) {
    const standing = standingOf(entry);
    if (entry.kind === 'open-visit') opening = standing;
    if (entry.kind === 'keep-cast') {
      const cast = CastView.safeParse(entry.shown).data;
      if (!cast || casts.some(({ id }) => id === cast.id)) continue;
      last += 1;
      casts.push({ ...cast, seq: last });
      if (standing) unsent[cast.id] = standing;
    }
    if (entry.kind === 'undo-cast' && entry.state !== 'refused') {
      const castId = TakenBack.safeParse(entry.shown).data?.castId;
      casts = casts.filter(({ id }) => id !== castId);
    }
    if (entry.kind === 'close-visit') {
      const ended = CloseVisit.safeParse(entry.body).data;
      closing = standing;
      if (ended && entry.state !== 'refused')
        visit = { ...visit, ...ended, status: 'closed', may: { ...visit.may, addCasts: false } };
    }
  }
  const stale = closing === 'waiting' ? casts : casts.filter(({ id }) => unsent[id] !== undefined);
  const anew = new Map(
    stale.map((cast) => [cast.id, here.reduce(cast, { ...known, visit, casts }) ?? cast.reduced]),
  );
  casts = casts.map((cast) => ({ ...cast, reduced: anew.get(cast.id) ?? cast.reduced }));
  if (opening) visit = { ...visit, may: { ...visit.may, correct: false } };
  return {
    ...known,
    visit: { ...visit, castCount: casts.length },
    casts,
    coverage: coverageShown(
      known.coverage,
      { visit, casts },
      { pegIds: stale.map(({ pegId }) => pegId), here },
    ),
    unsent,
    opening,
    closing,
  };
}

type Covering = { pegIds: readonly string[]; here: WorkedOutHere };

function coverageShown(known: readonly ArcCoverage[], of: Of, { pegIds, here }: Covering): ArcCoverage[] {
  const anew = [...new Set(pegIds)].flatMap((pegId) => here.cover(pegId, of) ?? []);
  return [...known.filter(({ pegId }) => !anew.some((each) => each.pegId === pegId)), ...anew];
}

/** A visit opened here that the server does not know yet. */
export function openedHere(queue: readonly Placed[], visitId: string): VisitWithCasts | null {
  const entry = ofVisit(queue, visitId).find(({ kind, state }) => kind === 'open-visit' && state !== 'sent');
  const visit = VisitView.safeParse(entry?.shown).data;
  return visit ? { visit, casts: [], coverage: [] } : null;
}

/** A lake's visits with those opened or closed here, and casts counted that wait here. */
export function visitsShown(known: VisitList, queue: readonly Placed[], lakeId: string): VisitList {
  const opened = queue.flatMap(({ kind, shown, state }) => {
    const visit = kind === 'open-visit' && state !== 'sent' ? VisitView.safeParse(shown).data : undefined;
    return visit?.lakeId === lakeId && !known.visits.some(({ id }) => id === visit.id) ? [visit] : [];
  });
  const visits = [...opened.reverse(), ...known.visits].map((visit) => {
    const { visit: now } = visitShown({ visit, casts: [], coverage: [] }, queue);
    const waiting = ofVisit(queue, visit.id).filter(
      ({ kind, state }) => kind === 'keep-cast' && state !== 'sent',
    );
    return { ...now, castCount: visit.castCount + waiting.length };
  });
  return { ...known, visits };
}
