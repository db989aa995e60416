import { wrapsToMetres } from '../units/wraps';
import type { CastObservation, Kit, ReductionStep } from './contract';
import { SIGMA } from './error-budget';
import { metres, plusMinus, step } from './reduction-step';

/** The sticks a count was wound on. */
export type Sticks = Pick<Kit, 'stickSpacingM' | 'stickMeasured' | 'stickDiameterM'>;
type Stretchy = Pick<Kit, 'lineType' | 'stretchShare' | 'stretchSigmaShare'>;
type Count = Pick<CastObservation, 'wrapsWhole' | 'remainderM' | 'remainderStated'>;

/**
 * Line that one wrap takes, metres. Sticks taped between centres take half a turn round a stick more, π·d/2, when
 * their diameter is known; a tape laid along the line's own path already holds it.
 */
export function lineAWrapM({ stickSpacingM, stickMeasured, stickDiameterM }: Sticks): number {
  const aroundM = stickMeasured === 'centres' && stickDiameterM !== null ? (Math.PI * stickDiameterM) / 2 : 0;
  return stickSpacingM + aroundM;
}

/** Share by which the line is longer under a cast's pull than round the sticks. Braid is taken not to stretch. */
export function stretchOf({ lineType, stretchShare, stretchSigmaShare }: Stretchy): {
  share: number;
  sigmaShare: number;
} {
  return lineType === 'braid'
    ? { share: 0, sigmaShare: 0 }
    : { share: stretchShare, sigmaShare: stretchSigmaShare };
}

/**
 * σ of a count, metres: a quarter of a wrap (or the kit's own share) when nothing was said of what was left over;
 * a tenth of a metre when the remainder was marked and measured, and a measured nought counts as measured.
 */
export function countSigmaM(count: Count, kit: Kit): number {
  const carelessM = kit.wrapSigmaShare * lineAWrapM(kit);
  return count.remainderStated ? Math.min(SIGMA.markedRemainderM, carelessM) : carelessM;
}

/** Line out, metres, from the lead to the rod tip or the clip, stretched as under a cast's pull. */
export function lineOutM(count: Pick<Count, 'wrapsWhole' | 'remainderM'>, kit: Kit): number {
  const woundM = wrapsToMetres({ whole: count.wrapsWhole, remainderM: count.remainderM }, lineAWrapM(kit));
  return woundM * (1 + stretchOf(kit).share);
}

/**
 * Line out L, metres, from the lead to the rod tip or to the reel's clip as the kit's wrap reference says, with its
 * σ, and the two steps that led there.
 */
export function lineOut(
  count: Count,
  kit: Kit,
): { lineOutM: number; sigmaM: number; steps: ReductionStep[] } {
  const wrapM = lineAWrapM(kit);
  const woundM = wrapsToMetres({ whole: count.wrapsWhole, remainderM: count.remainderM }, wrapM);
  const { share, sigmaShare } = stretchOf(kit);
  const lineOutM = woundM * (1 + share);
  const sigmaM = Math.hypot(countSigmaM(count, kit) * (1 + share), woundM * sigmaShare);
  return {
    lineOutM,
    sigmaM,
    steps: [wrapStep(kit, wrapM), lineStep(count, kit, { lineOutM, sigmaM, wrapM })],
  };
}

function wrapStep(kit: Kit, wrapM: number): ReductionStep {
  const around = kit.stickMeasured === 'centres' && kit.stickDiameterM !== null;
  const inputs: (readonly [string, string])[] = [['sticks apart', metres(kit.stickSpacingM, 4)]];
  if (kit.stickDiameterM !== null) inputs.push(['stick diameter d', metres(kit.stickDiameterM)]);
  inputs.push([
    'taped',
    around
      ? 'between centres'
      : kit.stickMeasured === 'centres'
        ? 'between centres, diameter not known'
        : 'along the line',
  ]);
  return step(
    ['wrap', 'Line in one wrap', around ? 's = sticks apart + π·d/2' : 's = sticks apart'],
    inputs,
    {
      value: metres(wrapM, 4),
    },
  );
}

function lineStep(
  count: Count,
  kit: Kit,
  { lineOutM, sigmaM, wrapM }: { lineOutM: number; sigmaM: number; wrapM: number },
): ReductionStep {
  const { share } = stretchOf(kit);
  const ends = kit.wrapReference === 'lead_to_rod_tip' ? 'lead to rod tip' : 'lead to clip';
  const inputs: (readonly [string, string])[] = [
    ['wraps n', `${count.wrapsWhole}`],
    [
      'remainder p',
      count.remainderStated ? metres(count.remainderM) : `${metres(count.remainderM)}, not measured`,
    ],
    ['s', metres(wrapM, 4)],
    ['read', ends],
  ];
  if (share > 0) inputs.push(['stretch q', `${(share * 100).toFixed(1)} %`]);
  const formula = share > 0 ? 'L = (n·s + p)·(1 + q)' : 'L = n·s + p';
  return step(['line', `Line out, ${ends}`, formula], inputs, {
    value: metres(lineOutM),
    sigma: plusMinus(sigmaM, 'm'),
  });
}
