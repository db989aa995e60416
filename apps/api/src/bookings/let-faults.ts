import type { Lake } from '@mereward/db/entities/lakes/lake';
import type { Peg } from '@mereward/db/entities/lakes/peg';
import { affects, mayBookInSpite, CLOSURE_REASON_WORDS } from '@mereward/shared/closures/closure-effect';
import { toldLine } from '@mereward/shared/lakes/lake-places';
import { whyNotLet } from '@mereward/shared/lakes/peg-rules';
import { Problem, type ProblemError } from '@mereward/shared/problems/problem';
import { civilDay } from '@mereward/shared/time/civil-day';
import type { Interval } from '@mereward/shared/time/interval';
import type { Ctx } from '../ctx';
import { originOfLake } from '../lakes/found';
import { closuresOver } from './closures-over';

/** Pegs and lake wanted for some hours; a peg is null where one is chosen on arrival. */
export type PegsAt = {
  fisheryId: string;
  zone: string;
  lake: Lake;
  hours: Interval;
  season: boolean;
  pegs: readonly (Peg | null)[]; // one for each ticket
};

type LetThen = Pick<PegsAt, 'lake' | 'hours' | 'zone'>;

/** What of a peg, or of a line drawn near it, stands against letting it for some hours, in words; null when nothing does. */
export function pegFault({ number, details }: Peg, { lake, hours, zone }: LetThen): string | null {
  const drawn = { places: lake.details.places, origin: originOfLake(lake) };
  const under = whyNotLet({ overheadLine: toldLine(details, drawn) });
  if (under) return under;
  const { status, statusUntil, statusReason } = details;
  const shut = status === 'closed' && (statusUntil === null || civilDay(hours.from, zone) <= statusUntil);
  return shut ? `Peg ${number} is closed: ${statusReason}` : null;
}

/** Refuses what the pegs themselves, or a closure over them, stand against. Room is the calendar's to say. */
export async function refuseUnlet(ctx: Ctx, at: PegsAt): Promise<void> {
  const faults = at.pegs.flatMap((peg, index) => {
    const words = peg && pegFault(peg, at);
    return words ? [{ index, words }] : [];
  });
  refuse(faults, 'Nothing was kept. Choose another peg or another time.');
  const closures = await closuresOver(ctx.tx, at.fisheryId, at.hours);
  const closed = at.pegs.flatMap((peg, index) => {
    const stay = { lakeId: at.lake.id, pegId: peg?.id ?? null, ...at.hours, season: at.season };
    const inTheWay = closures.find(
      (closure) => !mayBookInSpite(closure, affects(closure, stay, at.zone), false),
    );
    return inTheWay
      ? [
          {
            index,
            words: `Closed then (${CLOSURE_REASON_WORDS[inTheWay.reason].toLowerCase()}): ${inTheWay.publicWords}`,
          },
        ]
      : [];
  });
  refuse(closed, 'Nothing was kept. Choose another day, or another lake.');
}

function refuse(faults: readonly { index: number; words: string }[], detail: string): void {
  const [first] = faults;
  if (!first) return;
  const errors = faults.map(({ index, words }): ProblemError => ({
    pointer: `/tickets/${index}/pegId`,
    detail: words,
  }));
  throw new Problem('conflict', first.words, { detail, errors });
}
