/** EACH: one draw a line of conditions, such as days in store given the harvest of that row. */
import type { Cell, Range } from '../density/cells';
import { given, isBlankOrZero, isText, passErrors, quoted, sizeOf } from '../density/cells';
import type { Overrides, PlainShape } from '../density/kinds';
import type { Family } from '../density/shape';
import { inLine } from '../density/shapelist';
import { drawEach } from '../draw/each';
import type { RowsOfOne } from '../draw/each';
import { InputError } from '../errors';
import { nameKey } from '../formula/names';
import { checkName, endNamed, readOneInput } from './oneinput';
import { drawerOf, prove } from './proved';

const PLACES = {
  density: 'density (argument 1)',
  limits: 'limits (argument 2)',
  seed: 'seed (argument 3)',
  label: 'label (argument 4)',
  givens: 6,
};
const LINES = 'lines (argument 5)';
const FORM = 'give a heading row of names and a line of values for each draw';
/** Each takes a proof of its own. */
export const MAX_DIFFERENT = 20_000;
/** So many proofs are kept for the next call, and shared with DRAW. */
const MAX_KEPT = 100;

/**
 * One draw for each line, under the values that the line gives to names of givens, `from` and `to`.
 * Shapes: lines × 1, bare values. Guarantee: line i is row i of DRAW with the line's values, bit for bit.
 * @throws {InputError} as DRAW does, naming the line; for a heading that is no given, no name of the
 * formula and no end of the limits; for more than MAX_DIFFERENT different lines.
 * @throws {CellErrorPassed} when a cell holds an error value.
 */
export function each(
  density: Range | null,
  limits: Range | null,
  seed: Range | null,
  label: Range | null,
  lines: Range | null,
  givens: readonly Range[],
): Range {
  const { family, key } = readOneInput(density, limits, seed, label, givens, PLACES);
  const { names, body } = readLines(given(lines), family);
  const groups = groupEqual(body, names);
  const isKept = groups.length <= MAX_KEPT;
  const drawn = groups.map(({ cells, rows }): RowsOfOne => {
    const where = `${LINES}, row ${rows[0]! + 1}`;
    return {
      rows,
      drawer: () =>
        inLine(where, () => {
          const shape = shapeOf(family, names, cells, where);
          return isKept ? prove(shape).drawer : drawerOf(shape);
        }),
    };
  });
  return Array.from(drawEach(drawn, key, body.length), (value) => [value]);
}

interface Name {
  readonly name: string;
  readonly column: number;
}

function readLines(
  range: Range | null,
  family: Family,
): { readonly names: readonly Name[]; readonly body: Range } {
  if (range === null) throw new InputError(LINES, 'they are missing', FORM);
  passErrors(range);
  const [heading, ...body] = range;
  if (body.length === 0) throw new InputError(LINES, sizeOf(range), FORM);
  const seen = new Set<string>();
  const names = heading!.flatMap((name, column): Name[] => {
    if (isBlankOrZero(name) && body.every((row) => isBlankOrZero(row[column]!))) return [];
    const where = `${LINES}, column ${column + 1}`;
    if (!isText(name)) {
      throw new InputError(
        where,
        `${quoted(name)} is not a name`,
        'write the name of a given, from or to above the values',
      );
    }
    checkName(name, family, where);
    const key = nameKey(name.trim());
    if (seen.has(key))
      throw new InputError(where, `${quoted(name)} stands twice`, 'keep one of the two');
    seen.add(key);
    return [{ name, column }];
  });
  if (names.length === 0) throw new InputError(LINES, 'there is no name', FORM);
  return { names, body };
}

/** Lines with the same values and their rows, in the order in which they first stand. */
function groupEqual(
  body: Range,
  names: readonly Name[],
): readonly { readonly cells: readonly Cell[]; readonly rows: number[] }[] {
  const groups = new Map<string, { readonly cells: readonly Cell[]; readonly rows: number[] }>();
  body.forEach((line, i) => {
    // A blank is 0, as everywhere: some hosts hand it over as 0.
    const cells = names.map(({ column }) => line[column] ?? 0);
    const text = JSON.stringify(cells);
    const known = groups.get(text);
    if (known) known.rows.push(i + 1);
    else if (groups.size < MAX_DIFFERENT) groups.set(text, { cells, rows: [i + 1] });
    else {
      throw new InputError(
        `${LINES}, row ${i + 2}`,
        `more than ${MAX_DIFFERENT} different lines`,
        `give at most ${MAX_DIFFERENT} different ones (equal lines count once), or round their values`,
      );
    }
  });
  return [...groups.values()];
}

function shapeOf(
  family: Family,
  names: readonly Name[],
  cells: readonly Cell[],
  where: string,
): PlainShape {
  const values: { name: string; value: Cell; where: string }[] = [];
  const ends: Record<string, { cell: Cell; where: string }> = {};
  names.forEach(({ name }, j) => {
    const end = endNamed(name);
    if (end === null) values.push({ name, value: cells[j]!, where });
    else ends[end] = { cell: cells[j]!, where: `${where}, ${end}` };
  });
  const overrides: Overrides = { values, ends };
  return family.shapes(overrides)[0]!;
}
