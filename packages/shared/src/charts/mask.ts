/** Widest gap between casts a fishery may allow on a chart, and the usual one. Common practice, no published source. */
export const MOST_GAP_M = 15;
export const USUAL_GAP_M = 8;
/** A place is not surveyed where its σ is above this share of the lake's own spread of depth. */
export const MOST_SIGMA_SHARE = 0.4;
export type SurveyEvidence = {
  soundingDistanceM: Float64Array; // from each place to the nearest sounding
  sigmaM: Float64Array;
  spreadM: number; // standard deviation of the samples' depths, the shore's noughts among them
};

/**
 * 1 where a place counts as surveyed: a sounding within the limit, and σ within its share of the lake's spread of depth. The
 * shore's depth of nought shapes the margin in front of a cast but makes nothing surveyed by itself.
 */
export function surveyedPlaces(
  { soundingDistanceM, sigmaM, spreadM }: SurveyEvidence,
  maxGapM: number,
): Uint8Array {
  if (!(maxGapM > 0 && maxGapM <= MOST_GAP_M)) {
    throw new RangeError(
      `The widest gap between casts must be more than 0 and at most ${MOST_GAP_M} m; got ${maxGapM}.`,
    );
  }
  const mostSigmaM = MOST_SIGMA_SHARE * spreadM;
  return Uint8Array.from(soundingDistanceM, (distanceM, i) =>
    distanceM <= maxGapM && sigmaM[i]! <= mostSigmaM ? 1 : 0,
  );
}
