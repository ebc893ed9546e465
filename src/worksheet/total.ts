/** TOTAL: sums over a number of draws that differs from row to row. */
import type { Cell, Range } from '../density/cells';
import { givenUnlessZero } from '../density/cells';
import { drawTotals } from '../draw/total';
import { InputError } from '../errors';
import { evaluator } from '../formula/evaluate';
import type { Tape } from '../formula/tape';
import { shortNumber } from '../numeric/text';
import type { Line } from './numbers';
import { numberLine } from './numbers';
import { readOneInput } from './oneinput';
import { prove } from './proved';
import { readQuantity } from './quantity';

const PLACES = {
  density: 'density (argument 2)',
  limits: 'limits (argument 3)',
  seed: 'seed (argument 5)',
  label: 'label (argument 6)',
  givens: 7,
};
const COUNTS = 'counts (argument 1)';
const EACH = 'each (argument 4)';
/** Draws of one row, and of all together. */
const MOST_OF_A_ROW = 1_000_000;
const MOST_OF_ALL = 100_000_000;

/**
 * For each row of counts so many draws: their total, the largest of them, and the count again.
 * Where there are no draws both are 0. With `each` every draw is first put through that formula.
 * Shapes: a heading row, then counts × 3. Units: those of x or of `each`.
 * Guarantee: draw j of row i depends on shape, seed, label, i and j alone, exact in the sense of src/METHOD.md.
 * @throws {InputError} as EACH does; for counts that are not whole numbers from 0 to MOST_OF_A_ROW or
 * more than MOST_OF_ALL together; where `each` is undefined at a draw.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function total(
  counts: Range | null,
  density: Range | null,
  limits: Range | null,
  each: Range | null,
  seed: Range | null,
  label: Range | null,
  givens: readonly Range[],
): Range {
  const line = readCounts(counts);
  const { family, key } = readOneInput(density, limits, seed, label, givens, PLACES);
  const shape = family.shapes({ values: [], ends: {} })[0]!;
  const formula = givenUnlessZero(each);
  const tape =
    formula &&
    readQuantity(formula, shape, limits, givens, { ...PLACES, quantity: EACH, name: 'Each' }).tape;
  const { drawer } = prove(shape);
  const { totals, largest } = drawTotals(drawer, key, line.numbers, tape && measureBy(tape));
  const { numbers } = line;
  const spilled = new Array<readonly Cell[]>(numbers.length + 1);
  spilled[0] = ['total', 'largest', 'count'];
  for (let i = 0; i < numbers.length; i++) spilled[i + 1] = [totals[i]!, largest[i]!, numbers[i]!];
  return spilled;
}

function readCounts(range: Range | null): Line {
  const expected = `give a whole number from 0 to ${MOST_OF_A_ROW} for each row`;
  const line = numberLine(range, COUNTS, expected);
  let sum = 0;
  line.numbers.forEach((count, i) => {
    if (Math.floor(count) !== count)
      throw new InputError(line.placeOf(i), `${count} is not whole`, expected);
    if (count < 0) throw new InputError(line.placeOf(i), `${count} is negative`, expected);
    if (count > MOST_OF_A_ROW)
      throw new InputError(line.placeOf(i), `${count} is above ${MOST_OF_A_ROW}`, expected);
    sum += count;
  });
  if (sum <= MOST_OF_ALL) return line;
  throw new InputError(
    COUNTS,
    `${sum} draws in all`,
    `give counts that add up to at most ${MOST_OF_ALL}, or total them in parts under labels of their own`,
  );
}

function measureBy(tape: Tape): (x: number, row: number) => number {
  const at = evaluator(tape);
  return (x, row) => {
    const value = at(x);
    if (value - value === 0) return value;
    throw new InputError(
      EACH,
      `it is undefined or has no bound at x = ${shortNumber(x)}, a draw of row ${row + 1}`,
      'give it a value there with IF, or limits that leave the place out',
    );
  };
}
