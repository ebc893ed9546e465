/**
 * The sample workbook as data from which the grid library builds a model:
 * an orchard co-operative that plans its pressing season. All figures invented.
 */
import { acceptanceSheet } from './acceptance';
import { answersSheet } from './answers';
import { decisionSheet } from './decision';
import { drawsSheet } from './draws';
import { inputsSheet } from './inputs';
import { judgementSheet } from './judgement';
import { type Look, styleOf } from './looks';
import { plansSheet } from './plans';
import { seasonSheet } from './season';
import { shapesSheet } from './shapes';

/** The library's data format in which the sample is written; it upgrades older ones itself. */
const DATA_VERSION = '19.3.2';

export function sampleWorkbook(): object {
  const looks: Look[] = [];
  const formats: string[] = [];
  const sheets = [
    shapesSheet(),
    drawsSheet(),
    acceptanceSheet(),
    judgementSheet(),
    inputsSheet(),
    answersSheet(),
    plansSheet(),
    seasonSheet(),
    decisionSheet(),
  ].map((sheet) =>
    sheet.build(
      (look) => numberIn(looks, look),
      (format) => numberIn(formats, format),
    ),
  );
  return {
    version: DATA_VERSION,
    sheets,
    styles: Object.fromEntries(looks.map((look, i) => [i + 1, styleOf(look)])),
    formats: Object.fromEntries(formats.map((format, i) => [i + 1, format])),
    borders: {},
    pivots: {},
    pivotNextId: 1,
    revisionId: 'START_REVISION',
    uniqueFigureIds: true,
    customTableStyles: {},
    namedRanges: {},
  };
}

/** The number (from 1) of an entry in a register, entered if new. */
function numberIn<T>(register: T[], entry: T): number {
  const at = register.indexOf(entry);
  return at >= 0 ? at + 1 : register.push(entry);
}
