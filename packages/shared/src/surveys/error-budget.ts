import type { PegDetails } from '../lakes/contract';

/**
 * One-sigma errors of a bank cast where the observation doesn't state its own. Sizes are common practice, no published
 * source, unless a source stands beside them; change them here and run the reduction again.
 */
export const SIGMA = {
  /** A count whose remainder was marked and measured, metres; otherwise a quarter of a wrap, or as the kit says. */
  markedRemainderM: 0.1,
  lineAlongRodM: 0.1,
  reelHeightM: 0.1,
  clipM: 0.1, // where on the spool the clip holds the line
  rodElevationDeg: 5, // judged by eye as level, half up or upright
  aimAtMarkDeg: 0.5,
  compassPhoneDeg: 5, // drifting between calibrations; outliers reach 13–25°
  compassSightingDeg: 1,
  estimatedBearingDeg: 10,
  besideMarkedOriginM: 0.1,
  besideUnmarkedOriginM: 4 / Math.sqrt(12), // anywhere on a 4 m platform
  pullShare: 0.02, // of one pull: arm's lengths, or a spool's turns, are not all alike
  floatOffsetM: 0.02, // the float and link measured in a bucket
  softBottomM: 0.08, // the lead sinks in, the link holds the ring up
  deepSiltM: 0.15,
  poorFloatShare: 2, // a float seen poorly: twice the error of a good one
  levelBothEndsM: 0.01,
  levelOneEndM: 0.02,
  levelFarM: 0.1, // a board not read within a fortnight
  crosswindBowM: 3, // sideways belly of the line
  slackLineM: 2,
} as const;

/** A depth that nobody read is taken so, only to slope the line: metres, with its σ. It is never shown or plotted. */
export const UNREAD_DEPTH = { depthM: 2.5, sigmaM: 1.5 } as const;

export const DEEPEST_M = 60;
export const GAUGE_AWAY_DAYS = 14;

/** σ of a stance's coordinates, metres, by how it was fixed. */
export function stanceSigmaM(fixedBy: PegDetails['originFixedBy']): number {
  switch (fixedBy) {
    case 'tape_or_plan':
      return 0.3;
    case 'gnss':
    case 'phone_gnss':
      return 3;
    case 'estimated':
      return 5;
  }
}
