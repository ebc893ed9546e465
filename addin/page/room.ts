/**
 * Room for an answer that comes later. Where a formula spills past the end of its sheet the
 * grid adds what is missing while the formula is entered; an answer that is only then being
 * worked out has to do the same when it is there.
 */
import { helpers, type Model } from '@odoo/o-spreadsheet';
import type { CallPlace } from './register';

/** Adds the rows and columns that the formula at a place needs beyond the end of its sheet. */
export function makeRoom(model: Model, { sheetId, col, row }: CallPlace): void {
  const { getters } = model;
  const formula = getters.getCellText({ sheetId, col, row }, { showFormula: true });
  if (!formula.startsWith('=')) return;
  const value: unknown = getters.evaluateFormula(sheetId, formula);
  if (!helpers.isMatrix(value)) return;
  add('COL', getters.getNumberCols(sheetId), col + value.length);
  add('ROW', getters.getNumberRows(sheetId), row + value[0]!.length);

  function add(dimension: 'COL' | 'ROW', present: number, wanted: number): void {
    if (wanted <= present) return;
    model.dispatch('ADD_COLUMNS_ROWS', {
      sheetId,
      sheetName: getters.getSheetName(sheetId),
      dimension,
      base: present - 1,
      position: 'after',
      quantity: wanted - present,
    });
  }
}
