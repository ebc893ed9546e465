/**
 * A density over a part of its limits, for proofs about integrals: its jet, and its
 * values at the part's ends as seen from inside the part.
 * Not handled: parts that cross from one piece of the envelope into another.
 */
import type { Envelope } from '../envelope/envelope';
import type { Piece } from '../envelope/piece';
import { Encloser } from '../formula/enclose';
import { Defined } from '../formula/operation';
import type { Tape } from '../formula/tape';
import type { Interval } from '../numeric/interval';
import * as I from '../numeric/interval';
import type { Jet } from '../numeric/jet';
import * as J from '../numeric/jet';

/** Enclosures of the scaled density; valid until the next call, and the caller may overwrite them. */
interface DensityOver {
  readonly atFrom: Interval;
  readonly atTo: Interval;
  readonly jet: Jet;
  /** True where the formula may be below 0 or undefined: then MAX(0, f) is the density and only jet.v speaks of it. */
  readonly isSigned: boolean;
}

export interface DensityJets {
  /** The formula's encloser, for what is not within the pieces; null for straight lines. */
  readonly encloser: Encloser | null;
  /** Encloses the density over [from, to], a part of a piece or a sliver between pieces (null). */
  over(from: number, to: number, piece: Piece | null): DensityOver;
}

/** `tape` is the density's formula, null for a table's straight lines. */
export function densityJets(envelope: Envelope, tape: Tape | null): DensityJets {
  return tape === null ? new LineJets() : new FormulaJets(tape, envelope.exponent);
}

class FormulaJets implements DensityJets {
  readonly encloser: Encloser;
  private readonly atA;
  private readonly atB;
  private readonly jet = J.jet();
  private readonly atFrom = I.interval();
  private readonly atTo = I.interval();

  constructor(tape: Tape, exponent: number) {
    this.encloser = new Encloser(tape, exponent);
    this.atA = this.encloser.pointValues();
    this.atB = this.encloser.pointValues();
  }

  over(from: number, to: number, piece: Piece | null): DensityOver {
    const { encloser, atA, atB, jet, atFrom, atTo } = this;
    encloser.at(from, atA);
    encloser.at(to, atB);
    const { density, defined } = encloser.over(from, to, atA, atB);
    J.copyJet(jet, density);
    I.copy(atFrom, atA.density);
    I.copy(atTo, atB.density);
    if (defined === Defined.Nowhere) I.set(jet.v, 0, 0);
    const isSigned = defined !== Defined.Everywhere || jet.v.lo < 0;
    if (jet.v.lo < 0) jet.v.lo = 0;
    if (jet.v.hi < 0) jet.v.hi = 0;
    if (piece !== null) {
      // Between its lines the density lies by proof.
      jet.v.lo = Math.max(jet.v.lo, Math.min(piece.lowerLeft, piece.lowerRight));
      jet.v.hi = Math.min(jet.v.hi, Math.max(piece.upperLeft, piece.upperRight));
    }
    return { atFrom, atTo, jet, isSigned };
  }
}

/** Straight lines: one a piece, known exactly. */
class LineJets implements DensityJets {
  readonly encloser = null;
  private readonly jet = J.jet();
  private readonly atFrom = I.interval();
  private readonly atTo = I.interval();
  private readonly slope = I.interval();
  private readonly room = I.interval();

  over(from: number, to: number, piece: Piece | null): DensityOver {
    const { jet, atFrom, atTo, slope, room } = this;
    if (piece === null) {
      for (const out of [jet.v, jet.d, jet.h, atFrom, atTo]) I.set(out, 0, 0);
      return { atFrom, atTo, jet, isSigned: false };
    }
    const { upperLeft: left, upperRight: right } = piece;
    I.subtract(slope, I.interval(right), I.interval(left));
    I.subtract(room, I.interval(piece.to), I.interval(piece.from));
    I.divide(slope, slope, room);
    this.heightAt(atFrom, from, piece);
    this.heightAt(atTo, to, piece);
    I.hull(jet.v, atFrom, atTo);
    I.copy(jet.d, slope);
    I.set(jet.h, 0, 0);
    return { atFrom, atTo, jet, isSigned: false };
  }

  private heightAt(out: Interval, x: number, { from, to, upperLeft, upperRight }: Piece): void {
    if (x === from || x === to) {
      const height = x === from ? upperLeft : upperRight;
      I.set(out, height, height);
      return;
    }
    I.subtract(out, I.interval(x), I.interval(from));
    I.multiply(out, out, this.slope);
    I.add(out, out, I.interval(upperLeft));
    if (out.lo < 0) out.lo = 0;
  }
}
