/** Common practice, no published source: a peg is held ten minutes, once to fifteen while a card is being checked. */
export const HOLD_MINUTES = 10;
export const CHALLENGE_HOLD_MINUTES = 15;

const MINUTE_MS = 60_000;

/** A peg kept for somebody who is paying; free again at `until`. */
export type Hold = { heldAt: Date; until: Date };

export const holdFrom = (now: Date, minutes = HOLD_MINUTES): Hold => ({
  heldAt: now,
  until: new Date(now.getTime() + minutes * MINUTE_MS),
});

export const holdIsOver = ({ until }: Hold, now: Date): boolean => now.getTime() >= until.getTime();

/**
 * The hold once the card’s bank has begun to ask its owner: up to `minutes` from its start, as often as this is told.
 * One that is over stays over, and none gets shorter.
 */
export function holdInChallenge(hold: Hold, now: Date, minutes = CHALLENGE_HOLD_MINUTES): Hold {
  if (holdIsOver(hold, now)) return hold;
  const longest = hold.heldAt.getTime() + minutes * MINUTE_MS;
  return { heldAt: hold.heldAt, until: new Date(Math.max(longest, hold.until.getTime())) };
}

/** Two hours after its start with nobody there and no word, a bailiff may mark it. Common practice, no published source. */
export const NO_SHOW_AFTER_HOURS = 2;
export const mayBeNoShow = (from: Date, now: Date, afterHours = NO_SHOW_AFTER_HOURS): boolean =>
  now.getTime() >= from.getTime() + afterHours * 60 * MINUTE_MS;
