/** Long calls in the grid, with a Worker of the test that answers when it is told to. */
import { Background, type Helper } from '../../../addin/functions/background';
import { replyOf, type Reply } from '../../../addin/functions/reply';
import { CallLog } from '../../../addin/page/calls';
import { LongCalls, WORKING } from '../../../addin/page/long';
import { makeRoom } from '../../../addin/page/room';
import { registerFunctions } from '../../../addin/page/register';
import { gridOf, workbookOf, type Grid } from './grid';

/** Another number in each test: answers are kept. */
let n = 0;
let ended = 0;
let asked = 0;
let helper: Helper;
const background = new Background(() => {
  helper = {
    onmessage: null,
    onerror: null,
    postMessage: () => void asked++,
    terminate: () => void ended++,
  };
  return helper;
});
let grid: Grid;
const long = new LongCalls(background, (places) => {
  for (const place of places) makeRoom(grid.model, place);
  const cellIds = places.map((place) => grid.model.getters.getCell(place)!.id);
  grid.model.dispatch('EVALUATE_CELLS', { cellIds });
});
const log = new CallLog();
registerFunctions(
  [
    {
      name: 'TEST.PLANS',
      description: 'Gives its density back.',
      parameters: ['density', 'limits'].map((name) => ({
        name,
        description: `${name} of the test`,
        optional: false,
        repeating: false,
      })),
      call: ([density]) => density!,
    },
  ],
  log.note,
  long,
);
jest.mock('../../../addin/functions/long', () => ({ takesLong: () => true }));

/** The Worker answers its task; what waits for that has then happened. */
async function answerWith(reply: Reply): Promise<void> {
  helper.onmessage!.call(helper as Worker, { data: reply } as MessageEvent<Reply>);
  await new Promise((resolve) => setImmediate(resolve));
}

beforeEach(() => {
  long.clear();
  ended = asked = 0;
  n += 10;
  grid = gridOf(
    workbookOf({
      Sheet1: { A1: String(n), B1: '=UNDERCURVE.TEST.PLANS(A1,A1)', C1: '=B1+1', D1: '=A1+1' },
    }),
    log,
  );
});

describe('a long call in the grid', () => {
  test('shows that it is under way, then its answer and what depends on it [law]', async () => {
    expect(['B1', 'C1', 'D1'].map((cell) => grid.read('Sheet1', cell))).toEqual([
      WORKING,
      WORKING,
      n + 1,
    ]);
    expect(grid.message('Sheet1', 'B1')).toBe('#WORKING! The proof is being worked out.');
    await answerWith({ cells: [[41]] });
    expect(['B1', 'C1', 'D1'].map((cell) => grid.read('Sheet1', cell))).toEqual([41, 42, n + 1]);
  });

  test('that is asked again has its answer at once [law]', async () => {
    await answerWith({ cells: [[41]] });
    grid.write('Sheet1', 'B2', '=UNDERCURVE.TEST.PLANS(A1,A1)');
    expect(grid.read('Sheet1', 'B2')).toBe(41);
  });

  test('is dropped when its cell asks for something else [law]', async () => {
    grid.write('Sheet1', 'A1', String(n + 2));
    expect(ended).toBe(1);
    await answerWith({ cells: [[70]] });
    expect(grid.read('Sheet1', 'B1')).toBe(70);
    grid.write('Sheet1', 'A1', String(n));
    expect(grid.read('Sheet1', 'B1')).toBe(WORKING);
  });

  test('goes on when another cell waits for it too [law]', async () => {
    grid.write('Sheet1', 'B2', `=UNDERCURVE.TEST.PLANS(${n},${n})`);
    grid.write('Sheet1', 'A1', String(n + 2));
    expect(ended).toBe(0);
    await answerWith({ cells: [[50]] });
    expect([grid.read('Sheet1', 'B1'), grid.read('Sheet1', 'B2')]).toEqual([WORKING, 50]);
    await answerWith({ cells: [[70]] });
    expect(grid.read('Sheet1', 'B1')).toBe(70);
  });

  test('does not begin while its formula is only tried, as the grid does on Enter [law]', async () => {
    await answerWith({ cells: [[41]] });
    const tried = (formula: string) => grid.model.getters.evaluateFormula('Sheet1', formula);
    expect(asked).toBe(1);
    expect(tried(`=UNDERCURVE.TEST.PLANS(${n},"other")`)).toBe(WORKING);
    expect(tried('=UNDERCURVE.TEST.PLANS(A1,A1)')).toEqual([[41]]);
    expect(asked).toBe(1);
  });

  test('has room for its answer beyond the end of the sheet [law]', async () => {
    const { getters } = grid.model;
    const [rows, columns] = [getters.getNumberRows('Sheet1'), getters.getNumberCols('Sheet1')];
    const cells = Array.from({ length: rows + 5 }, (_, i) =>
      Array.from({ length: columns + 2 }, (__, j) => i + j / 100),
    );
    for (const cell of ['C1', 'D1']) grid.write('Sheet1', cell, '');
    await answerWith({ cells });
    expect(grid.readSpill('Sheet1', 'B1')).toEqual(cells);
    expect([getters.getNumberRows('Sheet1'), getters.getNumberCols('Sheet1')]).toEqual([
      rows + 5,
      columns + 3,
    ]);
  });

  test('shows the message of a wrong input [law]', async () => {
    await answerWith(replyOf('DRAW', [null]));
    expect(grid.read('Sheet1', 'B1')).toBe('#VALUE!');
    expect(grid.message('Sheet1', 'C1')).toMatch(/^#VALUE! .+: .+; .+\. \(from Sheet1!B1\)$/);
  });
});
