/** A workbook without a page, for the tests: the grid library's model read and written by address. */
import { Model } from '@odoo/o-spreadsheet';
import { CallLog } from '../../../addin/page/calls';
import { hookFor, type WorkbookHook } from '../../../addin/page/hook';
import type { Range } from '../../../src/index';

export interface Grid extends WorkbookHook {
  readonly model: Model;
  /** The cells that called one of our functions since the last time this was asked, sorted. */
  recentCalls(): string[];
}

/** Builds the model; the library reports its times through console.debug, which is silenced. */
export function gridOf(data: object, log = new CallLog()): Grid {
  jest.spyOn(console, 'debug').mockImplementation(() => undefined);
  log.clear();
  const model = new Model(data);
  const hook = hookFor(model, log);
  let before = hook.calls();
  return {
    ...hook,
    model,
    recentCalls() {
      const now = hook.calls();
      const recent = Object.keys(now).filter((cell) => now[cell] !== before[cell]);
      before = now;
      return recent.sort();
    },
  };
}

/** A workbook with these cells on sheets of these names. */
export function workbookOf(sheets: Readonly<Record<string, Readonly<Record<string, string>>>>) {
  return {
    sheets: Object.entries(sheets).map(([name, cells]) => ({
      id: name,
      name,
      colNumber: 12,
      rowNumber: 40,
      cells,
    })),
  };
}

/** A rectangle of cells, as the functions get it. */
export function rectangle(
  grid: Grid,
  sheet: string,
  columns: readonly string[],
  first: number,
  last: number,
): Range {
  return Array.from({ length: last - first + 1 }, (_, i) =>
    columns.map((each) => grid.read(sheet, `${each}${first + i}`)),
  );
}

/** The first column of a spill, as numbers. */
export function column(grid: Grid, sheet: string, address: string): number[] {
  return grid.readSpill(sheet, address).map(([cell]) => Number(cell));
}

export const one = (value: string | number): Range => [[value]];
