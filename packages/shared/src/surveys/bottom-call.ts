import type { Bottom, CameBack, CastObservation } from './contract';
import type { Feels } from './bottom-agreement';

/** A call and why, in words. */
export type BottomCall = { bottom: Bottom; why: string };

/** The parts of a cast from one peg by which two of them can confirm a snag. */
export type ThrownLine = Pick<CastObservation, 'aim' | 'drag'> & { lineOutM: number };

/**
 * The bottom's label by the surveyor's rule of thumb: the drag first, then the landing, then what came back. Silt needs
 * a soft landing and a plugged drag or mud; gravel a rattle; clay a skim and no rattle; weed sticking and freeing, or
 * weed brought back; a snag two casts that stop solid at the same wraps. Without that, `unknown`: the honest default.
 * Common practice, no published source.
 */
export function bottomCall(feels: Feels, here: ThrownLine, earlier: readonly ThrownLine[]): BottomCall {
  switch (feels.drag) {
    case 'solid_stop':
      return solidStop(here, earlier);
    case 'fine_rattle':
    case 'coarse_rattle':
      return rattle(feels);
    case 'smooth_skim':
      return skim(feels);
    case 'smooth_slow_heavy':
      return plugged(feels);
    case 'stick_free_stick':
      return sticking(feels);
    case 'spongy_pull':
      return spongy(feels);
    case 'unsure':
    case null:
      return withoutDrag(feels);
  }
}

const brought = ({ cameBack }: Feels, ...things: CameBack[]): boolean =>
  things.some((thing) => cameBack?.includes(thing));

const SAME_LINE_M = 2; // half a wrap on the usual sticks
const SAME_BEARING_DEG = 3;

function solidStop(here: ThrownLine, earlier: readonly ThrownLine[]): BottomCall {
  if (earlier.some((other) => other.drag === 'solid_stop' && sameSpot(here, other))) {
    return { bottom: 'snag', why: 'Two casts stopped solid at the same wraps' };
  }
  return {
    bottom: 'unknown',
    why: 'It stopped solid once: perhaps a snag. Cast again to the same wraps; two solid stops there make a snag',
  };
}

function sameSpot(a: ThrownLine, b: ThrownLine): boolean {
  if (Math.abs(a.lineOutM - b.lineOutM) > SAME_LINE_M) return false;
  if (a.aim.by === 'mark' && b.aim.by === 'mark') {
    return a.aim.markId === b.aim.markId && Math.abs(a.aim.offsetDeg - b.aim.offsetDeg) <= SAME_BEARING_DEG;
  }
  if (a.aim.by !== 'compass' || b.aim.by !== 'compass') return false;
  const turn = Math.abs(a.aim.bearingDeg - b.aim.bearingDeg);
  return Math.min(turn, 360 - turn) <= SAME_BEARING_DEG;
}

function rattle(feels: Feels): BottomCall {
  if (feels.drag === 'coarse_rattle' && brought(feels, 'shell')) {
    return { bottom: 'shell', why: 'It rattled coarsely and brought shell back' };
  }
  if (feels.drag === 'fine_rattle' && brought(feels, 'sand') && feels.drop !== 'sharp_crack') {
    return { bottom: 'sand', why: 'A fine hiss, and grains came back' };
  }
  return { bottom: 'gravel', why: 'It rattled as it was drawn' };
}

function skim(feels: Feels): BottomCall {
  if (brought(feels, 'sand')) return { bottom: 'sand', why: 'It skimmed, and grains came back' };
  return { bottom: 'clay', why: 'It skimmed smoothly and did not rattle' };
}

function plugged(feels: Feels): BottomCall {
  const soft = feels.drop === 'soft_slow' || feels.drop === 'dull' || feels.drop === 'no_touch';
  if (brought(feels, 'leaves', 'twig') && !brought(feels, 'black_silt')) {
    return { bottom: 'leaf', why: 'A soft, heavy pull, and leaves or twigs came back' };
  }
  if (!soft) {
    return { bottom: 'unknown', why: 'A plugged drag, but no soft landing was felt: silt needs both' };
  }
  const mud = brought(feels, 'black_silt') || feels.smell === 'bad_eggs';
  if (mud && feels.drop !== 'dull')
    return { bottom: 'silt_deep', why: 'A soft landing, a heavy drag and black mud' };
  return { bottom: 'silt_firm', why: 'A soft landing and a plugged drag' };
}

function sticking(feels: Feels): BottomCall {
  if (brought(feels, 'leaves', 'twig') && !brought(feels, 'weed')) {
    return { bottom: 'leaf', why: 'It caught and freed, and brought leaves or twigs' };
  }
  if (feels.drop === 'no_touch')
    return { bottom: 'weed_thick', why: 'It never felt down, and stuck and freed' };
  return { bottom: 'weed_low', why: 'It stuck, freed and stuck again' };
}

function spongy(feels: Feels): BottomCall {
  if (brought(feels, 'weed')) return { bottom: 'weed_thick', why: 'A spongy pull that brought weed back' };
  if (brought(feels, 'leaves', 'twig'))
    return { bottom: 'leaf', why: 'A spongy pull that brought leaves or twigs' };
  return { bottom: 'unknown', why: 'A spongy pull, but nothing came back to say what it was' };
}

function withoutDrag(feels: Feels): BottomCall {
  if (brought(feels, 'weed')) {
    const thick = feels.drop === 'no_touch';
    return { bottom: thick ? 'weed_thick' : 'weed_low', why: 'Weed came back' };
  }
  if (brought(feels, 'black_silt') && (feels.drop === 'soft_slow' || feels.drop === 'no_touch')) {
    return { bottom: 'silt_deep', why: 'A soft landing, and black mud came back' };
  }
  if (brought(feels, 'black_silt') && feels.drop === 'dull') {
    return { bottom: 'silt_firm', why: 'A soft stop, and mud came back' };
  }
  if (brought(feels, 'leaves', 'twig')) return { bottom: 'leaf', why: 'Leaves or twigs came back' };
  if (brought(feels, 'sand') && (feels.drop === 'dull' || feels.drop === 'firm_thud')) {
    return { bottom: 'sand', why: 'A firm, dull landing, and grains came back' };
  }
  if (feels.drop === 'sharp_crack' || feels.drop === 'firm_thud') {
    return { bottom: 'unknown', why: KNOCK_WORDS };
  }
  return { bottom: 'unknown', why: 'Not enough was felt to call the bottom' };
}

export const KNOCK_WORDS =
  'A firm knock alone can’t tell gravel from hard clay: draw the lead a metre, a rattle is gravel and a smooth skim is clay';
