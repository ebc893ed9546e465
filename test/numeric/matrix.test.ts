import fc from 'fast-check';
import type { Matrix } from '../../src/numeric/matrix';
import { axesOf, correlationFactor, matrixOf, solveLower } from '../../src/numeric/matrix';
import { nearestCorrelation } from '../../src/numeric/nearest';

const from = (rows: readonly (readonly number[])[]): Matrix =>
  rows.map((row) => Float64Array.from(row));

function times(a: Matrix, b: (k: number, j: number) => number): Matrix {
  return matrixOf(a.length, (i, j) => a[i]!.reduce((sum, x, k) => sum + x * b(k, j), 0));
}

function distance(a: Matrix, b: Matrix): number {
  return Math.sqrt(
    a.reduce((sum, row, i) => row.reduce((s, x, j) => s + (x - b[i]![j]!) ** 2, sum), 0),
  );
}

/** Symmetric, with a diagonal of 1. */
const wishes = fc
  .integer({ min: 2, max: 12 })
  .chain((n) =>
    fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: n * n, maxLength: n * n }),
  )
  .map((entries) => {
    const n = Math.sqrt(entries.length);
    return matrixOf(n, (i, j) => (i === j ? 1 : entries[Math.max(i, j) * n + Math.min(i, j)]!));
  });

describe('nearestCorrelation', () => {
  // Higham (2002), "Computing the nearest correlation matrix", the example of section 4 (from memory).
  it('of 1 1 0, 1 1 1, 0 1 1 is that of Higham, at his distance [published]', () => {
    const wished = from([
      [1, 1, 0],
      [1, 1, 1],
      [0, 1, 1],
    ]);
    const nearest = nearestCorrelation(wished, 0, 1e-12);
    expect(Math.abs(nearest[0]![1]! - 0.7606898534)).toBeLessThanOrEqual(5e-11);
    expect(Math.abs(nearest[1]![2]! - 0.7606898534)).toBeLessThanOrEqual(5e-11);
    expect(Math.abs(nearest[0]![2]! - 0.1572981061)).toBeLessThanOrEqual(5e-11);
    expect(Math.abs(distance(nearest, wished) - 0.5277904636)).toBeLessThanOrEqual(5e-11);
  });

  it('has a factor, and is the matrix itself where that has one [law]', () => {
    fc.assert(
      fc.property(wishes, (wished) => {
        const nearest = nearestCorrelation(wished, 1e-3, 1e-9);
        expect(correlationFactor(nearest)).not.toBeNull();
        if (axesOf(wished).values.every((value) => value > 1e-3))
          expect(distance(nearest, wished)).toBeLessThan(1e-8);
      }),
      { seed: 51, numRuns: 60 },
    );
  });
});

describe('correlationFactor', () => {
  it('times its mirror image is the matrix, and there is none below 0 [law]', () => {
    fc.assert(
      fc.property(wishes, (wished) => {
        const least = axesOf(wished).values.reduce((a, b) => Math.min(a, b));
        const factor = correlationFactor(wished);
        if (least < -1e-6) expect(factor).toBeNull();
        if (least > 1e-6) {
          expect(
            distance(
              times(factor!, (k, j) => factor![j]![k]!),
              wished,
            ),
          ).toBeLessThan(1e-10);
          const x = solveLower(factor!, wished[0]!);
          // L·(first row of L's mirror image) is the first row of the matrix.
          x.forEach((entry, i) => expect(entry).toBeCloseTo(i === 0 ? 1 : 0, 6));
        }
      }),
      { seed: 52, numRuns: 300 },
    );
  });

  it('takes columns that move as one, or against one another [law]', () => {
    const matrix = from([
      [1, 1, -1, 0.5],
      [1, 1, -1, 0.5],
      [-1, -1, 1, -0.5],
      [0.5, 0.5, -0.5, 1],
    ]);
    const factor = correlationFactor(matrix)!;
    expect(
      distance(
        times(factor, (k, j) => factor[j]![k]!),
        matrix,
      ),
    ).toBeLessThan(1e-11);
    const other = matrixOf(4, (i, j) => ([i, j].sort().join() === '1,3' ? 0.4 : matrix[i]![j]!));
    expect(correlationFactor(other)).toBeNull();
  });
});

describe('axesOf', () => {
  it('has axes that give the matrix again [law]', () => {
    fc.assert(
      fc.property(wishes, (matrix) => {
        const { values, vectors } = axesOf(matrix);
        const stretched = matrixOf(matrix.length, (i, k) => vectors[i]![k]! * values[k]!);
        expect(
          distance(
            times(stretched, (k, j) => vectors[j]![k]!),
            matrix,
          ),
        ).toBeLessThan(1e-12);
      }),
      { seed: 53, numRuns: 200 },
    );
  });
});
