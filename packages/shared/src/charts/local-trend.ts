/** Inner products of what is left of ones (o), drift (d) and values (z) once the neighbours' covariance is divided out. */
export type TrendSums = { oo: number; oz: number; od: number; dd: number; dz: number };

/**
 * Generalised least squares of a neighbourhood's values on 1 and the drift, with its variance. A drift that is level over
 * the neighbourhood says nothing here: it falls back to the constant alone, as ordinary kriging has it.
 */
export class LocalTrend {
  constant = 0;
  slope = 0;
  private inverseOo = 0; // (Fᵀ K⁻¹ F)⁻¹
  private inverseOd = 0;
  private inverseDd = 0;

  fit({ oo, oz, od, dd, dz }: TrendSums): void {
    const determinant = oo * dd - od * od;
    const drifts = determinant > 1e-9 * oo * dd;
    this.inverseOo = drifts ? dd / determinant : 1 / oo;
    this.inverseOd = drifts ? -od / determinant : 0;
    this.inverseDd = drifts ? oo / determinant : 0;
    this.constant = drifts ? (dd * oz - od * dz) / determinant : oz / oo;
    this.slope = drifts ? (oo * dz - od * oz) / determinant : 0;
  }

  /** What not knowing the trend adds to the variance where the target lacks so much of 1 and of its drift. */
  varianceM2(shortOne: number, shortDrift: number): number {
    return (
      this.inverseOo * shortOne * shortOne +
      2 * this.inverseOd * shortOne * shortDrift +
      this.inverseDd * shortDrift * shortDrift
    );
  }
}
