/**
 * The vocabulary at length: containment over 10,000 random intervals a formula, and the
 * same formula text evaluated by LibreOffice Calc (Debian's libreoffice-calc).
 */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { evaluator } from '../../src/formula/evaluate';
import { checkContainment } from '../formula/containment';
import { CASES } from '../formula/references';
import { tapeOf } from '../formula/formulas';

const N_INTERVALS = 10_000;

describe.each(CASES.map((c) => [c.formula, c] as const))('%s', (formula, c) => {
  test('holds its reference values and slopes over 10,000 random intervals [law]', () => {
    const { breaches, nPoints } = checkContainment(c, tapeOf(formula), N_INTERVALS);
    expect(breaches.slice(0, 3)).toEqual([]);
    expect(nPoints).toBeGreaterThanOrEqual(N_INTERVALS);
  });
});

/** Other formulas for the comparison, with where x runs. */
const MORE: readonly (readonly [string, number, number])[] = [
  ['INT(x)', -20, 20],
  ['TRUNC(x,1)', -20, 20],
  ['ROUND(x,2)', -20, 20],
  ['ROUNDUP(x,1)', -20, 20],
  ['ROUNDDOWN(x,1)', -20, 20],
  ['FLOOR(x,0.25)', 0, 20],
  ['CEILING(x,0.25)', 0, 20],
  ['FLOOR.MATH(x,4,1)', -90, 90],
  ['CEILING.MATH(x,4,1)', -90, 90],
  ['MOD(x,3)', -20, 20],
  ['MOD(x,-3)', -20, 20],
  ['YEAR(x)', 61, 90_000],
  ['MONTH(x)', 61, 90_000],
  ['DAY(x)', 61, 90_000],
  ['WEEKDAY(x)', 61, 90_000],
  ['WEEKDAY(x,2)', 61, 90_000],
  ['WEEKDAY(x,3)', 61, 90_000],
  ['DATE(2027,2,x)', 1, 400],
  ['DATE(2027,x,15)', 1, 60],
  ['IFS(x<1,2,x<3,5,TRUE,7)', -1, 5],
  ['SWITCH(INT(x),1,4,2,9,0)', 0, 4],
  ['CHOOSE(x,5,6,7)', 1, 3.9],
  ['MEDIAN(1,x,5,9)', -2, 12],
  ['SUM(x,{1,2;3,4})', -5, 5],
  ['AVERAGE(x,2,7)', -5, 5],
  ['PRODUCT(x,{1,2,3})', -5, 5],
  ['MIN(x,2)+MAX(x,3)', -5, 5],
  ['x^3-2^x+x%', 0.5, 5],
  ['-2^2+x', -5, 5],
  ['2^3^2/x', 1, 5],
  ['EXP(x)*LN(ABS(x)+1)', -9, 9],
  ['SQRT(x)+POWER(x,1.5)+LOG(x,2)', 0.1, 90],
  ['SIN(x)+COS(x)+TAN(x)/9+ATAN(x)', -1.5, 1.5],
  ['TANH(x)*SIGN(x)+PI()', -4, 4],
  ['IF(AND(x>1,NOT(x>3)),x,OR(x<0,x>4)*1)', -2, 6],
];

const TOLERANCE = 1e-12;

/**
 * Calc takes 1 less the share above, which costs the digits of small shares: its error
 * is that of 1, a few 2^-53. Ours is held to mpmath's values in test/formula.
 */
const TAKEN_FROM_1: ReadonlyMap<string, number> = new Map([['F.DIST(x,60,80,TRUE)', 1e-15]]);

function readNumbers(formulas: readonly (readonly [string, readonly number[]])[]): number[] {
  const folder = mkdtempSync(join(tmpdir(), 'calc-'));
  try {
    writeFileSync(join(folder, 'sheet.fods'), sheet(formulas));
    execFileSync(
      'soffice',
      [
        `-env:UserInstallation=file://${folder}/profile`,
        '--headless',
        '--convert-to',
        'csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,false,false',
        '--outdir',
        folder,
        join(folder, 'sheet.fods'),
      ],
      { stdio: 'pipe', timeout: 300_000 },
    );
    return readFileSync(join(folder, 'sheet.csv'), 'utf8').trim().split('\n').map(Number);
  } finally {
    rmSync(folder, { recursive: true });
  }
}

/** In a file the functions of later years have longer names. */
function inFile(formula: string, x: number): string {
  const named = formula
    .replace(
      /\b(?=(?:BETA|BINOM|CHISQ|EXPON|F|GAMMA|LOGNORM|NORM|NORM\.S|POISSON|T|WEIBULL)\.DIST\()/g,
      'COM.MICROSOFT.',
    )
    .replace(/\b(?=(?:FLOOR|CEILING)\.MATH\()/g, 'COM.MICROSOFT.')
    .replace(/\b(?=(?:IFS|SWITCH)\()/g, 'COM.MICROSOFT.');
  const rows = named.replace(/\{[^}]*\}/g, (array) => array.replace(/;/g, '|').replace(/,/g, ';'));
  return rows.replace(/,/g, ';').replace(/\bx\b/g, x < 0 ? `(${x})` : String(x));
}

function sheet(formulas: readonly (readonly [string, readonly number[]])[]): string {
  const escape = (text: string): string =>
    text.replace(/&/g, '&amp;').replace(/</g, '&lt;').replace(/>/g, '&gt;').replace(/"/g, '&quot;');
  const rows = formulas
    .flatMap(([formula, xs]) => xs.map((x) => inFile(formula, x)))
    .map(
      (text) =>
        `<table:table-row><table:table-cell table:formula="of:=${escape(`TEXT(${text};"0.0000000000000000E+000")`)}" table:number-matrix-columns-spanned="1" table:number-matrix-rows-spanned="1"/></table:table-row>`,
    );
  return `<?xml version="1.0"?><office:document xmlns:office="urn:oasis:names:tc:opendocument:xmlns:office:1.0" xmlns:table="urn:oasis:names:tc:opendocument:xmlns:table:1.0" xmlns:of="urn:oasis:names:tc:opendocument:xmlns:of:1.2" office:version="1.3" office:mimetype="application/vnd.oasis.opendocument.spreadsheet"><office:body><office:spreadsheet><table:table table:name="a">${rows.join('')}</table:table></office:spreadsheet></office:body></office:document>`;
}

function hasCalc(): boolean {
  try {
    execFileSync('soffice', ['--version'], { stdio: 'pipe' });
    return true;
  } catch {
    return false;
  }
}

if (hasCalc()) {
  describe('the same text in LibreOffice Calc', () => {
    const N_POINTS = 50;
    const formulas = [
      ...CASES.map((c) => [c.formula, c.references.slice(0, N_POINTS).map(({ x }) => x)] as const),
      ...MORE.map(([formula, from, to]) => {
        const xs = Array.from({ length: N_POINTS }, (_, i) => {
          // The golden section spreads the points; three decimals keep ties out of reach of rounding.
          const share = (i * 0.6180339887498949) % 1;
          return Number((from + (to - from) * share).toFixed(3)) + 0.0003;
        });
        return [formula, xs] as const;
      }),
    ];
    const numbers = readNumbers(formulas);

    test.each(formulas.map(([formula, xs], i) => [formula, xs, i] as const))(
      '%s has the same values to 1e-12 [law]',
      (formula, xs, i) => {
        const at = evaluator(tapeOf(formula));
        const start = formulas.slice(0, i).reduce((n, [, before]) => n + before.length, 0);
        const room = TAKEN_FROM_1.get(formula) ?? 0;
        const isSame = (ours: number, theirs: number): boolean =>
          Math.abs(ours - theirs) <= TOLERANCE * Math.abs(ours) + room;
        const differences = xs
          .map((x, k) => ({ x, ours: at(x), theirs: numbers[start + k]! }))
          .filter(({ ours, theirs }) => !isSame(ours, theirs));
        expect(differences).toEqual([]);
      },
    );
  });
} else {
  console.log('LibreOffice Calc is not installed: the comparison with it was not made.');
}
