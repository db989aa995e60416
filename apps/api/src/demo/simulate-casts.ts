import { pointAlong, type Point } from '@mereward/shared/geometry/plane';
import { insideOutline } from '@mereward/shared/geometry/polygon';
import { COVER_LIKELIHOODS, SUBSTRATE_LIKELIHOODS } from '@mereward/shared/surveys/bottom-likelihoods';
import type { CastObservation, Kit } from '@mereward/shared/surveys/contract';
import type { Bed } from './bed';
import type { DemoLake } from './fishery';
import { normal, pick } from './random';

/** What a careful bank surveyor's kit is like. */
export const DEMO_KIT: Kit = {
  stickSpacingM: 3.6576,
  stickMeasured: 'along_line',
  stickDiameterM: 0.012,
  stickCheckedOn: null,
  wrapReference: 'lead_to_clip',
  rodLengthM: 3.6576,
  lineAlongRodM: 3,
  reelHeightM: 1.2,
  rodElevationDeg: 0,
  lineType: 'braid',
  stretchShare: 0,
  stretchSigmaShare: 0.005,
  wrapSigmaShare: 0.25,
  pullM: 0.3048,
  floatOffsetM: 0.25,
  leadG: 85,
  leadShape: 'smooth_ball',
  declinationDeg: 0,
};

/** The errors of the simulated surveyor, one σ: the sizes that bank surveys are known to have. Common practice, no published source. */
const ERROR = { lineM: 0.15, aimDeg: 0.6, rodDeg: 4, standM: 0.15, pullShare: 0.02, floatAgainPulls: 0.35 };

/** Rings walked outwards on each line, in wraps: close where the shelf falls, wider beyond. */
const RINGS = [2, 4, 6, 8, 10, 12, 15, 18, 21, 24];
const LINES_DEG = [-20, -10, 0, 10, 20];

export type SimulatedCast = { pegId: string; observation: CastObservation; truth: Point };

type Survey = { lake: DemoLake; bed: (p: Point) => Bed | null; gaugeM: number; random: () => number };
type Peg = DemoLake['pegs'][number];

/** Close casting over one place: lines four degrees apart, every wrap, so far to either side. */
const CLOSE_LINES_DEG = [-16, -12, -8, -4, 0, 4, 8, 12, 16];
const CLOSE_WRAPS = [-4, -3, -2, -1, 0, 1, 2, 3, 4];

/** One place cast over closely from a peg. */
export function simulateClosely(survey: Survey, peg: Peg, middle: Plan): SimulatedCast[] {
  return CLOSE_LINES_DEG.flatMap((off) =>
    CLOSE_WRAPS.flatMap((more) => {
      const plan = { bearingDeg: middle.bearingDeg + off, wraps: middle.wraps + more };
      return throwOne(survey, peg, plan) ?? [];
    }),
  );
}

/** One peg surveyed: five lines across its arc, rings outwards, every ninth cast thrown again. */
export function simulatePeg(survey: Survey, peg: Peg): SimulatedCast[] {
  const planned = LINES_DEG.flatMap((off) =>
    RINGS.map((wraps) => ({ bearingDeg: peg.facingDeg + off, wraps })),
  );
  const thrown = planned.flatMap((plan) => throwOne(survey, peg, plan) ?? []);
  const again = planned.filter((_, i) => i % 9 === 4).flatMap((plan) => throwOne(survey, peg, plan) ?? []);
  return [...thrown, ...again];
}

export type Plan = { bearingDeg: number; wraps: number };

function throwOne(survey: Survey, peg: Peg, plan: Plan): SimulatedCast | null {
  const { lake, random, gaugeM } = survey;
  if (plan.wraps * DEMO_KIT.stickSpacingM > lake.details.longestCastM) return null;
  const aim = aimAt(lake, peg, plan.bearingDeg);
  const bearingDeg = aim.bearingDeg + ERROR.aimDeg * normal(random);
  const lineM = plan.wraps * DEMO_KIT.stickSpacingM + ERROR.lineM * normal(random);
  const rodDeg = Math.abs(ERROR.rodDeg * normal(random));
  const stand = {
    xM: peg.origin.xM + ERROR.standM * normal(random),
    yM: peg.origin.yM + ERROR.standM * normal(random),
  };
  const aboveDatumM = gaugeM - lake.details.datumM;
  let at = pointAlong(stand, bearingDeg, lineM - 0.5);
  let bed = survey.bed(at);
  // Where the lead lies depends on how deep it sinks there: three turns settle it to a millimetre.
  for (let turn = 0; turn < 3 && bed; turn++) {
    at = pointAlong(stand, bearingDeg, groundRangeM(lineM, rodDeg, bed.depthM + aboveDatumM));
    bed = survey.bed(at);
  }
  // A careful surveyor keeps a rod length off the far bank and doesn't cast across the island.
  if (!bed || crossesLand(lake, stand, at) || bed.depthM + aboveDatumM < 0.45) return null;
  const observation = observe(survey, { aim, wraps: plan.wraps, bed, waterM: bed.depthM + aboveDatumM });
  return { pegId: peg.id, observation, truth: at };
}

/** P = r·cos e + √((L − r)² − (h + r·sin e + z)²): the line read to the clip. */
function groundRangeM(lineM: number, rodDeg: number, waterM: number): number {
  const e = (rodDeg * Math.PI) / 180;
  const { lineAlongRodM: r, reelHeightM: h } = DEMO_KIT;
  const dropM = h + r * Math.sin(e) + waterM;
  return r * Math.cos(e) + Math.sqrt(Math.max((lineM - r) ** 2 - dropM ** 2, 0));
}

function crossesLand(lake: DemoLake, from: Point, to: Point): boolean {
  for (let share = 0.15; share <= 1; share += 0.05) {
    const p = { xM: from.xM + share * (to.xM - from.xM), yM: from.yM + share * (to.yM - from.yM) };
    if (!insideOutline(lake.water.outline, p)) return true;
  }
  return false;
}

/** The far-bank mark nearest the wanted line, and the whole degrees to its side. */
function aimAt(lake: DemoLake, peg: Peg, wantedDeg: number) {
  const marks = lake.marks.map((mark) => {
    const markDeg = (Math.atan2(mark.at.xM - peg.origin.xM, mark.at.yM - peg.origin.yM) * 180) / Math.PI;
    return { id: mark.id, markDeg, offDeg: ((((wantedDeg - markDeg) % 360) + 540) % 360) - 180 };
  });
  const nearest = marks.reduce((a, b) => (Math.abs(b.offDeg) < Math.abs(a.offDeg) ? b : a));
  const offsetDeg = Math.round(nearest.offDeg);
  return { markId: nearest.id, offsetDeg, bearingDeg: nearest.markDeg + offsetDeg };
}

/** A lead surveyor feels the commoner signs more often than the table's average hand does. */
const attentive = <T extends string>(shares: Readonly<Record<T, number>>): Record<T, number> => {
  const squared = Object.entries<number>(shares).map(([name, share]) => [name, share * share]);
  return Object.fromEntries(squared) as Record<T, number>;
};

type Seen = { aim: { markId: string; offsetDeg: number }; wraps: number; bed: Bed; waterM: number };

function observe({ random }: Survey, { aim, wraps, bed, waterM }: Seen): CastObservation {
  const cover = COVER_LIKELIHOODS.of[bed.cover];
  const feel = bed.cover === 'clear' ? SUBSTRATE_LIKELIHOODS.of[bed.substrate] : cover;
  const trueP = DEMO_KIT.pullM * (1 + ERROR.pullShare * normal(random));
  const pulls = Math.max(1, Math.ceil((waterM - DEMO_KIT.floatOffsetM) / trueP));
  const weedy = bed.cover === 'tall_weed';
  return {
    aim: { by: 'mark', markId: aim.markId, offsetDeg: aim.offsetDeg },
    sidestepM: 0,
    wrapsWhole: wraps,
    remainderM: 0,
    remainderStated: true,
    lineText: `${wraps}`,
    rodElevationDeg: 0,
    drop: random() < 0.03 ? 'unsure' : pick(random, attentive(feel.drop)),
    dropCountS: null,
    drag: random() < 0.03 ? 'unsure' : pick(random, attentive(feel.drag)),
    dragLengthM: 0.8,
    cameBack: [pick(random, attentive(feel.cameBack))],
    smell: bed.substrate === 'silt' && random() < 0.1 ? 'bad_eggs' : null,
    pulls,
    pullsAgain:
      random() < 0.25 ? Math.max(1, Math.round(pulls + ERROR.floatAgainPulls * normal(random))) : null,
    floatSight: weedy ? 'poor' : 'good',
    flags: [],
    note: '',
  };
}
