/** The shape of a block of labelled cells, or of a line of a list, which is read as one. */
import { InputError } from '../errors';
import type { Source } from '../formula/compile';
import type { Block } from './block';
import { isBlankOrZero } from './cells';
import { ended, formulaShape, namedGivens } from './formulashape';
import { readFormula } from './formulas';
import type { GivenRanges, NamedValue } from './givens';
import { checkMethod } from './givens';
import type { FormulaShape, Overrides, SeveralShape } from './kinds';
import type { LimitCells } from './limits';
import { DEFAULT_VARIABLE, UNBOUNDED } from './limits';
import { once } from './once';

/** Sources are read, and limits and givens put together, when they are asked for. */
interface Member {
  readonly sources: () => readonly Source[];
  readonly shape: (overrides: Overrides) => FormulaShape | SeveralShape;
}

/** The constants of a block. */
export function blockValues({ givens }: Block, where: string): readonly NamedValue[] {
  return givens.map(({ name, value }) => ({ name, value, where }));
}

/** The shapes of a block, or of a line of a list, whose place is `where`. */
export function blockMember(
  block: Block,
  where: string,
  limits: readonly LimitCells[],
  shared: GivenRanges,
  isLine = false,
): Member {
  const sources = once(() => {
    const formula = block.words.get('density') ?? null;
    return [readFormula(formula, 'Formula', `${where}, density`)];
  });
  const own = blockValues(block, where);
  const shape = (overrides: Overrides): FormulaShape | SeveralShape => {
    const cells = ended(
      limits.length > 0 ? limits : blockLimits(block, where, isLine),
      overrides,
      where,
    );
    const named = namedGivens(cells, own, shared, overrides);
    const method = block.words.get('method');
    if (method !== undefined) checkMethod(method, `${where}, method`);
    return formulaShape(sources(), cells, named);
  };
  return { sources, shape };
}

function blockLimits({ words }: Block, where: string, isLine: boolean): readonly LimitCells[] {
  const step = words.get('step') ?? null;
  const [from, to] = [words.get('from'), words.get('to')];
  if (from === undefined && to === undefined) {
    if (isBlankOrZero(step)) return [];
    return [{ variable: DEFAULT_VARIABLE, from: UNBOUNDED, to: UNBOUNDED, step, where }];
  }
  for (const [name, cell] of [
    ['from', from],
    ['to', to],
  ] as const) {
    if (cell === undefined)
      throw new InputError(
        where,
        isLine ? `the list has no column "${name}"` : `the block has no row "${name}"`,
        `add a ${isLine ? 'column' : 'row'} ${name} and its value`,
      );
  }
  return [{ variable: DEFAULT_VARIABLE, from: from!, to: to!, step, where }];
}
