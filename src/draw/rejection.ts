/**
 * A column of exact draws, row by row from its own numbers, whatever is drawn from.
 *
 * Row i proposes until a proposal is accepted. Its first number settles most rows at
 * once; otherwise attempt 0 draws a height where the lower bound does not tell, and
 * every further attempt k = 1, 2 … is a fresh proposal with its own counter. So row i is
 * the same whatever the number of rows. Rejection sampling: von Neumann (1951); the lower
 * bound as a squeeze: Marsaglia (1977).
 */
import { bug } from '../errors';
import type { Interval } from '../numeric/interval';
import { RowStream } from '../random/stream';
import type { Key } from '../random/key';

/** Drawn values and what is needed to judge how they came about. */
export interface Column {
  readonly values: Float64Array;
  /** Proposals made for all rows together. */
  readonly proposals: number;
  /** Rows whose first number fell under the lower line. */
  readonly settledAtOnce: number;
  /** Most proposals that one row needed. */
  readonly longestWait: number;
  /** Heights so near the density that its enclosure could not tell, settled by comparing doubles. */
  readonly nearTies: number;
}

/** One proposal of a row. */
interface Proposal {
  readonly row: number;
  readonly attempt: number;
  readonly x: number;
  /** The height drawn; under the lower line no height is drawn, and it is NaN. */
  readonly height: number;
  readonly isKept: boolean;
}

/** Where the numbers of draws 0, 1, 2 … come from; multiples of 2^-53 in [0, 1), as of random/stream.ts. */
export interface NumberSource {
  /** Writes the first numbers of draws from … from + count − 1 to out[0 … count − 1]. */
  fillFirst(from: number, out: Float64Array, count: number): void;
  /** Writes u and v of an attempt of draw i to out[0] and out[1]. */
  further(i: number, attempt: number, out: Float64Array): void;
}

const CHUNK = 4096;
/** At an acceptance of 0.01 a row needs this many with a chance far below 10^-1000. */
const MAX_ATTEMPTS = 1_000_000;

/** Draws columns from one envelope; how it proposes and accepts is the heirs' business. */
export abstract class ColumnDrawer {
  protected nearTies = 0;
  private readonly one = new Float64Array(1);
  private readonly pair = new Float64Array(2);

  /** Rows `first` … `first + n − 1` under a key. @throws {Error} on a breach, which no proof allows. */
  column(key: Key, first: number, n: number, method = 0): Column {
    return this.draws(rowsFrom(new RowStream(key, method), first), n);
  }

  /** n draws by numbers of the caller's, each draw by its own. @throws {Error} on a breach. */
  draws(source: NumberSource, n: number): Column {
    const values = new Float64Array(n);
    const chunk = Math.min(CHUNK, n);
    const numbers = new Float64Array(chunk);
    const open = new Int32Array(chunk);
    this.nearTies = 0;
    let proposals = n;
    let settledAtOnce = 0;
    let longestWait = n > 0 ? 1 : 0;
    for (let done = 0; done < n; done += CHUNK) {
      const size = Math.min(CHUNK, n - done);
      source.fillFirst(done, numbers, size);
      const nOpen = this.settleFirst(numbers, size, values, done, open);
      settledAtOnce += size - nOpen;
      for (let k = 0; k < nOpen; k++) {
        const at = open[k]!;
        const wait = this.finish(source, done + at, numbers[at]!, values);
        if (wait === 0) settledAtOnce++;
        else proposals += wait - 1;
        if (wait > longestWait) longestWait = wait;
      }
    }
    return { values, proposals, settledAtOnce, longestWait, nearTies: this.nearTies };
  }

  /** Every proposal of rows `first` … `first + n − 1`, as `column` makes them; null when there are more than `most`. */
  proposals(key: Key, first: number, n: number, most: number, method = 0): Proposal[] | null {
    const source = rowsFrom(new RowStream(key, method), first);
    const made: Proposal[] = [];
    for (let i = 0; i < n; i++) {
      source.fillFirst(i, this.one, 1);
      let u = this.one[0]!;
      for (let attempt = 0, isKept = false; !isKept; attempt++) {
        if (made.length === most) return null;
        source.further(i, attempt, this.pair);
        const [fresh, v] = [this.pair[0]!, this.pair[1]!];
        if (attempt > 0) u = fresh;
        const { x, isUnderLower } = this.propose(u, source, i, attempt);
        isKept = isUnderLower || this.isAccepted(v);
        const height = isUnderLower ? NaN : this.heightAtShare(v);
        made.push({ row: first + i, attempt, x, height, isKept });
      }
    }
    return made;
  }

  /** Finishes draw i, which its first number u left open; returns the proposals it took, 0 if the lower bound settled it. */
  private finish(source: NumberSource, i: number, u: number, values: Float64Array): number {
    const { pair } = this;
    for (let attempt = 0; attempt < MAX_ATTEMPTS; attempt++) {
      source.further(i, attempt, pair);
      const v = pair[1]!;
      const { x, isUnderLower } = this.propose(attempt === 0 ? u : pair[0]!, source, i, attempt);
      if (isUnderLower || this.isAccepted(v)) {
        values[i] = x;
        return attempt === 0 && isUnderLower ? 0 : attempt + 1;
      }
    }
    throw bug(`draw ${i} found no place in ${MAX_ATTEMPTS} attempts`);
  }

  /** Writes x of every first number that settles; returns how many do not and lists them in `open`. */
  protected abstract settleFirst(
    numbers: Float64Array,
    size: number,
    values: Float64Array,
    offset: number,
    open: Int32Array,
  ): number;

  /** The proposal that u stands for, which the next two look at; valid until the next call. */
  protected abstract propose(
    u: number,
    source: NumberSource,
    i: number,
    attempt: number,
  ): Readonly<Place>;

  /** Whether the height at share v of what lies over the lower bound is under the density. */
  protected abstract isAccepted(v: number): boolean;

  /** That height. */
  protected abstract heightAtShare(v: number): number;

  /** Whether a height lies under the density, of which `density` is the enclosure at x. */
  protected isUnder(
    { lo, hi }: Interval,
    x: number,
    height: number,
    upper: number,
    settle: () => number,
  ): boolean {
    if (lo > upper) throw bug(`breach: the density at x = ${x} lies above the envelope`);
    if (lo >= height) return true;
    if (hi < height) return false;
    this.nearTies++;
    return settle() >= height;
  }
}

/** A proposal: its place, and whether every height there is under the lower bound. */
export interface Place {
  x: number;
  isUnderLower: boolean;
}

function rowsFrom(stream: RowStream, first: number): NumberSource {
  return {
    fillFirst: (from, out, count) => stream.fillFirst(first + from, out, count),
    further: (i, attempt, out) => stream.further(first + i, attempt, out),
  };
}
