/**
 * Every bad input that a person is likely to give, and the whole text it is answered
 * with: where, what was found, what would be right.
 */
import type { Cell, Range } from '../../src/index';
import { acceptance, CellErrorPassed, draw, envelope, InputError, profile } from '../../src/index';
import { messageOf } from '../message';

interface Given {
  readonly density?: Range | string | null;
  readonly limits?: Range | null;
  readonly rows?: Cell | Range;
  readonly seed?: Cell | Range;
  readonly label?: Cell | Range;
  readonly givens?: readonly Range[];
}

const rangeOf = (value: Cell | Range): Range =>
  Array.isArray(value) ? (value as Range) : [[value as Cell]];

/** The arguments of DRAW, all of them right but for what is given. */
function argumentsOf(given: Given): Parameters<typeof draw> {
  const { density = 'x+1', limits = [[0, 1]], rows = 3, seed = 'plan', label = 'press' } = given;
  return [
    typeof density === 'string' ? [[density]] : density,
    limits,
    rangeOf(rows),
    rangeOf(seed),
    rangeOf(label),
    given.givens ?? [],
  ];
}

const U = 'unbounded';
const WHOLE = 'give a whole number from 1 to 1048575.';
const SEED = 'give a text or a number other than 0, so that the draws can be rebuilt.';
const LABEL =
  'give a text or a number other than 0 (inputs without labels would share their random numbers).';
const DEFINED = 'keep the limits where it is defined, or give it a height there with IF.';
const POSITIVE = 'heights must be 0 or more; use MAX(0, …) if that is meant.';
const NARROW_OR_IF =
  'end or begin the limits there if it grows without limit, keep them away from there or, where the formula is only 0/0, give its height with IF, as in IF(ABS(x)<1E-9, 1, SIN(x)/x).';

const BLOCK: Range = [
  ['density', 'm*EXP(-x)'],
  ['from', 0],
  ['to', 5],
  ['rows', 3],
  ['seed', 'plan'],
  ['label', 'press'],
  ['m', 2],
];
const blockWith = (name: string, value: Cell): Given => ({
  density: BLOCK.map((row) => (row[0] === name ? [name, value] : row)),
  limits: null,
  rows: null,
  seed: null,
  label: null,
});

const REFUSED: Record<string, readonly (readonly [Given, string])[]> = {
  'a density that cannot be drawn': [
    [
      { density: 'SIN(x)', limits: [[0, 10]] },
      `Density: it is negative at x = 10 (-0.544021); ${POSITIVE}`,
    ],
    [
      { density: 'LN(x)', limits: [[0.5, 2]] },
      `Density: it is negative at x = 0.5 (-0.693147); ${POSITIVE}`,
    ],
    [
      { density: 'LN(x)' },
      'Density: it is never above 0 within the limits, and negative at x = 0.5 (-0.693147); heights must be 0 or more, and above 0 somewhere: turn the sign, or write MAX where MIN stands.',
    ],
    [
      { density: 'x^2-0.01', limits: [[-1, 1]] },
      `Density: it is negative at x = 0 (-0.01); ${POSITIVE}`,
    ],
    [
      { density: 'x+1', limits: null },
      'Density: it is negative at x = -3.22818e+19 (-3.22818e+19); heights must be 0 or more; give limits, or use MAX(0, …) if that is meant.',
    ],
    [
      { density: 'x-x' },
      'Density: it is 0 everywhere from x = 0 to x = 1; some height within the limits must be above 0.',
    ],
    [
      { density: 'MAX(0,x-5)' },
      'Density: it is 0 everywhere from x = 0 to x = 1; some height within the limits must be above 0.',
    ],
    [
      { density: 'x=0.5' },
      'Density: it is 0 everywhere from x = 0 to x = 1, apart from single points; some height within the limits must be above 0.',
    ],
    [
      { density: 'TAN(x)^2', limits: [[0, 3]] },
      `Density: it cannot be bounded near x = 1.5708; ${NARROW_OR_IF}`,
    ],
    [
      { density: '1/x', limits: [[-1, 1]] },
      `Density: it cannot be bounded near x = 0; ${NARROW_OR_IF}`,
    ],
    [{ density: 'x^-1' }, 'Density: its area is infinite at x = 0; start the limits above 0.'],
    [
      { density: '1/(3-x)', limits: [[0, 3]] },
      'Density: it cannot be bounded near x = 3; end the limits below 3.',
    ],
    [
      { density: '1/x', limits: [[1, U]] },
      'Density: its area is infinite towards larger x: it does not fall fast enough; give a number as the upper limit instead of unbounded.',
    ],
    [
      { density: '1/(1+ABS(x))', limits: [[U, U]] },
      'Density: its area is infinite towards smaller x: it does not fall fast enough; give a number as the lower limit instead of unbounded.',
    ],
    [
      { density: '1', limits: [[0, U]] },
      'Density: its area is infinite towards larger x: it does not fall fast enough; give a number as the upper limit instead of unbounded.',
    ],
    [
      { density: 'EXP(x)', limits: [[0, U]] },
      'Density: its area is infinite towards larger x: it does not fall fast enough; give a number as the upper limit instead of unbounded.',
    ],
    [
      { density: 'SQRT(x-1)', limits: [[0, 3]] },
      `Density: it is undefined from x = 0 to x = 1, where the square root of a negative number is taken; ${DEFINED}`,
    ],
    [
      { density: 'LN(x)+5', limits: [[-1, 3]] },
      `Density: it is undefined from x = -1 to x = 0, where LN takes a number that is not above 0; ${DEFINED}`,
    ],
    [
      { density: 'x^x', limits: [[-1, 1]] },
      `Density: it is undefined from x = -1 to x = 0, where a number that is not above 0 is raised to a power that varies; ${DEFINED}`,
    ],
    [
      { density: 'x^(1/3)', limits: [[-8, 8]] },
      `Density: it is undefined from x = -8 to x = 0, where a negative number is raised to a power that is not whole; ${DEFINED}`,
    ],
    [
      { density: 'x/0' },
      `Density: it is undefined from x = 0 to x = 1, where it divides by zero; ${DEFINED}`,
    ],
  ],

  'a name that is not known': [
    [
      { density: 'x+y' },
      'Formula, character 3: "y" is not a known name; add it to the givens, or use one of: x.',
    ],
    [
      {
        density: 'm*x+y',
        givens: [
          [
            ['m', 1],
            ['s', 2],
          ],
        ],
      },
      'Formula, character 5: "y" is not a known name; add it to the givens, or use one of: x, m, s.',
    ],
    [
      { density: 'x+1', limits: [['t', 0, 1]] },
      'Formula, character 1: "x" is not a known name; add it to the givens, or use one of: t.',
    ],
    [
      { density: '$B$2*x' },
      'Formula, character 1: "$B$2" is a cell address with no given; add a row $B$2 | value to the givens, or write the value itself.',
    ],
    [
      { density: 'x*Sheet1!B2' },
      'Formula, character 3: "Sheet1!B2" is a cell address with no given; add a row Sheet1!B2 | value to the givens, or write the value itself.',
    ],
    [
      { density: 'SUM(A1:A9)*x' },
      'Formula, character 5: "A1:A9" is a cell address with no given; add a column with the heading A1:A9 to the givens, or write its values as an array such as {1,2,3}.',
    ],
    [
      { density: 'EXP' },
      'Formula, character 1: "EXP" is a function without its brackets; write EXP(…).',
    ],
    [
      { density: 'PI*x' },
      'Formula, character 1: "PI" is a function without its brackets; write PI().',
    ],
    [
      { density: 'x(2)' },
      'Formula, character 1: brackets after something that is not a function; put * before the bracket to multiply.',
    ],
    [
      { density: '2(x)' },
      'Formula, character 2: brackets after something that is not a function; put * before the bracket to multiply.',
    ],
  ],

  'brackets, operators and separators': [
    [{ density: 'EXP(-(x^2)' }, 'Formula, character 4: "(" is never closed; add ")".'],
    [{ density: 'x)' }, 'Formula, character 2: ")" was never opened; remove it or add "(".'],
    [
      { density: 'SUM({1,2)}*x' },
      'Formula, character 9: ")" closes the "{" of character 5; close brackets in the order they were opened.',
    ],
    [
      { density: '"x' },
      'Formula, character 1: the quotation mark " is never closed; add another ".',
    ],
    [
      { density: 'EXP(-x^2)', limits: [[-3, 3]] },
      'Formula, character 5: -x^2 means (-x)^2 in a worksheet; write -(x^2), or (-x)^2 if that is meant.',
    ],
    [
      {
        density: 'EXP(-m^(k+(1))/2)',
        givens: [
          [
            ['m', 1],
            ['k', 1],
          ],
        ],
      },
      'Formula, character 5: -m^(k+(1)) means (-m)^(k+(1)) in a worksheet; write -(m^(k+(1))), or (-m)^(k+(1)) if that is meant.',
    ],
    [
      { density: '2-3*-SIN(x)^2' },
      'Formula, character 5: -SIN(x)^2 means (-SIN(x))^2 in a worksheet; write -(SIN(x)^2), or (-SIN(x))^2 if that is meant.',
    ],
    [{ density: 'EXP(-0,5*x)' }, 'Formula, character 6: "0,5" has a decimal comma; write 0.5.'],
    [{ density: '0,5*x' }, 'Formula, character 1: "0,5" has a decimal comma; write 0.5.'],
    [{ density: 'LET(a,0,5,a*x)' }, 'Formula, character 7: "0,5" has a decimal comma; write 0.5.'],
    [{ density: 'MAX(1,5;x)' }, 'Formula, character 5: "1,5" has a decimal comma; write 1.5.'],
    [
      { density: 'IF(x<1;2,x)' },
      'Formula, character 9: both "," and ";" separate arguments; use one of them throughout.',
    ],
    [{ density: 'IF(x>0.5,1,2,3)' }, 'Formula, character 1: IF has 4 arguments; give it 2 to 3.'],
    [
      { density: 'ATAN(x1,2)', givens: [[['x1', 1]]] },
      'Formula, character 1: ATAN has 2 arguments; give it 1.',
    ],
    [{ density: 'EXP(x,x)+MAX(1,2)' }, 'Formula, character 1: EXP has 2 arguments; give it 1.'],
    [
      { density: 'x,1' },
      'Formula, character 2: "," stands outside the brackets of a function; remove it, or write a decimal point.',
    ],
    [
      { density: '(x;1)' },
      'Formula, character 3: ";" stands outside the brackets of a function; remove it, or write a decimal point.',
    ],
    [
      { density: 'x*2*' },
      'Formula, character 4: the formula ends with "*"; write what follows it, or remove it.',
    ],
    [
      { density: '=*x' },
      'Formula, character 2: the formula begins with "*"; write what belongs before it.',
    ],
    [
      { density: 'MAX(1,2)+*x' },
      'Formula, character 10: "+" and "*" stand next to each other; remove one, or write what belongs between them.',
    ],
    [
      { density: 'EXP(x*)' },
      'Formula, character 7: nothing stands between "*" and ")"; write what belongs there.',
    ],
    [
      { density: '2*()' },
      'Formula, character 4: nothing stands between "(" and ")"; write what belongs there.',
    ],
    [{ density: 'x**2' }, 'Formula, character 2: "**" is not a worksheet operator; write ^.'],
    [{ density: 'x=>0.5' }, 'Formula, character 2: "=>" is not a worksheet operator; write >=.'],
    [{ density: 'x!=0.5' }, 'Formula, character 2: "!=" is not a worksheet operator; write <>.'],
    [
      { density: '(x>0)&&(x<1)' },
      'Formula, character 6: "&&" is not a worksheet operator; write AND(…, …).',
    ],
    [
      { density: 'x < = 0.5' },
      'Formula, character 5: "<" and "=" stand next to each other; write <= without a space.',
    ],
    [
      { density: 'x≤0.5' },
      'Formula, character 2: "≤" is not the sign that worksheet formulas use; write <=.',
    ],
    [
      { density: 'SUM({1,−2})+x' },
      'Formula, character 8: "−" is not the sign that worksheet formulas use; write -.',
    ],
    [
      { density: 'x+\u200b1' },
      'Formula, character 3: a character that cannot be seen (U+200B); delete it.',
    ],
    [
      { density: '2x+1' },
      'Formula, character 1: "2x" is neither a number nor a name; put * or another operator between a number and what follows it.',
    ],
    [
      { density: '2 x' },
      'Formula, character 3: two parts with no operator between them; add * or another operator.',
    ],
    [
      { density: 'x SIN(x)' },
      'Formula, character 3: two parts with no operator between them; add * or another operator.',
    ],
    [
      { density: 'EXP (x)' },
      'Formula, character 4: a space between EXP and its bracket; remove the space.',
    ],
    [
      { density: 'x&1' },
      'Formula, character 2: the operator "&" joins text; use + - * / ^ %, comparisons, AND and OR.',
    ],
    [
      { density: '@x' },
      'Formula, character 1: the operator "@" is not part of the formula language; use + - * / ^ %, comparisons, AND and OR.',
    ],
    [
      { density: 'x#[' },
      'Formula, character 1: "x#[" does not fit what stands before it; look for a missing operator, number, comma or bracket.',
    ],
    [
      { density: 'Sheet1!*x' },
      'Formula, character 1: "Sheet1!" names a sheet without a cell; write the cell after it, as in Sheet1!B2.',
    ],
    [
      { density: 'SUM({x,1})' },
      'Formula, character 6: "x" is not a number; write only numbers inside { }, as in {1,2,3}.',
    ],
  ],

  'what a formula may not hold': [
    [
      { density: '"much"*x' },
      'Formula, character 1: the text "much" where a number belongs; write a number or a name from the givens.',
    ],
    [
      { density: '#N/A+x' },
      'Formula, character 1: the error value #N/A; write a formula without error values.',
    ],
    [
      { density: '1e400*x' },
      'Formula, character 1: the number 1e400 is too large; use numbers up to 1.79E308.',
    ],
    [
      { density: `x${' '.repeat(8192)}` },
      'Formula: 8193 characters; use at most 8192, or split the formula with givens.',
    ],
    [
      { density: `${'('.repeat(65)}x${')'.repeat(65)}` },
      'Formula, character 65: brackets 65 deep; use at most 64 levels, or name parts with LET.',
    ],
    [
      { density: 'LET(f,LAMBDA(n,n*f(n-1)),f(x))' },
      'Formula, character 5: f calls itself; recursion is not part of the formula language; write the steps out.',
    ],
    [
      { density: '0^0*x' },
      'Formula, character 2: 0^0, on which spreadsheet programs disagree; write the value that is meant.',
    ],
    [
      { density: '1<x<2' },
      'Formula, character 4: a TRUE or FALSE is compared with a number, on which spreadsheet programs disagree; write IF(…, 1, 0) around the condition, or AND(…, …) for a chain such as 1<x<3.',
    ],
    [
      { density: '(-8)^(1/3)+x' },
      'Formula, character 5: (-8) to a power that is not whole, on which spreadsheet programs disagree; use a base that is not negative.',
    ],
    [
      { density: '{1,2}*x' },
      'Formula, character 1: an array where a single number belongs; put it inside SUM, PRODUCT or another function that takes many numbers.',
    ],
    [
      { density: 'LAMBDA(a,b,a+b)' },
      'Formula, character 1: LAMBDA has 2 names; give it 1, one for each variable (x).',
    ],
    [
      { density: 'LET(f,LAMBDA(a,a+1),f)' },
      'Formula, character 1: a LAMBDA where a number belongs; give it its arguments in brackets.',
    ],
    [
      { density: 'LET(f,LAMBDA(a,a+1),f(1,2))+x' },
      'Formula, character 21: a LAMBDA of 1 name has 2 arguments; give it 1.',
    ],
    [
      { density: 'LAMBDA()' },
      'Formula, character 1: LAMBDA is empty; write its names and then its result.',
    ],
    [
      { density: 'LET(a,1)' },
      'Formula, character 8: LET or LAMBDA ends too early; write pairs of name and value and then the result, as in LET(a,2,a*x).',
    ],
    [
      { density: 'LET(a,1,a,2,3)' },
      'Formula, character 9: the name "a" stands twice in one LET or LAMBDA; give each name once.',
    ],
    [
      { density: 'LET(x1,2,x1*x)' },
      'Formula, character 5: "x1" cannot be a name in LET or LAMBDA; use letters that are not a cell address, such as a or mu.',
    ],
    [{ density: '=' }, 'Formula: it is blank; give a formula such as EXP(-x).'],
  ],

  'lines of a product': [
    [
      { density: [['EXP(-x)'], [null], ['x*']] },
      'Formula, line 3, character 2: the formula ends with "*"; write what follows it, or remove it.',
    ],
    [
      { density: [['EXP(-x)'], ['x<lowest']] },
      'Formula, line 2, character 3: "lowest" is not a known name; add it to the givens, or use one of: x.',
    ],
    [
      { density: [['EXP(-x)'], [3]] },
      'density (argument 1), row 2: 3 is not a formula; give a formula as text, such as EXP(-x).',
    ],
  ],

  'a table': [
    [
      {
        density: [
          [0, 1],
          [2, 1],
          [1, 1],
        ],
        limits: null,
      },
      'density (argument 1), row 3: x falls from 2 to 1; order the points so that x never falls.',
    ],
    [
      {
        density: [
          ['x', 'h'],
          [0, 1],
          [2, -3],
        ],
        limits: null,
      },
      'density (argument 1), row 3, column 2: the height -3 is negative; give heights of 0 or more.',
    ],
    [
      {
        density: [
          [0, 1],
          ['2 t', 1],
        ],
        limits: null,
      },
      'density (argument 1), row 2, x: "2 t" is not a number; give a number.',
    ],
    [
      {
        density: [
          [0, 0],
          [2, 0],
        ],
        limits: null,
      },
      'density (argument 1), column 2: there is no area under the points; give some height above 0 over a stretch of x.',
    ],
    [
      {
        density: [
          [0, 1],
          [2, 1],
        ],
        limits: [[5, 6]],
      },
      'limits (argument 2): the table has no area between 5 and 6; give limits that meet its points, which go from 0 to 2.',
    ],
    [
      {
        density: [
          [0, 1, 1],
          [2, 1, 1],
        ],
        limits: null,
      },
      'density (argument 1): column 2 has no heading; give every column of heights a heading; it is the label of its draws.',
    ],
    [
      {
        density: [
          ['x', 'a', 'b'],
          [0, 1, 1],
          [2, 1, 1],
        ],
        limits: null,
        label: [['p', 'q']],
      },
      'label (argument 5): 2 labels for 2 columns of heights; give one label or none: the headings of the columns tell them apart.',
    ],
    [
      {
        density: [
          [0, 1],
          [2, 1],
        ],
        limits: null,
        label: null,
      },
      `label (argument 5): it is blank; ${LABEL}`,
    ],
  ],

  'density and limits': [
    [
      { density: null },
      'density (argument 1): it is blank; give a formula such as EXP(-x), a table of points, or a block with a row density.',
    ],
    [
      { density: [[5]] },
      'density (argument 1): 5 is not a formula; give a formula as text, such as EXP(-x).',
    ],
    [
      { limits: [[1, 1]] },
      'limits (argument 2): from (1) is not below to (1); give from first and a larger to.',
    ],
    [
      { limits: [[3, 1]] },
      'limits (argument 2): from (3) is not below to (1); give from first and a larger to.',
    ],
    [
      { limits: [['low', 1]] },
      'limits (argument 2), from: "low" is neither a number nor the name of a given; give a number, or the word unbounded.',
    ],
    [{ limits: [[0, false]] }, 'limits (argument 2), to: FALSE is not a number; give a number.'],
    [
      { limits: [[0]], density: 'x' },
      'Density: it is negative at x = -3.22818e+19 (-3.22818e+19); heights must be 0 or more; give limits, or use MAX(0, …) if that is meant.',
    ],
    [
      { limits: [[7]] },
      'limits (argument 2): 1 row and 1 column; give two cells, from and to, or a row name, from, to.',
    ],
  ],

  'rows, seed and label': [
    [{ rows: null }, `rows (argument 3): they are missing; ${WHOLE}`],
    [{ rows: 0 }, `rows (argument 3): 0 is below 1; ${WHOLE}`],
    [{ rows: -5 }, `rows (argument 3): -5 is below 1; ${WHOLE}`],
    [{ rows: 1.5 }, `rows (argument 3): 1.5 is not whole; ${WHOLE}`],
    [{ rows: 1_048_576 }, `rows (argument 3): 1048576 is above 1048575; ${WHOLE}`],
    [{ rows: 'many' }, `rows (argument 3): "many" is not a number; ${WHOLE}`],
    [
      { rows: [[9, 3]] },
      'rows (argument 3): the last row (3) is before the first (9); give one number of rows, or the first and the last row.',
    ],
    [
      { rows: [[1, 2, 3]] },
      'rows (argument 3): 3 cells; give one number of rows, or the first and the last row.',
    ],
    [{ rows: [[null, 3]] }, `rows (argument 3): a blank is not a number; ${WHOLE}`],
    [{ seed: null }, `seed (argument 4): it is blank; ${SEED}`],
    [{ seed: '' }, `seed (argument 4): it is blank; ${SEED}`],
    [{ seed: 0 }, `seed (argument 4): it is blank; ${SEED}`],
    [{ seed: '0' }, `seed (argument 4): "0" counts as blank; ${SEED}`],
    [{ seed: [['a', 'b']] }, 'seed (argument 4): 1 row and 2 columns; give one cell.'],
    [{ label: null }, `label (argument 5): it is blank; ${LABEL}`],
    [{ label: ' ' }, `label (argument 5): it is blank; ${LABEL}`],
    [{ label: 0 }, `label (argument 5): it is blank; ${LABEL}`],
    [{ label: [['a', null, 'c']] }, `label (argument 5), cell 2: it is blank; ${LABEL}`],
    [{ label: [['a', 0]] }, `label (argument 5), cell 2: 0 counts as blank; ${LABEL}`],
    [
      { label: [['press', 'Press ']] },
      'label (argument 5): "Press" stands twice; give each column its own label; equal labels draw equal numbers.',
    ],
    [
      {
        label: [
          ['a', 'b'],
          ['c', 'd'],
        ],
      },
      'label (argument 5): 2 rows and 2 columns; give one row or one column.',
    ],
  ],

  givens: [
    [
      {
        givens: [
          [
            ['m', 4],
            ['M', 5],
          ],
        ],
      },
      'givens (argument 6), "M": it is the same name as "m"; keep one of the two.',
    ],
    [
      { givens: [[['m', 4]], [['m', 4]]] },
      'givens (argument 7), "m": it is given twice; keep one of the two.',
    ],
    [
      { givens: [[['x', 4]]] },
      'givens (argument 6), "x": it is the name of the variable; rename the given, or the variable in limits.',
    ],
    [
      { givens: [[['if', 4]]] },
      'givens (argument 6), "if": it is the name of a formula function; rename the given.',
    ],
    [
      {
        givens: [
          [
            ['m', 4],
            ['s', 'much'],
          ],
        ],
      },
      'givens (argument 6), "s": "much" is not a number; give a number.',
    ],
  ],

  'a shape block': [
    [blockWith('rows', null), `density (argument 1), rows: a blank is not a number; ${WHOLE}`],
    [blockWith('rows', 0), `density (argument 1), rows: 0 is below 1; ${WHOLE}`],
    [blockWith('seed', null), `density (argument 1), seed: it is blank; ${SEED}`],
    [blockWith('label', 0), `density (argument 1), label: 0 counts as blank; ${LABEL}`],
    [blockWith('m', 'two'), 'density (argument 1), "m": "two" is not a number; give a number.'],
    [
      blockWith('density', null),
      'density (argument 1), density: a blank is not a formula; give a formula as text, such as EXP(-x).',
    ],
    [
      blockWith('to', -1),
      'density (argument 1): from (0) is not below to (-1); give from first and a larger to.',
    ],
    [
      blockWith('to', 'last'),
      'density (argument 1), to: "last" is neither a number nor the name of a given; give a number, or the word unbounded.',
    ],
    [
      { ...blockWith('m', 2), density: [...BLOCK, ['Seed', 'other']] },
      'density (argument 1), row 8: "seed" stands twice; keep one of the two.',
    ],
    [
      { ...blockWith('m', 2), density: BLOCK.map((row) => [...row, null]) },
      'density (argument 1): a block of 3 columns; give its two columns, words and values.',
    ],
  ],
};

describe.each(Object.entries(REFUSED))('%s', (_, rows) => {
  const shown = (given: Given): string => JSON.stringify(given).slice(0, 80);

  it.each(rows.map(([given, message]) => [shown(given), given, message] as const))(
    'draw(%s …) is refused in full words [law]',
    (__, given, message) => {
      const call = () => draw(...argumentsOf(given));
      expect(call).toThrow(InputError);
      expect(messageOf(call)).toBe(message);
    },
  );
});

describe('messages', () => {
  it('give a place, what was found and what would be right, in one line [law]', () => {
    for (const [, message] of Object.values(REFUSED).flat()) {
      expect(message).toMatch(/^[^:;]+: .+; .+\.$/);
      expect(message).not.toMatch(/undefined is|NaN|\[object|null/);
    }
  });

  it('of ENVELOPE, ACCEPTANCE and PROFILE are those of DRAW, in their own places [law]', () => {
    const bad = argumentsOf({ density: 'EXP(-(x^2)' });
    const message = 'Formula, character 4: "(" is never closed; add ")".';
    expect(messageOf(() => acceptance(...bad))).toBe(message);
    expect(messageOf(() => envelope(bad[0], bad[1], []))).toBe(message);
    expect(messageOf(() => profile(bad[0], bad[1], null, []))).toBe(message);
    const twice = [
      [
        ['m', 1],
        ['m', 2],
      ],
    ];
    expect(messageOf(() => envelope([['x']], [[0, 1]], twice))).toBe(
      'givens (argument 3), "m": it is given twice; keep one of the two.',
    );
    expect(messageOf(() => profile([['x']], [[0, 1]], null, twice))).toBe(
      'givens (argument 4), "m": it is given twice; keep one of the two.',
    );
  });

  it.each([
    [
      1,
      'count (argument 3): 1 is not a whole number from 2 to 100000; give how many points the chart needs, such as 201.',
    ],
    [
      2.5,
      'count (argument 3): 2.5 is not a whole number from 2 to 100000; give how many points the chart needs, such as 201.',
    ],
    [
      100_001,
      'count (argument 3): 100001 is not a whole number from 2 to 100000; give how many points the chart needs, such as 201.',
    ],
    ['many', 'count (argument 3): "many" is not a number; give a number.'],
  ])('profile(…, %j) is refused [law]', (count, message) => {
    expect(messageOf(() => profile([['x']], [[0, 1]], [[count]], []))).toBe(message);
  });

  it('envelope and profile of several columns of heights are refused [law]', () => {
    const table = [
      ['x', 'a', 'b'],
      [0, 1, 1],
      [1, 1, 1],
    ];
    const message = 'density (argument 1): 2 columns of heights; give x and one column of heights.';
    expect(messageOf(() => envelope(table, null, []))).toBe(message);
    expect(messageOf(() => profile(table, null, null, []))).toBe(message);
  });

  it.each(['density', 'limits', 'rows', 'seed', 'label', 'givens'] as const)(
    'an error value in %s comes back as that error value [law]',
    (name) => {
      const error: Range = [[{ error: '#DIV/0!' }]];
      const given = { [name]: name === 'givens' ? [[['m', { error: '#DIV/0!' }]]] : error };
      const call = () => draw(...argumentsOf(given));
      expect(call).toThrow(CellErrorPassed);
      expect(messageOf(call)).toBe('#DIV/0!');
    },
  );
});
