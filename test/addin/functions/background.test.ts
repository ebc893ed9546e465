/** Calls in a Worker, with a Worker of the test that answers when it is told to. */
import { Background, type Helper, type Task } from '../../../addin/functions/background';
import { takesLong } from '../../../addin/functions/long';
import { cellsOf, replyOf, type Arguments, type Reply } from '../../../addin/functions/reply';
import { CellErrorPassed, InputError, type Range } from '../../../src/index';
import { messageOf } from '../../message';

class TestHelper implements Helper {
  onmessage: Helper['onmessage'] = null;
  onerror: Helper['onerror'] = null;
  readonly tasks: Task[] = [];
  isEnded = false;

  postMessage(task: Task): void {
    this.tasks.push(task);
  }
  terminate(): void {
    this.isEnded = true;
  }
  answer(reply: Reply): void {
    this.onmessage!.call(this as unknown as Worker, { data: reply } as MessageEvent<Reply>);
  }
  fail(): void {
    this.onerror!.call(this as unknown as Worker, {} as ErrorEvent);
  }
}

function backgroundOfTest() {
  const helpers: TestHelper[] = [];
  const background = new Background(() => {
    helpers.push(new TestHelper());
    return helpers.at(-1)!;
  });
  return { background, helpers };
}

const TABLE = [
  [0, 1],
  [4, 3],
];
const DRAW: Arguments = [TABLE, null, [[3]], [['plan-2027']], [['a']]];

describe('Background.call(name, args)', () => {
  test('gives the Worker one task at a time, in order [law]', async () => {
    const { background, helpers } = backgroundOfTest();
    const calls = ['A', 'B'].map((name) => background.call(name, []));
    expect(helpers).toHaveLength(1);
    expect(helpers[0]!.tasks).toEqual([{ name: 'A', args: [] }]);
    helpers[0]!.answer({ cells: [[1]] });
    expect(helpers[0]!.tasks.map(({ name }) => name)).toEqual(['A', 'B']);
    helpers[0]!.answer({ cells: [[2]] });
    expect(await Promise.all(calls.map(({ reply }) => reply))).toEqual([
      { cells: [[1]] },
      { cells: [[2]] },
    ]);
  });

  test('ends the Worker of a cancelled call and goes on with the next in a new one [law]', async () => {
    const { background, helpers } = backgroundOfTest();
    const [first, second, third] = ['A', 'B', 'C'].map((name) => background.call(name, []));
    first!.cancel();
    first!.cancel();
    expect(helpers.map(({ isEnded }) => isEnded)).toEqual([true, false]);
    third!.cancel();
    expect(helpers[1]!.isEnded).toBe(false);
    helpers[1]!.answer({ cells: [[2]] });
    expect(await second!.reply).toEqual({ cells: [[2]] });
    expect(helpers[1]!.tasks.map(({ name }) => name)).toEqual(['B']);
  });

  test('answers without the Worker when that breaks [law]', async () => {
    const { background, helpers } = backgroundOfTest();
    const call = background.call('DRAW', DRAW);
    helpers[0]!.fail();
    expect(await call.reply).toEqual(replyOf('DRAW', DRAW));
    expect(helpers[0]!.isEnded).toBe(true);
  });
});

describe('replyOf(name, args)', () => {
  test('passes cells and every kind of failure through plain data [law]', () => {
    const passed = (reply: Reply): Reply => JSON.parse(JSON.stringify(reply)) as Reply;
    expect(cellsOf(passed(replyOf('DRAW', DRAW)))).toHaveLength(3);
    const wrong = passed(replyOf('DRAW', [TABLE, null, [[0]], [['plan-2027']], [['a']]]));
    expect(() => cellsOf(wrong)).toThrow(InputError);
    expect(messageOf(() => cellsOf(wrong))).toBe(
      'rows (argument 3): 0 is below 1; give a whole number from 1 to 1048575.',
    );
    const error = passed(replyOf('DRAW', [[[{ error: '#N/A' }]]]));
    expect(() => cellsOf(error)).toThrow(CellErrorPassed);
    expect(() => cellsOf(passed(replyOf('NONE', [])))).toThrow('bug: NONE is not in the catalogue');
  });
});

describe('takesLong(name, args)', () => {
  const shares = (n: number): Range => Array.from({ length: n }, (_, i) => [i / n]);
  const lines = (different: number): Range => [
    ['m'],
    ...Array.from({ length: 5000 }, (_, i) => [i % different]),
  ];
  const PLANS = [
    ['early', 0, 90],
    ['late', 0, 90],
  ];
  test.each<[string, string, Arguments, boolean]>([
    ['one variable', 'DRAW', [[['EXP(-x)']], [[0, 5]]], false],
    ['one named variable', 'DRAW', [[['EXP(-q)']], [['q', 0, 5]]], false],
    [
      'one named variable below a heading',
      'DRAW',
      [
        [['EXP(-q)']],
        [
          ['name', 'from', 'to'],
          ['q', 0, 5],
        ],
      ],
      false,
    ],
    ['a table', 'DRAW', [TABLE], false],
    ['two variables', 'DRAW', [[['early*late>=400']], PLANS], true],
    ['two variables of EXPECT', 'EXPECT', [[['early*late>=400']], PLANS, [['early']]], true],
    ['a formula as long as a page', 'ENVELOPE', [[[`EXP(-x)${'+x*0'.repeat(200)}`]]], true],
    ['a function without limits', 'PICK', [PLANS, PLANS], false],
    ['a few counted values', 'DRAW', [[['1']], [['x', 0, 1000, 1]]], false],
    ['many counted values', 'DRAW', [[['1']], [['x', 0, 1000, 0.01]]], true],
    ['a total of a few draws', 'TOTAL', [[[500], [400]], TABLE], false],
    ['a total of millions of draws', 'TOTAL', [[[1e6], [1e6]], TABLE], true],
    ['a few quantiles', 'QUANTILE', [TABLE, null, shares(500)], false],
    ['thousands of quantiles', 'QUANTILE', [TABLE, null, shares(5000)], true],
    ['thousands of shares', 'BELOW', [TABLE, null, shares(5000)], true],
    ['one share', 'ABOVE', [TABLE, null, [[3]]], false],
    [
      'thousands of lines, few of them different',
      'EACH',
      [TABLE, null, null, null, lines(9)],
      false,
    ],
    ['thousands of different lines', 'EACH', [TABLE, null, null, null, lines(5000)], true],
  ])('of %s [law]', (_, name, args, expected) => {
    expect(takesLong(name, args)).toBe(expected);
  });
});
