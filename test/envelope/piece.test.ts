import { proveEnvelope } from '../../src/envelope/prove';
import { compile } from '../../src/formula/compile';
import { parse } from '../../src/formula/parse';

function envelopeOf(text: string, from: number, to: number): ReturnType<typeof proveEnvelope> {
  const source = { text, where: 'Formula', tree: parse(text, 'Formula') };
  return proveEnvelope(compile([source], ['x'], new Map()), from, to);
}

describe('provePiece', () => {
  // Heights near e^-440, which need no scaling: the product of two of them underflows.
  test.each([-354, -400, -440, -479])(
    'keeps the upper line above the lower one where heights are near e^%i [law]',
    (level) => {
      const { pieces, exponent } = envelopeOf(`EXP(${level}-500*(x-4)^2)`, 0, 12);
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
