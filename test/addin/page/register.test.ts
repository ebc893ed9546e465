/** Our functions as functions of the grid: what reaches them and what becomes of their answers. */
import { CellErrorPassed, InputError, type Range } from '../../../src/index';
import { CallLog } from '../../../addin/page/calls';
import { answer, registerFunctions } from '../../../addin/page/register';
import { gridOf, workbookOf } from './grid';

const parameter = (name: string, optional: boolean, repeating = false) => ({
  name,
  description: `${name} of the test`,
  optional,
  repeating,
});

/** A function of the test that keeps what reached it and answers with a column 10, 20, 30. */
const received: (readonly (Range | null)[])[] = [];
const log = new CallLog();
registerFunctions(
  [
    {
      name: 'TEST.KEEP',
      description: 'Keeps its arguments.',
      parameters: [
        parameter('density', false),
        parameter('limits', true),
        parameter('givens', true, true),
      ],
      call(args) {
        received.push(args);
        return [[10], [20], [30]];
      },
    },
    {
      name: 'TEST.REFUSE',
      description: 'Refuses its argument.',
      parameters: [parameter('rows', false)],
      call: () => {
        throw new InputError('rows (argument 3)', '0 is below 1', 'give 1 or more');
      },
    },
  ],
  log.note,
);

/** What reaches the function for a formula in A9 beside these cells. */
function argumentsOf(formula: string, cells: Readonly<Record<string, string>> = {}) {
  received.length = 0;
  gridOf(workbookOf({ Sheet1: { ...cells, A9: formula } }), log);
  return received.at(-1);
}

describe('registerFunctions(catalogue), arguments', () => {
  test.each<[string, string, (Range | null)[]]>([
    [
      'a range row by row',
      '=UNDERCURVE.TEST.KEEP(A1:B2)',
      [
        [
          [1, 'a'],
          [2, 'b'],
        ],
      ],
    ],
    ['one cell as a range', '=UNDERCURVE.TEST.KEEP(B2)', [[['b']]]],
    ['values and expressions', '=UNDERCURVE.TEST.KEEP(-A2,"x"&"y")', [[[-2]], [['xy']]]],
    ['an omitted argument as null', '=UNDERCURVE.TEST.KEEP(A1,,B1)', [[[1]], null, [['a']]]],
    ['a missing argument not at all', '=UNDERCURVE.TEST.KEEP(A1)', [[[1]]]],
    ['a blank cell as null', '=UNDERCURVE.TEST.KEEP(A2:A3)', [[[2], [null]]]],
    ['truth values', '=UNDERCURVE.TEST.KEEP(TRUE,1>2)', [[[true]], [[false]]]],
    [
      'array constants',
      '=UNDERCURVE.TEST.KEEP({1,2;3,4})',
      [
        [
          [1, 2],
          [3, 4],
        ],
      ],
    ],
    ['a name in lower case', '=undercurve.test.keep(A1)', [[[1]]]],
    ['a date as its number', '=UNDERCURVE.TEST.KEEP(B4)', [[[46388]]]],
    ['an error cell', '=UNDERCURVE.TEST.KEEP(B3,1)', [[[{ error: '#DIV/0!' }]], [[1]]]],
    ['an error value', '=UNDERCURVE.TEST.KEEP(1,NA())', [[[1]], [[{ error: '#N/A' }]]]],
    [
      'repeating arguments flat',
      '=UNDERCURVE.TEST.KEEP(1,2,3,4,5)',
      [[[1]], [[2]], [[3]], [[4]], [[5]]],
    ],
  ])('registerFunctions(catalogue) passes %s [law]', (_, formula, expected) => {
    const cells = { A1: '1', B1: 'a', A2: '2', B2: 'b', B3: '=1/0', B4: '=DATE(2027,1,1)' };
    expect(argumentsOf(formula, cells)).toEqual(expected);
  });

  test('registerFunctions(catalogue) passes a whole spill by A2# [law]', () => {
    const cells = { A2: '=UNDERCURVE.TEST.KEEP(1)' };
    expect(argumentsOf('=UNDERCURVE.TEST.KEEP(A2#)', cells)).toEqual([[[10], [20], [30]]]);
  });
});

describe('registerFunctions(catalogue), answers', () => {
  test('registerFunctions(catalogue) spills the answer [law]', () => {
    const grid = gridOf(workbookOf({ Sheet1: { B2: '=UNDERCURVE.TEST.KEEP(1)' } }), log);
    expect(grid.readSpill('Sheet1', 'B2')).toEqual([[10], [20], [30]]);
    expect(grid.read('Sheet1', 'B5')).toBeNull();
  });

  test('registerFunctions(catalogue) shows a bad input as #VALUE! with the whole message [law]', () => {
    const grid = gridOf(
      workbookOf({ Sheet1: { B2: '=UNDERCURVE.TEST.REFUSE(0)', C3: '=B2+1' } }),
      log,
    );
    const message = '#VALUE! rows (argument 3): 0 is below 1; give 1 or more.';
    expect(grid.read('Sheet1', 'B2')).toBe('#VALUE!');
    expect(grid.message('Sheet1', 'B2')).toBe(message);
    expect(grid.message('Sheet1', 'C3')).toBe(`${message} (from Sheet1!B2)`);
  });

  test('registerFunctions(catalogue) counts the calls of each cell [law]', () => {
    const grid = gridOf(workbookOf({ Counted: { A1: '5', B2: '=UNDERCURVE.TEST.KEEP(A1)' } }), log);
    const before = grid.calls()['Counted!B2'] ?? 0;
    grid.write('Counted', 'A1', '6');
    grid.write('Counted', 'A2', '7');
    expect(grid.calls()['Counted!B2']).toBe(before + 1);
  });
});

describe('answer(entry, args)', () => {
  const failing = (problem: Error) => ({
    call: (): Range => {
      throw problem;
    },
  });

  test('answer(entry, args) gives a passed error back with its own message [law]', () => {
    const cell = { value: '#DIV/0!', message: 'The divisor must be different from zero.' };
    expect(answer(failing(new CellErrorPassed('#DIV/0!')), [[[{ value: 1 }, cell]]])).toBe(cell);
  });

  test('answer(entry, args) gives a passed error that no cell holds as its code [law]', () => {
    expect(answer(failing(new CellErrorPassed('#N/A')), [])).toEqual({
      value: '#N/A',
      message: '#N/A',
    });
  });

  test('answer(entry, args) shows a fault of ours instead of throwing or giving 0 [law]', () => {
    const shown = { value: '#VALUE!', message: 'bug: a result of NaN' };
    expect(answer({ call: () => [[NaN]] }, [])).toEqual(shown);
  });
});

describe('registerFunctions(catalogue), looks', () => {
  test('a result has the number format of its first cell, and a cell keeps its own [law]', () => {
    const data = workbookOf({ Sheet1: { A1: '=UNDERCURVE.TEST.KEEP(1)', B1: '=A1#+0' } });
    const formats = ['0.00', '0.0'];
    Object.assign(data.sheets[0]!, { formats: { A1: 1, A3: 2 } });
    const { getters } = gridOf({ ...data, formats: { 1: formats[0], 2: formats[1] } }, log).model;
    const shown = (col: number) =>
      [0, 1, 2].map(
        (row) => getters.getEvaluatedCell({ sheetId: 'Sheet1', col, row }).formattedValue,
      );
    expect(shown(0)).toEqual(['10.00', '20.00', '30.0']);
    expect(shown(1)).toEqual(['10.00', '20.00', '30.0']);
  });
});
