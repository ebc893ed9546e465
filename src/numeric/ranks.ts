/**
 * Orders and ranks of long columns.
 *
 * Order: digits of the upper half of the doubles' own bits, the lowest first (radix sort, Knuth
 * (1998), "The art of computer programming" 3, 5.2.5, from memory), then comparisons where upper
 * halves are equal. For 100,000 rows it takes about as long as sorting the bare numbers.
 */

const DIGIT_BITS = 11;
const N_DIGITS = 3;
const N_KEYS = 1 << DIGIT_BITS;
const MASK = N_KEYS - 1;
/** Runs of equal upper halves up to this length are put in order by insertion. */
const SHORT_RUN = 24;

/** The places of the values from least to largest, equal ones in the order they stand. Not for NaN. */
export function orderOf(values: Float64Array): Int32Array {
  const n = values.length;
  let keys = keysOf(values);
  let order = asTheyStand(n);
  let [nextKeys, nextOrder] = [new Int32Array(n), new Int32Array(n)];
  const places = new Int32Array(N_KEYS);
  for (let d = 0; d < N_DIGITS; d++) {
    const shift = d * DIGIT_BITS;
    places.fill(0);
    for (let i = 0; i < n; i++) places[(keys[i]! >>> shift) & MASK]!++;
    let place = 0;
    for (let key = 0; key < N_KEYS; key++) {
      const count = places[key]!;
      places[key] = place;
      place += count;
    }
    for (let k = 0; k < n; k++) {
      const key = keys[k]!;
      const to = places[(key >>> shift) & MASK]!++;
      nextKeys[to] = key;
      nextOrder[to] = order[k]!;
    }
    [keys, nextKeys] = [nextKeys, keys];
    [order, nextOrder] = [nextOrder, order];
  }
  for (let first = 0; first < n;) {
    let end = first + 1;
    while (end < n && keys[end] === keys[first]) end++;
    if (end - first > 1) settle(values, order, first, end);
    first = end;
  }
  return order;
}

/** 0 … n − 1. (Int32Array.from with a function takes ten times as long.) */
export function asTheyStand(n: number): Int32Array<ArrayBuffer> {
  const order = new Int32Array(n);
  for (let i = 0; i < n; i++) order[i] = i;
  return order;
}

/** The upper halves of the doubles, changed so that they rise with the value as whole numbers. */
function keysOf(values: Float64Array): Int32Array<ArrayBuffer> {
  const n = values.length;
  const one = new Float64Array(1);
  const words = new Int32Array(one.buffer);
  one[0] = 1;
  const upper = words[0] === 0 ? 1 : 0;
  const keys = new Int32Array(n);
  for (let i = 0; i < n; i++) {
    // −0 + 0 is 0: the two are equal and must have equal bits.
    one[0] = values[i]! + 0;
    const word = words[upper]!;
    keys[i] = word ^ ((word >> 31) | -2147483648);
  }
  return keys;
}

/** Puts places first … end − 1, which stand in the order of the rows, in the order of their values. */
function settle(values: Float64Array, order: Int32Array, first: number, end: number): void {
  let isRising = true;
  for (let k = first + 1; k < end && isRising; k++)
    isRising = values[order[k - 1]!]! <= values[order[k]!]!;
  if (isRising) return;
  if (end - first > SHORT_RUN) {
    order.subarray(first, end).sort((i, j) => values[i]! - values[j]! || i - j);
    return;
  }
  for (let k = first + 1; k < end; k++) {
    const own = order[k]!;
    const value = values[own]!;
    let at = k;
    for (; at > first && values[order[at - 1]!]! > value; at--) order[at] = order[at - 1]!;
    order[at] = own;
  }
}

/** The values in an order. */
export function inOrder(values: Float64Array, order: Int32Array): Float64Array {
  const sorted = new Float64Array(order.length);
  for (let i = 0; i < order.length; i++) sorted[i] = values[order[i]!]!;
  return sorted;
}

/** Rank of each value, from 1; equal values have the mean of their ranks. */
export function averageRanks(values: Float64Array, order = orderOf(values)): Float64Array {
  const n = values.length;
  const ranks = new Float64Array(n);
  for (let first = 0; first < n;) {
    const value = values[order[first]!]!;
    let end = first + 1;
    while (end < n && values[order[end]!] === value) end++;
    for (let k = first; k < end; k++) ranks[order[k]!] = (first + 1 + end) / 2;
    first = end;
  }
  return ranks;
}

/**
 * Pearson's correlation of two columns of ranks: Spearman's rank correlation.
 * Null when one of them is the same in all rows. Guarantee: error ≤ 1e-12, exactly 1 for equal ranks
 * and −1 for opposite ones.
 */
export function correlationOfRanks(
  a: Float64Array,
  b: Float64Array,
  aa = commonSpread(a, a),
  bb = commonSpread(b, b),
): number | null {
  if (aa === 0 || bb === 0) return null;
  const ab = commonSpread(a, b);
  return aa === bb ? ab / aa : ab / Math.sqrt(aa * bb);
}

/** The sum over the rows of the product of two ranks, each less the mean rank. */
function commonSpread(a: Float64Array, b: Float64Array): number {
  const mean = (a.length + 1) / 2;
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += (a[i]! - mean) * (b[i]! - mean);
  return sum;
}

/** The rank correlations of every two columns of ranks; null where a column is the same in all rows. */
export function rankCorrelations(ranks: readonly Float64Array[]): readonly (number | null)[][] {
  const spreads = ranks.map((column) => commonSpread(column, column));
  const matrix: (number | null)[][] = ranks.map(() => []);
  ranks.forEach((first, i) => {
    for (let j = 0; j <= i; j++) {
      const value = correlationOfRanks(first, ranks[j]!, spreads[i], spreads[j]);
      matrix[i]![j] = value;
      matrix[j]![i] = value;
    }
  });
  return matrix;
}
