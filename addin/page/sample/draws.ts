/**
 * Sheet "Draws": one scenario a row, one column an uncertain quantity, with the
 * seed, the number of rows and the labels in cells, and a few figures of each column.
 */
import { countsChart } from './charts';
import { APPLES, DOWNTIME, ROWS } from './quantities';
import { SheetPlan } from './sheet';

const ROWS_BEFORE_DRAWS = 7;
/** The longest column of draws that fits the sheet; longer ones need rows added to it. */
const MOST_ROWS = 10000;
const SHEET_ROWS = ROWS_BEFORE_DRAWS + MOST_ROWS;

const FIGURES: readonly (readonly [string, (draws: string) => string])[] = [
  ['mean', (draws) => `=AVERAGE(${draws})`],
  ['lowest', (draws) => `=MIN(${draws})`],
  ['1 in 10 below', (draws) => `=PERCENTILE.INC(${draws},0.1)`],
  ['half below', (draws) => `=PERCENTILE.INC(${draws},0.5)`],
  ['9 in 10 below', (draws) => `=PERCENTILE.INC(${draws},0.9)`],
  ['highest', (draws) => `=MAX(${draws})`],
];

const CHART = { col: 8, shift: 0, width: 380, height: 222 };

export function drawsSheet(): SheetPlan {
  return new SheetPlan('Draws', {
    columns: 13,
    rows: SHEET_ROWS,
    frozenRows: ROWS_BEFORE_DRAWS,
  })
    .columnWidths([70, 130, 130, 40, 130, 120, 120, 30])
    .put('A1', 'Draws: one scenario a row', 'title')
    .put(
      'A2',
      'A row keeps its draw whatever the number of rows. Different labels make independent columns.',
      'note',
    )
    .put('A3', 'seed', 'word')
    .put('B3', 'plan-2027', 'input')
    .put('C3', 'any text; another seed gives another, equally good set', 'unit')
    .put('A4', 'rows', 'word')
    .put('B4', 2000, 'input')
    .put('C4', `1 to ${MOST_ROWS.toLocaleString('en')} on this sheet`, 'unit')
    .putRows('A', 6, [
      ['row', 'apples', `=${DOWNTIME.label}`],
      ['', APPLES.unit, DOWNTIME.unit],
      [
        `=SEQUENCE(${ROWS})`,
        `=UNDERCURVE.DRAW(${APPLES.drawing})`,
        `=UNDERCURVE.DRAW(${DOWNTIME.drawing})`,
      ],
    ])
    .look('A6:C6', 'head')
    .look('B6', 'input')
    .look('A7:C7', 'unit')
    .format('B8:C8', '0.00')
    .putRows('E', 6, [
      ['of the draws', `=${APPLES.label}`, `=${DOWNTIME.label}`],
      ['', APPLES.unit, DOWNTIME.unit],
      ...FIGURES.map(([name, formula]) => [
        name,
        formula(`${APPLES.draws}#`),
        formula(`${DOWNTIME.draws}#`),
      ]),
    ])
    .look('E6:G6', 'head')
    .look('F7:G7', 'unit')
    .look('E8:E13', 'word')
    .format('F8:G13', '0.00')
    .chart({ ...CHART, id: 'apples-drawn', row: 7, data: countsChart(APPLES) })
    .chart({ ...CHART, id: 'downtime-drawn', row: 17, data: countsChart(DOWNTIME) });
}
