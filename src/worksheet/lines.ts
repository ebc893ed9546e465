/** Lines of ACCEPTANCE that shapes of one variable and of several share, and lines of items side by side. */
import type { Cell, Range } from '../density/cells';
import { wilson } from '../evidence/proportion';
import type { Source } from '../formula/compile';
import type { Given, GivenMap } from '../formula/given';

const CONFIDENCE = 0.95;
export const CAUTION =
  'the draws follow the stated shape; they do not make the shape right, and they do not replace licensed or professional judgement';

export type Line = readonly [item: string, value: Cell];

/** The formulas as read. */
export function densityLines(sources: readonly Source[]): readonly Line[] {
  return sources.map(({ text }, i): Line => [
    i === 0 ? 'density' : `density, times`,
    withoutSign(text),
  ]);
}

/** A text that begins with = would be taken for a formula of the sheet. */
function withoutSign(text: string): string {
  return text.trim().replace(/^=\s*/, '');
}

export function givenLines(givens: GivenMap): readonly Line[] {
  return [...givens].map(([name, given]): Line => [`given ${name}`, givenAsRead(given)]);
}

/** A constant itself; of a list or a function what tells whether all of it was read. */
function givenAsRead(given: Given): Cell {
  if (typeof given === 'number') return given;
  if (given.kind === 'function') return `function through ${given.nPoints} points`;
  const { values } = given;
  const nZeros = values.filter((value) => value === 0).length;
  const least = values.reduce((a, b) => Math.min(a, b));
  const most = values.reduce((a, b) => Math.max(a, b));
  const zeros = nZeros === 0 ? '' : `, ${nZeros} of them 0 or blank`;
  return `list of ${values.length} values from ${least} to ${most}${zeros}`;
}

/** How many proposals the rows took, and what that says of the chance to be accepted. */
export function intervalLines(nRows: number, proposals: number): readonly Line[] {
  const { lo, hi } = wilson(nRows, proposals, CONFIDENCE);
  return [
    ['proposals', proposals],
    ['acceptance', nRows / proposals],
    ['acceptance, 95 % interval from', lo],
    ['acceptance, 95 % interval to', hi],
  ];
}

export function shortened(text: string): string {
  return text.length <= 60 ? text : `${text.slice(0, 59)}…`;
}

/** One row for each item of any table, in order; blanks where a table has none of it. All its rows are as long. */
export function joined(
  tables: readonly (readonly (readonly [item: string, ...cells: Cell[]])[])[],
): Range {
  const items: string[] = [];
  for (const lines of tables) {
    let after = -1;
    for (const [item] of lines) {
      const known = items.indexOf(item);
      if (known < 0) items.splice(after + 1, 0, item);
      after = known < 0 ? after + 1 : known;
    }
  }
  const columns = tables.map((lines) => ({
    cells: new Map(lines.map(([item, ...cells]) => [item, cells])),
    blanks: lines[0]!.slice(1).map(() => null),
  }));
  return items.map((item) => [
    item,
    ...columns.flatMap(({ cells, blanks }) => cells.get(item) ?? blanks),
  ]);
}
