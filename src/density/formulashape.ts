/**
 * The shape of a formula, from its lines, limits and givens: in one variable, or in several
 * where the limits name them. Not handled: reading the cells (formulas.ts, limits.ts, givens.ts).
 */
import type { Source } from '../formula/compile';
import type { GivenRanges, NamedValue } from './givens';
import { Givens } from './givens';
import type { FormulaShape, Overrides, SeveralShape } from './kinds';
import type { LimitCells, LineLimits } from './limits';
import { DEFAULT_VARIABLE, readAxes, readLimits, withEnds } from './limits';

/** A formula without limits is drawn over the whole line. */
const UNBOUNDED_LIMITS: LineLimits = { limits: { from: -Infinity, to: Infinity }, lattice: null };

/** The limits of one variable with other ends; those of several stay as they are. */
export function ended(
  variables: readonly LimitCells[],
  { ends }: Overrides,
  where: string,
): readonly LimitCells[] {
  if (variables.length > 1) return variables;
  const cells = withEnds(variables[0] ?? null, ends, where);
  return cells ? [cells] : [];
}

/** All givens by name: the shape's own, those it shares with others, and values in place of them. */
export function namedGivens(
  cells: readonly LimitCells[],
  own: readonly NamedValue[],
  shared: GivenRanges,
  overrides: Overrides,
): Givens {
  const named = new Givens(
    cells.length > 0 ? cells.map(({ variable }) => variable) : [DEFAULT_VARIABLE],
  );
  for (const value of [...own, ...shared.values]) named.add(value);
  for (const value of overrides.values) named.replace(value);
  return named;
}

/** @throws {InputError} for limits that do not fit. */
export function formulaShape(
  sources: readonly Source[],
  cells: readonly LimitCells[],
  named: Givens,
): FormulaShape | SeveralShape {
  const givens = named.map;
  if (cells.length > 1) return { kind: 'several', sources, axes: readAxes(cells, named), givens };
  const [own] = cells;
  return {
    kind: 'formula',
    sources,
    variable: own?.variable ?? DEFAULT_VARIABLE,
    ...(own ? readLimits(own, named) : UNBOUNDED_LIMITS),
    givens,
  };
}
