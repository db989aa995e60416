import { metresToWraps, wrapsToMetres } from '../units/wraps';
import { refuse, type Refusal } from './cast-site';
import type { CastObservation } from './contract';
import { lineAWrapM, type Sticks } from './line-out';

/** Line wound in between two readings of one throw: so many turns of the reel, or so many wraps round the sticks. */
export type WoundIn =
  | { by: 'turns'; turns: number; lineATurnM: number }
  | { by: 'wraps'; wraps: number }
  | { by: 'length'; lengthM: number };

/** The count still out, after winding in from `before`. The remainder counts as measured only when both parts were. */
export type StillOut = Pick<CastObservation, 'wrapsWhole' | 'remainderM' | 'remainderStated'>;

/**
 * The count of the next reading closer in on the same throw: a sounding of its own, on the same bearing. Winding in as
 * much line as was out, or more, is refused in words.
 */
export function closerIn(
  before: StillOut,
  wound: WoundIn,
  sticks: Sticks,
): { ok: true; out: StillOut } | Refusal {
  const wrapM = lineAWrapM(sticks);
  const outM = wrapsToMetres({ whole: before.wrapsWhole, remainderM: before.remainderM }, wrapM);
  const inM = lengthIn(wound, wrapM);
  if (!(inM > 0))
    return refuse('No line was wound in, so this is the same reading', 'Give the turns or wraps wound in');
  if (!(outM > inM)) {
    const words = `${inM.toFixed(1)} m was wound in, but only ${outM.toFixed(1)} m was out`;
    return refuse(words, 'Check the turns, the line one turn takes in, and the first count');
  }
  const left = metresToWraps(outM - inM, wrapM);
  const measured = before.remainderStated && wound.by !== 'wraps';
  const whole = wound.by === 'wraps' && Number.isInteger(wound.wraps) && before.remainderStated;
  return {
    ok: true,
    out: { wrapsWhole: left.whole, remainderM: left.remainderM, remainderStated: measured || whole },
  };
}

function lengthIn(wound: WoundIn, wrapM: number): number {
  switch (wound.by) {
    case 'turns':
      return wound.turns * wound.lineATurnM;
    case 'wraps':
      return wound.wraps * wrapM;
    case 'length':
      return wound.lengthM;
  }
}
