import type { Outline } from '../geometry/polygon';
import { distanceToShoreM } from '../geometry/shore-distance';

/** A reading on the line it was thrown along: from which peg, which way and how far out. */
export type OrderedCast = {
  id: string;
  label: string;
  xM: number;
  yM: number;
  depthM: number | null;
  depthSigmaM?: number | null | undefined;
  line?: { pegId: string; bearingDeg: number; rangeM: number } | undefined;
};

// Limits: common practice, no published source.
/** Loose ground seldom stands steeper under water than one down for one along; a piled bank does, and a slip often seems to. */
const STEEPEST = 1;
const SAME_LINE_DEG = 3;
/** Nearer than this two casts are neighbours, which have a check of their own. */
const APART_M = 2;
const NEAR_BANK_M = 8;
const FEWEST_TO_TURN = 3;

export type OrderFinding = { id: string; words: string };

/**
 * Whether depths follow one another as a bed can along each line cast: no steeper than it can stand from the bank to the
 * first reading and from reading to reading, more than the readings' own σ explain; and not deepest at the bank and
 * shallower all the way out, which is how a line looks that was written down from its far end.
 */
export function depthOrder(outline: Outline, casts: readonly OrderedCast[]): OrderFinding[] {
  return linesOf(casts).flatMap((line) => {
    const turned = writtenBackwards(outline, line);
    return turned ? [turned] : [...steepBank(outline, line), ...steepSteps(line)];
  });
}

type Read = OrderedCast & { depthM: number; line: NonNullable<OrderedCast['line']> };

/** Readings from one peg within a few degrees of one another, nearest first. */
function linesOf(casts: readonly OrderedCast[]): Read[][] {
  const byPeg = new Map<string, Read[]>();
  for (const cast of casts) {
    if (!isRead(cast)) continue;
    const ofPeg = byPeg.get(cast.line.pegId) ?? [];
    ofPeg.push(cast);
    byPeg.set(cast.line.pegId, ofPeg);
  }
  const lines = [...byPeg.values()].flatMap(linesOfPeg);
  for (const line of lines) line.sort((a, b) => a.line.rangeM - b.line.rangeM);
  return lines;
}

const isRead = (cast: OrderedCast): cast is Read => cast.depthM !== null && cast.line !== undefined;

/** By bearing, told from one of them so that a peg facing north does not fall apart at 360°. */
function linesOfPeg(casts: Read[]): Read[][] {
  const fromDeg = casts[0]?.line.bearingDeg ?? 0;
  const turn = ({ line }: Read): number => ((line.bearingDeg - fromDeg + 540) % 360) - 180;
  const lines: Read[][] = [];
  for (const cast of [...casts].sort((a, b) => turn(a) - turn(b) || (a.id < b.id ? -1 : 1))) {
    const line = lines.at(-1);
    const [first] = line ?? [];
    if (line && first && turn(cast) - turn(first) <= SAME_LINE_DEG) line.push(cast);
    else lines.push([cast]);
  }
  return lines;
}

const doubtM = ({ depthSigmaM }: Read): number => 2 * (depthSigmaM ?? 0);

function steepBank(outline: Outline, [nearest]: Read[]): OrderFinding[] {
  if (!nearest) return [];
  const outM = distanceToShoreM(outline, nearest);
  if (nearest.depthM - doubtM(nearest) <= STEEPEST * Math.max(outM, APART_M)) return [];
  const words = `${nearest.label}, ${nearest.depthM.toFixed(1)} m deep only ${outM.toFixed(1)} m from the bank`;
  return [{ id: nearest.id, words }];
}

function steepSteps(line: Read[]): OrderFinding[] {
  return line.flatMap((far, i) => {
    const near = line[i - 1];
    if (!near) return [];
    const alongM = Math.hypot(far.xM - near.xM, far.yM - near.yM);
    const downM = far.depthM - near.depthM;
    const doubt = Math.hypot(doubtM(near), doubtM(far));
    if (alongM < APART_M || Math.abs(downM) - doubt <= STEEPEST * alongM) return [];
    const words = `${near.label} and ${far.label}, ${Math.abs(downM).toFixed(1)} m ${downM > 0 ? 'deeper' : 'shallower'} in ${alongM.toFixed(1)} m`;
    return [{ id: `${near.id} ${far.id}`, words }];
  });
}

function writtenBackwards(outline: Outline, line: Read[]): OrderFinding | null {
  const [nearest] = line;
  const last = line.at(-1);
  if (!nearest || !last || line.length < FEWEST_TO_TURN) return null;
  const falls = line.every((cast, i) => i === 0 || cast.depthM < (line[i - 1]?.depthM ?? 0));
  const dropM = nearest.depthM - last.depthM;
  const clear = dropM > Math.max(0.5, Math.hypot(doubtM(nearest), doubtM(last)));
  if (!falls || !clear || distanceToShoreM(outline, nearest) > NEAR_BANK_M) return null;
  const words = `${nearest.label} to ${last.label}, deepest at the bank and shallower all the way out`;
  return { id: line.map(({ id }) => id).join(' '), words };
}
