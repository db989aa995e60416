import { predictGlobal, solveGlobal } from './kriging-global';
import { krigeNeighbourhood } from './kriging-neighbourhood';
import type { KrigingSetup, Prediction } from './kriging-setup';
import type { Targets } from './sample-points';

/** Above this many samples the global solve gives way to a moving neighbourhood. */
export const GLOBAL_LIMIT = 800;
export const DEFAULT_NEIGHBOURS = 24;

/**
 * Ordinary kriging (with an external drift when the setup has one), prediction and variance at each target, in the unit
 * of the samples and its square. All samples at once up to 800, above that the nearest 24; `neighbours` asks for a moving
 * neighbourhood of that size. Covariances are sill · ρ(h) with the nugget by `nuggetIs`; each sample's error variance is
 * added to its own diagonal only, so the error-free surface is predicted.
 * Source: Cressie, Statistics for Spatial Data, 1993, sections 3.2 and 3.4; checked against gstat.
 */
export function krige(setup: KrigingSetup, targets: Targets, neighbours?: number): Prediction {
  const count = setup.samples.xM.length;
  if (neighbours === undefined && count <= GLOBAL_LIMIT) return predictGlobal(solveGlobal(setup), targets);
  return krigeNeighbourhood(setup, targets, { neighbours: neighbours ?? DEFAULT_NEIGHBOURS });
}
