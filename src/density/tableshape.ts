/** The shapes of a table of points, one a column of heights, within limits. */
import { InputError } from '../errors';
import type { Givens } from './givens';
import type { Places, TableShape } from './kinds';
import type { Lattice } from './lattice';
import { latticeOf, within } from './lattice';
import type { LimitCells, Limits } from './limits';
import { readLimits } from './limits';
import type { PointTable } from './table';
import { truncate } from './table';

/** @throws {InputError} for limits between which the table is 0 or has no point. */
export function tableShapes(
  table: PointTable,
  cells: readonly LimitCells[],
  named: Givens,
  places: Places,
): readonly TableShape[] {
  const { x, columns } = table;
  const own = { from: x[0]!, to: x.at(-1)! };
  const read = cells[0] ? readLimits(cells[0], named) : { limits: own, lattice: null };
  const wanted = read.limits;
  const lattice = read.lattice && cells[0] ? tableLattice(read.lattice, own, cells[0].where) : null;
  const limits = { from: Math.max(wanted.from, own.from), to: Math.min(wanted.to, own.to) };
  return columns.map(({ heading, heights }) => {
    const polyline = truncate(x, heights, wanted, places.limits);
    return { kind: 'table', heading, polyline, limits, lattice };
  });
}

/** The points of a table, counted from its own end on a side without a limit. */
function tableLattice(lattice: Lattice, { from, to }: Limits, where: string): Lattice {
  const { first, last, at, step } = lattice;
  if (Number.isFinite(first) || Number.isFinite(last)) {
    const inside = within(lattice, from, to);
    if (inside.first <= inside.last) return inside;
    throw new InputError(
      where,
      `no point with step ${step} lies between the ends of the table, ${from} and ${to}`,
      `start the limits elsewhere than at ${at(0)}, or give a smaller step`,
    );
  }
  return latticeOf(from, to, step, where);
}
