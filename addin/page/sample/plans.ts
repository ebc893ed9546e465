/**
 * Sheet "Plans": all splits of a harvest over two presses and the cold store that keep to
 * the conditions, drawn evenly and weighted by what they cost; and whole crates over three
 * stores. All figures invented.
 */
import { scatterChart } from './charts';
import { BLUE, GREEN } from './looks';
import { SEED } from './quantities';
import { SheetPlan } from './sheet';

const ROWS = 300;
const FIRST_DRAW = 28;
const LAST_DRAW = FIRST_DRAW + ROWS - 1;

const CONDITIONS = 'A6:A9';
const WEIGHTED = 'A6:A10';
const LIMITS = 'D6:F7';
const GIVENS = 'H6:I9';

const arguments_ = (density: string, label: string): string =>
  `${density},${LIMITS},${ROWS},${SEED},"${label}",${GIVENS}`;

const CHART = { shift: 0, width: 330, height: 262 };
const range = (column: string): string => `Plans!${column}${FIRST_DRAW - 1}:${column}${LAST_DRAW}`;

export function plansSheet(): SheetPlan {
  return new SheetPlan('Plans', { columns: 20, rows: LAST_DRAW + 2, frozenRows: 0 })
    .columnWidths([210, 90, 90, 90, 90, 90, 30, 110, 80, 30, 450, 210, 30, 190, 80, 80, 80, 80])
    .put('A1', 'Plans: which splits of the harvest are possible', 'title')
    .put(
      'A2',
      'Conditions in, plans out: each plan below keeps to all of them, and all that do are equally likely.',
      'note',
    )
    .put('A3', 'The draws follow what is stated; whether it is right they do not know.', 'caution')
    .putRows('A', 5, [
      ['conditions, one a cell'],
      ['early+late<=harvest'],
      ['harvest-(early+late)<=room'],
      ['2*early+3*late<=hours'],
      ['late>=0.25*early'],
      ['EXP(-(2*early+3*late)/cost)'],
    ])
    .look('A5', 'head')
    .look('A6:A10', 'input')
    .put(
      'A11',
      'The last line only weighs the second set of plans: cheaper ones are likelier.',
      'note',
    )
    .putRows('D', 5, [
      ['press', 'from', 'to'],
      ['early', 0, 60],
      ['late', 0, 60],
    ])
    .look('D5:F5', 'head')
    .look('D6:F7', 'input')
    .put('D8', 'tonnes pressed early and late', 'unit')
    .putRows('H', 5, [
      ['given', 'value'],
      ['harvest', 80],
      ['room', 35],
      ['hours', 165],
      ['cost', 25],
    ])
    .look('H5:I5', 'head')
    .look('H6:H9', 'word')
    .look('I6:I9', 'input')
    .put('H10', 'room: tonnes the cold store holds', 'unit')
    .put('H11', 'hours, cost: hours of pressing', 'unit')
    .putRows('K', 5, [['how the even plans were drawn']])
    .look('K5:L5', 'head')
    .put('K6', `=UNDERCURVE.ACCEPTANCE(${arguments_(CONDITIONS, 'plans')})`, 'word')
    .look('K7:K50', 'word')
    .look('L6:L50', 'result')
    .putRows('N', 5, [
      ['whole crates', '', 'kind', 'from', 'to', 'step'],
      ['red+green+yellow=24', '', 'red', 0, 24, 1],
      ['red>=2*yellow', '', 'green', 0, 24, 1],
      ['', '', 'yellow', 0, 24, 1],
    ])
    .look('N5', 'head')
    .look('P5:S5', 'head')
    .look('N6:N7', 'input')
    .look('P6:S8', 'input')
    .put('N9', 'A step makes a counted quantity; an equation of such is no problem.', 'note')
    .putRows('A', FIRST_DRAW - 2, [
      ['every plan alike', '', '', 'weighted by cost'],
      ['early', 'late', 'store', 'early', 'late', 'store'],
      [
        `=UNDERCURVE.DRAW(${arguments_(CONDITIONS, 'plans')})`,
        '',
        `=$I$6-A${FIRST_DRAW}:A${LAST_DRAW}-B${FIRST_DRAW}:B${LAST_DRAW}`,
        `=UNDERCURVE.DRAW(${arguments_(WEIGHTED, 'weighted plans')})`,
        '',
        `=$I$6-D${FIRST_DRAW}:D${LAST_DRAW}-E${FIRST_DRAW}:E${LAST_DRAW}`,
      ],
    ])
    .putRows('N', FIRST_DRAW - 2, [
      ['24 crates, every split alike'],
      ['red', 'green', 'yellow'],
      [`=UNDERCURVE.DRAW(N6:N7,P6:S8,${ROWS},${SEED},"crates")`],
    ])
    .look(`A${FIRST_DRAW - 2}:F${FIRST_DRAW - 2}`, 'section')
    .look(`N${FIRST_DRAW - 2}:P${FIRST_DRAW - 2}`, 'section')
    .look(`A${FIRST_DRAW - 1}:F${FIRST_DRAW - 1}`, 'head')
    .look(`N${FIRST_DRAW - 1}:P${FIRST_DRAW - 1}`, 'head')
    .format(`A${FIRST_DRAW}:F${LAST_DRAW}`, '0.0')
    .chart({
      ...CHART,
      id: 'plans-even',
      col: 0,
      row: 11,
      data: scatterChart(
        'Every plan alike',
        'early, tonnes',
        'late, tonnes',
        range('A'),
        range('B'),
        GREEN,
      ),
    })
    .chart({
      ...CHART,
      id: 'plans-weighted',
      col: 3,
      row: 11,
      data: scatterChart(
        'Weighted by cost',
        'early, tonnes',
        'late, tonnes',
        range('D'),
        range('E'),
        BLUE,
      ),
    });
}
