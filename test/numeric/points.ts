/** A small generator for fixed sets of test points: the same numbers on every run. */

export interface Points {
  /** Uniform in [0, 1). */
  uniform(): number;
  /** Uniform in [a, b). */
  between(a: number, b: number): number;
  /** Of random size: the logarithm is uniform; 0 < a < b. */
  sized(a: number, b: number): number;
  /** A whole number from a to b. */
  whole(a: number, b: number): number;
  /** −1 or 1. */
  sign(): number;
  /** A double at most `n` doubles away from x. */
  near(x: number, n?: number): number;
  pick<T>(choices: readonly T[]): T;
}

/** Marsaglia (2003), "Xorshift RNGs": 32 bits, the triple 13, 17, 5. */
export function points(seed: number): Points {
  let state = seed | 0 || 1;
  const word = (): number => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return state >>> 0;
  };
  const uniform = (): number => ((word() >>> 5) * 67108864 + (word() >>> 6)) / 9007199254740992;
  const between = (a: number, b: number): number => a + (b - a) * uniform();
  const whole = (a: number, b: number): number => Math.floor(between(a, b + 1));
  const view = new DataView(new ArrayBuffer(8));
  return {
    uniform,
    between,
    whole,
    sized: (a, b) => Math.exp(between(Math.log(a), Math.log(b))),
    sign: () => (uniform() < 0.5 ? -1 : 1),
    near(x, n = 20) {
      if (x === 0) return 0;
      view.setFloat64(0, x);
      view.setBigInt64(0, view.getBigInt64(0) + BigInt(whole(-n, n)));
      return view.getFloat64(0);
    },
    pick: (choices) => choices[whole(0, choices.length - 1)]!,
  };
}
