/**
 * From the seed and label a person writes to the Philox key of that input's random numbers.
 *
 * Key: the first two int32() of seedrandom(hex SHA-256 of the UTF-8 JSON text of
 * [seed, label]). The JSON text keeps the two apart ("ab","c" is not "a","bc"); SHA-256
 * (FIPS 180-4) spreads texts of any length evenly; seedrandom's int32() is ARC4 on whole
 * numbers, so the key has the same bits on every engine.
 *
 * Not handled: letters outside A–Z are compared as written ("Ł" is not "ł"), and so are the
 * composed and decomposed forms of an accented letter.
 */
import { sha256 } from '@noble/hashes/sha2';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils';
import seedrandom from 'seedrandom';
import { InputError } from '../errors';

/** What a cell with a seed or a label may hold. */
export type KeyPart = string | number | boolean;

/** Two unsigned 32-bit words. */
export type Key = readonly [k0: number, k1: number];

/**
 * The key under which all numbers of one input are drawn.
 * Domain: any seed and label that are not blank, as `keyText` reads them.
 * Guarantee: exact, the same bits on every engine.
 * @throws {InputError} when seed or label is blank, 0 or "".
 */
export function keyOf(seed: KeyPart, label: KeyPart): Key {
  const json = JSON.stringify([keyText(seed, 'seed'), keyText(label, 'label')]);
  const digest = bytesToHex(sha256(utf8ToBytes(json)));
  // Called with a text and nothing else, seedrandom takes in no entropy and leaves Math.random alone.
  const generator = seedrandom(digest);
  return [generator.int32() >>> 0, generator.int32() >>> 0];
}

/**
 * The text that decides the key: numbers by String(), white space trimmed, A–Z folded to a–z,
 * so that "Plan ", "plan" and, for numbers, 1 and "1" agree.
 * @throws {InputError} when nothing is left, or 0, which is what a blank cell reads as.
 */
export function keyText(value: KeyPart, where: 'seed' | 'label'): string {
  const text = String(value)
    .trim()
    .replace(/[A-Z]/g, (letter) => letter.toLowerCase());
  if (text === '' || text === '0') {
    const found = typeof value === 'string' ? `"${value}"` : String(value);
    throw new InputError(where, `${found} counts as blank`, WANTED[where]);
  }
  return text;
}

const WANTED = {
  seed: 'give a text or a number other than 0, so that the draws can be rebuilt',
  label:
    'give a text or a number other than 0 (inputs without labels would share their random numbers)',
};
