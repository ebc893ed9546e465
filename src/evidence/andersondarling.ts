/**
 * The Anderson–Darling distance between a column and a continuous shape, which looks at the
 * tails, and the chance of one as large.
 *
 * Sources: Anderson & Darling (1952), Annals of Mathematical Statistics 23, the limit for many
 * rows as series of integrals; Marsaglia & Marsaglia (2004), "Evaluating the Anderson-Darling
 * distribution", Journal of Statistical Software 9(2), the correction for n rows; far tail:
 * Zolotarev (1961), Theory of Probability and its Applications 6, for a sum of squares with
 * weights 1/(j(j + 1)) (all from memory; points in the test).
 * Not handled: shapes with lumps.
 */
import { exp, ln } from '../numeric/elementary';
import { erfc } from '../numeric/special';

const PI = 3.141592653589793;
const ROOT_TWO_PI = 2.5066282746310002;
const ROOT_THREE = 1.7320508075688772;
/** From here the series loses the tail's digits; the tail's own form is right to 1 in 10^3. */
const FAR = 14;

/**
 * A² from the exact shares below and above the rising values.
 * Infinite when a value lies where the shape has no area.
 */
export function andersonDarlingDistance(below: Float64Array, above: Float64Array): number {
  const n = below.length;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const [low, high] = [below[i]!, above[n - 1 - i]!];
    const product = low * high;
    const log = product > 1e-300 ? ln(product) : ln(low) + ln(high);
    sum += (2 * i + 1) * log;
  }
  return -n - sum / n;
}

/**
 * The chance of a distance of at least z in n independent rows.
 * Guarantee: the limit for many rows to 1e-11 (1 in 10^3 beyond z = 14); the correction for n rows about 1e-5/n.
 */
export function andersonDarlingPValue(n: number, z: number): number {
  if (!(z > 0)) return 1;
  if (z > FAR) return farTail(z);
  const share = andersonDarlingLimit(z);
  return Math.max(farTail(FAR), Math.min(1, 1 - share - correction(n, share)));
}

function farTail(z: number): number {
  return z < Infinity ? ROOT_THREE * erfc.at(Math.sqrt(z)) : 0;
}

/** The share of A² below z for infinitely many rows. */
export function andersonDarlingLimit(z: number): number {
  if (z < 0.01) return 0;
  let sum = 0;
  let binomial = 1;
  for (let j = 0; j < 40; j++) {
    const t = ((4 * j + 1) * (4 * j + 1) * PI * PI) / (8 * z);
    const term = binomial * (4 * j + 1) * exp(-t) * integral(t, z);
    sum += term;
    if (Math.abs(term) < 1e-18) break;
    binomial *= -(j + 0.5) / (j + 1);
  }
  return Math.max(0, Math.min(1, (ROOT_TWO_PI / z) * sum));
}

/** ∫ exp(z/(8(w² + 1)) − t w²) dw over w > 0: the trapezoidal rule converges geometrically. */
function integral(t: number, z: number): number {
  const step = Math.min(0.15, 0.4 / Math.sqrt(t));
  let sum = exp(z / 8) / 2;
  for (let w = step; ; w += step) {
    const term = exp(z / (8 * (w * w + 1)) - t * w * w);
    sum += term;
    if (term < 1e-18 * sum) return sum * step;
  }
}

/** What n rows add to the share x of the limit. Source: errfix of Marsaglia & Marsaglia (2004). */
function correction(n: number, x: number): number {
  if (x > 0.8) {
    return (
      (-130.2137 +
        (745.2337 - (1705.091 - (1950.646 - (1116.36 - 255.7844 * x) * x) * x) * x) * x) /
      n
    );
  }
  const c = 0.01265 + 0.1757 / n;
  if (x < c) {
    const root = Math.sqrt(x / c);
    const t = root * (1 - x / c) * (49 * (x / c) - 102);
    return (t * (0.0037 / (n * n) + 0.00078 / n + 0.00006)) / n;
  }
  const s = (x - c) / (0.8 - c);
  const t = -0.00022633 + (6.54034 - (14.6538 - (14.458 - (8.259 - 1.91864 * s) * s) * s) * s) * s;
  return (t * (0.04213 + 0.01365 / n)) / n;
}
