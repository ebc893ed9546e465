import fc from 'fast-check';
import { keyOf } from '../../src/random/key';
import type { Key } from '../../src/random/key';
import { fraction, philox4x32 } from '../../src/random/philox';
import { correlation, Z_FALSE_ALARM } from '../draw/statistics';
import { DrawStream, PURPOSE, RowStream } from '../../src/random/stream';

const LAST_ROW = 1048575;
const KEY = keyOf('plan-2027', 'harvest');

const word = fc.integer({ min: 0, max: 0xffffffff });
const key = fc.tuple(word, word);
const row = fc.integer({ min: 1, max: LAST_ROW });

/** The fractions of one counter, by the plain generator. */
function fractions(counter: readonly [number, number, number, number], [k0, k1]: Key) {
  const words = new Uint32Array(4);
  philox4x32(...counter, k0, k1, words);
  return [fraction(words[0]!, words[1]!), fraction(words[2]!, words[3]!)];
}

/** The first numbers of rows 1 … n. */
function firsts(stream: RowStream, n: number): Float64Array {
  const out = new Float64Array(n);
  stream.fillFirst(1, out, n);
  return out;
}

/** u (which = 0) or v (which = 1) of one attempt of rows 1 … n. */
function furthers(stream: RowStream, n: number, attempt: number, which: 0 | 1): Float64Array {
  const pair = new Float64Array(2);
  return Float64Array.from({ length: n }, (_, i) => {
    stream.further(i + 1, attempt, pair);
    return pair[which]!;
  });
}

describe('RowStream.fillFirst', () => {
  it('fillFirst(row, …) is block (floor(row / 2), 0, 0, method), half by parity [law]', () => {
    fc.assert(
      fc.property(key, word, row, fc.integer({ min: 0, max: 12 }), (k, method, start, count) => {
        const out = new Float64Array(count);
        new RowStream(k, method).fillFirst(start, out, count);
        out.forEach((value, i) => {
          const at = start + i;
          const block = fractions([Math.floor(at / 2), 0, 0, method], k);
          expect(value).toBe(block[at % 2]);
        });
      }),
      { seed: 11, numRuns: 1000 },
    );
  });

  it('fillFirst(row, …) for a purpose is block (floor(row / 2), 0, purpose, method) [law]', () => {
    expect(new Set(Object.values(PURPOSE)).size).toBe(Object.values(PURPOSE).length);
    for (const purpose of [0, 2, 3, 4, 5]) {
      const out = new Float64Array(9);
      new RowStream(KEY, 3, purpose).fillFirst(6, out, 9);
      out.forEach((value, i) => {
        expect(value).toBe(fractions([(6 + i) >> 1, 0, purpose, 3], KEY)[i % 2]);
      });
    }
  });

  it('fillFirst(1, n) equals its pieces, whatever their sizes [law]', () => {
    const n = 5000;
    const whole = firsts(new RowStream(KEY), n);
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 700 }), { maxLength: 20 }), (sizes) => {
        const stream = new RowStream(KEY);
        let done = 0;
        for (const size of [...sizes, n]) {
          const count = Math.min(size, n - done);
          const piece = new Float64Array(count);
          stream.fillFirst(done + 1, piece, count);
          expect(piece.every((value, i) => value === whole[done + i])).toBe(true);
          done += count;
        }
      }),
      { seed: 12, numRuns: 100 },
    );
  });

  it('fillFirst(row, out, count) writes count numbers and no more [law]', () => {
    for (const start of [1, 2]) {
      for (let count = 0; count <= 5; count++) {
        const out = new Float64Array(8).fill(-1);
        new RowStream(KEY).fillFirst(start, out, count);
        expect([...out].map((value) => value >= 0)).toEqual([...out].map((_, i) => i < count));
      }
    }
  });

  it('fillFirst(row, …) does not depend on what was drawn before [law]', () => {
    const stream = new RowStream(KEY);
    furthers(stream, 10, 3, 0);
    firsts(stream, 7);
    expect(firsts(stream, 100)).toEqual(firsts(new RowStream(KEY), 100));
  });

  it('fillFirst(1, …) keeps these numbers [pinned]', () => {
    expect([...firsts(new RowStream(KEY), 4)]).toEqual([
      0.9090590199718377, 0.24680380653975742, 0.2868423290592992, 0.023871608462282312,
    ]);
  });
});

describe('DrawStream', () => {
  const draws = fc.nat(1e6);

  it('fillFirst(row, draw, …) is block (floor(draw / 2), row, 6, method), half by parity [law]', () => {
    const small = fc.nat(9);
    fc.assert(
      fc.property(key, word, row, draws, small, (k, method, at, draw, n) => {
        const out = new Float64Array(n + 4);
        new DrawStream(k, method).fillFirst(at, draw, out, 2, n);
        const wanted = Array.from({ length: n }, (_, i) => {
          const block = fractions([(draw + i) >> 1, at, PURPOSE.total, method], k);
          return block[(draw + i) % 2];
        });
        // One number may follow.
        expect([...out.slice(0, n + 2)]).toEqual([0, 0, ...wanted]);
        expect(out[n + 3]).toBe(0);
      }),
      { seed: 12, numRuns: 1000 },
    );
  });

  it('further(row, draw, attempt) is block (2^31 + draw, row, attempt, method) [law]', () => {
    fc.assert(
      fc.property(key, word, row, draws, word, (k, method, at, draw, attempt) => {
        const out = new Float64Array(2);
        new DrawStream(k, method).further(at, draw, attempt, out);
        expect([...out]).toEqual(fractions([2 ** 31 + draw, at, attempt, method], k));
      }),
      { seed: 14, numRuns: 1000 },
    );
  });

  it('the draws of neighbouring rows are uncorrelated [law]', () => {
    const n = 100_000;
    const of = (at: number) => {
      const out = new Float64Array(n + 1);
      new DrawStream(KEY).fillFirst(at, 0, out, 0, n);
      return out.slice(0, n);
    };
    const limit = Z_FALSE_ALARM / Math.sqrt(n);
    expect(Math.abs(correlation(of(7), of(8)))).toBeLessThan(limit);
    expect(correlation(of(7), of(7))).toBeGreaterThan(limit);
  });
});

describe('RowStream.further', () => {
  it('further(row, attempt) is block (row, attempt, 1, method) [law]', () => {
    fc.assert(
      fc.property(key, word, row, fc.nat(1e6), (k, method, at, attempt) => {
        const out = new Float64Array(2);
        new RowStream(k, method).further(at, attempt, out);
        expect([...out]).toEqual(fractions([at, attempt, 1, method], k));
      }),
      { seed: 13, numRuns: 1000 },
    );
  });

  it('further(row, attempt) keeps these numbers [pinned]', () => {
    const out = new Float64Array(2);
    const pairs = [];
    for (const attempt of [0, 1]) {
      new RowStream(KEY).further(17, attempt, out);
      pairs.push([...out]);
    }
    expect(pairs).toEqual([
      [0.4899851065097296, 0.8985311778558558],
      [0.6285603368499584, 0.5809690123485609],
    ]);
  });

  it('the numbers of rows, attempts, purposes and methods never come from one block twice [law]', () => {
    // 6,000 numbers of 53 bits: any two of them agree by chance with probability below 2e-9.
    const n = 1000;
    const seen = new Set<number>();
    for (const method of [0, 1]) {
      const stream = new RowStream(KEY, method);
      for (const value of firsts(stream, n)) seen.add(value);
      for (const attempt of [0, 1]) {
        for (const value of furthers(stream, n, attempt, 1)) seen.add(value);
      }
    }
    expect(seen.size).toBe(6 * n);
  });
});

describe('the numbers look random', () => {
  // Every check below raises a false alarm with probability ≤ 1e-6 for a random key; the key is
  // fixed. n = 2^18 rows.
  const n = 2 ** 18;
  const stream = new RowStream(KEY);
  const first = firsts(stream, n);
  const samples = new Map<string, Float64Array>([
    ['first numbers', first],
    ['first numbers of odd rows', first.filter((_, i) => i % 2 === 0)],
    ['first numbers of even rows', first.filter((_, i) => i % 2 === 1)],
    ['v of attempt 0', furthers(stream, n, 0, 1)],
    ['u of attempt 1', furthers(stream, n, 1, 0)],
    ['v of attempt 1', furthers(stream, n, 1, 1)],
    ['u of attempt 2', furthers(stream, n, 2, 0)],
    ['first numbers under another label', firsts(new RowStream(keyOf('plan-2027', 'press')), n)],
    ['first numbers under another seed', firsts(new RowStream(keyOf('plan-2028', 'harvest')), n)],
    ['first numbers of another method', firsts(new RowStream(KEY, 1), n)],
  ]);
  const sample = (name: string) => samples.get(name)!;

  /** χ² of counts over equally likely cells, in the scale where a sound one is within ±1. */
  function excess(cells: Int32Array): number {
    // P(χ² − df ≥ 2√(df·t) + 2t) ≤ e^-t and P(df − χ² ≥ 2√(df·t)) ≤ e^-t: Laurent & Massart
    // (2000), lemma 1 (from memory); with t = ln(2e6) both sides together are ≤ 1e-6. Cells
    // expect ≥ 63 counts, so the sum of squares is χ² closely enough.
    const t = 14.508657738524219;
    const df = cells.length - 1;
    const expected = cells.reduce((sum, seen) => sum + seen) / cells.length;
    let chi2 = 0;
    for (const seen of cells) chi2 += (seen - expected) ** 2 / expected;
    const deviation = chi2 - df;
    return deviation / (2 * Math.sqrt(df * t) + (deviation > 0 ? 2 * t : 0));
  }

  function tally(values: Float64Array, cell: (value: number, i: number) => number): Int32Array {
    const cells = new Int32Array(1024);
    values.forEach((value, i) => cells[cell(value, i)]!++);
    return cells;
  }

  const upperBits = (v: Float64Array) => excess(tally(v, (u) => Math.floor(u * 1024)));
  const lowerBits = (v: Float64Array) => excess(tally(v, (u) => (u * 2 ** 53) % 1024));
  /** Pairs of rows that do not overlap, the first beginning at row 1 + skip. */
  function neighbours(v: Float64Array, skip: 0 | 1): number {
    const begins = v.subarray(skip).filter((_, i) => i % 2 === 0);
    const follows = v.subarray(skip + 1).filter((_, i) => i % 2 === 0);
    return excess(tally(follows, (u, i) => Math.floor(begins[i]! * 32) * 32 + Math.floor(u * 32)));
  }

  /** Correlation of two samples times √n: standard normal when they are independent. */
  function correlation(a: Float64Array, b: Float64Array): number {
    let sum = 0;
    for (let i = 0; i < a.length; i++) sum += (a[i]! - 0.5) * (b[i]! - 0.5);
    return (12 * sum) / Math.sqrt(a.length);
  }
  const lagged = (v: Float64Array, lag: number) => v.map((_, i) => v[(i + lag) % v.length]!);
  /** The upper 5e-7 point of the normal distribution, recomputed with mpmath. */
  const LIMIT = 4.891638475699;

  it.each([...samples.keys()])(
    '%s fill 1,024 cells evenly, by upper and by lower bits [law]',
    (name) => {
      const v = sample(name);
      expect(Math.abs(upperBits(v))).toBeLessThan(1);
      expect(Math.abs(lowerBits(v))).toBeLessThan(1);
    },
  );

  it.each([...samples.keys()])(
    '%s of neighbouring rows fill 32 × 32 cells evenly [law]',
    (name) => {
      const v = sample(name);
      expect(Math.abs(neighbours(v, 0))).toBeLessThan(1);
      expect(Math.abs(neighbours(v, 1))).toBeLessThan(1);
    },
  );

  it.each([...samples.keys()])(
    '%s are uncorrelated with themselves 1, 2, 3, 64 rows on [law]',
    (name) => {
      const v = sample(name);
      for (const lag of [1, 2, 3, 64]) {
        expect(Math.abs(correlation(v, lagged(v, lag)))).toBeLessThan(LIMIT);
      }
    },
  );

  it('numbers of different purpose, attempt, label, seed or method are uncorrelated [law]', () => {
    const whole = [...samples.values()].filter((v) => v.length === n);
    for (const [i, a] of whole.entries()) {
      for (const b of whole.slice(i + 1)) {
        expect(Math.abs(correlation(a, b))).toBeLessThan(LIMIT);
      }
    }
  });

  it('the checks fail for numbers that are uneven, repeated or alike [law]', () => {
    const uneven = first.map((u) => u * (0.9 + 0.1 * u));
    expect(upperBits(uneven)).toBeGreaterThan(1);
    const evenTooWell = first.map((_, i) => (i + 0.5) / n);
    expect(upperBits(evenTooWell)).toBeLessThan(-1);
    const short = first.map((u) => Math.round(u * 2 ** 48) / 2 ** 48);
    expect(lowerBits(short)).toBeGreaterThan(1);
    const rowsOfAPairShared = first.map((_, i) => first[i - (i % 2)]!);
    expect(neighbours(rowsOfAPairShared, 0)).toBeGreaterThan(1);
    expect(correlation(rowsOfAPairShared, lagged(rowsOfAPairShared, 1))).toBeGreaterThan(LIMIT);
    const slightlyAlike = sample('v of attempt 0').map((v, i) => 0.98 * v + 0.02 * first[i]!);
    expect(correlation(first, slightlyAlike)).toBeGreaterThan(LIMIT);
  });
});
