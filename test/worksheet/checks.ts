/** What the spill of CHECK is read with. */
import type { Cell, Range } from '../../src/index';

/** The text of a cell; empty where it holds none. */
export const text = (cell: Cell): string => (typeof cell === 'string' ? cell : '');

/** The row of the first item that begins so, without its name. */
export function line(spill: Range, item: string): readonly Cell[] {
  const row = spill.find(([name]) => text(name!).startsWith(item));
  if (row === undefined) throw new Error(`no row ${item}`);
  return row.slice(1);
}

/** The overall line in words. */
export function overall(spill: Range): string {
  return text(spill[1]![1]!);
}
