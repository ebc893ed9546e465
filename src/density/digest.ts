/** A short text that stands for many numbers, so that results can be kept under it. */
import { sha256 } from '@noble/hashes/sha2';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils';

/** SHA-256 (FIPS 180-4) of the numbers' JSON text, in hex. */
export function digest(...sequences: readonly (readonly number[])[]): string {
  return bytesToHex(sha256(utf8ToBytes(JSON.stringify(sequences))));
}
