/** Arguments and results between the grid's cells and the ranges of the functions. */
import fc from 'fast-check';
import { findErrorCell, type GridCell, toColumns, toRange } from '../../../addin/page/translate';

const isErrorCode = (value: unknown) => value === '#N/A' || value === '#DIV/0!';
const columnsOf = (rows: readonly (readonly GridCell['value'][])[]) =>
  (rows[0] ?? []).map((_, i) => rows.map((row) => ({ value: row[i] ?? null })));

/** Rectangles of what a cell may hold, no error codes among the texts. */
const rectangle = fc
  .tuple(fc.integer({ min: 1, max: 5 }), fc.integer({ min: 1, max: 5 }))
  .chain(([rows, width]) => {
    const cell = fc.oneof(
      fc.double({ noNaN: true, noDefaultInfinity: true }),
      fc.string().filter((text) => !isErrorCode(text)),
      fc.boolean(),
    );
    const row = fc.array(cell, { minLength: width, maxLength: width });
    return fc.array(row, { minLength: rows, maxLength: rows });
  });

describe('toRange(argument)', () => {
  test('toRange(columns) gives rows [law]', () => {
    expect(
      toRange(
        columnsOf([
          [1, 'a'],
          [2, 'b'],
          [3, 'c'],
        ]),
        isErrorCode,
      ),
    ).toEqual([
      [1, 'a'],
      [2, 'b'],
      [3, 'c'],
    ]);
  });

  test('toRange(one cell) is a range of one cell [law]', () => {
    expect(toRange({ value: 'plan-2027' }, isErrorCode)).toEqual([['plan-2027']]);
  });

  test('toRange(undefined) is null, an omitted argument [law]', () => {
    expect(toRange(undefined, isErrorCode)).toBeNull();
  });

  test('toRange(columns) keeps blanks as null and truth values as themselves [law]', () => {
    expect(toRange([[{ value: null }, { value: true }]], isErrorCode)).toEqual([[null], [true]]);
  });

  test('toRange(columns) turns −0 into 0 [law]', () => {
    expect(toRange([[{ value: -0 }]], isErrorCode)?.[0]?.[0]).toBe(0);
  });

  test('toRange(columns) marks error codes and leaves other texts alone [law]', () => {
    expect(toRange([[{ value: '#N/A' }, { value: '#N/B' }]], isErrorCode)).toEqual([
      [{ error: '#N/A' }],
      ['#N/B'],
    ]);
  });
});

describe('toColumns(result)', () => {
  test('toColumns(toRange(columns)) gives the columns back, −0 as 0 [law]', () => {
    fc.assert(
      fc.property(rectangle, (rows) => {
        const columns = columnsOf(rows);
        const back = toColumns(toRange(columns, isErrorCode) ?? []);
        const positive = columns.map((column) =>
          column.map(({ value }) => ({ value: value === 0 ? 0 : value })),
        );
        expect(back).toEqual(positive);
      }),
      { seed: 2027, numRuns: 300 },
    );
  });

  test('toColumns(result) shows a blank as an empty text, where the grid would show 0 [law]', () => {
    expect(toColumns([[1, null]])).toEqual([[{ value: 1 }], [{ value: '' }]]);
  });

  test('toColumns(result) passes on an error cell with its code [law]', () => {
    expect(toColumns([[{ error: '#N/A' }]])).toEqual([[{ value: '#N/A', message: '#N/A' }]]);
  });

  test.each([
    ['NaN', [[NaN]], 'bug: a result of NaN'],
    ['infinity', [[Infinity]], 'bug: a result of Infinity'],
    ['nothing', [], 'bug: an empty result'],
    ['rows of different lengths', [[1, 2], [3]], 'bug: a ragged result'],
  ])('toColumns(%s) throws, where the grid would show 0 [law]', (_, result, message) => {
    expect(() => toColumns(result)).toThrow(new Error(message));
  });
});

test('findErrorCell(args, code) finds the first cell with the code, message included [law]', () => {
  const first = { value: '#N/A', message: 'first' };
  const args = [
    undefined,
    { value: 3 },
    [[{ value: '#DIV/0!', message: 'other' }], [first]],
    { value: '#N/A', message: 'second' },
  ];
  expect(findErrorCell(args, '#N/A')).toBe(first);
  expect(findErrorCell(args, '#NUM!')).toBeUndefined();
});
