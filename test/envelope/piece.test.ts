import { provePiece } from '../../src/envelope/piece';
import { proved } from './proved';

describe('provePiece', () => {
  // Heights near e^-440, which need no scaling: the product of two of them underflows.
  test.each([-354, -400, -440, -479])(
    'keeps the upper line above the lower one where heights are near e^%i [law]',
    (level) => {
      const { pieces, exponent } = proved(`EXP(${level}-500*(x-4)^2)`, 0, 12);
      const crossed = pieces.filter(
        (piece) =>
          piece.upperLeft < piece.lowerLeft ||
          piece.upperRight < piece.lowerRight ||
          piece.upperArea < piece.lowerArea,
      );
      expect([exponent, crossed]).toEqual([0, []]);
    },
  );
});

describe('provePiece among the smallest and largest numbers', () => {
  // Found by fuzzing: the cube of the width underflowed to 0 and cancelled an infinite f″.
  test('encloses the area where the width is 10^-302 and f″ overflows [law]', () => {
    const { areaLo, areaHi } = proved('EXP(-((1E300*x)^2))', 0, 9);
    const area = Math.sqrt(Math.PI) / 2e300;
    expect(areaLo).toBeLessThanOrEqual(area);
    expect(areaHi).toBeGreaterThanOrEqual(area);
    // An enclosure whose pieces had lost their f″ was 10^-13 wide.
    expect(areaHi - areaLo).toBeGreaterThan(1e-3 * area);
  });

  // Found by fuzzing: slope times height underflowed, and the bound by slopes fell to 0.
  test('keeps the upper line above a plateau whose slopes are below all doubles [law]', () => {
    const plateau = 1.755143854900032e-6;
    const slopes = {
      v: { lo: plateau, hi: plateau * 1.01 },
      d: { lo: -2.485e-321, hi: 1e-322 },
      h: { lo: -Infinity, hi: Infinity },
    };
    const height = { lo: plateau, hi: plateau };
    const ends = { atFrom: height, atTo: height, atMiddle: height };
    const { upperLeft, upperRight } = provePiece(37, 125, slopes, ends);
    expect(upperLeft).toBeGreaterThanOrEqual(plateau);
    expect(upperRight).toBeGreaterThanOrEqual(plateau);
  });
});
