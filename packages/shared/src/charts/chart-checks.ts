import type { Outline } from '../geometry/polygon';
import { insideOutline } from '../geometry/polygon';
import { distanceToShoreM } from '../geometry/shore-distance';
import type { CheckView } from './contract';
import { depthOrder, type OrderedCast } from './depth-order';

/** A reduced cast as the checks see it: plane metres, depth at datum (null: no float reading), and a name for people. */
export type CheckedCast = OrderedCast;

export type CheckedVisit = {
  id: string;
  label: string;
  gaugeStartM: number | null;
  gaugeEndM: number | null;
  stickCheckedOn: string | null; // civil day of the last tape check of the sticks' spacing
  visitedOn: string; // civil day
};

/** How much of one peg's arc was cast over, and how many casts were repeated: shares 0–1. */
export type CheckedPeg = { id: string; label: string; arcShare: number; repeatsShare: number };

export type CheckInput = {
  outline: Outline;
  casts: readonly CheckedCast[];
  visits: readonly CheckedVisit[];
  pegs: readonly CheckedPeg[];
};

// Limits: common practice, no published source.
const NEIGHBOURS_M = 2;
const NEIGHBOURS_DIFFER_M = 1;
const LEVEL_MOVED_M = 0.05;
const LEAST_ARC_SHARE = 0.6;
const LEAST_REPEATS_SHARE = 0.1;
/** So many are named in a check's words; all their ids stand beside them. */
const NAMED = 3;

/**
 * The machine's checks before a chart is published, in the order they are shown. What makes the chart wrong blocks it; what
 * a person must weigh (a steep place, a thin survey) warns.
 */
export function chartChecks(input: CheckInput): CheckView[] {
  return [
    castsOnWater(input),
    neighboursAgree(input),
    depthsInOrder(input),
    levelsRead(input),
    levelSteady(input),
    sticksTaped(input),
    arcsCovered(input),
    castsRepeated(input),
  ];
}

type Finding = { id: string; words: string };
type Check = { key: string; blocks: boolean; good: string; bad: string; findings: readonly Finding[] };

function checkView({ key, blocks, good, bad, findings }: Check): CheckView {
  if (findings.length === 0) return { key, state: 'passed', blocks: false, words: good, ids: [] };
  const named = findings.slice(0, NAMED).map((f) => f.words);
  const more = findings.length > NAMED ? [`and ${findings.length - NAMED} more`] : [];
  const words = `${bad} ${[...named, ...more].join('; ')}.`;
  return {
    key,
    state: blocks ? 'failed' : 'warning',
    blocks,
    words,
    ids: [...new Set(findings.flatMap((f) => f.id.split(' ')))],
  };
}

function castsOnWater({ outline, casts }: CheckInput): CheckView {
  const findings = casts.flatMap((cast) => {
    if (insideOutline(outline, cast)) return [];
    const outM = distanceToShoreM(outline, cast);
    return [{ id: cast.id, words: `${cast.label} lies ${outM.toFixed(1)} m outside`, outM }];
  });
  return checkView({
    key: 'casts_on_water',
    blocks: true,
    good: 'Every cast lies on the water.',
    bad: 'Casts lie outside the outline of the water; correct the cast, the peg or the outline:',
    findings: findings.sort((a, b) => b.outM - a.outM || (a.id < b.id ? -1 : 1)),
  });
}

function neighboursAgree({ casts }: CheckInput): CheckView {
  return checkView({
    key: 'neighbours_agree',
    blocks: false,
    good: `No two casts within ${NEIGHBOURS_M} m differ by more than ${NEIGHBOURS_DIFFER_M} m.`,
    bad: `Casts within ${NEIGHBOURS_M} m of each other differ by more than ${NEIGHBOURS_DIFFER_M} m; a steep edge or a slip, look at each:`,
    findings: disagreeingPairs(casts),
  });
}

function disagreeingPairs(casts: readonly CheckedCast[]): Finding[] {
  const sorted = [...casts].sort((a, b) => a.xM - b.xM || (a.id < b.id ? -1 : 1));
  const pairs: (Finding & { byM: number })[] = [];
  for (let i = 0; i < sorted.length; i++) {
    const a = sorted[i]!;
    for (let j = i + 1; j < sorted.length && sorted[j]!.xM - a.xM < NEIGHBOURS_M; j++) {
      const b = sorted[j]!;
      if (a.depthM === null || b.depthM === null || Math.hypot(a.xM - b.xM, a.yM - b.yM) >= NEIGHBOURS_M)
        continue;
      const byM = Math.abs(a.depthM - b.depthM);
      if (byM <= NEIGHBOURS_DIFFER_M) continue;
      const [first, second] = a.id < b.id ? [a, b] : [b, a];
      const words = `${first.label} and ${second.label} by ${byM.toFixed(1)} m`;
      pairs.push({ id: `${first.id} ${second.id}`, words, byM });
    }
  }
  return pairs.sort((a, b) => b.byM - a.byM || (a.id < b.id ? -1 : 1));
}

function depthsInOrder({ outline, casts }: CheckInput): CheckView {
  return checkView({
    key: 'depths_in_order',
    blocks: false,
    good: 'From shallow to deep the readings of every line follow one another as a bed can.',
    bad: 'Readings along a line that a bed can hardly follow; a piled bank, or a count or its order mistaken, look at each:',
    findings: depthOrder(outline, casts),
  });
}

function levelsRead({ visits }: CheckInput): CheckView {
  const findings = visits.flatMap(({ id, label, gaugeStartM, gaugeEndM }) => {
    const missing = [...(gaugeStartM === null ? ['start'] : []), ...(gaugeEndM === null ? ['end'] : [])];
    return missing.length === 0
      ? []
      : [{ id, words: `${label} has no reading at its ${missing.join(' or ')}` }];
  });
  return checkView({
    key: 'levels_read',
    blocks: true,
    good: 'The gauge board was read at the start and the end of every visit.',
    bad: 'Without the level, depths cannot be brought to the datum; add the reading:',
    findings,
  });
}

function levelSteady({ visits }: CheckInput): CheckView {
  const findings = visits.flatMap(({ id, label, gaugeStartM, gaugeEndM }) => {
    if (gaugeStartM === null || gaugeEndM === null) return [];
    const movedM = gaugeEndM - gaugeStartM;
    // A board is read to a centimetre; a hair more than 5 cm is still 5 cm.
    if (Math.abs(movedM) <= LEVEL_MOVED_M + 1e-9) return [];
    return [{ id, words: `${label}, ${movedM > 0 ? 'up' : 'down'} ${Math.abs(movedM).toFixed(2)} m` }];
  });
  return checkView({
    key: 'level_steady',
    blocks: false,
    good: 'The level moved by no more than 5 cm during any visit.',
    bad: 'The level moved by more than 5 cm during a visit; depths are corrected by the hour, but check the readings:',
    findings,
  });
}

function sticksTaped({ visits }: CheckInput): CheckView {
  const findings = visits.flatMap(({ id, label, stickCheckedOn, visitedOn }) => {
    if (stickCheckedOn === null) return [{ id, words: `${label}, never taped` }];
    return withinAYear(stickCheckedOn, visitedOn)
      ? []
      : [{ id, words: `${label}, last taped ${stickCheckedOn}` }];
  });
  return checkView({
    key: 'sticks_taped',
    blocks: true,
    good: 'The stick spacing was taped within twelve months of every visit.',
    bad: 'Every distance hangs on the stick spacing; tape it and enter the day:',
    findings,
  });
}

/** Is the check's day at most twelve months before the visit's? A check made after the visit counts: sticks don't heal. */
function withinAYear(checkedOn: string, visitedOn: string): boolean {
  const yearLater = `${String(Number(checkedOn.slice(0, 4)) + 1).padStart(4, '0')}${checkedOn.slice(4)}`;
  return visitedOn <= yearLater;
}

function arcsCovered({ pegs }: CheckInput): CheckView {
  const findings = pegs
    .filter((peg) => peg.arcShare < LEAST_ARC_SHARE)
    .map(({ id, label, arcShare }) => ({ id, words: `${label} ${Math.floor(arcShare * 100)} %` }));
  return checkView({
    key: 'arcs_covered',
    blocks: false,
    good: 'At least 60 % of every surveyed peg’s arc was cast over.',
    bad: 'Less than 60 % of the arc was cast over; the rest will show as not surveyed:',
    findings,
  });
}

function castsRepeated({ pegs }: CheckInput): CheckView {
  const findings = pegs
    .filter((peg) => peg.repeatsShare < LEAST_REPEATS_SHARE)
    .map(({ id, label, repeatsShare }) => ({ id, words: `${label} ${Math.floor(repeatsShare * 100)} %` }));
  return checkView({
    key: 'casts_repeated',
    blocks: false,
    good: 'At least one cast in ten was repeated at every surveyed peg.',
    bad: 'Fewer than one cast in ten was repeated, so slips are harder to find:',
    findings,
  });
}
