/**
 * Sheet "Acceptance": the evidence beside the draws. Charts first, then the
 * diagnostics and the proved pieces, and at the right the numbers behind the charts.
 */
import { boundsChart, countsChart } from './charts';
import { APPLES, DOWNTIME, EVIDENCE_ROWS, PROFILE_POINTS, type Quantity } from './quantities';
import { SheetPlan } from './sheet';

const { section, head, first, profileLast } = EVIDENCE_ROWS;
const SHEET_ROWS = 1000;
const DIAGNOSTICS_ROWS = 60;
/** Pieces shown with few digits; a shape rarely needs as many. */
const PIECES_ROWS = 200;
const P_VALUE = 'p-value of observed against expected';
const CHART = { col: 0, row: 4, width: 292, height: 268 };
const CHART_GAP = 8;

export function acceptanceSheet(): SheetPlan {
  const sheet = new SheetPlan('Acceptance', { columns: 42, rows: SHEET_ROWS, frozenRows: 0 });
  const narrow = Array.from({ length: 36 }, () => 88);
  sheet
    .columnWidths([256, 240, 24, 256, 240, 24, ...narrow])
    .put('A1', 'Acceptance: the evidence that each column is drawn correctly', 'title')
    .put(
      'A2',
      'A proposal under the upper bound is kept with the chance density / upper bound. Breaches must be 0; a p-value below 0.001 would be a reason to look.',
      'note',
    )
    .put(
      'A3',
      'This is evidence about the drawing, not about the shape: whether the shape is right stays your judgement.',
      'caution',
    );
  [APPLES, DOWNTIME].forEach((quantity, i) => {
    diagnostics(sheet, quantity);
    pieces(sheet, quantity);
    profile(sheet, quantity);
    counts(sheet, quantity);
    [boundsChart(quantity), countsChart(quantity)].forEach((data, j) => {
      const place = 2 * i + j;
      const shift = place * (CHART.width + CHART_GAP);
      sheet.chart({ ...CHART, id: `evidence-${place}`, shift, data });
    });
  });
  return sheet;
}

function diagnostics(sheet: SheetPlan, { title, drawing, evidence }: Quantity): void {
  const [item, value] = evidence.diagnostics;
  const last = first + DIAGNOSTICS_ROWS - 1;
  const look = (name: string) => `VLOOKUP("${name}",${item}${first}#,2,FALSE)`;
  sheet
    .put(`${item}${section}`, title, 'section')
    .put(
      `${value}${section}`,
      `=TEXT(${look('acceptance')},"0.0%")&" kept, "&${look('breaches')}&" breaches, p-value "&TEXT(${look(P_VALUE)},"0.000")`,
      'verdict',
    )
    .put(`${item}${head}`, 'item', 'head')
    .put(`${value}${head}`, 'value', 'head')
    .put(`${item}${first}`, `=UNDERCURVE.ACCEPTANCE(${drawing})`)
    .look(`${item}${first}:${item}${last}`, 'word')
    .look(`${value}${first}:${value}${last}`, 'result');
}

function pieces(sheet: SheetPlan, { title, shape, evidence }: Quantity): void {
  const [from, last] = evidence.pieces;
  sheet
    .put(`${from}${section}`, `${title}: the proved pieces`, 'section')
    .put(`${from}${head}`, `=UNDERCURVE.ENVELOPE(${shape})`)
    .look(`${from}${head}:${last}${head}`, 'head')
    .format(`${from}${first}:${last}${first + PIECES_ROWS}`, '0.0000');
}

function profile(sheet: SheetPlan, { title, shape, evidence }: Quantity): void {
  const [x, density, , last] = evidence.profile;
  sheet
    .put(`${x}${section}`, `${title}: density and bounds`, 'section')
    .put(`${x}${head}`, `=UNDERCURVE.PROFILE(${shape},,${PROFILE_POINTS})`)
    .look(`${x}${head}:${last}${head}`, 'head')
    .format(`${x}${first}:${x}${profileLast}`, '0.0')
    .format(`${density}${first}:${last}${profileLast}`, '0.000');
}

/**
 * Counted by an ordinary worksheet function, so that the histogram does not rest on
 * our own code. Lines: below the bins, each bin, above the bins.
 */
function counts(sheet: SheetPlan, { title, draws, evidence, bins }: Quantity): void {
  const [above, upTo, count] = evidence.counts;
  const last = first + bins.n;
  sheet
    .put(`${above}${section}`, `${title}: the draws, counted`, 'section')
    .put(`${above}${head}`, 'above', 'head')
    .put(`${upTo}${head}`, 'up to', 'head')
    .put(`${count}${head}`, 'draws', 'head')
    .put(`${count}${first}`, `=FREQUENCY(${draws}#,${upTo}${first}:${upTo}${last})`)
    .look(`${upTo}${first}:${upTo}${last}`, 'input');
  for (let i = 0; i <= bins.n; i++) {
    sheet
      .put(`${upTo}${first + i}`, bins.first + i * bins.width)
      .put(`${above}${first + i + 1}`, `=${upTo}${first + i}`, 'result');
  }
}
