import type { ChangeWeight, ReadingMode, Rule, SheetNumber } from './contract';

/** A published version of a sheet: frozen, with how much it mattered. */
export type PublishedSheet = SheetNumber & { weight: ChangeWeight; publishedAt: Date };

export const isLater = (a: SheetNumber, b: SheetNumber): boolean =>
  a.major !== b.major ? a.major > b.major : a.minor > b.minor;

/** What has to be read for a booking, and what hangs on it. */
export type Reading = {
  needed: boolean;
  blocks: 'ticket' | 'arrival' | 'nothing';
  version: SheetNumber | null; // the one to read: the newest
  since: SheetNumber | null; // changes are shown from here; null: the whole sheet is new to them
};

export type Reader = { read: SheetNumber | null; bookedAt: Date };

/**
 * Whether somebody who has read a version (null: none) must read again for a booking. A safety-critical version asks
 * everybody with a booking still to come; another change asks those who booked after it was published; a wording put
 * right asks nobody. `sheets`: every published version of the lake, in any order; none: nothing to read.
 */
export function readingNeeded(
  sheets: readonly PublishedSheet[],
  { read, bookedAt }: Reader,
  mode: ReadingMode,
): Reading {
  const newest = sheets.reduce<PublishedSheet | null>(
    (latest, each) => (latest === null || isLater(each, latest) ? each : latest),
    null,
  );
  const missed = sheets.filter((each) => read === null || isLater(each, read));
  const needed =
    read === null
      ? newest !== null
      : missed.some(
          ({ weight, publishedAt }) =>
            weight === 'safety' || (weight === 'change' && publishedAt <= bookedAt),
        );
  return {
    needed,
    blocks: needed ? BLOCKS[mode] : 'nothing',
    version: newest && { major: newest.major, minor: newest.minor },
    since: read,
  };
}

const BLOCKS = {
  must_ack_before_ticket_valid: 'ticket',
  must_ack_before_arrival: 'arrival',
  notice_only: 'nothing',
} as const satisfies Record<ReadingMode, Reading['blocks']>;

export const READING_WORDS: Readonly<Record<Reading['blocks'], string>> = {
  ticket: 'Not valid until the rules are read',
  arrival: 'Read the rules before you come',
  nothing: 'The rules have changed since you read them',
};

/** From when a ticket is good: its start, or the reading where that came later and the ticket hangs on it. */
export const goodFrom = (start: Date, readAt: Date, mode: ReadingMode): Date =>
  mode === 'must_ack_before_ticket_valid' && readAt > start ? readAt : start;

/** The rules that hold at a peg for a kind of ticket, in the order of their numbers. */
export function rulesAt(
  rules: readonly Rule[],
  at: { lakeId: string; pegId: string | null; ticketTypeId: string | null },
): Rule[] {
  const reaches = (ids: readonly string[] | null, id: string | null): boolean =>
    ids === null || id === null || ids.includes(id);
  return rules
    .filter(
      ({ scope }) =>
        reaches(scope.lakeIds, at.lakeId) &&
        reaches(scope.pegIds, at.pegId) &&
        reaches(scope.ticketTypeIds, at.ticketTypeId),
    )
    .sort((a, b) => a.number - b.number);
}
