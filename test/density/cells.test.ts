import {
  given,
  givenUnlessZero,
  lineOfCells,
  numberIn,
  quoted,
  singleCell,
  sizeOf,
  word,
} from '../../src/density/cells';
import { messageOf } from '../message';

describe('given', () => {
  it('an omitted argument, an empty one and a single blank are null; larger ranges are not [law]', () => {
    for (const none of [null, [], [[null]], [['']], [['  ']]]) expect(given(none)).toBeNull();
    for (const some of [[[0]], [['a']], [[null, null]], [[null], [null]], [[false]]])
      expect(given(some)).toBe(some);
  });

  it('givenUnlessZero takes a single 0 for the blank it may have been [law]', () => {
    for (const none of [null, [[null]], [[0]], [[-0]]]) expect(givenUnlessZero(none)).toBeNull();
    for (const some of [[[1]], [['0']], [[0, 0]], [[false]]])
      expect(givenUnlessZero(some)).toBe(some);
  });
});

describe('cells', () => {
  it.each([
    [null, 'a blank'],
    ['', 'a blank'],
    ['  ', 'a blank'],
    ['a', '"a"'],
    ['q'.repeat(40), `"${'q'.repeat(40)}"`],
    ['q'.repeat(41), `"${'q'.repeat(40)}…"`],
    [true, 'TRUE'],
    [false, 'FALSE'],
    [1.5, '1.5'],
    [{ error: '#N/A' }, '#N/A'],
  ])('quoted(%j) is %s [law]', (cell, text) => {
    expect(quoted(cell)).toBe(text);
  });

  it('numberIn takes blanks and −0 for 0 and refuses text and truths [law]', () => {
    for (const zero of [null, '', ' ', 0, -0]) expect(Object.is(numberIn(zero, 'a'), 0)).toBe(true);
    expect(numberIn(-2.5, 'a')).toBe(-2.5);
    expect(messageOf(() => numberIn('5', 'm'))).toBe('m: "5" is not a number; give a number.');
    expect(messageOf(() => numberIn(true, 'm'))).toBe('m: TRUE is not a number; give a number.');
  });

  it('singleCell and lineOfCells refuse other sizes by name [law]', () => {
    expect(singleCell([[5]], 'count')).toBe(5);
    expect(lineOfCells([[1, 2]], 'rows')).toEqual([1, 2]);
    expect(lineOfCells([[1], [2]], 'rows')).toEqual([1, 2]);
    expect(messageOf(() => singleCell([[1, 2]], 'count'))).toBe(
      'count: 1 row and 2 columns; give one cell.',
    );
    const square = [
      [1, 2],
      [3, 4],
    ];
    expect(messageOf(() => lineOfCells(square, 'rows'))).toBe(
      'rows: 2 rows and 2 columns; give one row or one column.',
    );
    expect(sizeOf([[1]])).toBe('1 row and 1 column');
  });

  it('word folds case and the white space around a text [law]', () => {
    expect([word(' Density '), word(null), word(5), word(true)]).toEqual(['density', '', '', '']);
  });
});
