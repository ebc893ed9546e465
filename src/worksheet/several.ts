/** Proofs and rows of shapes of several variables, each made once while it is kept (cache.ts). */
import type { Axis } from '../density/limits';
import type { SeveralShape } from '../density/kinds';
import type { Rows } from '../draw/several';
import { BoxDrawer } from '../draw/several';
import type { BoxEnvelope, Joint } from '../envelope/boxes';
import { proveBoxes } from '../envelope/boxes';
import { Space } from '../envelope/space';
import { compile } from '../formula/compile';
import { Encloser } from '../formula/enclose';
import { factorsOf, sidesOf } from '../formula/factors';
import { guarded } from '../formula/guard';
import { Defined } from '../formula/operation';
import type { Source } from '../formula/compile';
import type { Tape } from '../formula/tape';
import type { Key } from '../random/key';
import { remember } from './cache';
import { canonicalGivens } from './proved';

/** What a box takes in its envelope and tables, generously. */
const BYTES_PER_BOX = 600;

/** A shape of several variables with its proof and what is drawn from it. */
interface ProvedSeveral {
  readonly key: string;
  readonly envelope: BoxEnvelope;
  readonly drawer: BoxDrawer;
}

/** The proof of a shape. @throws {InputError} when it cannot be proved. */
export function proveSeveral(shape: SeveralShape): ProvedSeveral {
  const key = canonical(shape);
  return remember(key, () => {
    const envelope = proveBoxes(jointOf(shape));
    return {
      value: { key, envelope, drawer: new BoxDrawer(envelope) },
      bytes: envelope.boxes.length * BYTES_PER_BOX,
    };
  });
}

/** The rows of a proved shape under a key. */
export function drawRows(
  { key, drawer }: ProvedSeveral,
  randomKey: Key,
  first: number,
  n: number,
): Rows {
  return remember(`${randomKey.join()} ${first} ${n} ${key}`, () => {
    const value = drawer.rows(randomKey, first, n);
    return { value, bytes: 8 * n * value.columns.length };
  });
}

/** The conditions and the rest of a shape, compiled. */
export function jointOf(shape: SeveralShape): Joint {
  const { sources, axes, givens } = shape;
  const names = axes.map(({ name }) => name);
  // As written first, so that a mistake is told at its place in the whole text.
  compile(sources, names, givens);
  const { conditions, others } = factorsOf(sources);
  return {
    axes,
    conditions: conditions.map((source) => ({
      text: source.text,
      sides: sidesOf(source),
      tape: compile([source], names, givens),
    })),
    rest: others.length === 0 ? null : heightOf(shape, others),
  };
}

/**
 * The product of `others` where the conditions of the shape hold. Where it is not plain sailing
 * all over the limits, conditions guard it (formula/guard.ts).
 */
export function heightOf({ sources, axes, givens }: SeveralShape, others: readonly Source[]): Tape {
  const names = axes.map(({ name }) => name);
  const plain = compile(others, names, givens);
  if (isPlain(plain, axes)) return plain;
  const { conditions } = factorsOf(sources);
  const careful = guarded(compile([...conditions, ...others], names, givens));
  return careful?.isTold ? careful.tape : plain;
}

/** True for what is defined, bounded and not negative all over the limits, as far as one look tells. */
function isPlain(tape: Tape, axes: readonly Axis[]): boolean {
  const space = new Space(axes);
  const { lo, hi } = space.corners(space.whole());
  const { density, defined } = new Encloser(tape).overBox(lo, hi, []);
  return defined === Defined.Everywhere && density.v.lo >= 0 && density.v.hi < Infinity;
}

function canonical({ sources, axes, givens }: SeveralShape): string {
  return JSON.stringify([
    sources.map(({ text, where }) => [text, where]),
    axes,
    canonicalGivens(givens),
  ]);
}
