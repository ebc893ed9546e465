/**
 * Sheet "Inputs": a dozen uncertain quantities of a season, one a line of a shape
 * list, drawn by one formula, and the season's margin computed from them row by row.
 * All figures invented.
 */
import { barsChart } from './charts';
import { BLUE } from './looks';
import { SEED } from './quantities';
import { SheetPlan } from './sheet';

interface Line {
  readonly cells: readonly [
    label: string,
    density: string,
    from: number | string,
    to: number | string,
    a: number | string,
    b: number | string,
  ];
  /** Unit, and what the shape says. */
  readonly meaning: string;
}

const LINES: readonly Line[] = [
  {
    cells: ['harvest', 'EXP(-0.5*((x-a)/b)^2)', 300, 1500, 900, 130],
    meaning: 'tonnes: around a, with the spread b',
  },
  {
    cells: ['frost loss', 'EXP(-x/a)', 0, 1, 0.06, ''],
    meaning: 'share of the harvest: mostly little, at times much',
  },
  {
    cells: ['yield', 'MAX(0,1-ABS(x-a)/b)', 560, 720, 650, 110],
    meaning: 'litres a tonne: likeliest a',
  },
  {
    cells: ['broken', 'x^(a-1)*(1-x)^(b-1)', 0, 1, 2, 80],
    meaning: 'share of the bottles: as after a in a + b',
  },
  {
    cells: ['picking', 'IF(x<a,3,1)', 90, 150, 115, ''],
    meaning: 'euros a tonne: below a three times as likely',
  },
  {
    cells: ['pressing', 'EXP(-ABS(x-a)/b)', 20, 90, 45, 6],
    meaning: 'euros a tonne: a sharp peak at a',
  },
  { cells: ['power', 'x>0', 60, 100, '', ''], meaning: 'kWh a tonne: anything between the ends' },
  {
    cells: ['tariff', '(1+((x-a)/b)^2)^-2', 0.05, 'unbounded', 0.21, 0.04],
    meaning: 'euros a kWh: around a, with rare spikes',
  },
  {
    cells: ['bottle', 'EXP(-0.5*(LN(x/a)/b)^2)/x', 0.1, 1, 0.28, 0.12],
    meaning: 'euros each: a, up or down by the share b',
  },
  {
    cells: ['weeks', 'x*EXP(-x/a)', 0, 'unbounded', 5, ''],
    meaning: 'weeks in store until sold: rises, then fades',
  },
  {
    cells: ['storage', '(x-a)*(b-x)', 'a', 'b', 1, 2],
    meaning: 'euros a week for 1,000 bottles: an arch from a to b',
  },
  {
    cells: ['price', 'EXP(-0.5*((x-a)/0.03)^2)+0.4*EXP(-0.5*((x-b)/0.03)^2)', 0.4, 0.9, 0.58, 0.72],
    meaning: 'euros a bottle: a usual hump, another if fruit is short',
  },
];

const HEAD = 8;
const FIRST = HEAD + 1;
const LAST = HEAD + LINES.length;
/** The rows of draws that fit the sheet. */
const MOST_ROWS = 5000;
const LAST_ROW = HEAD + MOST_ROWS;
/** The spill of all draws, and one column of it by its label's place in the list. */
const DRAWN = `L${FIRST}#`;
const drawn = (label: string): string =>
  `CHOOSECOLS(${DRAWN},${LINES.findIndex(({ cells }) => cells[0] === label) + 1})`;

const BOTTLES = `=${drawn('harvest')}*(1-${drawn('frost loss')})*${drawn('yield')}/0.75*(1-${drawn('broken')})/1000`;
const MARGIN = `=I${FIRST}#*(${drawn('price')}-${drawn('bottle')}-${drawn('weeks')}*${drawn('storage')}/1000)-${drawn('harvest')}*(${drawn('picking')}+${drawn('pressing')}+${drawn('power')}*${drawn('tariff')})/1000`;

const FIGURES: readonly (readonly [string, string, string])[] = [
  ['mean', `=AVERAGE(J${FIRST}#)`, '1,000 euros'],
  ['1 in 10 below', `=PERCENTILE.INC(J${FIRST}#,0.1)`, '1,000 euros'],
  ['half below', `=PERCENTILE.INC(J${FIRST}#,0.5)`, '1,000 euros'],
  ['9 in 10 below', `=PERCENTILE.INC(J${FIRST}#,0.9)`, '1,000 euros'],
  ['share of losses', `=COUNTIF(J${FIRST}#,"<0")/ROWS(J${FIRST}#)`, 'of the scenarios'],
];
const FIGURES_ROW = LAST + 4;

const BINS = { first: -150, width: 25, n: 24, row: LAST + 4, above: 'E', upTo: 'F', count: 'G' };

export function inputsSheet(): SheetPlan {
  const sheet = new SheetPlan('Inputs', { columns: 23, rows: LAST_ROW, frozenRows: 0 })
    .columnWidths([110, 260, 70, 80, 70, 70, 320, 24, 110, 110, 24])
    .put('A1', 'Inputs: a dozen unknowns, one a line, drawn by one formula', 'title')
    .put(
      'A2',
      'Change any line, or write another below the last one and lengthen the range in L9. A blank a or b is 0.',
      'note',
    )
    .put(
      'A3',
      'The inputs are drawn as if none had to do with another. If a short harvest lifts the price in truth, the margin is not right.',
      'caution',
    )
    .put('A5', 'rows', 'word')
    .put('B5', 1000, 'input')
    .put('C5', `scenarios, 1 to ${MOST_ROWS.toLocaleString('en')} on this sheet`, 'unit')
    .put('A6', 'seed', 'word')
    .put('B6', `=${SEED}`, 'result')
    .put('C6', 'set on sheet Draws', 'unit')
    .putRows('A', HEAD, [['label', 'density', 'from', 'to', 'a', 'b', 'unit, and what it says']])
    .putRows(
      'A',
      FIRST,
      LINES.map(({ cells }) => cells),
    )
    .look(`A${HEAD}:G${HEAD}`, 'head')
    .look(`A${FIRST}:F${LAST}`, 'input')
    .look(`G${FIRST}:G${LAST}`, 'unit');
  LINES.forEach(({ meaning }, i) => sheet.put(`G${FIRST + i}`, meaning));
  results(sheet);
  return sheet;
}

function results(sheet: SheetPlan): void {
  sheet
    .put('I5', 'The season, a scenario a row', 'section')
    .put('L5', 'The draws of all inputs, from one formula', 'section')
    .put(`I${HEAD - 1}`, 'thousands', 'unit')
    .put(`J${HEAD - 1}`, '1,000 euros', 'unit')
    .put(`I${HEAD}`, 'bottles', 'head')
    .put(`J${HEAD}`, 'margin', 'head')
    .put(`L${HEAD}`, `=TRANSPOSE(A${FIRST}:A${LAST})`)
    .look(`L${HEAD}:W${HEAD}`, 'head')
    .put(`L${FIRST}`, `=UNDERCURVE.DRAW(A${HEAD}:F${LAST},,B5,B6)`)
    .put(`I${FIRST}`, BOTTLES)
    .put(`J${FIRST}`, MARGIN)
    .format(`I${FIRST}:J${LAST_ROW}`, '0.0')
    .format(`L${FIRST}`, '0.000')
    .put(`A${FIGURES_ROW - 2}`, "The season's margin", 'section')
    .putRows('A', FIGURES_ROW, FIGURES)
    .look(`A${FIGURES_ROW}:A${FIGURES_ROW + 4}`, 'word')
    .look(`B${FIGURES_ROW}:B${FIGURES_ROW + 4}`, 'result')
    .look(`C${FIGURES_ROW}:C${FIGURES_ROW + 4}`, 'unit')
    .format(`B${FIGURES_ROW}:B${FIGURES_ROW + 3}`, '0.0')
    .format(`B${FIGURES_ROW + 4}`, '0.0%');
  counts(sheet);
}

function counts(sheet: SheetPlan): void {
  const { first, width, n, row, above, upTo, count } = BINS;
  sheet
    .put(`${above}${row - 1}`, 'above', 'head')
    .put(`${upTo}${row - 1}`, 'up to', 'head')
    .put(`${count}${row - 1}`, 'scenarios', 'head')
    .put(`${count}${row}`, `=FREQUENCY(J${FIRST}#,${upTo}${row}:${upTo}${row + n})`)
    .look(`${count}${row}:${count}${row + n + 1}`, 'result')
    .look(`${upTo}${row}:${upTo}${row + n}`, 'input');
  for (let i = 0; i <= n; i++) {
    sheet
      .put(`${upTo}${row + i}`, first + i * width)
      .put(`${above}${row + i + 1}`, `=${upTo}${row + i}`, 'result');
  }
  sheet.chart({
    id: 'margin-drawn',
    col: 0,
    row: FIGURES_ROW + 5,
    shift: 0,
    width: 440,
    height: 240,
    data: barsChart({
      title: "The season's margin",
      x: '1,000 euros, bins from',
      y: 'scenarios',
      labels: `${above}${row + 1}:${above}${row + n}`,
      values: `${count}${row + 1}:${count}${row + n}`,
      color: BLUE,
    }),
  });
}
