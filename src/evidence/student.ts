/**
 * Intervals of one confidence by Student's t, its quantiles kept for the columns of one call.
 *
 * Source: Student (1908), "The probable error of a mean", Biometrika 6 (from memory);
 * quantiles from @stdlib, within 1e-15 of themselves where measured.
 */
import tQuantile from '@stdlib/stats-base-dists-t-quantile';

/** An end that the rows are too few to tell is null. */
export interface Ends {
  readonly lo: number | null;
  readonly hi: number | null;
}

export const NO_ENDS: Ends = { lo: null, hi: null };

export class Student {
  private readonly quantiles = new Map<number, number>();

  /** Domain: 0 < confidence < 1. */
  constructor(readonly confidence: number) {}

  /** The t that `degrees` of freedom exceed on both sides with the chance 1 − confidence. */
  quantile(degrees: number): number {
    let t = this.quantiles.get(degrees);
    if (t === undefined) {
      t = tQuantile((1 + this.confidence) / 2, degrees);
      this.quantiles.set(degrees, t);
    }
    return t;
  }

  /** Estimate ± t · error; no ends with less than one degree of freedom. */
  interval(estimate: number, error: number, degrees: number): Ends {
    if (!(degrees >= 1)) return NO_ENDS;
    const reach = this.quantile(degrees) * error;
    return { lo: estimate - reach, hi: estimate + reach };
  }
}
