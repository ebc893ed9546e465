/** CASES: a what-if table, one column of draws a case, its rows paired. */
import type { Cell, Range } from '../density/cells';
import { given, isBlankOrZero, isText, passErrors, quoted, sizeOf } from '../density/cells';
import type { Overrides, PlainShape } from '../density/kinds';
import type { Family } from '../density/shape';
import { inLine } from '../density/shapelist';
import { InputError } from '../errors';
import { nameKey } from '../formula/names';
import { argumentOr } from './keys';
import { checkName, endNamed, readOneInput } from './oneinput';
import { drawColumn, prove } from './proved';
import { readRows } from './rows';

const PLACES = {
  density: 'density (argument 1)',
  limits: 'limits (argument 2)',
  rows: 'rows (argument 3)',
  seed: 'seed (argument 4)',
  label: 'label (argument 5)',
  givens: 7,
};
const CASES = 'cases (argument 6)';
const FORM = 'give a heading row with the name of each case, then a row of a name and its values';

/**
 * Draws of one input under several cases: row i of every column has the same random numbers.
 * Shapes: a heading row of case names, then rows × cases.
 * Guarantee: a column equals DRAW with that case's values, bit for bit.
 * @throws {InputError} as DRAW does, naming the case; for several labels or shapes; for a name in
 * `cases` that is no given, no name of the formula and no end of the limits.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function cases(
  density: Range | null,
  limits: Range | null,
  rows: Range | null,
  seed: Range | null,
  label: Range | null,
  cases: Range | null,
  givens: readonly Range[],
): Range {
  const { family, key } = readOneInput(density, limits, seed, label, givens, PLACES);
  const wanted = argumentOr(rows, family, 'rows', PLACES) ?? { range: null, where: PLACES.rows };
  const { firstRow, nRows } = readRows(wanted);
  const all = readCases(given(cases), family);
  // Every case is proved before any is drawn.
  const proofs = all.map(({ shape, where }) => inLine(where, () => prove(shape)));
  const columns = proofs.map((proof) => drawColumn(proof, key, firstRow, nRows).values);
  return [
    all.map(({ name }) => name),
    ...Array.from({ length: nRows }, (_, i) => columns.map((values) => values[i]!)),
  ];
}

interface Case {
  readonly name: Cell;
  readonly shape: PlainShape;
  readonly where: string;
}

function readCases(range: Range | null, family: Family): readonly Case[] {
  if (range === null) throw new InputError(CASES, 'they are missing', FORM);
  passErrors(range);
  const [heading, ...body] = range;
  if (range[0]!.length < 2 || body.length === 0) throw new InputError(CASES, sizeOf(range), FORM);
  const rows = body.flatMap((cells, i) => {
    if (cells.every(isBlankOrZero)) return [];
    const name = cells[0]!;
    const where = `${CASES}, row ${i + 2}`;
    if (!isText(name)) {
      throw new InputError(
        where,
        `${quoted(name)} is not a name`,
        'write the name of a given, from or to before the values',
      );
    }
    checkName(name, family, where);
    return [{ name, cells, row: i + 2, where }];
  });
  refuseTwice(rows, (name) => nameKey(name.trim()));
  const columns = heading!.flatMap((cell, j) => {
    if (j === 0 || range.every((row) => isBlankOrZero(row[j]!))) return [];
    if (isBlankOrZero(cell)) {
      throw new InputError(
        `${CASES}, column ${j + 1}`,
        'the case has no name',
        'write a text or a number other than 0 above its values',
      );
    }
    return [{ name: cell, j, where: `${CASES}, column ${j + 1}` }];
  });
  if (columns.length === 0) throw new InputError(CASES, 'there is no case', FORM);
  refuseTwice(columns, (name) =>
    typeof name === 'object' ? '' : String(name).trim().toLowerCase(),
  );
  return columns.map(({ name, j, where }) => {
    const place = `${where} ${quoted(name)}`;
    return { name, where: place, shape: shapeOf(family, rows, j, place) };
  });
}

interface ValueRow {
  readonly name: string;
  readonly cells: readonly Cell[];
  readonly row: number;
}

function shapeOf(family: Family, rows: readonly ValueRow[], j: number, where: string): PlainShape {
  const placed = rows.map(({ name, cells, row }) => ({
    name,
    end: endNamed(name),
    value: cells[j]!,
    where: `${where}, row ${row}`,
  }));
  const overrides: Overrides = {
    values: placed.filter(({ end }) => end === null),
    ends: Object.fromEntries(
      placed.flatMap(({ end, value, where }) =>
        end === null ? [] : [[end, { cell: value, where: `${where}, ${end}` }]],
      ),
    ),
  };
  return inLine(where, () => family.shapes(overrides)[0]!);
}

function refuseTwice<T extends Cell>(
  names: readonly { readonly name: T; readonly where: string }[],
  keyOf: (name: T) => string,
): void {
  const seen = new Set<string>();
  for (const { name, where } of names) {
    if (seen.has(keyOf(name)))
      throw new InputError(where, `${quoted(name)} stands twice`, 'keep one of the two');
    seen.add(keyOf(name));
  }
}
