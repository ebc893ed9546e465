/** Reads test/formula/vectors/values.txt, and compares doubles with its 25 digits. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { Big, big } from '../numeric/reference';

interface Reference {
  readonly x: number;
  /** The value, and for smooth functions its two derivatives. */
  readonly digits: readonly Big[];
}

export interface Case {
  readonly kind: string;
  readonly formula: string;
  readonly references: readonly Reference[];
}

function readCases(): readonly Case[] {
  const text = readFileSync(join(__dirname, 'vectors/values.txt'), 'utf8');
  return text
    .split(/^(?=smooth|steps)/m)
    .map((block) => block.trim().split('\n'))
    .map(([heading, ...lines]) => {
      const [, kind, formula] = /^(\w+) (.+)$/.exec(heading!)!;
      const references = lines.map((line) => {
        const [x, ...digits] = line.split(' ');
        return { x: Number(x), digits: digits.map((d) => new Big(d)) };
      });
      return { kind: kind!, formula: formula!, references };
    });
}

export const CASES = readCases();

/** How far a double is from the reference, relative to it. */
export function relativeError(y: number, reference: Big): number {
  if (reference.isZero()) return Math.abs(y);
  return big(y).minus(reference).div(reference).abs().toNumber();
}

/** True if the reference lies in [lo, hi], allowing for its own last digit. */
export function isWithin(lo: number, hi: number, reference: Big): boolean {
  const near = reference.toNumber();
  const room = reference.abs().times('1e-24');
  const isAbove = lo < near || (Number.isFinite(lo) && big(lo).lte(reference.plus(room)));
  return isAbove && (near < hi || (Number.isFinite(hi) && big(hi).gte(reference.minus(room))));
}
