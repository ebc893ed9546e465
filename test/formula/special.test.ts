/**
 * Functions with reference values made by vectors/make.py (mpmath): at points, over
 * random intervals, with their derivatives, and how tight they are.
 */
import { Encloser } from '../../src/formula/enclose';
import { evaluator } from '../../src/formula/evaluate';
import { checkContainment } from './containment';
import { CASES, isWithin, relativeError } from './references';
import { tapeOf } from './formulas';

/** Relative, at every reference point: the promise for all functions of the worksheet. */
const POINT_TOLERANCE = 1e-12;
/** The width of a point's enclosure, relative to its value. */
const POINT_WIDTH = 2e-11;
const N_INTERVALS = 1000;
/** Values below this are among the subnormals' neighbours, where digits are lost. */
const TINY = 1e-290;

describe('reference values', () => {
  test('are at least 50 a formula [law]', () => {
    expect(CASES.length).toBeGreaterThan(80);
    for (const { formula, references } of CASES) {
      expect({ formula, enough: references.length >= 50 }).toEqual({ formula, enough: true });
    }
  });
});

describe.each(CASES.map((c) => [c.formula, c] as const))('%s', (_, c) => {
  const tape = tapeOf(c.formula);

  test('has the reference values at points to 1e-12 [law]', () => {
    const at = evaluator(tape);
    const errors = c.references
      .filter(({ digits }) => digits[0]!.abs().greaterThan(TINY))
      .map(({ x, digits }) => ({ x, error: relativeError(at(x), digits[0]!) }));
    expect(errors.filter(({ error }) => !(error <= POINT_TOLERANCE))).toEqual([]);
  });

  test('has tight enclosures of the reference values at points [law]', () => {
    const encloser = new Encloser(tape);
    const room = encloser.pointValues();
    for (const { x, digits } of c.references) {
      encloser.at(x, room);
      const { lo, hi } = room.density;
      expect([x, isWithin(lo, hi, digits[0]!)]).toEqual([x, true]);
      const size = digits[0]!.abs().toNumber();
      if (size > TINY) expect([x, (hi - lo) / size <= POINT_WIDTH]).toEqual([x, true]);
    }
  });

  test('holds its reference values and slopes over 1,000 random intervals [law]', () => {
    const { breaches, nPoints } = checkContainment(c, tape, N_INTERVALS);
    expect(breaches.slice(0, 3)).toEqual([]);
    expect(nPoints).toBeGreaterThanOrEqual(N_INTERVALS);
  });
});

describe('the containment law', () => {
  test('fails for wrong reference values [law]', () => {
    const c = CASES.find(({ formula }) => formula === 'ERF(x)')!;
    const wrong = {
      ...c,
      references: c.references.map((r) => ({
        ...r,
        digits: r.digits.map((d) => d.times('1.00000000000001')),
      })),
    };
    expect(checkContainment(wrong, tapeOf('ERF(x)'), N_INTERVALS).breaches.length).toBeGreaterThan(
      100,
    );
  });
});
