/** Proofs and columns of shapes of one variable, each made once while it is kept (cache.ts). */
import type { Lattice } from '../density/lattice';
import type { PlainShape } from '../density/kinds';
import { once } from '../density/once';
import { inLine } from '../density/shapelist';
import { Drawer } from '../draw/column';
import { PointDrawer } from '../draw/points';
import type { Column, ColumnDrawer } from '../draw/rejection';
import type { Envelope } from '../envelope/envelope';
import type { PointEnvelope } from '../envelope/points';
import { knownPoints, provePoints } from '../envelope/points';
import { polylineEnvelope } from '../envelope/polyline';
import { proveEnvelope } from '../envelope/prove';
import { continuous } from '../exact/continuous';
import { counted } from '../exact/counted';
import type { Distribution } from '../exact/distribution';
import { rescaled } from '../exact/rescale';
import { PointShares } from '../exact/points';
import type { ExactShares } from '../exact/shares';
import { Shares } from '../exact/shares';
import { InputError } from '../errors';
import { compile, compileSmooth } from '../formula/compile';
import { guarded } from '../formula/guard';
import type { Tape } from '../formula/tape';
import { powerOfTwo } from '../numeric/float';
import type { GivenMap } from '../formula/given';
import type { Key } from '../random/key';
import { remember } from './cache';

/** What a piece takes in its envelope, guide table and exact shares, generously. */
const BYTES_PER_PIECE = 2000;
const BYTES_PER_POINT = 40;
const BYTES_PER_STEP = 1500;

/** A shape with its proof and what is drawn and told from it. */
export type Proved = ProvedCurve | ProvedPoints;

interface Told {
  readonly key: string;
  readonly drawer: ColumnDrawer;
  /** Exact shares and quantiles, worked out when first asked for. */
  readonly shares: ExactShares;
  /** The area under the scaled density, or the sum of its heights, within its proved bounds. */
  readonly area: number;
  /** What columns are compared with. */
  readonly distribution: Distribution;
}

/** A continuous quantity. */
export interface ProvedCurve extends Told {
  readonly kind: 'curve';
  readonly envelope: Envelope;
  /** The compiled formula; null for a table. */
  readonly tape: Tape | null;
}

/** A counted quantity. */
export interface ProvedPoints extends Told {
  readonly kind: 'points';
  readonly envelope: PointEnvelope;
  /** The formula as a curve through the points; null for a table. */
  readonly smooth: Tape | null;
  readonly shares: PointShares;
}

/** A drawer that is not kept, for one of so many shapes that they would crowd out all others. @throws {InputError} as prove. */
export function drawerOf(shape: PlainShape): ColumnDrawer {
  return proofOf(shape, '').drawer;
}

/** The proof of a shape. @throws {InputError} when it cannot be proved. */
export function prove(shape: PlainShape): Proved {
  const key = canonical(shape);
  return remember(key, () => {
    const value = inLine(shape.kind === 'formula' ? shape.line : undefined, () =>
      proofOf(shape, key),
    );
    const tape = value.kind === 'curve' ? value.tape : value.smooth;
    const nPoints = value.kind === 'points' ? value.envelope.heights.most.length : 0;
    return {
      value,
      bytes:
        value.envelope.pieces.length * BYTES_PER_PIECE +
        nPoints * BYTES_PER_POINT +
        (tape?.steps.length ?? 0) * BYTES_PER_STEP,
    };
  });
}

function proofOf(shape: PlainShape, key: string): Proved {
  const { lattice } = shape;
  return lattice ? pointsOf(shape, lattice, key) : curveOf(shape, key);
}

function curveOf(shape: PlainShape, key: string): ProvedCurve {
  const { tape, envelope } =
    shape.kind === 'table'
      ? { tape: null, envelope: polylineEnvelope(shape.polyline) }
      : guardedIfRefused(
          compile(shape.sources, [shape.variable], shape.givens),
          (each): { tape: Tape; envelope: Envelope } => ({
            tape: each,
            envelope: proveEnvelope(each, shape.limits.from, shape.limits.to),
          }),
        );
  const exact = once(() => {
    const { envelope: roomy, shift } = rescaled(envelope, tape);
    const shares = new Shares(roomy);
    return {
      shares,
      area: shares.area / powerOfTwo(shift),
      distribution: continuous(shares, envelope, tape),
    };
  });
  return {
    key,
    kind: 'curve',
    envelope,
    tape,
    drawer: new Drawer(envelope),
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

/** What is refused as it stands is proved once more with its conditions guarding the rest (formula/guard.ts). */
function guardedIfRefused<T>(tape: Tape, work: (tape: Tape) => T): T {
  try {
    return work(tape);
  } catch (error) {
    const careful = error instanceof InputError ? guarded(tape) : null;
    if (careful === null) throw error;
    return work(careful.tape);
  }
}

function pointsOf(shape: PlainShape, lattice: Lattice, key: string): ProvedPoints {
  const { envelope, smooth } = pointEnvelopeOf(shape, lattice);
  const exact = once(() => {
    const shares = new PointShares(envelope);
    return { shares, distribution: counted(shares) };
  });
  return {
    key,
    kind: 'points',
    envelope,
    smooth,
    drawer: new PointDrawer(envelope),
    get shares() {
      return exact().shares;
    },
    get area() {
      return exact().shares.area;
    },
    get distribution() {
      return exact().distribution;
    },
  };
}

function pointEnvelopeOf(
  shape: PlainShape,
  lattice: Lattice,
): { readonly envelope: PointEnvelope; readonly smooth: Tape | null } {
  if (shape.kind === 'table') {
    const { heightAt, exponent } = polylineEnvelope(shape.polyline);
    return { envelope: knownPoints(lattice, heightAt, exponent), smooth: null };
  }
  const { sources, variable, givens } = shape;
  const asWritten = compile(sources, [variable], givens);
  const ofWhole = lattice.isWhole ? compileSmooth(sources, [variable], givens) : null;
  return guardedIfRefused(asWritten, (tape) => {
    const curve = ofWhole && tape !== asWritten ? (guarded(ofWhole)?.tape ?? ofWhole) : ofWhole;
    const smooth = curve ?? tape;
    return { envelope: provePoints(tape, smooth, lattice), smooth };
  });
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

function canonical(shape: PlainShape): string {
  const { lattice } = shape;
  const points = lattice && [lattice.step, lattice.first, lattice.last, lattice.at(0)];
  if (shape.kind === 'table')
    return JSON.stringify([shape.polyline.x, shape.polyline.heights, points]);
  const { sources, variable, limits, givens } = shape;
  return JSON.stringify([
    sources.map(({ text, where }) => [text, where]),
    variable,
    limits.from,
    limits.to,
    points,
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
