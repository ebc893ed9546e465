/**
 * Sheet "Decision": how many presses? The scenarios of sheet Season become bottles, an
 * overflow of the store and a margin by worksheet formulas, one column for each number of
 * presses; then the chance of an overflow, the case to choose and a check of the draws.
 * All figures invented.
 */
import { barsChart } from './charts';
import { BLUE } from './looks';
import { SEASON } from './season';
import { SheetPlan } from './sheet';

const { firstRow: FIRST, mostRows: MOST_ROWS } = SEASON;
const HEAD = FIRST - 1;
const LAST_ROW = HEAD + MOST_ROWS;

/** The name that formulas here go by, its words on the sheet, value, and unit. */
const INPUTS: readonly (readonly [string, string, number, string])[] = [
  ['yield', 'yield', 0.87, '1,000 bottles a tonne'],
  ['store', 'the store holds', 760, '1,000 bottles'],
  ['elsewhere', 'storing the rest elsewhere', 0.15, 'euros a bottle'],
  ['cost', 'making a bottle', 0.32, 'euros a bottle'],
  ['press', 'running a press', 28, '1,000 euros a season'],
  ['cold store', 'cold store', 0.4, '1,000 euros a day'],
];
/** First rows of the parts; their section titles and notes stand above. */
const SHORT_ROW = 6;
const INPUTS_ROW = 12;
const BEST_ROW = 21;
const CHANCES_ROW = 36;
const DRIVERS_ROW = 21;
const CHECK_ROW = 33;

const cellOf = (name: string): string =>
  `$B$${INPUTS_ROW + INPUTS.findIndex(([own]) => own === name)}`;

/** Columns of scenarios: three cases each. */
const BOTTLES = ['P', 'Q', 'R'];
const OVERFLOW = ['S', 'T', 'U'];
const MARGIN = ['V', 'W', 'X'];
const spillOf = (column: string | undefined): string => `${column}${FIRST}#`;
const table = (columns: readonly string[]): string =>
  `VSTACK(${SEASON.cases},HSTACK(${columns.map(spillOf).join(',')}))`;

/** The unknowns of the middle case, each below its name. */
const DRIVING = `VSTACK({"harvest","price","days stored","presses take","spoilt"},HSTACK(${[
  ...[SEASON.harvest, SEASON.price, SEASON.days],
  ...[SEASON.taken(2), SEASON.spoilt],
].join(',')}))`;

const BEST_CASES = `B${BEST_ROW}:D${BEST_ROW}`;
const PLACES = `B${BEST_ROW + 1}:D${BEST_ROW + 1}`;
/** The number of the case that comes first, the left one of a tie. */
const FIRST_CASE = `MATCH(MIN(${PLACES}),${PLACES},0)`;
const FIRST_NAME = `INDEX(${BEST_CASES},1,${FIRST_CASE})`;

/** A figure of the first case, from a row below the three cases, as text. */
const figure = (row: number, format: string): string =>
  `TEXT(INDEX(B${row}:D${row},1,${FIRST_CASE}),"${format}")`;
/** An interval from the two rows from this one on. */
const interval = (row: number, format: string): string =>
  `" (95 % interval "&${figure(row, format)}&" to "&${figure(row + 1, format)}&")"`;

/** Said first: the gist of each part below, or the error of the part that it is taken from. */
const SHORT: readonly string[] = (
  [
    [
      `A${BEST_ROW}`,
      `${FIRST_NAME}&": the largest mean margin, "&${figure(BEST_ROW + 2, '0.0')}&" thousand euros"&` +
        `${interval(BEST_ROW + 3, '0.0')}&", the best in "&${figure(BEST_ROW + 5, '0%')}&" of the scenarios"`,
    ],
    [
      `A${CHANCES_ROW}`,
      `${FIRST_NAME}&": more bottles than the store holds with a chance of "&` +
        `${figure(CHANCES_ROW + 5, '0%')}&${interval(CHANCES_ROW + 6, '0%')}`,
    ],
    [
      `F${DRIVERS_ROW}`,
      `C${BEST_ROW}&": what moves the margin most is "&G${DRIVERS_ROW}&", "&TEXT(G${DRIVERS_ROW + 4},"0%")&" of its variance"`,
    ],
    [`F${CHECK_ROW}`, `"the harvest as drawn: "&INDEX(F${CHECK_ROW}#,2,2)`],
  ] as const
).map(([part, text]) => `=IF(ISERROR(${part}),${part},${text})`);

export function decisionSheet(): SheetPlan {
  const sheet = new SheetPlan('Decision', { columns: 24, rows: LAST_ROW, frozenRows: 0 })
    .columnWidths([230, 90, 90, 90, 24, 270, 90, 90, 90, 90, 90, 90, 24, 24, 100])
    .put('A1', 'Decision: how many presses?', 'title')
    .put(
      'A2',
      'Each scenario of sheet Season becomes bottles and a margin (columns O to X). Change a number of presses there, or a yellow cell here.',
      'note',
    )
    .put(
      'A3',
      'The draws follow the stated shapes; they do not make the shapes right. No substitute for professional judgement.',
      'caution',
    )
    .put(`A${SHORT_ROW - 1}`, 'In short', 'section')
    .put(`A${INPUTS_ROW - 1}`, '5  What a season brings and costs', 'section')
    .putRows(
      'A',
      INPUTS_ROW,
      INPUTS.map(([, ...shown]) => shown),
    )
    .look(`A${INPUTS_ROW}:A${INPUTS_ROW + 5}`, 'word')
    .look(`B${INPUTS_ROW}:B${INPUTS_ROW + 5}`, 'input')
    .look(`C${INPUTS_ROW}:C${INPUTS_ROW + 5}`, 'unit');
  SHORT.forEach((text, i) => sheet.put(`A${SHORT_ROW + i}`, text, 'verdict'));
  scenarios(sheet);
  answers(sheet);
  return sheet;
}

function scenarios(sheet: SheetPlan): void {
  sheet
    .put('O4', '5  The season under each number of presses, a scenario a row', 'section')
    .put(
      'O5',
      'bottles = yield x what is delivered, or what the presses take if that is less; overflow = bottles beyond what the store holds',
      'note',
    )
    .put(
      'O6',
      'margin = bottles x (price - making) - overflow x elsewhere - presses x running one - days x cold store',
      'note',
    )
    .put(`O${HEAD - 1}`, 'tonnes', 'unit')
    .put(`O${HEAD}`, 'delivered')
    .look(`O${HEAD}:X${HEAD}`, 'head')
    .put(
      `O${FIRST}`,
      `=IF(${SEASON.harvest}>${SEASON.spoilt},${SEASON.harvest}-${SEASON.spoilt},0)`,
    )
    .format(`O${FIRST}:X${FIRST}`, '0.0')
    .format(`S${FIRST}:U${LAST_ROW}`, '0.0');
  const heads = [
    ['P', 'bottles, thousands'],
    ['S', 'overflow, thousands'],
    ['V', 'margin, 1,000 euros'],
  ] as const;
  for (const [column, text] of heads) sheet.put(`${column}${HEAD - 1}`, text, 'unit');
  for (const columns of [BOTTLES, OVERFLOW, MARGIN])
    sheet.put(`${columns[0]}${HEAD}`, `=${SEASON.cases}`);
  SEASON.presses.forEach((presses, k) => {
    const [bottles, overflow] = [spillOf(BOTTLES[k]), spillOf(OVERFLOW[k])];
    const [delivered, taken] = [`O${FIRST}#`, SEASON.taken(k + 1)];
    sheet
      .put(
        `${BOTTLES[k]}${FIRST}`,
        `=${cellOf('yield')}*IF(${delivered}<${taken},${delivered},${taken})`,
      )
      .put(
        `${OVERFLOW[k]}${FIRST}`,
        `=IF(${bottles}>${cellOf('store')},${bottles}-${cellOf('store')},0)`,
      )
      .put(
        `${MARGIN[k]}${FIRST}`,
        `=${bottles}*(${SEASON.price}-${cellOf('cost')})-${overflow}*${cellOf('elsewhere')}-${presses}*${cellOf('press')}-${SEASON.days}*${cellOf('cold store')}`,
      );
  });
}

function answers(sheet: SheetPlan): void {
  const best = (first: number, last = first): string => `B${BEST_ROW + first}:D${BEST_ROW + last}`;
  sheet
    .put(`A${BEST_ROW - 2}`, '6  Which case to choose: the margin, 1,000 euros', 'section')
    .put(`A${BEST_ROW - 1}`, 'regret: how much less than the best of the same scenario', 'unit')
    .put(`A${BEST_ROW}`, `=TRANSPOSE(UNDERCURVE.BESTOF(${table(MARGIN)},TRUE))`)
    .look(`A${BEST_ROW}:D${BEST_ROW}`, 'head')
    .look(`A${BEST_ROW + 1}:A${BEST_ROW + 11}`, 'word')
    .look(best(1, 11), 'result')
    .format(best(2, 4), '0.0')
    .format(best(5, 7), '0.0%')
    .format(best(8, 10), '0.0')
    .put(`A${CHANCES_ROW - 2}`, '7  The chance of more bottles than the store holds', 'section')
    .put(`A${CHANCES_ROW - 1}`, 'above the threshold: bottles that must go elsewhere', 'unit')
    .put(`A${CHANCES_ROW}`, `=UNDERCURVE.EXCEEDANCE(${table(BOTTLES)},${cellOf('store')})`)
    .look(`A${CHANCES_ROW}:D${CHANCES_ROW}`, 'head')
    .look(`A${CHANCES_ROW + 1}:A${CHANCES_ROW + 14}`, 'word')
    .look(`B${CHANCES_ROW + 1}:D${CHANCES_ROW + 14}`, 'result')
    .format(`B${CHANCES_ROW + 5}:D${CHANCES_ROW + 13}`, '0.0%')
    .put(`F${DRIVERS_ROW - 2}`, `="8  What moves the margin of "&C${BEST_ROW}`, 'section')
    .put(
      `F${DRIVERS_ROW - 1}`,
      'share of variance: how much less the margin would vary if this input were known; the largest first',
      'unit',
    )
    .put(`F${DRIVERS_ROW}`, `=TRANSPOSE(UNDERCURVE.DRIVERS(${DRIVING},${spillOf(MARGIN[1])}))`)
    .look(`F${DRIVERS_ROW}:L${DRIVERS_ROW}`, 'head')
    .look(`F${DRIVERS_ROW + 1}:F${DRIVERS_ROW + 7}`, 'word')
    .look(`G${DRIVERS_ROW + 1}:L${DRIVERS_ROW + 7}`, 'result')
    .format(`G${DRIVERS_ROW + 1}:L${DRIVERS_ROW + 6}`, '0.00')
    .put(`F${CHECK_ROW - 3}`, '9  Check: the linked harvest against its shape, tonnes', 'section')
    .put(
      `F${CHECK_ROW - 2}`,
      'drawn should lie from "allowed from" to "allowed to"; the overall line allows for the number of comparisons',
      'unit',
    )
    .put(`F${CHECK_ROW - 1}`, `=INDEX(F${CHECK_ROW}#,2,2)`, 'verdict')
    .put(`F${CHECK_ROW}`, `=UNDERCURVE.CHECK(${SEASON.harvest},${SEASON.harvestShape})`)
    .look(`F${CHECK_ROW}:K${CHECK_ROW}`, 'head')
    .look(`F${CHECK_ROW + 1}:F${CHECK_ROW + 21}`, 'word')
    .look(`G${CHECK_ROW + 1}:K${CHECK_ROW + 21}`, 'result')
    .format(`G${CHECK_ROW + 4}:J${CHECK_ROW + 21}`, '0.00')
    .format(`K${CHECK_ROW + 2}:K${CHECK_ROW + 21}`, '0.000')
    .chart({
      id: 'margin-by-presses',
      col: 5,
      row: 9,
      shift: 0,
      width: 480,
      height: 204,
      data: barsChart({
        title: 'Mean margin by the number of presses',
        x: 'case',
        y: '1,000 euros',
        labels: BEST_CASES,
        values: best(2),
        color: BLUE,
      }),
    });
}
