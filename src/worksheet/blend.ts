/** BLEND: a weighted pool of shapes by shares of area, as a table or as a shape block. */
import { areaUnder, poolOfTables } from '../density/blend';
import type { Cell, Range } from '../density/cells';
import { counted, given } from '../density/cells';
import type { FormulaShape, PlainShape, TableShape } from '../density/kinds';
import { readShapes } from '../density/shape';
import { DEFAULT_VARIABLE } from '../density/limits';
import { InputError } from '../errors';
import { MAX_CHARACTERS } from '../formula/check';
import { nameKey } from '../formula/names';
import { namesIn as namesInText, renamed } from '../formula/rename';
import { powerOfTwo } from '../numeric/float';
import { numberLine } from './numbers';
import { prove } from './proved';

const SHARES = 'shares (argument 1)';
/** Shares may miss 1 by their own rounding. */
const ROUNDING = 1e-9;

interface Part {
  readonly shape: PlainShape;
  readonly share: number;
  readonly where: string;
}

/**
 * A pool of shapes in which each has its share of the area, whatever its heights.
 * Shapes: tables alone give a table, heading row x | height; with a formula among them a
 * shape block of two columns: density, from, to, then the constants.
 * @throws {InputError} when shares do not fit the shapes or do not add up to 1, and as DRAW does for each shape.
 */
export function blend(shares: Range | null, shapes: readonly Range[]): Range {
  const { numbers, placeOf } = numberLine(shares, SHARES, 'give one share for each shape');
  if (numbers.length !== shapes.length) {
    throw new InputError(
      SHARES,
      `${counted(numbers.length, 'share')} for ${counted(shapes.length, 'shape')}`,
      'give one share for each shape',
    );
  }
  const negative = numbers.findIndex((share) => share < 0);
  if (negative >= 0)
    throw new InputError(
      placeOf(negative),
      `${numbers[negative]} is negative`,
      'give shares of 0 or more',
    );
  const sum = numbers.reduce((total, share) => total + share, 0);
  if (!(Math.abs(sum - 1) <= ROUNDING))
    throw new InputError(
      SHARES,
      `they add up to ${sum}`,
      'give shares that add up to 1, such as 0.9 and 0.1',
    );
  const parts = shapes.map((range, i): Part => {
    const where = `shape ${i + 1} (argument ${i + 2})`;
    return { shape: onlyShape(range, where), share: numbers[i]! / sum, where };
  });
  const used = parts.filter(({ share }) => share > 0);
  return used.every(isTable)
    ? [
        ['x', 'height'],
        ...poolOfTables(used.map(({ shape, share }) => ({ polyline: shape.polyline, share }))),
      ]
    : poolOfFormulas(used);
}

function isTable(part: Part): part is Part & { shape: TableShape } {
  return part.shape.kind === 'table';
}

function onlyShape(range: Range, where: string): PlainShape {
  const { shapes } = readShapes(given(range), null, [], {
    density: where,
    limits: where,
    givens: 0,
  });
  if (shapes.length > 1)
    throw new InputError(
      where,
      `${shapes.length} shapes in one range`,
      'give each shape a range of its own',
    );
  if (shapes[0]!.lattice) {
    throw new InputError(
      where,
      'a counted quantity',
      'give continuous shapes; a formula of counted values can add up terms such as 0.3*POISSON.DIST(x,4,FALSE)+0.7*POISSON.DIST(x,9,FALSE)',
    );
  }
  return shapes[0]!;
}

/** A block whose formula is the sum of the shapes' formulas, each × its share over its area. */
function poolOfFormulas(parts: readonly Part[]): Range {
  const names = new Names(parts.flatMap(({ shape }) => namesIn(shape)));
  const from = Math.min(...parts.map(({ shape }) => shape.limits.from));
  const to = Math.max(...parts.map(({ shape }) => shape.limits.to));
  const terms = parts.map(({ shape, share, where }, i) => {
    const area = names.fresh(`area_${i + 1}`, areaOf(shape, where));
    const weight = names.fresh(`share_${i + 1}`, share);
    const text = shape.kind === 'table' ? tableText(shape) : formulaText(shape, names, where);
    return `${weight}/${area}*${withinLimits(text, shape, from, to)}`;
  });
  const density = terms.join('+');
  if (density.length > MAX_CHARACTERS) {
    throw new InputError(
      'BLEND',
      `the formula of the blend has ${density.length} characters`,
      `use shapes that make at most ${MAX_CHARACTERS}: tables with fewer points, or tables alone`,
    );
  }
  return [['density', density], ['from', endCell(from)], ['to', endCell(to)], ...names.rows()];
}

function endCell(end: number): Cell {
  return Number.isFinite(end) ? end : 'unbounded';
}

/** The area under the shape's own heights. */
function areaOf(shape: PlainShape, where: string): number {
  if (shape.kind === 'table') return areaUnder(shape.polyline);
  const { area, envelope } = prove(shape);
  const half = Math.trunc(envelope.exponent / 2);
  const whole =
    Math.abs(half) > 1000 ? 0 : area * powerOfTwo(half) * powerOfTwo(envelope.exponent - half);
  if (whole > 1e-290 && whole < 1e290) return whole;
  throw new InputError(
    where,
    'its area is beyond the numbers that a cell holds',
    'divide its formula by its largest height; heights need no unit',
  );
}

/** The term, 0 outside its shape's own limits where the blend reaches further. */
function withinLimits(text: string, shape: PlainShape, from: number, to: number): string {
  // A table's lines are 0 outside as they stand.
  if (shape.kind === 'table') return text;
  const { limits } = shape;
  const x = DEFAULT_VARIABLE;
  const conditions = [
    ...(limits.from > from ? [`${x}>=${limits.from}`] : []),
    ...(limits.to < to ? [`${x}<=${limits.to}`] : []),
  ];
  if (conditions.length === 0) return text;
  return `IF(${conditions.length === 1 ? conditions[0] : `AND(${conditions.join(',')})`},${text},0)`;
}

function namesIn(shape: PlainShape): readonly string[] {
  return shape.kind === 'table' ? [] : shape.sources.flatMap(({ text }) => namesInText(text));
}

/** The product of the shape's lines, with names that no other shape uses for something else. */
function formulaText(shape: FormulaShape, names: Names, where: string): string {
  const other = new Map<string, string>();
  if (nameKey(shape.variable) !== nameKey(DEFAULT_VARIABLE))
    other.set(nameKey(shape.variable), DEFAULT_VARIABLE);
  for (const [name, value] of shape.givens) {
    if (typeof value !== 'number')
      throw new InputError(
        where,
        `"${name}" is not a constant`,
        'blend shapes whose givens are numbers',
      );
    const used = names.add(name, value);
    if (used !== name) other.set(nameKey(name), used);
  }
  return shape.sources
    .map(({ text, tree }) => {
      const own = renamed(text.trim().replace(/^=\s*/, ''), other);
      return tree.kind === 'lambda' ? `${own}(${DEFAULT_VARIABLE})` : `(${own})`;
    })
    .join('*');
}

/** A table's straight lines as one formula. */
function tableText({ polyline: { x, heights } }: TableShape): string {
  const lines = x.flatMap((to, i) => {
    const from = x[i - 1]!;
    if (i === 0 || !(to > from)) return [];
    const width = to - from;
    return [{ from, to, left: heights[i - 1]! / width, right: heights[i]! / width }];
  });
  const list = (numbers: readonly number[]): string => `{${numbers.join(',')}}`;
  const v = DEFAULT_VARIABLE;
  const starts = list(lines.map(({ from }) => from));
  const ends = list(lines.map(({ to }) => to));
  const left = list(lines.map((line) => line.left));
  const right = list(lines.map((line) => line.right));
  // Both terms are ≥ 0 between the ends, so that no rounding makes the height negative.
  return `SUM((${v}>=${starts})*(${v}<${ends})*(${left}*(${ends}-${v})+${right}*(${v}-${starts})))`;
}

/** The constants of the blend by name; a name that stands for another number gets an ending. */
class Names {
  private readonly values = new Map<string, { readonly name: string; readonly value: number }>();
  private readonly taken: ReadonlySet<string>;

  /** `texts`: every name in the formulas, which no new name may hide behind. */
  constructor(texts: readonly string[]) {
    this.taken = new Set(texts);
  }

  /** A given of a shape: the name under which its value is found. */
  add(name: string, value: number): string {
    const known = this.values.get(nameKey(name));
    if (known === undefined) return this.put(name, value);
    return known.value === value ? known.name : this.fresh(name, value);
  }

  /** A constant under a name of its own, this one if it is free. */
  fresh(name: string, value: number): string {
    for (let k = 1; ; k++) {
      const candidate = k === 1 ? plain(name) : `${plain(name)}_${k}`;
      const key = nameKey(candidate);
      if (!this.taken.has(key) && !this.values.has(key)) return this.put(candidate, value);
    }
  }

  private put(name: string, value: number): string {
    this.values.set(nameKey(name), { name, value });
    return name;
  }

  rows(): readonly (readonly [string, number])[] {
    return [...this.values.values()].map(({ name, value }) => [name, value] as const);
  }
}

/** A cell address without its sheet and signs, as the beginning of a name. */
function plain(name: string): string {
  return name.replace(/^.*!/, '').replace(/[^A-Za-z0-9_]/g, '');
}
