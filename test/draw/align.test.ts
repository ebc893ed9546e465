import { adjustedScores, scoreColumns } from '../../src/draw/align';
import { matrixOf } from '../../src/numeric/matrix';
import { averageRanks, rankCorrelations } from '../../src/numeric/ranks';

describe('adjustedScores', () => {
  // Iman & Conover (1982): their recipe, worked by hand for a case of our own (10 rows, 3 columns).
  it('of the worked case has the ranks and rank correlations of the recipe [published]', () => {
    const ranks = [
      [1, 2, 3, 4, 5, 6, 7, 8, 9, 10],
      [4, 9, 1, 7, 3, 10, 2, 6, 8, 5],
      [7, 3, 10, 1, 8, 5, 2, 9, 4, 6],
    ];
    const orders = ranks.map((column) => Int32Array.from(column, (_, k) => column.indexOf(k + 1)));
    const wished = [
      [1, 0.8, 0.4],
      [0.8, 1, 0.3],
      [0.4, 0.3, 1],
    ];
    const adjusted = adjustedScores(
      scoreColumns(orders),
      matrixOf(3, (i, j) => wished[i]![j]!),
    )!;
    const reached = adjusted.map((column) => averageRanks(column));
    expect(reached.map((column) => Array.from(column))).toEqual([
      [1, 2, 3, 4, 5, 6, 7, 8, 9, 10],
      [2, 5, 1, 6, 3, 8, 4, 7, 10, 9],
      [4, 3, 8, 1, 6, 7, 2, 10, 5, 9],
    ]);
    const between = rankCorrelations(reached);
    expect(Math.abs(between[0]![1]! - 0.7696969697)).toBeLessThanOrEqual(5e-11);
    expect(Math.abs(between[0]![2]! - 0.4424242424)).toBeLessThanOrEqual(5e-11);
    expect(Math.abs(between[1]![2]! - 0.2121212121)).toBeLessThanOrEqual(5e-11);
  });
});
