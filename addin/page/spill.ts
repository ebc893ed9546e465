/**
 * `Draws!B8#`, the whole spill of a formula.
 *
 * Puts two things right in the grid library's own reading of `#` (19.3.7,
 * SPILLED.RANGE): it looks for the spill on the sheet of the formula that asks, so
 * that a reference to another sheet silently reads the wrong cells; and it calls a
 * formula that gives one cell a bad reference, so that one row of draws breaks what
 * works with two. Everything else stays the library's.
 */
import { helpers, registries } from '@odoo/o-spreadsheet';

type Compute = ReturnType<typeof registries.functionRegistry.get>['compute'];
type Argument = Parameters<Compute>[0];

/** Replaces the library's reading of `#`; once per program, before the first model. */
export function correctSpillReferences(): void {
  const original = registries.functionRegistry.get('SPILLED.RANGE');
  registries.functionRegistry.replace('SPILLED.RANGE', {
    ...original,
    compute(reference) {
      const position = positionOf(reference);
      if (reference === undefined || position === undefined) {
        return original.compute.call(this, reference);
      }
      const { getters } = this;
      if (getters.getSpreadZone(position) === undefined && getters.getCell(position)?.isFormula) {
        return reference;
      }
      const there = Object.assign(Object.create(this) as typeof this, {
        __originSheetId: position.sheetId,
      });
      return original.compute.call(there, reference);
    },
  });
}

/** The place of the cell referred to; none for values and for ranges of several cells. */
function positionOf(reference: Argument) {
  if (!helpers.isMatrix(reference)) return reference?.position;
  return reference.length === 1 && reference[0]?.length === 1
    ? reference[0][0]?.position
    : undefined;
}
