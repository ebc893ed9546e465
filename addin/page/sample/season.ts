/**
 * Sheet "Season": inputs that belong together, row by row. Harvest and price are linked, the
 * days in the cold store are drawn given the harvest, what the presses take is drawn for three
 * numbers of presses, and events of spoilage are summed. All figures invented.
 */
import { scatterChart } from './charts';
import { GREEN } from './looks';
import { SEED } from './quantities';
import { SheetPlan } from './sheet';

/** Scenarios, a row each, below this row of headings. */
const HEAD = 8;
const FIRST = HEAD + 1;
const MOST_ROWS = 5000;
const LAST_ROW = HEAD + MOST_ROWS;

const HARVEST_SHAPE = '$A$14:$B$18';
const PRICE_SHAPE = '$D$14:$E$18';
const DAYS_SHAPE = '$A$22:$B$25';
const PRESSES_SHAPE = '$A$33:$B$37';
const EVENTS_SHAPE = '$A$41:$B$45';
const TONNES_SHAPE = '$D$41:$E$44';

/** What other sheets read: the case table, and spills of scenarios. */
export const SEASON = {
  firstRow: FIRST,
  mostRows: MOST_ROWS,
  harvestShape: `Season!${HARVEST_SHAPE}`,
  cases: 'Season!$B$29:$D$29',
  presses: ['Season!$B$30', 'Season!$C$30', 'Season!$D$30'],
  harvest: `Season!L${FIRST}#`,
  price: `Season!M${FIRST}#`,
  days: `Season!N${FIRST}#`,
  // DROP would hide why there are no columns.
  taken: (k: number) =>
    `IF(ISERROR(Season!$O$${HEAD}),Season!$O$${HEAD},DROP(CHOOSECOLS(Season!O${HEAD}#,${k}),1))`,
  spoilt: `DROP(CHOOSECOLS(Season!S${HEAD}#,1),1)`,
} as const;

export function seasonSheet(): SheetPlan {
  const sheet = new SheetPlan('Season', { columns: 21, rows: LAST_ROW, frozenRows: 0 })
    .columnWidths([
      ...[120, 130, 150, 110, 130, 130, 16, 16, 16, 80, 80],
      ...[80, 80, 80, 90, 90, 90, 80, 80, 80, 80],
    ])
    .put('A1', 'Season: inputs that belong together', 'title')
    .put(
      'A2',
      'Every column at the right is drawn by one formula, and row 17 of each is the same scenario. Yellow cells are inputs.',
      'note',
    )
    .put(
      'A3',
      'Links and chains are stated here, not found: whether price follows the harvest like this stays your judgement.',
      'caution',
    )
    .putRows('A', 5, [
      ['rows', 500],
      ['seed', `=${SEED}`],
    ])
    .look('A5:A6', 'word')
    .look('B5', 'input')
    .look('B6', 'result')
    .put('C5', `scenarios, 1 to ${MOST_ROWS.toLocaleString('en')} on this sheet`, 'unit')
    .put('C6', 'set on sheet Draws', 'unit');
  linked(sheet);
  chain(sheet);
  whatIf(sheet);
  spoilage(sheet);
  scenarios(sheet);
  return sheet;
}

/** A shape block from this cell on: name, value, and where it has one its unit. */
function block(sheet: SheetPlan, column: string, row: number, lines: (string | number)[][]): void {
  const [next, third] = [1, 2].map((n) => String.fromCharCode(column.charCodeAt(0) + n));
  const last = row + lines.length - 1;
  sheet
    .putRows(column, row, lines)
    .look(`${column}${row}:${column}${last}`, 'word')
    .look(`${next}${row}:${next}${last}`, 'input')
    .look(`${third}${row}:${third}${last}`, 'unit');
}

function linked(sheet: SheetPlan): void {
  sheet
    .put('A8', '1  Linked: a short harvest lifts the price', 'section')
    .putRows('A', 9, [
      ['rank correlation', 'harvest', 'price'],
      ['harvest', 1, -0.6],
      ['price', '=C10', 1],
    ])
    .look('A9:C9', 'head')
    .look('A10:A11', 'word')
    .look('B10:C11', 'result')
    .look('C10', 'input')
    .put('D10', 'from -1 to 1; 0 for no link', 'unit')
    .put('A13', 'harvest, tonnes', 'unit')
    .put('D13', 'price, euros a bottle', 'unit')
    .chart({
      id: 'harvest-and-price',
      col: 4,
      row: 19,
      shift: 8,
      width: 300,
      height: 250,
      data: scatterChart(
        'Harvest and price, linked',
        'harvest, tonnes',
        'price, euros a bottle',
        `Season!L${HEAD}:L${LAST_ROW}`,
        `Season!M${HEAD}:M${LAST_ROW}`,
        GREEN,
      ),
    });
  block(sheet, 'A', 14, [
    ['density', 'EXP(-0.5*((x-usual)/spread)^2)'],
    ['from', 300, 'the least possible'],
    ['to', 1500, 'the most possible'],
    ['usual', 900, 'the usual season'],
    ['spread', 130, 'how far from it'],
  ]);
  block(sheet, 'D', 14, [
    ['density', 'EXP(-ABS(x-usual)/spread)'],
    ['from', 0.4, 'the least possible'],
    ['to', 0.9, 'the most possible'],
    ['usual', 0.64, 'the likeliest'],
    ['spread', 0.04, 'how far from it'],
  ]);
}

function chain(sheet: SheetPlan): void {
  sheet
    .put('A20', '2  A chain: days in the cold store, given the harvest', 'section')
    .put('A21', 'days; the harvest of the same row in steps of 20 tonnes', 'unit');
  block(sheet, 'A', 22, [
    ['density', 'x^2*EXP(-3*x/(days*harvest/900))'],
    ['from', 0, 'days'],
    ['to', 150, 'days'],
    ['days', 24, 'the mean, of a harvest of 900 tonnes'],
  ]);
}

function whatIf(sheet: SheetPlan): void {
  sheet
    .put('A27', '3  What if: tonnes that the presses take in the season', 'section')
    .put('A28', 'change a number of presses, and its column follows', 'unit')
    .putRows('A', 29, [
      ['case', ...['B', 'C', 'D'].map((each) => `=${each}30&IF(${each}30=1," press"," presses")`)],
      ['presses', 2, 3, 4],
    ])
    .look('A29:D29', 'head')
    .look('A30', 'word')
    .look('B30:D30', 'input')
    .put('A32', 'tonnes', 'unit');
  block(sheet, 'A', 33, [
    ['density', 'EXP(-0.5*((x-presses*each)/(spread*SQRT(presses)))^2)'],
    ['from', 0, 'tonnes'],
    ['to', 4000, 'tonnes'],
    ['each', 290, 'tonnes a press in the usual season'],
    ['spread', 35, 'tonnes, how far one press is from that'],
  ]);
}

function spoilage(sheet: SheetPlan): void {
  sheet
    .put('A39', '4  Totals: events of spoilage, and what they take', 'section')
    .put('A40', 'events a season: 0, 1, 2 …', 'unit')
    .put('D40', 'tonnes that one event takes', 'unit');
  block(sheet, 'A', 41, [
    ['density', 'rate^x/FACT(x)'],
    ['from', 0],
    ['to', 40],
    ['step', 1, 'whole events'],
    ['rate', 2.5, 'the mean'],
  ]);
  block(sheet, 'D', 41, [
    ['density', 'EXP(-x/usual)'],
    ['from', 0],
    ['to', 'unbounded'],
    ['usual', 9, 'the mean'],
  ]);
}

function scenarios(sheet: SheetPlan): void {
  const drawn = (shape: string, label: string): string =>
    `=UNDERCURVE.DRAW(${shape},,$B$5,$B$6,${label})`;
  const share = (k: number): string => `CHOOSECOLS(J${FIRST}#,${k})`;
  sheet
    .put('J4', 'The season, a scenario a row', 'section')
    .put('J5', 'The number above a column is that of the section which states it.', 'note')
    .putRows('J', HEAD - 2, [
      ['1  shares', '', '1  linked', '', '2  chain', '3  what if', '', '', '4  count', '4  totals'],
      ['', '', 'tonnes', 'euros', 'days', 'tonnes', 'tonnes', 'tonnes', '', 'tonnes', 'tonnes'],
      ['harvest', 'price', 'harvest', 'price', 'days'],
    ])
    .look(`J${HEAD - 2}:U${HEAD - 2}`, 'verdict')
    .look(`J${HEAD - 1}:U${HEAD - 1}`, 'unit')
    .look(`J${HEAD}:U${HEAD}`, 'head')
    .put(`R${HEAD}`, 'events')
    .put(`J${FIRST}`, '=UNDERCURVE.LINKEDSHARES($A$9:$C$11,$B$5,$B$6,"link")')
    .put(`L${FIRST}`, `=UNDERCURVE.QUANTILE(${HARVEST_SHAPE},,${share(1)})`)
    .put(`M${FIRST}`, `=UNDERCURVE.QUANTILE(${PRICE_SHAPE},,${share(2)})`)
    .put(
      `N${FIRST}`,
      `=UNDERCURVE.EACH(${DAYS_SHAPE},,$B$6,N${HEAD},VSTACK("harvest",20*ROUND(L${FIRST}#/20,0)))`,
    )
    .put(`O${HEAD}`, `=UNDERCURVE.CASES(${PRESSES_SHAPE},,$B$5,$B$6,"taken",$A$29:$D$30)`)
    .put(`R${FIRST}`, drawn(EVENTS_SHAPE, `R${HEAD}`))
    .put(`S${HEAD}`, `=UNDERCURVE.TOTAL(R${FIRST}#,${TONNES_SHAPE},,,$B$6,"spoilt")`)
    .format(`J${FIRST}`, '0.0000')
    .format(`L${FIRST}`, '0.0')
    .format(`M${FIRST}`, '0.000')
    .format(`N${FIRST}`, '0.0')
    .format(`O${HEAD}`, '0.0')
    .format(`S${FIRST}:T${LAST_ROW}`, '0.0');
}
