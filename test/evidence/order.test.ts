import fc from 'fast-check';
import { inOrder, orderOf, ranksOf } from '../../src/evidence/order';
import { uniform } from './samples';

const byComparison = (values: Float64Array): number[] =>
  Array.from(values.keys()).sort((a, b) => values[a]! - values[b]! || a - b);

describe('orderOf', () => {
  it('is the order that comparing gives, for few rows and for many [law]', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ noNaN: true }), { minLength: 1, maxLength: 40 }),
        fc.integer({ min: 1, max: 200 }),
        (numbers, times) => {
          const some = numbers.map((x) => x + 0);
          const values = Float64Array.from({ length: some.length * times }, (_, i) => {
            const value = some[(i * 7919) % some.length]!;
            return i % 3 === 0 ? value : value / (1 + (i % 5));
          }).map((x) => (x === 0 ? 0 : x));
          expect(Array.from(orderOf(values))).toEqual(byComparison(values));
        },
      ),
      { seed: 3, numRuns: 60 },
    );
  });

  it('sorts numbers of every size and sign by their digits [law]', () => {
    const u = uniform(20_000, 'order');
    const values = u.map((x, i) => (x - 0.5) * 10 ** ((i % 601) - 300));
    const sorted = inOrder(values, orderOf(values));
    expect(sorted).toEqual(values.slice().sort());
  });
});

describe('ranksOf', () => {
  it('gives equal values the middle of their ranks [law]', () => {
    const values = Float64Array.of(5, 1, 5, 3, 5);
    const order = orderOf(values);
    expect(Array.from(ranksOf(inOrder(values, order), order))).toEqual([4, 1, 4, 2, 4]);
  });
});
