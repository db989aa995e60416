import { Problem } from '@mereward/shared/problems/problem';

/** A phone's clock may run a little fast. */
const FAST_MS = 10 * 60_000;
/** Older books are not brought here; a clock that was never set tells 1970, a slipped year the first century. */
const EARLIEST = Date.UTC(1980, 0, 1);

type Told = { at: Date; now: Date; pointer: string; what: string; fastMs?: number };

/** Refuses an instant that only a wrong clock, or a slip in the year, can have told. */
export function refuseWrongClock({ at, now, pointer, what, fastMs = FAST_MS }: Told): void {
  const late = at.getTime() > now.getTime() + fastMs;
  if (!late && at.getTime() >= EARLIEST) return;
  throw new Problem('invalid', late ? `This ${what} lies in the future` : `This ${what} lies before 1980`, {
    detail: 'Look at the date and the time on the phone, put them right, and send it again.',
    errors: [{ pointer, detail: late ? 'Later than now.' : 'Earlier than 1980.' }],
  });
}
