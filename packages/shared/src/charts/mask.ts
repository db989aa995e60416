/** Widest gap between casts a fishery may allow on a chart, and the usual one. Common practice, no published source. */
export const MOST_GAP_M = 15;
export const USUAL_GAP_M = 8;
/** A place is not surveyed where its σ is above this share of the lake's own spread of depth. */
export const MOST_SIGMA_SHARE = 0.6;

export type SurveyEvidence = {
  soundingDistanceM: Float64Array; // from each place to the nearest sounding
  shoreDistanceM: Float64Array;
  sigmaM: Float64Array;
  spreadM: number; // standard deviation of the soundings' depths
};

/**
 * 1 where a place counts as surveyed: the nearest sounding within the limit, and σ within its share of the lake's spread.
 * The shore is a measured depth of nought, but only for the strip next to it: a place up to half the limit from the shore
 * counts when a sounding lies within one and a half limits, so that the margin in front of a surveyed line is drawn; the
 * shore alone never fills water nobody cast in.
 */
export function surveyedPlaces(evidence: SurveyEvidence, maxGapM: number): Uint8Array {
  const { soundingDistanceM, shoreDistanceM, sigmaM, spreadM } = evidence;
  if (!(maxGapM > 0 && maxGapM <= MOST_GAP_M)) {
    throw new RangeError(
      `The widest gap between casts must be more than 0 and at most ${MOST_GAP_M} m; got ${maxGapM}.`,
    );
  }
  const mostSigmaM = MOST_SIGMA_SHARE * spreadM;
  return Uint8Array.from(soundingDistanceM, (distanceM, i) => {
    const nearCast = distanceM <= maxGapM;
    const margin = shoreDistanceM[i]! <= maxGapM / 2 && distanceM <= 1.5 * maxGapM;
    return (nearCast || margin) && sigmaM[i]! <= mostSigmaM ? 1 : 0;
  });
}
