import { Account } from '@mereward/db/entities/accounts/account';
import { ChartLeftOut } from '@mereward/db/entities/charts/chart-left-out';
import type { LeftOutWhat } from '@mereward/shared/charts/left-out-contract';
import { civilDay, dayWords } from '@mereward/shared/time/civil-day';
import { In, IsNull, type EntityManager } from 'typeorm';
import type { BuildSource, SourceVisit } from './build-source';
import type { Built } from './built';

/** What a person left out of a chart, with why in words for its papers. */
export type SourceLeftOut = { what: LeftOutWhat; why: string };

/** What a row of what was left out speaks of. */
export function whatOf({ castId, part }: Pick<ChartLeftOut, 'castId' | 'part'>): LeftOutWhat {
  if (castId !== null) return { kind: 'cast', castId };
  if (part === null) throw new Error('A row of what was left out names neither a cast nor a part of a log');
  return part;
}

type Of = { chartId: string; visits: readonly SourceVisit[]; zone: string };

/** What is left out of a chart just now, of what its visits still hold, in an order of its own. */
export async function leftOutOf(tx: EntityManager, { chartId, visits, zone }: Of): Promise<SourceLeftOut[]> {
  const rows = await tx.findBy(ChartLeftOut, { chartId, putBackAt: IsNull() });
  const people = await tx.findBy(Account, { id: In([...new Set(rows.map((row) => row.leftOutBy))]) });
  const kept = new Set(visits.flatMap(({ casts, logs }) => [...casts, ...logs].map(({ id }) => id)));
  const nameOf = (id: string): string => people.find((person) => person.id === id)?.name ?? 'somebody';
  return rows
    .filter(({ castId, logId }) => kept.has(castId ?? logId ?? ''))
    .map((row) => ({
      what: whatOf(row),
      why: `Left out of this chart by ${nameOf(row.leftOutBy)} on ${dayWords(civilDay(row.leftOutAt, zone))}: ${row.reason}`,
    }))
    .sort((a, b) => (keyOf(a.what) < keyOf(b.what) ? -1 : 1));
}

/** The same for the same thing, whatever order its fields came back in. */
export function keyOf(what: LeftOutWhat): string {
  switch (what.kind) {
    case 'cast':
      return `cast ${what.castId}`;
    case 'cell':
      return `cell ${what.logId} ${what.xM} ${what.yM} ${what.sideM}`;
    case 'run':
      return `run ${what.logId} ${what.fromSeq} ${what.toSeq}`;
  }
}

export type Counted = { source: BuildSource; leftOut: Built['leftOut'] };

/** The source without the casts a person left out, and those casts with why. Parts of logs go when they are merged. */
export function withoutLeftOut(source: BuildSource): Counted {
  const whyOf = new Map(
    source.leftOut.flatMap(({ what, why }) => (what.kind === 'cast' ? [[what.castId, why] as const] : [])),
  );
  return {
    source: {
      ...source,
      visits: source.visits.map((visit) => ({
        ...visit,
        casts: visit.casts.filter(({ id }) => !whyOf.has(id)),
      })),
    },
    leftOut: [...whyOf].map(([id, why]) => ({ id, why, byHand: true })),
  };
}

type Merging = { seq: number; xM: number; yM: number };

/** Whether a sounding of a log was left out by a person: by its cell, or as one of a run. */
export function isLeftOut(
  log: { id: string },
  leftOut: readonly SourceLeftOut[],
): (sounding: Merging) => boolean {
  const parts = leftOut.flatMap(({ what }) => (what.kind !== 'cast' && what.logId === log.id ? [what] : []));
  return ({ seq, xM, yM }) =>
    parts.some((part) =>
      part.kind === 'run'
        ? seq >= part.fromSeq && seq <= part.toSeq
        : xM >= part.xM && xM < part.xM + part.sideM && yM >= part.yM && yM < part.yM + part.sideM,
    );
}
