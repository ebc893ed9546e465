/** Proofs and columns of shapes of one variable, each made once while it is kept (cache.ts). */
import type { PlainShape } from '../density/shape';
import { inLine } from '../density/shape';
import type { Column } from '../draw/column';
import { Drawer } from '../draw/column';
import type { Envelope } from '../envelope/envelope';
import { polylineEnvelope } from '../envelope/polyline';
import { proveEnvelope } from '../envelope/prove';
import { continuous } from '../exact/continuous';
import type { Distribution } from '../exact/distribution';
import { rescaled } from '../exact/rescale';
import { Shares } from '../exact/shares';
import { compile } from '../formula/compile';
import type { Tape } from '../formula/tape';
import { powerOfTwo } from '../numeric/float';
import type { GivenMap } from '../formula/given';
import type { Key } from '../random/key';
import { remember } from './cache';

/** What a piece takes in its envelope, guide table and exact shares, generously. */
const BYTES_PER_PIECE = 2000;
const BYTES_PER_STEP = 1500;

/** A shape with its proof and what is drawn and told from it. */
export interface Proved {
  readonly key: string;
  readonly envelope: Envelope;
  readonly drawer: Drawer;
  /** The compiled formula; null for a table. */
  readonly tape: Tape | null;
  /** Exact shares and quantiles, worked out when first asked for. */
  readonly shares: Shares;
  /** The area under the scaled density, within its proved bounds. */
  readonly area: number;
  /** What columns are compared with. */
  readonly distribution: Distribution;
}

/** A drawer that is not kept, for one of so many shapes that they would crowd out all others. @throws {InputError} as prove. */
export function drawerOf(shape: PlainShape): Drawer {
  return new Drawer(envelopeOf(shape).envelope);
}

/** The proof of a shape. @throws {InputError} when it cannot be proved. */
export function prove(shape: PlainShape): Proved {
  const key = canonical(shape);
  return remember(key, () => {
    const { envelope, tape } = inLine(shape.kind === 'formula' ? shape.line : undefined, () =>
      envelopeOf(shape),
    );
    const nSteps = tape?.steps.length ?? 0;
    return {
      value: withShares({ key, envelope, drawer: new Drawer(envelope), tape }),
      bytes: envelope.pieces.length * BYTES_PER_PIECE + nSteps * BYTES_PER_STEP,
    };
  });
}

function withShares(proof: Omit<Proved, 'shares' | 'area' | 'distribution'>): Proved {
  let known: Pick<Proved, 'shares' | 'area' | 'distribution'> | undefined;
  const exact = (): NonNullable<typeof known> => {
    if (known) return known;
    const { envelope, shift } = rescaled(proof.envelope, proof.tape);
    const shares = new Shares(envelope);
    return (known = {
      shares,
      area: shares.area / powerOfTwo(shift),
      distribution: continuous(shares, proof.envelope, proof.tape),
    });
  };
  return {
    ...proof,
    get shares() {
      return exact().shares;
    },
    get area() {
      return exact().area;
    },
    get distribution() {
      return exact().distribution;
    },
  };
}

/** The column of a proved shape under a key. */
export function drawColumn(
  { key, drawer }: Proved,
  randomKey: Key,
  first: number,
  n: number,
): Column {
  return remember(`${randomKey.join()} ${first} ${n} ${key}`, () => {
    const value = drawer.column(randomKey, first, n);
    return { value, bytes: value.values.byteLength };
  });
}

function envelopeOf(shape: PlainShape): { envelope: Envelope; tape: Tape | null } {
  if (shape.kind === 'table') return { envelope: polylineEnvelope(shape.polyline), tape: null };
  const tape = compile(shape.sources, [shape.variable], shape.givens);
  const { from, to } = shape.limits;
  return { envelope: proveEnvelope(tape, from, to), tape };
}

function canonical(shape: PlainShape): string {
  if (shape.kind === 'table') return JSON.stringify([shape.polyline.x, shape.polyline.heights]);
  const { sources, variable, limits, givens } = shape;
  return JSON.stringify([
    sources.map(({ text, where }) => [text, where]),
    variable,
    limits.from,
    limits.to,
    canonicalGivens(givens),
  ]);
}

/** Givens by name, long ones by their fingerprints. */
export function canonicalGivens(givens: GivenMap): unknown {
  return [...givens].map(([name, given]) => [
    name,
    typeof given === 'number' ? given : given.fingerprint,
  ]);
}
