import type { CastObservation, Kit } from '@mereward/shared/surveys/contract';

/** Twelve-foot sticks, braid, a three-ounce lead, read from lead to clip with the rod level. */
export const aKit = (with_: Partial<Kit> = {}): Kit => ({
  stickSpacingM: 3.6576,
  stickMeasured: 'along_line',
  stickDiameterM: 0.012,
  stickCheckedOn: '2027-04-03',
  wrapReference: 'lead_to_clip',
  rodLengthM: 3.6576,
  lineAlongRodM: 3,
  reelHeightM: 1.2,
  rodElevationDeg: 0,
  lineType: 'braid',
  stretchShare: 0,
  stretchSigmaShare: 0,
  wrapSigmaShare: 0.25,
  pullM: 0.3048,
  floatOffsetM: 0.25,
  leadG: 85,
  leadShape: 'smooth_ball',
  declinationDeg: 0,
  ...with_,
});

/** A cast over a mark: fourteen wraps and nothing over, a crack and a rattle, eight pulls. */
export const anObservation = (markId: string, with_: Partial<CastObservation> = {}): CastObservation => ({
  aim: { by: 'mark', markId, offsetDeg: 0 },
  sidestepM: 0,
  wrapsWhole: 14,
  remainderM: 0,
  remainderStated: true,
  lineText: '14 + 0',
  rodElevationDeg: 0,
  drop: 'sharp_crack',
  dropCountS: null,
  drag: 'fine_rattle',
  dragLengthM: 0.8,
  cameBack: ['none'],
  smell: null,
  pulls: 8,
  pullsAgain: null,
  floatSight: 'good',
  flags: [],
  note: '',
  ...with_,
});
