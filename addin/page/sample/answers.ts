/**
 * Sheet "Answers": what needs no draws. Exact shares, values and means of four shapes,
 * among them a table cut by a condition and one without an end, beside the draws'
 * own figures, and the first proposals one by one. All figures invented.
 */
import { APPLES, DOWNTIME, ROWS, SEED } from './quantities';
import { SheetPlan } from './sheet';

/** Degrees in the cold store against how often they were read. */
const RECORD: readonly (readonly [number, number])[] = [
  [0, 0],
  [1, 1.5],
  [2, 5],
  [3, 7],
  [4, 4.5],
  [5, 3],
  [6, 2.5],
  [7, 1],
  [8, 0],
];

/** A shape as arguments: what goes before and after a function's own, and its draws. */
interface Asked {
  readonly column: string;
  readonly name: string;
  readonly unit: string;
  readonly threshold: number;
  readonly shape: string;
  readonly limits: string;
  readonly givens: string;
  readonly draws: string;
}

const COLD = {
  shape: '$D$9:$D$10',
  limits: '$D$14:$E$14',
  givens: ',$A$8:$B$17,$D$12:$E$12',
};
const WAITING = '$G$8:$H$11';
const DRAWN_HEAD = 20;

const ASKED: readonly Asked[] = [
  {
    column: 'B',
    name: 'apples',
    unit: APPLES.unit,
    threshold: 40,
    shape: APPLES.shape,
    limits: '',
    givens: '',
    draws: APPLES.draws,
  },
  {
    column: 'C',
    name: 'downtime',
    unit: DOWNTIME.unit,
    threshold: 6,
    shape: DOWNTIME.shape,
    limits: '',
    givens: '',
    draws: DOWNTIME.draws,
  },
  { column: 'D', name: 'cold store', unit: 'degrees', threshold: 5, ...COLD, draws: 'J21' },
  {
    column: 'E',
    name: 'waiting',
    unit: 'minutes',
    threshold: 60,
    shape: WAITING,
    limits: '',
    givens: '',
    draws: 'K21',
  },
];

const call = (name: string, { shape, limits, givens }: Asked, own: string): string =>
  `UNDERCURVE.${name}(${shape},${limits},${own}${givens})`;

/** Lines of the table of answers, from the threshold in row 23 on. */
const LINES: readonly (readonly [string, (asked: Asked) => string, string])[] = [
  ['share below it', (asked) => `=${call('BELOW', asked, `${asked.column}23`)}`, '0.00%'],
  ['share above it', (asked) => `=${call('ABOVE', asked, `${asked.column}23`)}`, '0.00%'],
  [
    'above it, of the draws',
    ({ column, draws }) => `=COUNTIF(${draws}#,">"&${column}23)/ROWS(${draws}#)`,
    '0.00%',
  ],
  ['1 in 20 below', (asked) => `=${call('QUANTILE', asked, '{0.05;0.5;0.95},')}`, '0.00'],
  ['half below', () => '', '0.00'],
  ['19 in 20 below', () => '', '0.00'],
  ['mean', (asked) => `=INDEX(${call('EXPECT', asked, '"x"')},2,1)`, '0.00'],
  ['mean of the draws', ({ draws }) => `=AVERAGE(${draws}#)`, '0.00'],
];

export function answersSheet(): SheetPlan {
  const sheet = new SheetPlan('Answers', { columns: 14, rows: 10020, frozenRows: 0 })
    .columnWidths([180, 120, 130, 190, 110, 60, 110, 180, 24, 110, 110])
    .put('A1', 'Answers: exact shares, values and means', 'title')
    .put(
      'A2',
      'They come from the shape itself. The lines "of the draws" beside them differ by chance alone.',
      'note',
    )
    .put(
      'A3',
      'An exact answer is exact for the shape you state. No substitute for professional judgement on what may go wrong.',
      'caution',
    );
  coldStore(sheet);
  waiting(sheet);
  answers(sheet);
  cost(sheet);
  proposals(sheet);
  drawn(sheet);
  return sheet;
}

function coldStore(sheet: SheetPlan): void {
  sheet
    .put('A5', 'Cold store: a record, cut by a condition', 'section')
    .put('A6', 'The alarm starts the second cooler, so nothing lies above it.', 'note')
    .putRows('A', 8, [['degrees', 'record'], ...RECORD])
    .look('A8:B8', 'head')
    .look('A9:B17', 'input')
    .put('D8', 'the product of its lines', 'head')
    .put('E8', '', 'head')
    .putRows('D', 9, [['record(x)'], ['x<=alarm']])
    .look('D9:D10', 'input')
    .putRows('D', 12, [['alarm', 5.5]])
    .look('D12', 'word')
    .look('E12', 'input')
    .put('D13', 'from and to, in degrees', 'unit')
    .putRows('D', 14, [[0, 8]])
    .look('D14:E14', 'input');
}

function waiting(sheet: SheetPlan): void {
  sheet
    .put('G5', 'Waiting at the gate: no end', 'section')
    .put('G6', 'Minutes a lorry waits; long ones are rare.', 'note')
    .putRows('G', 8, [
      ['density', 'EXP(-x/usual)'],
      ['from', 0],
      ['to', 'unbounded'],
      ['usual', 18],
    ])
    .look('G8:G11', 'word')
    .look('H8:H11', 'input')
    .put('G12', 'usual: minutes, the mean', 'unit');
}

function answers(sheet: SheetPlan): void {
  sheet
    .put('A19', 'Exact answers', 'section')
    .put('A21', '', 'head')
    .look('A21:E21', 'head')
    .look('B22:E22', 'unit')
    .put('A23', 'threshold', 'word');
  LINES.forEach(([name], i) => sheet.put(`A${24 + i}`, name, 'word'));
  for (const asked of ASKED) {
    const { column } = asked;
    sheet
      .put(`${column}21`, asked.name)
      .put(`${column}22`, asked.unit)
      .put(`${column}23`, asked.threshold, 'input');
    LINES.forEach(([, formula, format], i) => {
      const text = formula(asked);
      if (text !== '') sheet.put(`${column}${24 + i}`, text);
      sheet.look(`${column}${24 + i}`, 'result').format(`${column}${24 + i}`, format);
    });
  }
}

function cost(sheet: SheetPlan): void {
  sheet
    .put('A34', 'What waiting costs', 'section')
    .put('A35', 'cost of a wait of x', 'word')
    .put('B35', 'MAX(0,x-30)*1.4', 'input')
    .put('C35', 'euros: half an hour is free', 'unit')
    .put('A36', 'mean cost, euros', 'word')
    .put('B36', `=UNDERCURVE.EXPECT(${WAITING},,B35)`)
    .look('B36:D36', 'head')
    .look('B37:D37', 'result')
    .format('B37:D37', '0.000000');
}

function proposals(sheet: SheetPlan): void {
  sheet
    .put('A40', 'How some downtime draws came about', 'section')
    .put('A41', 'first and last row', 'word')
    .putRows('B', 41, [[129, 135]])
    .look('B41:C41', 'input')
    .put('A42', `=UNDERCURVE.PROPOSALS(${DOWNTIME.shape},,B41:C41)`)
    .look('A42:F42', 'head')
    .look('A43:F60', 'result')
    .format('C43:E60', '0.0000');
}

function drawn(sheet: SheetPlan): void {
  sheet
    .put('J5', 'Their draws', 'section')
    .put('J6', 'Rows and seed as on sheet Draws.', 'note')
    .put('J19', 'degrees', 'unit')
    .put('K19', 'minutes', 'unit')
    .put(`J${DRAWN_HEAD}`, 'cold store', 'head')
    .put(`K${DRAWN_HEAD}`, 'waiting', 'head')
    .put('J21', `=UNDERCURVE.DRAW(${COLD.shape},${COLD.limits},${ROWS},${SEED},J20${COLD.givens})`)
    .put('K21', `=UNDERCURVE.DRAW(${WAITING},,${ROWS},${SEED},K20)`)
    .format('J21:K21', '0.00');
}
