/**
 * `window.undercurveWorkbook`: reads and edits the workbook from outside the canvas
 * grid, for the browser tests and the curious. Addresses are those of the sheet, "B8".
 */
import type { Model } from '@odoo/o-spreadsheet';
import type { CallLog } from './calls';
import { findPosition, messageOf, type Position, sheetAddressOf } from './message';

export interface WorkbookHook {
  /** What the cell's value is; null when empty, the code when an error. */
  read(sheet: string, address: string): string | number | boolean | null;
  /** As `read`, for every cell of the spill that starts here, row by row. */
  readSpill(sheet: string, address: string): (string | number | boolean | null)[][];
  /** Types the text into the cell. */
  write(sheet: string, address: string, text: string): void;
  /** The full text of what the message area says about the cell. */
  message(sheet: string, address: string): string;
  /** How often each cell has called a function of ours, by address: "Draws!B8". */
  calls(): Record<string, number>;
}

export function hookFor(model: Model, log: CallLog): WorkbookHook {
  const { getters } = model;
  const at = (sheet: string, address: string): Position => {
    const position = findPosition(model, `'${sheet}'!${address}`);
    if (position === undefined) throw new Error(`Cell: no "${sheet}!${address}" in this workbook.`);
    return position;
  };
  const valueAt = (position: Position) => getters.getEvaluatedCell(position).value;
  return {
    read: (sheet, address) => valueAt(at(sheet, address)),
    readSpill(sheet, address) {
      const { sheetId, col, row } = at(sheet, address);
      const zone = getters.getSpreadZone({ sheetId, col, row });
      const [right, bottom] = zone ? [zone.right, zone.bottom] : [col, row];
      return Array.from({ length: bottom - row + 1 }, (_, i) =>
        Array.from({ length: right - col + 1 }, (__, j) =>
          valueAt({ sheetId, col: col + j, row: row + i }),
        ),
      );
    },
    write(sheet, address, text) {
      model.dispatch('UPDATE_CELL', { ...at(sheet, address), content: text });
    },
    message: (sheet, address) => messageOf(model, at(sheet, address)).text,
    calls: () =>
      Object.fromEntries(
        log
          .all()
          .filter(({ place }) => getters.tryGetSheet(place.sheetId) !== undefined)
          .map(({ place, calls }) => [sheetAddressOf(getters, place), calls]),
      ),
  };
}
