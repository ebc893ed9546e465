/**
 * Mean and standard deviation of a column with their intervals, with weights or without.
 *
 * Sources: two passes with a correction, Chan, Golub & LeVeque (1983), American Statistician 37;
 * errors of weighted means by the jackknife, weights.ts, which for equal weights is s / √n;
 * interval of a standard deviation without normality: Bonett (2006), Computational Statistics &
 * Data Analysis 50, with the mean in place of his trimmed mean, and Student's t with the degrees
 * of freedom of Satterthwaite (1946), Biometrics Bulletin 2 (all from memory).
 * Not handled: dependent rows; values beyond 1e300.
 */
import { exp, ln } from '../numeric/elementary';
import type { Rows } from './sample';
import type { Ends, Student } from './student';
import { NO_ENDS } from './student';
import { pull } from './weights';

export interface Moments {
  readonly mean: number;
  /** The standard error of the mean. */
  readonly error: number;
  /** With n − 1 in the denominator; for weights what that becomes. */
  readonly standardDeviation: number;
  readonly skewness: number;
  /** Without weights skewness / √n. */
  readonly skewnessOfMean: number;
  /** The squared relative standard error of the variance, times rows' worth: kurtosis − 1. */
  readonly varianceNoise: number;
  /** The degrees of freedom that this error itself is known with. */
  readonly varianceDegrees: number;
  readonly rowsWorth: number;
}

/** Rows' worth from which an interval of a standard deviation is given. */
const FEWEST_FOR_DEVIATION = 10;

/**
 * The moments of rows in any order.
 * Domain: at least two rows' worth.
 * Guarantee: relative error ≤ 1e-13 for up to 10^6 rows whose mean is not large beside their spread
 * (largest measured 4e-15).
 */
export function momentsOf({ values, shares, rowsWorth }: Rows): Moments {
  const n = values.length;
  const even = 1 / n;
  let mean = 0;
  if (shares === null) {
    for (let i = 0; i < n; i++) mean += values[i]!;
    mean /= n;
  } else for (let i = 0; i < n; i++) mean += shares[i]! * values[i]!;
  let off = 0;
  for (let i = 0; i < n; i++) off += (values[i]! - mean) * (shares === null ? even : shares[i]!);
  mean += off;

  let scale = 0;
  for (let i = 0; i < n; i++) scale = Math.max(scale, Math.abs(values[i]! - mean));
  if (!(scale > 0)) {
    return {
      ...{ mean, error: 0, standardDeviation: 0 },
      ...{ skewness: 0, skewnessOfMean: 0, varianceNoise: 0, varianceDegrees: n, rowsWorth },
    };
  }
  let [second, third, squares, pulled, cubed] = [0, 0, 0, 0, 0];
  for (let i = 0; i < n; i++) {
    const share = shares === null ? even : shares[i]!;
    const z = (values[i]! - mean) / scale;
    const zz = z * z;
    second += share * zz;
    third += share * zz * z;
    squares += share * share;
    const moved = pull(share) * z;
    pulled += moved * moved;
    cubed += moved * moved * moved;
  }
  let [noise, fourth] = [0, 0];
  for (let i = 0; i < n; i++) {
    const z = (values[i]! - mean) / scale;
    const moved = (shares === null ? even : shares[i]!) * ((z * z) / second - 1);
    noise += moved * moved;
    fourth += moved * moved * moved * moved;
  }
  return {
    mean,
    error: scale * Math.sqrt((pulled * (n - 1)) / n),
    standardDeviation: scale * Math.sqrt(second / (1 - squares)),
    skewness: third / (second * Math.sqrt(second)),
    skewnessOfMean: cubed / (pulled * Math.sqrt(pulled)),
    varianceNoise: rowsWorth * noise,
    varianceDegrees: fourth > 0 ? (2 * noise * noise) / fourth : n,
    rowsWorth,
  };
}

/** Mean ± t · standard error. */
export function meanInterval({ mean, error, rowsWorth }: Moments, student: Student): Ends {
  return student.interval(mean, error, rowsWorth - 1);
}

/** Bonett's interval: on the logarithm of the variance, with the kurtosis that the rows show. */
export function deviationInterval(moments: Moments, student: Student): Ends {
  const { standardDeviation, varianceNoise, varianceDegrees, rowsWorth: n } = moments;
  if (standardDeviation === 0) return { lo: 0, hi: 0 };
  if (n < FEWEST_FOR_DEVIATION) return NO_ENDS;
  if (!(varianceDegrees >= 1)) return NO_ENDS;
  const t = student.quantile(Math.min(n - 1, varianceDegrees));
  if (!(n > t)) return NO_ENDS;
  const small = n / (n - t);
  const error = small * Math.sqrt((varianceNoise + 3 / n) / (n - 1));
  const variance = ln(small) + 2 * ln(standardDeviation);
  return { lo: exp((variance - t * error) / 2), hi: exp((variance + t * error) / 2) };
}

/**
 * Whether so skewed or unevenly weighted a column has too few rows for the t interval of its mean.
 * Source: Cochran (1977), §2.15: more than 25 skewness² rows (a crude rule, from memory).
 */
export function isTooSkewed({ skewnessOfMean }: Moments): boolean {
  return 25 * skewnessOfMean * skewnessOfMean >= 1;
}
