/** The examples of JCGM 101:2008 with the 10^6 rows that it asks for, by the functions alone and as workbooks (npm run check:long). */
import { prepareLibrary } from '../../addin/page/library';
import { breaches, engineFigures, examples, workbookFigures } from '../published/propagation';

const log = prepareLibrary();

describe('JCGM 101:2008', () => {
  it.each(examples)('$name, 1,000,000 rows, has the exact interval [published]', (example) => {
    const figures = engineFigures(example, 1_000_000);
    const [p, q] = ['P2.5', 'P97.5'].map((item) => figures.get(item)!);
    console.log(`${example.name}: ${p!.join(' ')} and ${q!.join(' ')}`);
    expect(breaches(example, figures)).toEqual([]);
  });

  it.each(examples)('$name, a workbook of 1,000,000 rows, has it too [published]', (example) => {
    expect(breaches(example, workbookFigures(example, 1_000_000, log))).toEqual([]);
  });
});
