/**
 * The Kolmogorov–Smirnov distance between a column and a continuous shape, and the chance of
 * one as large.
 *
 * Sources: Marsaglia, Tsang & Wang (2003), "Evaluating Kolmogorov's distribution", Journal of
 * Statistical Software 8(18), the exact matrix algorithm; for many rows Pelz & Good (1976),
 * JRSS B 38, as equation 10 ff. of Simard & L'Ecuyer (2011), Journal of Statistical Software
 * 39(11); the far tail is twice the one-sided chance: Smirnov's exact sum (Birnbaum & Tingey
 * 1951), for many rows the asymptotic of Maag & Dicaire (1971) (all from memory, checked
 * against one another in the test). @stdlib's Kolmogorov test is not used: it took 88 s for
 * 10^5 rows. Not handled: shapes with lumps, for which the chances are too large.
 */
import { exp, ln } from '../numeric/elementary';
import { log1p } from '../numeric/special';

const PI = 3.141592653589793;
const ROOT_HALF_PI = 1.2533141373155003;
/** Up to so many rows chances are exact whatever the distance. */
const MOST_EXACT = 140;
/** The matrix has twice as many rows as this: n · d. */
const MOST_STEPS = 30;
/** From this n·d² on twice the one-sided chance is right to six digits. */
const FAR = 4;
/** For more rows the asymptotic of the one-sided chance takes over. */
const MOST_SUMMED = 2000;

/**
 * The largest distance between the empirical share and the exact one.
 * `below` are the exact shares below the values, rising.
 */
export function kolmogorovDistance(below: Float64Array): number {
  const n = below.length;
  let distance = 0;
  for (let i = 0; i < n; i++) {
    distance = Math.max(distance, (i + 1) / n - below[i]!, below[i]! - i / n);
  }
  return distance;
}

/**
 * The chance P(D ≥ d) of a distance at least as large in n independent rows.
 * Guarantee: absolute error ≤ 1e-13 for n ≤ 140 or n·d ≤ 30, else ≤ n^-2 where n·d² < 4; beyond that
 * relative error ≤ 1e-4 up to 2000 rows and ≤ 1e-2 for more (largest measured 4e-3 at p = 1e-4).
 */
export function kolmogorovPValue(n: number, d: number): number {
  if (d >= 1) return 0;
  if (2 * n * d <= 1) return 1;
  return n * d * d >= FAR ? Math.min(1, 2 * oneSided(n, d)) : clip(1 - kolmogorovBelow(n, d));
}

/** K(n, d) = P(D < d). Domain: n ≥ 1. */
export function kolmogorovBelow(n: number, d: number): number {
  if (d >= 1) return 1;
  if (2 * n * d <= 1) return 0;
  if (n * d * d >= FAR) return 1 - 2 * oneSided(n, d);
  return n <= MOST_EXACT || n * d <= MOST_STEPS ? kolmogorovExact(n, d) : bySeries(n, d);
}

function clip(p: number): number {
  return Math.max(0, Math.min(1, p));
}

/** Scaled by 10^-SHIFT whenever the middle element gets so large. */
const LARGE = 1e140;

/** K(n, d) by the matrix: n!/n^n · (H^n)_{k,k}, with d = (k − h)/n. Slow for large n · d. */
export function kolmogorovExact(n: number, d: number): number {
  const k = Math.floor(n * d) + 1;
  const m = 2 * k - 1;
  const h = k - n * d;
  const matrix = new Float64Array(m * m);
  for (let i = 0; i < m; i++) for (let j = 0; j < m; j++) matrix[i * m + j] = i - j + 1 < 0 ? 0 : 1;
  let power = 1;
  for (let i = 0; i < m; i++) {
    power *= h;
    matrix[i * m] = matrix[i * m]! - power;
    matrix[(m - 1) * m + (m - 1 - i)] = matrix[(m - 1) * m + (m - 1 - i)]! - power;
  }
  if (2 * h - 1 > 0) {
    let corner = 1;
    for (let i = 0; i < m; i++) corner *= 2 * h - 1;
    matrix[(m - 1) * m] = matrix[(m - 1) * m]! + corner;
  }
  for (let i = 0; i < m; i++) {
    let factorial = 1;
    for (let j = i; j >= 0; j--) {
      matrix[i * m + j] = matrix[i * m + j]! / factorial;
      factorial *= i - j + 2;
    }
  }
  const { values, scalings } = matrixPower(matrix, m, n);
  let chance = values[(k - 1) * m + k - 1]!;
  let left = scalings;
  for (let i = 1; i <= n; i++) {
    chance = (chance * i) / n;
    if (chance < 1 / LARGE) {
      chance *= LARGE;
      left--;
    }
  }
  for (; left < 0; left++) chance /= LARGE;
  for (; left > 0; left--) chance *= LARGE;
  return clip(chance);
}

interface Scaled {
  readonly values: Float64Array;
  /** How often it was divided by LARGE. */
  readonly scalings: number;
}

function matrixPower(matrix: Float64Array, m: number, n: number): Scaled {
  if (n === 1) return { values: matrix, scalings: 0 };
  const half = matrixPower(matrix, m, Math.floor(n / 2));
  let values = product(half.values, half.values, m);
  if (n % 2 === 1) values = product(matrix, values, m);
  let scalings = 2 * half.scalings;
  if (values[((m - 1) / 2) * m + (m - 1) / 2]! > LARGE) {
    values = values.map((value) => value / LARGE);
    scalings++;
  }
  return { values, scalings };
}

function product(a: Float64Array, b: Float64Array, m: number): Float64Array {
  const out = new Float64Array(m * m);
  for (let i = 0; i < m; i++) {
    for (let l = 0; l < m; l++) {
      const left = a[i * m + l]!;
      if (left === 0) continue;
      for (let j = 0; j < m; j++) out[i * m + j] = out[i * m + j]! + left * b[l * m + j]!;
    }
  }
  return out;
}

/** Pelz & Good's series in 1/√n, z = √n · d. */
function bySeries(n: number, d: number): number {
  const root = Math.sqrt(n);
  const z = root * d;
  const z2 = z * z;
  const z4 = z2 * z2;
  const z6 = z4 * z2;
  let [k0, k1, k2, k3] = [0, 0, 0, 0];
  for (let k = 0; k < 40; k++) {
    const a = PI * PI * (k + 0.5) * (k + 0.5);
    const fall = exp(-a / (2 * z2));
    k0 += fall;
    k1 += (a - z2) * fall;
    k2 += (6 * z6 + 2 * z4 + (2 * z4 - 5 * z2) * a + (1 - 2 * z2) * a * a) * fall;
    k3 +=
      ((5 - 30 * z2) * a * a * a +
        (-60 * z2 + 212 * z4) * a * a +
        (135 * z4 - 96 * z6) * a -
        30 * z6 -
        90 * z4 * z4) *
      fall;
    if (k === 0) continue;
    const b = PI * PI * k * k;
    const slower = exp(-b / (2 * z2));
    k2 -= 2 * z4 * b * slower;
    k3 += 60 * z4 * (3 * b * z2 - b * b) * slower;
  }
  // The sums run over all whole k: those over k + 1/2 have each term twice, as those over k do.
  k0 *= (2 * ROOT_HALF_PI) / z;
  k1 *= (2 * ROOT_HALF_PI) / (6 * z4);
  k2 *= (2 * ROOT_HALF_PI) / (72 * z6 * z);
  k3 *= (2 * ROOT_HALF_PI) / (6480 * z6 * z4);
  return clip(k0 + k1 / root + k2 / n + k3 / (n * root));
}

/** P(D+ ≥ d): d Σ C(n, j)(1 − d − j/n)^(n−j)(d + j/n)^(j−1) over j ≤ n(1 − d). */
function oneSided(n: number, d: number): number {
  if (n > MOST_SUMMED) {
    const t = 6 * n * d + 1;
    return exp((-t / (18 * n)) * t);
  }
  const most = Math.floor(n * (1 - d));
  let sum = 0;
  let choose = 0;
  for (let j = 0; j <= most; j++) {
    const rest = 1 - d - j / n;
    if (rest > 0) sum += exp(choose + (n - j) * log1p(-d - j / n) + (j - 1) * ln(d + j / n));
    choose += ln((n - j) / (j + 1));
  }
  return Math.min(1, d * sum);
}
