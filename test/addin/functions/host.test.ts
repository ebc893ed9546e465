/**
 * The worksheet functions with the host's two globals stood in for: what the platform's
 * documentation says arrives in and may leave a custom function.
 */
import { catalogue } from '../../../addin/functions/catalogue';
import * as functions from '../../../addin/functions/functions';
import { draw } from '../../../src/index';

class HostError extends Error {
  constructor(
    readonly code: string,
    message?: string,
  ) {
    super(message);
  }
}

const associated = new Map<string, unknown>();
const host = globalThis as Record<string, unknown>;

beforeAll(() => {
  host.CustomFunctions = {
    Error: HostError,
    associate: (id: string, run: unknown) => associated.set(id, run),
  };
});
afterAll(() => {
  delete host.CustomFunctions;
});
afterEach(() => {
  delete host.Office;
});

const TABLE = [
  [0, 1],
  [4, 3],
];
const args = (rows: number): [number[][], undefined, number[][], string[][], string[][]] => [
  TABLE,
  undefined,
  [[rows]],
  [['plan-2027']],
  [['a']],
];

async function failure(run: () => unknown): Promise<{ code: string; message: string }> {
  try {
    await run();
  } catch (error) {
    if (error instanceof HostError) return { code: error.code, message: error.message };
    throw error;
  }
  throw new Error('Nothing was thrown.');
}

describe('functions.draw(…) in the host', () => {
  test('gives the engine’s values [law]', async () => {
    expect(await functions.draw(...args(20))).toEqual(
      draw(TABLE, null, [[20]], [['plan-2027']], [['a']], []),
    );
  });

  test('takes null, undefined, an empty array and empty givens as left out [law]', async () => {
    const expected = await functions.draw(...args(20));
    const [table, , rows, seed, label] = args(20);
    // The host passes null for an omitted argument, whatever the types say.
    const none = null as unknown as undefined;
    expect(await functions.draw(table, none, rows, seed, label, none)).toEqual(expected);
    expect(await functions.draw(table, [], rows, seed, label, [])).toEqual(expected);
    expect(await functions.draw(table, none, rows, seed, label, [none as unknown as []])).toEqual(
      expected,
    );
  });

  test('reads formatted values by their plain value and empty ones as blank [law]', async () => {
    const formatted = [
      [{ type: 'FormattedNumber', basicValue: 0, numberFormat: '0.00' }, 1],
      [{ type: 'Double', basicValue: 4 }, 3],
    ];
    const [, limits, rows, seed, label] = args(20);
    expect(await functions.draw(formatted, limits, rows, seed, label)).toEqual(
      await functions.draw(...args(20)),
    );
    const blankLimits = [[{ type: 'Empty', basicValue: '' }, 4]];
    expect(await functions.draw(TABLE, blankLimits, rows, seed, label)).toEqual(
      await functions.draw(TABLE, [[null, 4]], rows, seed, label),
    );
  });

  test.each([
    ['an error instance', new HostError('#N/A')],
    ['an error value', { type: 'Error', basicValue: '#N/A', errorType: 'NotAvailable' }],
  ])('gives %s in an argument back as that error [law]', async (_, cell) => {
    const [, limits, rows, seed, label] = args(20);
    const table = [
      [0, 1],
      [4, cell],
    ];
    expect((await failure(() => functions.draw(table, limits, rows, seed, label))).code).toBe(
      '#N/A',
    );
  });

  test('turns wrong input into #VALUE! with the engine’s message [law]', async () => {
    const [table, limits, , seed, label] = args(1);
    let message = '';
    try {
      draw(TABLE, null, [[0]], [['plan-2027']], [['a']], []);
    } catch (error) {
      message = (error as Error).message;
    }
    expect(message).not.toBe('');
    expect(await failure(() => functions.draw(table, limits, [[0]], seed, label))).toEqual({
      code: '#VALUE!',
      message,
    });
  });

  test('refuses more than 200,000 cells on the web, and only there [law]', async () => {
    const onPlatform = (platform: string) => {
      host.Office = { PlatformType: { OfficeOnline: 'OfficeOnline' }, context: { platform } };
    };
    onPlatform('OfficeOnline');
    expect(await functions.draw(...args(200_000))).toHaveLength(200_000);
    expect(await failure(() => functions.draw(...args(200_001)))).toEqual({
      code: '#VALUE!',
      message:
        'Result: 200001 cells are more than the web host takes; ask for at most 200000 cells (rows times columns), or use the desktop.',
    });
    onPlatform('PC');
    expect(await functions.draw(...args(200_001))).toHaveLength(200_001);
  });

  test.each([
    ['acceptance', () => functions.acceptance(...args(20))],
    ['envelope', () => functions.envelope(TABLE)],
  ])('functions.%s leaves no blank or NaN, which the host shows as 0 [law]', async (_, run) => {
    const cells: unknown[] = (await run()).flat();
    expect(cells.length).toBeGreaterThan(0);
    expect(
      cells.filter((cell) => cell === null || cell === undefined || Number.isNaN(cell)),
    ).toEqual([]);
  });
});

describe('register', () => {
  test('ties every name of functions.json to its function [law]', async () => {
    await import('../../../addin/functions/register');
    const byName = Object.entries(functions).map(([name, run]) => [name.toUpperCase(), run]);
    expect([...associated]).toEqual(
      catalogue.map(({ name }) => byName.find(([upper]) => upper === name)),
    );
    expect(associated.get('DRAW')).toBe(functions.draw);
  });
});
