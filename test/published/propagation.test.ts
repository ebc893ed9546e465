/**
 * Examples of JCGM 101:2008 as workbooks, without a page: our functions for the inputs, worksheet
 * arithmetic for the model, SUMMARY for the result. The exact figures have to lie within the
 * error that SUMMARY itself states.
 */
import { prepareLibrary } from '../../addin/page/library';
import { breaches, engineFigures, examples, workbookFigures } from './propagation';

const log = prepareLibrary();

describe('JCGM 101:2008', () => {
  it.each(examples)(
    '$name, a workbook of 100,000 rows, has the exact interval [published]',
    (example) => {
      expect(breaches(example, workbookFigures(example, 100_000, log))).toEqual([]);
    },
  );

  // A normal result of the same standard deviation would have ±1.96 √103; of that the standard
  // deviation tells nothing, and SUMMARY has to.
  it('9.2.4 does not have the interval of a normal result [published]', () => {
    const wide = examples[2]!;
    const reach = 1.959963984540054 * wide.deviation;
    const wrong = breaches({ ...wide, interval: [-reach, reach] }, engineFigures(wide, 20_000));
    expect(wrong.map((breach) => breach.split(':')[0])).toEqual(['P2.5', 'P97.5']);
  });
});
