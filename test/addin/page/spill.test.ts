/** References to whole spills, `A2#`, as corrected for the grid library. */
import { correctSpillReferences } from '../../../addin/page/spill';
import { gridOf, workbookOf } from './grid';

const twoSheets = () =>
  workbookOf({
    Draws: { A1: '3', B2: '=SEQUENCE(A1,1,10,10)', D2: '=SUM(B2#)', E2: '=COUNT(C9#)', C9: '4' },
    Other: { B2: '1', B3: '2', A1: '=SUM(Draws!B2#)', A2: '=COUNT(Draws!$B$2#)' },
  });

describe('correctSpillReferences()', () => {
  // The negative control: should a later version of the library pass this, spill.ts can go.
  test('without correctSpillReferences() a spill on another sheet is read from the wrong cells [pinned]', () => {
    expect(gridOf(twoSheets()).read('Other', 'A1')).toBe(1 + 2);
  });

  test('correctSpillReferences() reads a spill on its own sheet [law]', () => {
    correctSpillReferences();
    const grid = gridOf(twoSheets());
    expect(grid.read('Other', 'A1')).toBe(10 + 20 + 30);
    expect(grid.read('Other', 'A2')).toBe(3);
    expect(grid.read('Draws', 'D2')).toBe(10 + 20 + 30);
  });

  test('correctSpillReferences() follows a spill as it grows and shrinks, down to one cell [law]', () => {
    const grid = gridOf(twoSheets());
    for (const [rows, sum] of [
      ['4', 100],
      ['1', 10],
      ['2', 30],
    ] as const) {
      grid.write('Draws', 'A1', rows);
      expect([grid.read('Draws', 'D2'), grid.read('Other', 'A1')]).toEqual([sum, sum]);
    }
  });

  test('correctSpillReferences() leaves # after a cell that is no formula a bad reference [law]', () => {
    expect(gridOf(twoSheets()).read('Draws', 'E2')).toBe(0);
    const grid = gridOf(workbookOf({ Draws: { C9: '4', E2: '=SUM(C9#)' } }));
    expect(grid.read('Draws', 'E2')).toBe('#REF');
  });

  test('correctSpillReferences() passes on the error of a spill that fails [law]', () => {
    const grid = gridOf(workbookOf({ Draws: { B2: '=1/0' }, Other: { A1: '=SUM(Draws!B2#)' } }));
    expect(grid.read('Other', 'A1')).toBe('#DIV/0!');
  });
});
