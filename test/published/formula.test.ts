/**
 * The worksheet's grammar, held to values that other programs and standards give.
 * Sources: [C] obtained by evaluating the text in LibreOffice Calc 7.4; [O] the operator
 * order of OpenFormula (OASIS ODF 1.2 part 2, §5.5, from memory), tightest first:
 * unary −, %, ^, * /, + −, &, comparisons, all left-associative.
 */
import { refusalOf, valueOf } from '../formula/formulas';

describe('formula', () => {
  it.each([
    ['-2^2', 4, 'C'],
    ['0-2^2', -4, 'C'],
    ['2^3^2', 64, 'C'],
    ['-2^-2', 0.25, 'C'],
    ['50%%', 0.005, 'C'],
    ['1+50%', 1.5, 'C'],
    ['2*-3', -6, 'O'],
    ['2--3', 5, 'O'],
    ['--2', 2, 'O'],
    ['+2', 2, 'O'],
    ['2^-1', 0.5, 'O'],
    ['200%^2', 4, 'O'],
    ['-50%', -0.5, 'O'],
    ['2+3*4', 14, 'O'],
    ['2*3^2', 18, 'O'],
    ['8/4/2', 1, 'O'],
    ['8/4*2', 4, 'O'],
    ['10-4-3', 3, 'O'],
    ['10-4+3', 9, 'O'],
    ['(1+2)*3', 9, 'O'],
    ['1+2<4', 1, 'O'],
    ['2*3=6', 1, 'O'],
    ['1<>1', 0, 'O'],
    ['-1<=-1', 1, 'O'],
    ['1>=2', 0, 'O'],
    ['1E3', 1000, 'O'],
    ['1.5e-2', 0.015, 'O'],
    ['.5', 0.5, 'O'],
    ['5.', 5, 'O'],
  ])('%s is %d [published]', (text, value) => {
    expect(valueOf(text)).toBe(value);
  });

  // Values that the same program gives and this language refuses, since another large
  // spreadsheet program gives a different one or since they are about text.
  it.each([
    [
      '3>2>1',
      'Formula, character 4: a TRUE or FALSE is compared with a number, on which spreadsheet programs disagree; write IF(…, 1, 0) around the condition, or AND(…, …) for a chain such as 1<x<3.',
    ],
    [
      '1<2<3',
      'Formula, character 4: a TRUE or FALSE is compared with a number, on which spreadsheet programs disagree; write IF(…, 1, 0) around the condition, or AND(…, …) for a chain such as 1<x<3.',
    ],
    [
      'TRUE=1',
      'Formula, character 5: a TRUE or FALSE is compared with a number, on which spreadsheet programs disagree; write IF(…, 1, 0) around the condition, or AND(…, …) for a chain such as 1<x<3.',
    ],
    [
      '0^0',
      'Formula, character 2: 0^0, on which spreadsheet programs disagree; write the value that is meant.',
    ],
    [
      '(-8)^(1/3)',
      'Formula, character 5: (-8) to a power that is not whole, on which spreadsheet programs disagree; use a base that is not negative.',
    ],
    [
      '"2"+3',
      'Formula, character 1: the text "2" where a number belongs; write a number or a name from the givens.',
    ],
    [
      '1&2="12"',
      'Formula, character 2: the operator "&" joins text; use + - * / ^ %, comparisons, AND and OR.',
    ],
  ])('%s is refused [published]', (text, message) => {
    expect(refusalOf(text)).toBe(message);
  });

  it('a bare minus before ^ is refused unless its number stands there [law]', () => {
    expect(refusalOf('-x^2')).toBe(
      'Formula, character 1: -x^2 means (-x)^2 in a worksheet; write -(x^2), or (-x)^2 if that is meant.',
    );
    expect(valueOf('(-x)^2', 3)).toBe(9);
    expect(valueOf('-(x^2)', 3)).toBe(-9);
    expect(valueOf('-3^2', 0)).toBe(9);
  });

  it.each([
    ['-(x-1)^2', 1, '(x-1)', '2'],
    ['EXP(-(x-1)^2/2)', 5, '(x-1)', '2'],
    ['EXP(-((x-1)/2)^2)', 5, '((x-1)/2)', '2'],
    ['2*-(x+SIN(x))^(1+1)', 3, '(x+SIN(x))', '(1+1)'],
    ['-SIN(x) ^ 2', 1, 'SIN(x)', '2'],
    ['-(x)%^2', 1, '(x)%', '2'],
    ['-(-x)^2', 1, '(-x)', '2'],
    ['-(3)^2', 1, '(3)', '2'],
  ])('%s, a bare minus before ^, is refused with the rewrite [law]', (text, at, base, power) => {
    expect(refusalOf(text)).toBe(
      `Formula, character ${at}: -${base}^${power} means (-${base})^${power} in a worksheet; ` +
        `write -(${base}^${power}), or (-${base})^${power} if that is meant.`,
    );
  });

  it.each([
    ['(-(x-1))^2', 4],
    ['(-(x-1)/2)^2', 1],
    ['-((x-1)^2)', -4],
    ['1-(x-1)^2', -3],
    ['2*(-x)^2', 18],
    ['(x-1)^-2', 0.25],
    ['(-(x-1)*(x-2))^2', 4],
  ])('%s has no bare minus before ^ [law]', (text, value) => {
    expect(valueOf(text, 3)).toBe(value);
  });
});
