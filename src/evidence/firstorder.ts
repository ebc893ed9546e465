/**
 * The first-order share of an input: how much of the output's variance goes, on average, when
 * that input is known. Estimated from given rows, without a plan of special runs.
 *
 * Rows are put in order of the input and cut into about 2√n groups of about √n/2 rows; the share is
 * 1 − (variance within groups)/(variance of all), each with its degrees of freedom, so that an
 * input that moves nothing has share 0 on average. Sources: given data in groups, Plischke,
 * Borgonovo & Smith (2013), European Journal of Operational Research 226; degrees of freedom:
 * Kelley (1935), PNAS 21; the error is that of a ratio by each row's influence (both from memory,
 * measured in the test). What an input does within a group is not seen: less than 1/n of a smooth
 * effect's share for each of its waves (measured in the test).
 * Not handled: shares that inputs hold only together; dependent rows.
 */
import { inOrder } from '../numeric/ranks';

interface FirstOrder {
  readonly share: number;
  /** The standard error of the share. */
  readonly error: number;
}

/**
 * The share of one input, null when its values do not make two groups.
 * Domain: `order` gives the rows in rising order of the input; an output that varies.
 */
export function firstOrder(
  input: Float64Array,
  order: Int32Array,
  output: Float64Array,
): FirstOrder | null {
  const n = input.length;
  const ends = groupEnds(inOrder(input, order));
  if (ends.length < 2) return null;
  const y = inOrder(output, order);
  const mean = average(y, 0, n);
  const within = new Float64Array(n);
  let start = 0;
  for (const end of ends) {
    const own = average(y, start, end);
    // The square is taken as that of a row that is not in its own average.
    const degrees = end - start > 1 ? (end - start) / (end - start - 1) : 1;
    for (let i = start; i < end; i++) within[i] = (y[i]! - own) * (y[i]! - own) * degrees;
    start = end;
  }
  let [all, left] = [0, 0];
  for (let i = 0; i < n; i++) {
    all += (y[i]! - mean) * (y[i]! - mean);
    left += within[i]!;
  }
  const variance = all / (n - 1);
  const rest = left / n / variance;
  let squares = 0;
  for (let i = 0; i < n; i++) {
    const influence = (within[i]! - rest * (y[i]! - mean) * (y[i]! - mean)) / variance;
    squares += influence * influence;
  }
  // An input that moves nothing has the noise of a χ² with as many degrees as groups less one.
  const least = rest * Math.sqrt(2 * (ends.length - 1));
  return { share: 1 - rest, error: Math.max(Math.sqrt(squares), least) / n };
}

/**
 * Where groups of about √n/2 rows end, of two rows at least. Equal values are in one group, and a
 * value that fills a group has one of its own.
 */
function groupEnds(sorted: Float64Array): readonly number[] {
  const n = sorted.length;
  const size = Math.max(2, Math.round(Math.sqrt(n) / 2));
  const ends: number[] = [];
  let [runStart, runEnd] = [0, 0];
  for (let start = 0; start < n;) {
    let end = Math.min(n, start + size);
    if (end > runEnd) {
      runStart = end - 1;
      while (runStart > start && sorted[runStart - 1] === sorted[end - 1]) runStart--;
      runEnd = end;
      while (runEnd < n && sorted[runEnd] === sorted[end - 1]) runEnd++;
    }
    end = runEnd - runStart >= size && runStart - start > 1 ? runStart : runEnd;
    // A few rows that are left over join this group, unless either has one value only.
    const isRest = sorted[start] !== sorted[end - 1] && sorted[end] !== sorted[n - 1];
    if (n - end === 1 || (n - end < size / 2 && isRest)) end = n;
    ends.push(end);
    start = end;
  }
  return ends;
}

function average(y: Float64Array, start: number, end: number): number {
  let sum = 0;
  for (let i = start; i < end; i++) sum += y[i]!;
  return sum / (end - start);
}
