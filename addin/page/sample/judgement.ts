/**
 * Sheet "Judgement": shapes made from what people know. Percentiles a manager judges,
 * a histogram of other years, measured values, and two experts who disagree, each
 * drawn from as it stands. All figures invented.
 */
import { lineChart } from './charts';
import { BLUE, GREEN, RED } from './looks';
import { SEED } from './quantities';
import { SheetPlan } from './sheet';

const SECTION = 17;
const HEAD = 19;
const FIRST = HEAD + 1;
const PROFILE_POINTS = 101;
const DRAWN_ROWS = 1000;
const LAST_ROW = FIRST + DRAWN_ROWS - 1;
const CHART = { col: 0, row: 4, width: 292, height: 244 };
const CHART_GAP = 8;

/** A shape of this sheet: the spill that states it, and where its draws and its profile stand. */
interface Made {
  readonly title: string;
  readonly label: string;
  readonly unit: string;
  readonly spill: string;
  readonly drawn: string;
  /** Columns of x and of the density. */
  readonly profile: readonly [string, string];
  /** Number formats of the chart's axes. */
  readonly axes: readonly [string, string];
  readonly color: string;
}

const PRICE: Made = {
  title: 'Juice price, as judged',
  label: 'price',
  unit: 'euros a litre',
  spill: 'A27#',
  drawn: 'P',
  axes: ['0.0', '0.0'],
  profile: ['U', 'V'],
  color: RED,
};
const DELIVERIES: Made = {
  title: 'Deliveries, as counted',
  label: 'deliveries',
  unit: 'tonnes a day',
  spill: 'D28#',
  drawn: 'Q',
  axes: ['0', '0.00'],
  profile: ['AA', 'AB'],
  color: BLUE,
};
const SUGAR: Made = {
  title: 'Sugar, as measured',
  label: 'sugar',
  unit: 'grams a litre',
  spill: 'H19#',
  drawn: 'R',
  axes: ['0', '0.000'],
  profile: ['AG', 'AH'],
  color: GREEN,
};
const SEASON: Made = {
  title: 'Season, as blended',
  label: 'season',
  unit: 'days of pressing',
  spill: 'K37#',
  drawn: 'S',
  axes: ['0', '0.00'],
  profile: ['AM', 'AN'],
  color: RED,
};
const WIDTHS = [
  120, 110, 24, 120, 110, 24, 130, 100, 100, 24, 110, 240, 24, 110, 24, 100, 100, 100, 100, 24,
];
const MADE: readonly Made[] = [PRICE, DELIVERIES, SUGAR, SEASON];

const PERCENTILES: readonly (readonly [number, number])[] = [
  [0.1, 0.92],
  [0.5, 1.1],
  [0.9, 1.46],
];

/** The edges of the bins and the days counted from each to the next. */
const DAYS: readonly (readonly [number, number | string])[] = [
  [0, 6],
  [5, 14],
  [10, 31],
  [20, 42],
  [30, 19],
  [40, 4],
  [60, ''],
];

/** Grams of sugar a litre in the juice of thirty orchards, as they were measured. */
const SUGAR_MEASURED: readonly number[] = [
  104, 98, 112, 121, 95, 109, 117, 126, 101, 92, 130, 115, 107, 99, 119, 123, 111, 106, 88, 114,
  136, 103, 118, 110, 97, 125, 108, 113, 102, 120,
];

const GROWER = [
  ['density', 'EXP(-0.5*((x-m)/s)^2)'],
  ['from', 20],
  ['to', 90],
  ['m', 52],
  ['s', 5],
];
const CELLAR = [
  ['density', 'EXP(-ABS(x-m)/s)'],
  ['from', 20],
  ['to', 90],
  ['m', 66],
  ['s', 4],
];

const FIGURES: readonly (readonly [string, (draws: string) => string])[] = [
  ['mean', (draws) => `=AVERAGE(${draws})`],
  ['1 in 10 below', (draws) => `=PERCENTILE.INC(${draws},0.1)`],
  ['half below', (draws) => `=PERCENTILE.INC(${draws},0.5)`],
  ['9 in 10 below', (draws) => `=PERCENTILE.INC(${draws},0.9)`],
];

export function judgementSheet(): SheetPlan {
  const sheet = new SheetPlan('Judgement', { columns: 44, rows: LAST_ROW, frozenRows: 0 })
    .columnWidths(WIDTHS)
    .put('A1', 'Judgement: shapes from what people know', 'title')
    .put(
      'A2',
      'Change a yellow cell. Each table or block below it is a shape; the draws at the right take it as it stands.',
      'note',
    )
    .put(
      'A3',
      'A shape from three percentiles or thirty values says no more than they do; the draws do not make it right.',
      'caution',
    );
  percentiles(sheet);
  histogram(sheet);
  data(sheet);
  experts(sheet);
  draws(sheet);
  MADE.forEach((made, i) => profile(sheet, made, i));
  return sheet;
}

function percentiles(sheet: SheetPlan): void {
  sheet
    .put(`A${SECTION}`, 'Juice price: percentiles', 'section')
    .put(`A${SECTION + 1}`, 'What the sales manager judges.', 'note')
    .putRows('A', HEAD, [
      ['chance below', PRICE.unit],
      ...PERCENTILES,
      ['lowest', 0.7],
      ['highest', 2.1],
    ])
    .look(`A${HEAD}:B${HEAD}`, 'head')
    .look('A20:B22', 'input')
    .look('A23:A24', 'word')
    .look('B23:B24', 'input')
    .format('A20:A22', '0%')
    .put('A26', 'as a shape', 'unit')
    .put('A27', '=UNDERCURVE.FROMPERCENTILES(A20:A22,B20:B22,B23,B24)')
    .look('A27:B27', 'head')
    .format('A28:B35', '0.000');
}

function histogram(sheet: SheetPlan): void {
  sheet
    .put(`D${SECTION}`, 'Deliveries: a histogram', 'section')
    .put(`D${SECTION + 1}`, 'Last years, days counted.', 'note')
    .putRows('D', HEAD, [['tonnes, from', 'days'], ...DAYS])
    .look(`D${HEAD}:E${HEAD}`, 'head')
    .look('D20:D26', 'input')
    .look('E20:E25', 'input')
    .put('E26', 'the last end', 'unit')
    .put('D27', 'as a shape', 'unit')
    .put('D28', '=UNDERCURVE.FROMBINS(D20:D26,E20:E25)')
    .look('D28:E28', 'head')
    .format('E29:E40', '0.0000');
}

function data(sheet: SheetPlan): void {
  sheet
    .put(`G${SECTION}`, 'Sugar: measured values', 'section')
    .put(`G${SECTION + 1}`, 'Thirty orchards. At the right, as a shape.', 'note')
    .putRows('G', HEAD, [[SUGAR.unit], ...SUGAR_MEASURED.map((value) => [value])])
    .look(`G${HEAD}:I${HEAD}`, 'head')
    .look('G20:G49', 'input')
    .put('H19', '=UNDERCURVE.FROMDATA(G20:G49)')
    .format('H20:H60', '0.0')
    .format('I20:I60', '0.0000');
}

function experts(sheet: SheetPlan): void {
  sheet
    .put(`K${SECTION}`, 'Season: two experts', 'section')
    .put(`K${SECTION + 1}`, 'Days of pressing, to each a share of belief.', 'note')
    .put(`K${HEAD}`, 'the grower', 'head')
    .put(`L${HEAD}`, '', 'head')
    .putRows('K', FIRST, GROWER)
    .put('K26', 'the cellar master', 'head')
    .put('L26', '', 'head')
    .putRows('K', 27, CELLAR)
    .put('K33', 'share of belief', 'head')
    .put('L33', '', 'head')
    .putRows('K', 34, [
      ['the grower', 0.6],
      ['the cellar master', '=1-L34'],
    ])
    .put('K36', 'as a shape', 'unit')
    .put('K37', '=UNDERCURVE.BLEND(L34:L35,K20:L24,K27:L31)')
    .look('K20:K24', 'word')
    .look('L20:L24', 'input')
    .look('K27:K31', 'word')
    .look('L27:L31', 'input')
    .look('K34:K35', 'word')
    .look('L34', 'input')
    .look('L35', 'result')
    .look('K37:K50', 'word')
    .look('L37:L50', 'result')
    .format('L34:L35', '0%');
}

function draws(sheet: SheetPlan): void {
  sheet
    .put('N2', `The draws of the four shapes, ${DRAWN_ROWS.toLocaleString('en')} each`, 'section')
    .put('N3', 'The seed is set on sheet Draws.', 'note')
    .putRows('N', 6, [['of the draws'], ...FIGURES.map(([name]) => [name])])
    .look('N6:S6', 'head')
    .look('N7:N10', 'word')
    .format('P7:S10', '0.00')
    .format(`P${FIRST}:S${FIRST}`, '0.00');
  for (const { label, unit, spill, drawn } of MADE) {
    sheet
      .put(`${drawn}6`, `=${drawn}${HEAD}`)
      .put(`${drawn}${HEAD - 1}`, unit, 'unit')
      .put(`${drawn}${HEAD}`, label, 'head')
      .put(`${drawn}${FIRST}`, `=UNDERCURVE.DRAW(${spill},,${DRAWN_ROWS},${SEED},${drawn}${HEAD})`);
    FIGURES.forEach(([, figure], i) => sheet.put(`${drawn}${7 + i}`, figure(`${drawn}${FIRST}#`)));
  }
}

/** The numbers behind a chart, and the chart. */
function profile(sheet: SheetPlan, made: Made, place: number): void {
  const { title, unit, spill, color, axes } = made;
  const [x, density] = made.profile;
  const last = HEAD + PROFILE_POINTS;
  sheet
    .put(`${x}${SECTION}`, title, 'section')
    .put(`${x}${HEAD}`, `=UNDERCURVE.PROFILE(${spill},,${PROFILE_POINTS})`)
    .format(`${x}${FIRST}:${x}${last}`, axes[0])
    .format(`${density}${FIRST}:${density}${last}`, axes[1])
    .chart({
      ...CHART,
      id: `judged-${place}`,
      shift: place * (CHART.width + CHART_GAP),
      data: lineChart(title, unit, `${x}${HEAD}:${x}${last}`, [
        ['density', `${density}${HEAD}:${density}${last}`, color],
      ]),
    });
}
