/**
 * What the message area says: the full text of the selected cell's error, or what
 * the cell shows. Reads a model of the grid library; changes nothing.
 */
import { helpers, type Model } from '@odoo/o-spreadsheet';
import { WORKING } from './long';

export type Position = Parameters<Model['getters']['getEvaluatedCell']>[0];

export interface Message {
  /** The cell's address, e.g. "B8". */
  readonly where: string;
  readonly text: string;
  readonly problem: boolean;
}

/** What the library keeps of an evaluated cell, as far as it matters here. */
interface Shown {
  readonly value: string | number | boolean | null;
  readonly formattedValue: string;
  readonly message?: string;
  /** Where an error arose; it may have been passed on from there. */
  readonly errorOriginPosition?: Position;
}

/** The message of one cell: an error's code and full text, else what is shown there and whence it spills. */
export function messageOf({ getters }: Model, position: Position): Message {
  const cell: Shown = getters.getEvaluatedCell(position);
  const where = addressOf(position);
  if (helpers.isEvaluationError(cell.value)) {
    const origin = cell.errorOriginPosition ?? position;
    const from = samePlace(origin, position) ? '' : ` (from ${sheetAddressOf(getters, origin)})`;
    const problem = cell.value !== WORKING;
    return { where, text: `${cell.value} ${cell.message ?? ''}${from}`, problem };
  }
  const source = getters.getArrayFormulaSpreadingOn(position) ?? position;
  const spilled = samePlace(source, position) ? '' : ` (spills from ${addressOf(source)})`;
  const shown = cell.value === null ? 'empty' : cell.formattedValue;
  return { where, text: `${shown}${spilled}`, problem: false };
}

/** Cells whose own formula fails, in the order of the sheets; cells that merely pass an error on are left out. */
export function problemsIn({ getters }: Model): readonly Position[] {
  return getters
    .getSheetIds()
    .flatMap((sheetId) => getters.getCells(sheetId))
    .map((cell) => getters.getCellPosition(cell.id))
    .filter((position) => {
      const { value, errorOriginPosition: origin = position }: Shown =
        getters.getEvaluatedCell(position);
      const isFailing = helpers.isEvaluationError(value) && value !== WORKING;
      return isFailing && samePlace(origin, position);
    });
}

/** The cell meant by "B8" (on the active sheet) or "Draws!B8"; a range means its first cell. */
export function findPosition({ getters }: Model, text: string): Position | undefined {
  const range = getters.getRangeFromSheetXC(getters.getActiveSheetId(), text.trim());
  if (range.invalidXc !== undefined || range.invalidSheetName !== undefined) return undefined;
  const { sheetId, zone } = range;
  const { right, bottom } = getters.getSheetZone(sheetId);
  if (zone.left > right || zone.top > bottom) return undefined;
  return { sheetId, col: zone.left, row: zone.top };
}

/** "B8" */
function addressOf({ col, row }: Position): string {
  return helpers.toXC(col, row);
}

/** "Draws!B8" */
export function sheetAddressOf(getters: Model['getters'], position: Position): string {
  return `${getters.getSheetName(position.sheetId)}!${addressOf(position)}`;
}

export function samePlace(a: Position, b: Position): boolean {
  return a.sheetId === b.sheetId && a.col === b.col && a.row === b.row;
}
