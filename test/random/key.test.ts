import { createHash } from 'node:crypto';
import { sha256 } from '@noble/hashes/sha2';
import { bytesToHex } from '@noble/hashes/utils';
import fc from 'fast-check';
import seedrandom from 'seedrandom';
import { keyOf, keyText } from '../../src/random/key';
import { messageOf } from '../message';

/** ARC4 keyed by the characters of a text, 256 outputs dropped, four bytes to a word, big end first. */
function arc4Words(text: string, count: number): number[] {
  const s = Array.from({ length: 256 }, (_, i) => i);
  const at = (i: number) => s[i & 255]!;
  const swap = (i: number, j: number) => ([s[i], s[j]] = [at(j), at(i)]);
  for (let i = 0, j = 0; i < 256; i++) {
    j = (j + at(i) + text.charCodeAt(i % text.length)) & 255;
    swap(i, j);
  }
  const bytes: number[] = [];
  for (let n = 1, j = 0; bytes.length < 256 + 4 * count; n++) {
    const i = n & 255;
    j = (j + at(i)) & 255;
    swap(i, j);
    bytes.push(at(at(i) + at(j)));
  }
  return Array.from({ length: count }, (_, w) =>
    bytes.slice(256 + 4 * w, 260 + 4 * w).reduce((word, byte) => word * 256 + byte, 0),
  );
}

describe('keyOf', () => {
  it('sha256 of "" and "abc" are the standard digests [published]', () => {
    // FIPS 180-4, example digests of the standard.
    expect(bytesToHex(sha256(''))).toBe(
      'e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855',
    );
    expect(bytesToHex(sha256('abc'))).toBe(
      'ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad',
    );
  });

  it('keyOf(seed, label) is the first two ARC4 words of the SHA-256 of the JSON text [law]', () => {
    // Rebuilt from another SHA-256 and a textbook ARC4. The last text holds letters beyond
    // ASCII, a character of two code units, a quotation mark and half a surrogate pair.
    for (const [seed, label] of [
      ['plan-2027', 'harvest'],
      ['1', '2'],
      ['s', 'Łódź 🍎 "x" \ud800'],
    ] as const) {
      const digest = createHash('sha256')
        .update(JSON.stringify([seed, label]), 'utf8')
        .digest('hex');
      expect(keyOf(seed, label)).toEqual(arc4Words(digest, 2));
    }
  });

  it('keyOf(seed, label) keeps these keys [pinned]', () => {
    expect(keyOf('plan-2027', 'harvest')).toEqual([2567193340, 4243378550]);
    expect(keyOf('plan-2027', 'downtime')).toEqual([4029563588, 1884783130]);
    expect(keyOf(1, 2)).toEqual([447020461, 3817452149]);
    expect(keyOf('Łódź', 'сад')).toEqual([2662954905, 2715604717]);
  });

  it('keyOf(seed, label) tells apart pairs that join to one text [law]', () => {
    const keys = [
      ['ab', 'a'],
      ['a', 'ba'],
      ['aba', '"'],
      ['a', 'b'],
      ['ab', 'b'],
      ['a","b', 'c'],
      ['a', 'b","c'],
    ].map(([seed = '', label = '']) => keyOf(seed, label).join());
    expect(new Set(keys).size).toBe(keys.length);
  });

  it('keyOf(seed, label) tells seed and label apart [law]', () => {
    expect(keyOf('harvest', 'plan')).not.toEqual(keyOf('plan', 'harvest'));
  });

  it('keyOf(seed, label) reads A–Z as a–z and no other letter so [law]', () => {
    expect(keyOf('A', 'Z')).toEqual(keyOf('a', 'z'));
    expect(keyOf('plan', 'Ł')).not.toEqual(keyOf('plan', 'ł'));
    expect(keyOf('plan', 'É')).not.toEqual(keyOf('plan', 'é'));
    expect(keyOf('plan', 'A')).not.toEqual(keyOf('plan', 'Ł'));
  });

  it('keyOf(seed, label) reads a number as its text [law]', () => {
    expect(keyOf(1, 0.5)).toEqual(keyOf('1', '0.5'));
    expect(keyOf(-3, 1e21)).toEqual(keyOf('-3', '1E+21'));
    expect(keyOf(true, 'x')).toEqual(keyOf('TRUE', 'x'));
    expect(keyOf('1.0', 'x')).not.toEqual(keyOf(1, 'x'));
  });

  it('keyOf(seed, label) trims white space at the ends and keeps it inside [law]', () => {
    expect(keyOf(' plan ', '\tharvest\u00a0')).toEqual(keyOf('plan', 'harvest'));
    expect(keyOf('plan a', 'x')).not.toEqual(keyOf('plana', 'x'));
  });

  it('keyOf(seed, label) gives distinct words for distinct texts [law]', () => {
    // 4,000 pairs: the chance that any two of 4,000 random 64-bit keys agree is below 5e-13.
    const keys = new Set<string>();
    for (let i = 1; i <= 2000; i++) keys.add(keyOf(i, 'x').join()).add(keyOf('x', i).join());
    expect(keys.size).toBe(4000);
  });

  it('keyOf(seed, label) takes in no entropy and leaves Math.random alone [law]', () => {
    const random = Math.random;
    const before = keyOf('plan', 'x');
    const stirred = seedrandom('plan', { entropy: true }).int32();
    expect(keyOf('plan', 'x')).toEqual(before);
    expect(Math.random).toBe(random);
    // Negative control: a generator with entropy does not repeat itself (it would once in 2^32).
    expect(seedrandom('plan', { entropy: true }).int32()).not.toBe(stirred);
  });

  it('keyOf(seed, label) refuses a blank seed and a blank label [law]', () => {
    for (const blank of ['', '   ', '\u00a0', '0', ' 0 ']) {
      expect(messageOf(() => keyOf(blank, 'x'))).toBe(
        `seed: "${blank}" counts as blank; give a text or a number other than 0, so that the draws can be rebuilt.`,
      );
      expect(messageOf(() => keyOf('x', blank))).toBe(
        `label: "${blank}" counts as blank; give a text or a number other than 0 (inputs without labels would share their random numbers).`,
      );
    }
    for (const zero of [0, -0]) {
      expect(messageOf(() => keyOf(zero, 'x'))).toBe(
        'seed: 0 counts as blank; give a text or a number other than 0, so that the draws can be rebuilt.',
      );
    }
  });
});

describe('keyText', () => {
  it('keyText(text) is unchanged by a second reading [law]', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme' }), (text) => {
        fc.pre(text.trim() !== '' && text.trim() !== '0');
        const read = keyText(text, 'seed');
        expect(keyText(read, 'seed')).toBe(read);
        expect(read).toHaveLength(text.trim().length);
      }),
      { seed: 4, numRuns: 1000 },
    );
  });
});
