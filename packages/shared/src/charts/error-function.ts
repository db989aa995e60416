/**
 * erf(x) = 2/√π ∫₀ˣ e^(−t²) dt, within 1.5·10⁻⁷ everywhere. Source: Abramowitz & Stegun 1964, Handbook of Mathematical
 * Functions, 7.1.26 (from memory; checked against scipy in tests/reference/charts).
 */
export function errorFunction(x: number): number {
  const a = Math.abs(x);
  const t = 1 / (1 + 0.3275911 * a);
  const poly =
    t * (0.254829592 + t * (-0.284496736 + t * (1.421413741 + t * (-1.453152027 + t * 1.061405429))));
  return Math.sign(x) * (1 - poly * Math.exp(-a * a));
}
