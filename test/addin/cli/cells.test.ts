import { cellsToJson, rangesFromJson } from '../../../addin/cli/cells';
import { UsageError } from '../../../addin/cli/usage';

describe('rangesFromJson(text)', () => {
  test('reads ranges as arrays of rows, single cells and arguments left out [law]', () => {
    expect(
      rangesFromJson('[[["x", 1.5], [null, true]], "EXP(-x)", null, {"error":"#N/A"}]'),
    ).toEqual([
      [
        ['x', 1.5],
        [null, true],
      ],
      [['EXP(-x)']],
      null,
      [[{ error: '#N/A' }]],
    ]);
  });

  test('takes nothing of an error cell but its code [law]', () => {
    expect(rangesFromJson('[{"error":"#REF!","more":1}]')).toEqual([[[{ error: '#REF!' }]]]);
  });

  test.each([
    ['{"a":1}', 'Arguments: {"a":1} is no JSON array; put them in [ ].'],
    ['[[0, 12]]', 'Argument 1, row 1: 0 is no row; write a range as [[1, 2], [3, 4]].'],
    ['[1, []]', 'Argument 2: [] has no rows; give null to leave the argument out.'],
    [
      '[[[1, 2], [3]]]',
      'Argument 1, row 2: has 1 cells; give every row the same number, at least 1.',
    ],
    ['[[[]]]', 'Argument 1, row 1: has 0 cells; give every row the same number, at least 1.'],
    [
      '[[[1, {"code": 5}]]]',
      'Argument 1, row 1, cell 2: {"code":5} is no cell; give a number, a text, true, false, null or {"error":"#N/A"}.',
    ],
    ['[1e999]', 'Argument 1: the number is too large; give one below 1.8e308.'],
  ])('refuses %s [law]', (text, message) => {
    expect(() => rangesFromJson(text)).toThrow(new UsageError(message));
  });

  test('refuses what is not JSON, with the reason of the parser [law]', () => {
    expect(() => rangesFromJson("['x']")).toThrow(
      /^Arguments: not JSON \(.+\); write texts in double quotes\.$/,
    );
  });
});

describe('cellsToJson(range)', () => {
  test('writes one row a line [law]', () => {
    expect(
      cellsToJson([
        ['a', 1],
        [null, { error: '#N/A' }],
      ]),
    ).toBe('[\n["a",1],\n[null,{"error":"#N/A"}]\n]\n');
  });

  test('is read back as the same cells, to the bit [law]', () => {
    const range = [
      [0.1 + 0.2, 5e-324, 1.7976931348623157e308],
      ['', false, -1 / 3],
    ];
    expect(rangesFromJson(`[${cellsToJson(range)}]`)).toEqual([range]);
  });
});
