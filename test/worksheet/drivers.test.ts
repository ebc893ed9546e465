import type { Cell, Range } from '../../src/index';
import { CellErrorPassed, draw, drivers } from '../../src/index';
import { Z_FALSE_ALARM } from '../draw/statistics';
import { messageOf } from '../message';

const SEED = [['plan-2027']];
const LABELS = [['harvest', 'pressing', 'storage', 'price']];
const N = 4000;
const INPUTS = draw([['1']], [[0, 1]], [[N]], SEED, LABELS, []);
const outputOf = (model: (x: readonly number[]) => number): Range =>
  INPUTS.map((row) => [model(row as number[])]);
const row = (spill: Range, name: string): readonly Cell[] =>
  spill.find(([item]) => item === name)!.slice(1);

describe('drivers', () => {
  const margin = outputOf(
    ([harvest, pressing, storage]) => 3 * harvest! - 2 * pressing! + storage!,
  );
  const spill = drivers([...LABELS, ...INPUTS], [['margin'], ...margin]);

  it('is a row an input, the largest share first, then all together [law]', () => {
    expect(spill[0]).toEqual([
      'input',
      'rank correlation',
      'rank correlation, 95 % interval from',
      'rank correlation, 95 % interval to',
      'share of variance',
      'share of variance, 95 % interval from',
      'share of variance, 95 % interval to',
      'note',
    ]);
    expect(spill.slice(1).map(([name]) => name)).toEqual([
      'harvest',
      'pressing',
      'storage',
      'price',
      'together',
    ]);
    for (const line of spill) expect(line).toHaveLength(8);
  });

  it('holds the exact shares of a linear model in its intervals, signs in the correlations [law]', () => {
    // Equal variances: squared weights over their sum. One seed: three errors more than z(.975).
    [9 / 14, 4 / 14, 1 / 14, 0].forEach((exact, i) => {
      const [, , , share, from, to] = spill[i + 1]!.slice(1) as number[];
      const room = (3 / 1.96) * Math.max(share! - from!, to! - share!);
      expect(from! - room).toBeLessThanOrEqual(exact);
      expect(to! + room).toBeGreaterThanOrEqual(exact);
      expect(to! - from!).toBeLessThan(0.08);
    });
    expect(row(spill, 'harvest')[0]).toBeGreaterThan(0.7);
    expect(row(spill, 'pressing')[0]).toBeLessThan(-0.4);
    expect(Math.abs((row(spill, 'together')[3] as number) - 1)).toBeLessThan(0.05);
    expect(row(spill, 'together')[6]).toBe('what is left may be noise');
    // The product of two centred inputs: neither moves the output alone.
    const joint = drivers(
      INPUTS,
      outputOf(([a, b]) => (a! - 0.5) * (b! - 0.5)),
    );
    expect(row(joint, 'together')[3]).toBeLessThan(0.1);
    expect(row(joint, 'together')[6]).toBe(
      'what is left is what inputs do jointly, or what is not among them',
    );
  });

  it('sees what moves the output without a trend [law]', () => {
    // |x − 1/2| rises and falls: no rank correlation, all of the variance.
    const bent = drivers(
      INPUTS,
      outputOf(([, , , price]) => Math.abs(price! - 0.5)),
    );
    const [rank, , , share] = bent[1]!.slice(1) as number[];
    expect(bent[1]![0]).toBe('column 4');
    // Its variance is 144 E (u − 1/2)² (2|u − 1/2| − 1/2)² / n = 1.2/n.
    expect(Math.abs(rank!)).toBeLessThan(Z_FALSE_ALARM * Math.sqrt(1.2 / N));
    expect(share).toBeGreaterThan(0.99);
  });

  it('does not depend on the order of rows or the unit of the output [law]', () => {
    const turned = drivers(
      [...LABELS, ...[...INPUTS].reverse()],
      [['margin'], ...[...margin].reverse()],
    );
    const scaled = drivers(
      [...LABELS, ...INPUTS],
      margin.map(([x]) => [1e200 * (x as number) - 1e199]),
    );
    for (const other of [turned, scaled]) {
      other.forEach((line, i) =>
        line.forEach((cell, j) => {
          const own = spill[i]![j];
          if (typeof cell === 'number') expect(cell).toBeCloseTo(own as number, 9);
          else expect(cell).toBe(own);
        }),
      );
    }
  });

  it('answers for a constant input, names equal ones, and zeros at the end [law]', () => {
    const inputs = INPUTS.map(([a, b], i) => [a!, 7, a!, i < N - 3 ? b! : 0]);
    const odd = drivers([['harvest', 'presses', 'again', 'storage'], ...inputs], margin);
    expect(row(odd, 'presses')).toEqual([0, 0, 0, 0, 0, 0, '7 in all rows: it moves nothing here']);
    expect(row(odd, 'harvest')[6]).toBe('the same in all rows as again');
    expect(row(odd, 'again')[6]).toBe('the same in all rows as harvest');
    expect(row(odd, 'again').slice(0, 6)).toEqual(row(odd, 'harvest').slice(0, 6));
    expect(row(odd, 'storage')[6]).toBe(
      'the last 3 rows are 0 or blank and count as 0: perhaps more rows were selected than there are',
    );
    expect(row(odd, 'together')[6]).toBe(
      'more than 1: inputs move together, and their shares overlap',
    );
  });

  it('says where one value leaves too few rows to tell [law]', () => {
    const inputs = INPUTS.slice(0, 40).map((_, i) => [i === 5 ? 1 : 0]);
    const spilled = drivers([['strike'], ...inputs], margin.slice(0, 40));
    expect(row(spilled, 'strike').slice(3)).toEqual([
      'too few rows to tell',
      null,
      null,
      'nearly all rows are alike',
    ]);
  });

  it('refuses what it cannot answer, in full words [law]', () => {
    expect(messageOf(() => drivers(INPUTS, margin.slice(1)))).toBe(
      'output (argument 2): 3999 rows for 4000 rows of inputs; give as many, in the same order.',
    );
    expect(messageOf(() => drivers(INPUTS, INPUTS))).toBe(
      'output (argument 2): 4 columns; give one column.',
    );
    expect(
      messageOf(() =>
        drivers(
          INPUTS,
          margin.map(() => [5]),
        ),
      ),
    ).toBe('output (argument 2): all rows are 5; give an output that is not the same in all rows.');
    expect(messageOf(() => drivers(INPUTS.slice(0, 9), margin.slice(0, 9)))).toBe(
      'inputs (argument 1): 9 rows of values; give at least 20.',
    );
    expect(messageOf(() => drivers(null, margin))).toBe(
      'inputs (argument 1): it is missing; give a column of values.',
    );
    expect(
      messageOf(() =>
        drivers(
          [
            ['late', 'x'],
            [1, 2],
            ['frost', 3],
          ],
          margin,
        ),
      ),
    ).toBe('inputs (argument 1), row 3, column 1: "frost" is not a number; give a number.');
    const broken: Range = [[{ error: '#DIV/0!' }], ...margin.slice(1)];
    expect(() => drivers(INPUTS, broken)).toThrow(CellErrorPassed);
    expect(() => drivers(broken, margin)).toThrow(CellErrorPassed);
  });
});
