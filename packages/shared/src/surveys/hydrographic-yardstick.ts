import { BAND_95, ELLIPSE_95, principalAxes, type Covariance } from './covariance';

/**
 * Limits of uncertainty at 95 %. Source: IHO S-44 edition 6.1.0 (2022), table 1: TVU = √(a² + (b·d)²), THU = fixed
 * part + share of depth. A yardstick only: the orders also ask for search and coverage that casting can't give, so
 * no order is ever claimed for a bank survey.
 */
export const S44_ORDERS = [
  { name: 'Exclusive Order', aM: 0.15, b: 0.0075, fixedM: 1, depthShare: 0 },
  { name: 'Special Order', aM: 0.25, b: 0.0075, fixedM: 2, depthShare: 0 },
  { name: 'Order 1a', aM: 0.5, b: 0.013, fixedM: 5, depthShare: 0.05 },
  { name: 'Order 1b', aM: 0.5, b: 0.013, fixedM: 5, depthShare: 0.05 },
  { name: 'Order 2', aM: 1, b: 0.023, fixedM: 20, depthShare: 0.1 },
] as const;

export type S44Order = (typeof S44_ORDERS)[number];
export type S44OrderName = S44Order['name'];

/** Greatest total vertical uncertainty the order allows at a depth, metres at 95 %. */
export function tvuLimitM({ aM, b }: S44Order, depthM: number): number {
  return Math.hypot(aM, b * depthM);
}

/** Greatest total horizontal uncertainty the order allows at a depth, metres at 95 %. */
export function thuLimitM({ fixedM, depthShare }: S44Order, depthM: number): number {
  return fixedM + depthShare * depthM;
}

/** Total vertical uncertainty, metres at 95 %. */
export function tvu95M(sigmaM: number): number {
  return BAND_95 * sigmaM;
}

/** Total horizontal uncertainty, metres at 95 %, by the circle whose σ is the root mean square of the two axes. */
export function thu95M(covariance: Covariance): number {
  const { majorM, minorM } = principalAxes(covariance);
  return ELLIPSE_95 * Math.sqrt((majorM * majorM + minorM * minorM) / 2);
}

/** σ of a depth once the bottom's slope carries part of the position's error into it, metres. */
export function sigmaOnSlopeM(sigmaM: number, slope: number, covariance: Covariance): number {
  const { majorM, minorM } = principalAxes(covariance);
  return Math.hypot(sigmaM, slope * Math.sqrt((majorM * majorM + minorM * minorM) / 2));
}

/** The strictest order whose two figures both cover these; null when none does. */
export function orderWithin(depthM: number, tvuM: number, thuM: number): S44OrderName | null {
  const met = S44_ORDERS.find(
    (order) => tvuM <= tvuLimitM(order, depthM) && thuM <= thuLimitM(order, depthM),
  );
  return met?.name ?? null;
}

/** What may be said of it. */
export function yardstickWords(depthM: number, tvuM: number, thuM: number): string {
  const name = orderWithin(depthM, tvuM, thuM);
  if (!name) return 'depth and position figures outside every order’s';
  return `depth and position figures within ${name}’s (a yardstick: casting covers too little to claim any order)`;
}
