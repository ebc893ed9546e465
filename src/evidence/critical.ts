/**
 * Where a falling p-value reaches a level: what a statistic may be before it is a sign.
 * Source: bisection. Guarantee: to 1e-9 of itself.
 */

const STEPS = 60;

/** Domain: pValue falls from `from` on, where it is at least `level`, to below it. */
export function criticalValue(
  pValue: (x: number) => number,
  level: number,
  from: number,
  firstStep: number,
): number {
  let [lo, hi] = [from, from + firstStep];
  while (pValue(hi) >= level) {
    const step = hi - from;
    lo = hi;
    hi = from + 2 * step;
  }
  for (let i = 0; i < STEPS && hi - lo > 1e-10 * Math.abs(hi); i++) {
    const m = lo / 2 + hi / 2;
    if (pValue(m) >= level) lo = m;
    else hi = m;
  }
  return lo;
}
