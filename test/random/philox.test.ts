import fc from 'fast-check';
import { fillFractions, fraction, philox4x32 } from '../../src/random/philox';

type Words = [number, number, number, number];

const half = fc.oneof(fc.constantFrom(0, 1, 0x7fff, 0x8000, 0xfffe, 0xffff), fc.nat(0xffff));
const word = fc.tuple(half, half).map(([hi, lo]) => hi * 65536 + lo);

/** The generator once more in 64-bit whole numbers, word for word from the paper. */
function philoxInBigInts(counter: readonly number[], key: readonly number[]): number[] {
  const mask = 0xffffffffn;
  let [x0, x1, x2, x3] = counter.map(BigInt) as [bigint, bigint, bigint, bigint];
  let [k0, k1] = key.map(BigInt) as [bigint, bigint];
  for (let round = 0; round < 10; round++) {
    const p0 = 0xd2511f53n * x0;
    const p1 = 0xcd9e8d57n * x2;
    [x0, x1, x2, x3] = [(p1 >> 32n) ^ x1 ^ k0, p1 & mask, (p0 >> 32n) ^ x3 ^ k1, p0 & mask];
    k0 = (k0 + 0x9e3779b9n) & mask;
    k1 = (k1 + 0xbb67ae85n) & mask;
  }
  return [x0, x1, x2, x3].map(Number);
}

function philox(counter: readonly number[], key: readonly number[]): Words {
  const [c0, c1, c2, c3] = counter as Words;
  const [k0, k1] = key as [number, number];
  const out = new Uint32Array(4);
  philox4x32(c0, c1, c2, c3, k0, k1, out);
  return [...out] as Words;
}

// Salmon, Moraes, Dror, Shaw, "Parallel random numbers: as easy as 1, 2, 3", SC11 (2011):
// known-answer vectors of philox4x32 with 10 rounds.
const KNOWN_ANSWERS = [
  {
    counter: [0, 0, 0, 0],
    key: [0, 0],
    words: [0x6627e8d5, 0xe169c58d, 0xbc57ac4c, 0x9b00dbd8],
  },
  {
    counter: [0xffffffff, 0xffffffff, 0xffffffff, 0xffffffff],
    key: [0xffffffff, 0xffffffff],
    words: [0x408f276d, 0x41c83b0e, 0xa20bc7c6, 0x6d5451fd],
  },
  {
    counter: [0x243f6a88, 0x85a308d3, 0x13198a2e, 0x03707344],
    key: [0xa4093822, 0x299f31d0],
    words: [0xd16cfe09, 0x94fdcceb, 0x5001e420, 0x24126ea1],
  },
  {
    counter: [1, 0, 0, 0],
    key: [0, 0],
    words: [0xf8e4cca4, 0x5cb200db, 0xb1a574eb, 0x097eff67],
  },
  {
    counter: [0, 1, 0, 0],
    key: [0, 0],
    words: [0x6ad0c5ec, 0xea236249, 0x73a459f5, 0x074944b3],
  },
  {
    counter: [1, 2, 3, 4],
    key: [5, 6],
    words: [0xc0c839bc, 0x889c87c5, 0x61986739, 0x2d4623d0],
  },
];

describe('philox4x32', () => {
  it.each(KNOWN_ANSWERS)(
    'philox4x32($counter, $key) gives the known words [published]',
    ({ counter, key, words }) => {
      expect(philox(counter, key)).toEqual(words);
    },
  );

  it('philox4x32(counter, key) agrees with the paper written in 64-bit whole numbers [law]', () => {
    // Words with extreme halves are where a lost carry of the long multiplication would show.
    fc.assert(
      fc.property(fc.tuple(word, word, word, word), fc.tuple(word, word), (counter, key) => {
        expect(philox(counter, key)).toEqual(philoxInBigInts(counter, key));
      }),
      { seed: 1, numRuns: 2000 },
    );
  });

  it('philox4x32(counter, key) takes signed words as the unsigned words of the same bits [law]', () => {
    fc.assert(
      fc.property(fc.array(word, { minLength: 6, maxLength: 6 }), (words) => {
        const signed = words.map((w) => w | 0);
        expect(philox(signed.slice(0, 4), signed.slice(4))).toEqual(
          philox(words.slice(0, 4), words.slice(4)),
        );
      }),
      { seed: 2, numRuns: 500 },
    );
  });
});

describe('fillFractions', () => {
  it('fillFractions(c0, …) gives the blocks of philox4x32 one after another [law]', () => {
    const runs = fc.nat(40);
    fc.assert(
      fc.property(
        word,
        word,
        word,
        word,
        fc.tuple(word, word),
        runs,
        runs,
        (c0, c1, c2, c3, [k0, k1], at, blocks) => {
          const out = new Float64Array(at + 2 * blocks + 3).fill(-1);
          fillFractions(c0, c1, c2, c3, k0, k1, out, at, blocks);
          const expected = new Array<number>(out.length).fill(-1);
          for (let i = 0; i < blocks; i++) {
            const [w0, w1, w2, w3] = philox([c0 + i, c1, c2, c3], [k0, k1]);
            expected[at + 2 * i] = fraction(w0, w1);
            expected[at + 2 * i + 1] = fraction(w2, w3);
          }
          expect([...out]).toEqual(expected);
        },
      ),
      { seed: 3, numRuns: 500 },
    );
  });
});

describe('fraction', () => {
  it('fraction(word, next) is the upper 27 and 26 bits read as a binary fraction [law]', () => {
    fc.assert(
      fc.property(word, word, (w, next) => {
        const bits = ((BigInt(w) >> 5n) << 26n) + (BigInt(next) >> 6n);
        expect(fraction(w, next)).toBe(Number(bits) / 2 ** 53);
        expect(fraction(w | 0, next | 0)).toBe(fraction(w, next));
      }),
      { seed: 5, numRuns: 2000 },
    );
  });

  it('fraction(word, next) reaches 0 and 1 − 2^-53 and nothing beyond [law]', () => {
    expect(fraction(0, 0)).toBe(0);
    expect(fraction(31, 63)).toBe(0);
    expect(fraction(0xffffffff, 0xffffffff)).toBe(1 - 2 ** -53);
  });
});
