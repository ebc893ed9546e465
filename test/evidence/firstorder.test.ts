import { firstOrder } from '../../src/evidence/firstorder';
import { orderOf } from '../../src/numeric/ranks';
import { Z_FALSE_ALARM } from '../draw/statistics';
import { uniform } from './samples';

const share = (input: Float64Array, output: Float64Array) =>
  firstOrder(input, orderOf(input), output);

/** Estimates of many seeded columns: their mean less the exact share, and how often 1.96 errors hold it. */
function measured(
  n: number,
  repetitions: number,
  exact: readonly number[],
  place: (u: number) => number,
  model: (x: readonly number[]) => number,
) {
  const found = exact.map(() => ({ off: 0, squares: 0, held: 0 }));
  for (let r = 0; r < repetitions; r++) {
    const x = exact.map((_, j) => uniform(n, `first order ${n} ${r} ${j}`).map(place));
    const y = Float64Array.from({ length: n }, (_, i) => model(x.map((column) => column[i]!)));
    exact.forEach((wanted, j) => {
      const own = share(x[j]!, y)!;
      found[j]!.off += own.share - wanted;
      found[j]!.squares += (own.share - wanted) ** 2;
      if (Math.abs(own.share - wanted) <= 1.96 * own.error) found[j]!.held++;
    });
  }
  return found.map(({ off, squares, held }) => ({
    bias: off / repetitions,
    error: Math.sqrt(squares / repetitions / repetitions),
    held: held / repetitions,
  }));
}

describe('firstOrder', () => {
  const N = 2000;
  const REPETITIONS = 200;
  /** Coverage of 0.95 in REPETITIONS at a false alarm of 1e-6; a hundredth for what is asymptotic. */
  const LEAST_HELD = 0.95 - Z_FALSE_ALARM * Math.sqrt((0.95 * 0.05) / REPETITIONS) - 0.01;

  it('finds the closed-form shares of the Ishigami function, within its own error [published]', () => {
    // Ishigami & Homma (1990), "An importance quantification technique in uncertainty analysis for
    // computer models", ISUMA '90 (from memory): SIN(x1) + a SIN(x2)^2 + b x3^4 SIN(x1) on (−π, π),
    // V = a²/8 + bπ⁴/5 + b²π⁸/18 + 1/2, V1 = (1 + bπ⁴/5)²/2, V2 = a²/8, V3 = 0.
    const [a, b] = [7, 0.1];
    const whole = a ** 2 / 8 + (b * Math.PI ** 4) / 5 + (b ** 2 * Math.PI ** 8) / 18 + 0.5;
    const exact = [(1 + (b * Math.PI ** 4) / 5) ** 2 / 2 / whole, a ** 2 / 8 / whole, 0];
    expect(exact[0]).toBeCloseTo(0.3139, 4);
    expect(exact[1]).toBeCloseTo(0.4424, 4);
    const place = (u: number): number => (2 * u - 1) * Math.PI;
    const model = ([x1, x2, x3]: readonly number[]): number =>
      Math.sin(x1!) + a * Math.sin(x2!) ** 2 + b * x3! ** 4 * Math.sin(x1!);
    for (const { bias, error, held } of measured(N, REPETITIONS, exact, place, model)) {
      // Two waves within 90 groups hide less than 4/n of the share.
      expect(Math.abs(bias)).toBeLessThan(Z_FALSE_ALARM * error + 4 / N);
      expect(held).toBeGreaterThan(LEAST_HELD);
    }
  });

  it('finds the shares of a linear model: squared weights times variances [law]', () => {
    const exact = [9 / 14, 4 / 14, 1 / 14, 0];
    const model = ([x1, x2, x3]: readonly number[]): number => 3 * x1! - 2 * x2! + x3!;
    for (const { bias, error, held } of measured(N, REPETITIONS, exact, (u) => u, model)) {
      expect(Math.abs(bias)).toBeLessThan(Z_FALSE_ALARM * error + 1 / N);
      expect(held).toBeGreaterThan(LEAST_HELD);
    }
  });

  it('finds the shares of inputs with two values [law]', () => {
    const exact = [0.9, 0.1, 0];
    const model = ([x1, x2]: readonly number[]): number => 3 * x1! + x2!;
    const place = (u: number): number => (u < 0.1 ? 1 : 0);
    for (const { bias, error, held } of measured(N, REPETITIONS, exact, place, model)) {
      expect(Math.abs(bias)).toBeLessThan(Z_FALSE_ALARM * error + 1 / N);
      expect(held).toBeGreaterThan(LEAST_HELD);
    }
  });

  it('is not fooled: shares of another model lie outside the error [law]', () => {
    const model = ([x1]: readonly number[]): number => x1!;
    const [found] = measured(N, 20, [0.9], (u) => u, model);
    expect(found!.held).toBe(0);
  });

  it('keeps a value that fills a group apart, and few rows of another value [law]', () => {
    const input = Float64Array.from({ length: 1000 }, (_, i) => (i < 990 ? 0 : i < 995 ? 1 : 2));
    const output = input.map((x) => (x === 0 ? 5 : 1));
    expect(share(input, output)!.share).toBeCloseTo(1, 12);
    const negative = input.map((x) => -x);
    expect(share(negative, output)!.share).toBeCloseTo(1, 12);
  });

  it('is null where all rows but one are alike [law]', () => {
    const input = Float64Array.from({ length: 50 }, (_, i) => (i === 9 ? 1 : 0));
    expect(share(input, uniform(50, 'alike'))).toBeNull();
  });
});
