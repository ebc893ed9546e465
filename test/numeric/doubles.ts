/** Doubles of every size for property tests: any bits, round numbers, edges, neighbours. */
import fc from 'fast-check';

const EDGES = [
  0,
  5e-324,
  1e-323,
  2.225073858507201e-308,
  2.2250738585072014e-308,
  1e-300,
  1e-290,
  1e-160,
  2 ** -53,
  0.1,
  1 - 2 ** -53,
  1,
  1 + 2 ** -52,
  2,
  3,
  2 ** 27 + 1,
  2 ** 53,
  1e160,
  1e290,
  1e300,
  2 ** 1023,
  Number.MAX_VALUE,
];

const signed = (edge: number): number[] => [edge, -edge];

/** Finite doubles. */
export const finite: fc.Arbitrary<number> = fc.oneof(
  { weight: 3, arbitrary: fc.double({ noNaN: true, noDefaultInfinity: true }) },
  { weight: 3, arbitrary: fc.double({ min: -1000, max: 1000, noNaN: true }) },
  { weight: 2, arbitrary: fc.integer({ min: -1000, max: 1000 }) },
  { weight: 1, arbitrary: fc.integer({ min: -4096, max: 4096 }).map((k) => k / 64) },
  { weight: 1, arbitrary: fc.constantFrom(...EDGES.flatMap(signed)) },
);

/** Pairs that are related: close in size, opposite, one far below the other. */
export const pair: fc.Arbitrary<readonly [number, number]> = fc.oneof(
  fc.tuple(finite, finite),
  fc
    .tuple(finite, fc.double({ min: -4, max: 4, noNaN: true }))
    .map(([a, k]): readonly [number, number] => [a, clamp(a * k)]),
  fc
    .tuple(finite, fc.integer({ min: -110, max: 110 }), fc.double({ min: 1, max: 2, noNaN: true }))
    .map(([a, k, m]): readonly [number, number] => [a, clamp(a * 2 ** k * m)]),
  fc
    .tuple(finite, fc.integer({ min: -3, max: 3 }))
    .map(([a, k]): readonly [number, number] => [a, clamp(-a * (1 + k * 2 ** -52))]),
);

function clamp(x: number): number {
  return Math.max(-Number.MAX_VALUE, Math.min(Number.MAX_VALUE, x));
}
