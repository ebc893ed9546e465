/**
 * Sheet "Shapes": what is not known, stated as numbers. A table of points for the
 * apples of a day, a shape block for the press's downtime. All figures invented.
 */
import { densityChart, pointsChart } from './charts';
import { APPLES, DOWNTIME, ROWS, SEED } from './quantities';
import { SheetPlan } from './sheet';

/** Tonnes of apples a day against height: an early hump of small days, a main hump of full ones. */
const APPLE_POINTS: readonly (readonly [number, number])[] = [
  [4, 0],
  [8, 1.2],
  [12, 3.5],
  [14, 4.2],
  [16, 3.4],
  [20, 1.5],
  [24, 2.2],
  [28, 5],
  [32, 7.5],
  [36, 6],
  [40, 2.8],
  [44, 0.9],
  [48, 0],
];

const DOWNTIME_BLOCK: readonly (readonly [string, string | number, string])[] = [
  ['density', 'EXP(-0.5*((x-m)/s)^2)', 'height at x hours; any scale will do'],
  ['from', 0, 'hours, the least possible'],
  ['to', 12, 'hours, the most possible'],
  ['rows', `=${ROWS}`, 'set on sheet Draws'],
  ['seed', `=${SEED}`, 'set on sheet Draws'],
  ['label', 'downtime', 'names the column; another label is independent'],
  ['m', 4, 'hours, the usual week'],
  ['s', 1.3, 'hours, how far weeks spread around it'],
];

const CHART = { col: 6, shift: 0, width: 380, height: 222 };

export function shapesSheet(): SheetPlan {
  return new SheetPlan('Shapes', { columns: 12, rows: 60, frozenRows: 0 })
    .columnWidths([115, 85, 30, 80, 190, 285, 24])
    .put('A1', 'Shapes: what is not known, stated as numbers', 'title')
    .put(
      'A2',
      'Change a yellow cell (a point, a constant, the formula) and the draws and their evidence follow.',
      'note',
    )
    .put(
      'A3',
      'The draws follow the shape you state; they do not make it right. No substitute for professional judgement.',
      'caution',
    )
    .put('A5', 'Apples delivered a day', 'section')
    .put('A6', 'Twice the height: twice as likely.', 'note')
    .putRows('A', 8, [['tonnes a day', 'height'], ...APPLE_POINTS])
    .look('A8:B8', 'head')
    .look('A9:B21', 'input')
    .put('D5', 'Press downtime a week', 'section')
    .put('D6', 'One block says it all: formula, limits, rows, seed, label and constants.', 'note')
    .putRows('D', 8, DOWNTIME_BLOCK)
    .look('D8:D15', 'word')
    .look('E8:E10', 'input')
    .look('E11:E12', 'result')
    .look('E13:E15', 'input')
    .look('F8:F15', 'unit')
    .chart({
      ...CHART,
      id: 'apples-as-stated',
      row: 4,
      data: pointsChart(APPLES, 'A8:A21', 'B8:B21'),
    })
    .chart({ ...CHART, id: 'downtime-as-stated', row: 14, data: densityChart(DOWNTIME) });
}
