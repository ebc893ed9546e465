/**
 * The mean of a quantity under a density, with proved bounds.
 *
 * The quantity g is taken less a number c near its mean, so that what is not known of
 * the area itself does not matter: E g = c + ∫(g − c)f / ∫f. Over a part [a, b] of
 * width w the product p = (g − c)·f is enclosed by its jet, and ∫p lies between
 * (p(a) + p(b))w/2 − p″w³/12 for the extremes of p″, and within the range of g − c
 * times the area of the part. Parts are halved where that leaves most open. Where g
 * has a kink or a jump, parts end at neighbouring doubles on either side.
 * The value comes from quadrature and is held within the bounds.
 * Beyond the pieces, towards ±∞ or into a pole, the growth of g·f proves a hat over it,
 * as the envelope's own; where that leaves too much open it begins further out.
 * Not handled: quantities without bound within the limits.
 * The file is long because it is one algorithm, read from the top down.
 */
import FlatQueue from 'flatqueue';
import { findCrossing } from '../envelope/crossing';
import type { Envelope } from '../envelope/envelope';
import type { Hat } from '../envelope/hat';
import type { Piece } from '../envelope/piece';
import { InputError } from '../errors';
import type { PointValues } from '../formula/enclose';
import { Encloser } from '../formula/enclose';
import { evaluator } from '../formula/evaluate';
import { Defined } from '../formula/operation';
import type { Tape } from '../formula/tape';
import { addDown, addUp, divDown, divUp, middle, powerOfTwo } from '../numeric/float';
import * as I from '../numeric/interval';
import * as J from '../numeric/jet';
import { shortNumber } from '../numeric/text';
import { Beyond, refusedBeyond, WANTED_BEYOND } from './beyond';
import type { DensityJets } from './density';
import { densityJets } from './density';
import { heightOf } from './height';
import { refinedIntegral, smoothIntegral } from './quadrature';
import { hatIntegral, isLowerHat } from './side';

export interface Expectation {
  readonly value: number;
  readonly atLeast: number;
  readonly atMost: number;
}

/** Bounds are narrowed until they are this near, as a share of the mean distance of g from c. */
const WANTED = 1e-7;
const MOST_PARTS = 2000;
/** Doublings of the distance at which the parts end. */
const MOST_DOUBLINGS = 200;
/** A part narrower than this share of the limits, or than the second one if g is defined in part, is not halved further. */
const NARROW = powerOfTwo(-60);
const NEGLIGIBLE = powerOfTwo(-42);
/** Kinks and jumps of the quantity that are cut out of one stretch at a time. */
const MOST_CUTS = 64;

/** A stretch of the limits; `piece` is null outside the pieces. */
interface Stretch {
  readonly from: number;
  readonly to: number;
  readonly piece: Piece | null;
  /** True for a sliver that the envelope leaves out. */
  readonly isSliver?: boolean;
}

/** A stretch with an enclosure of ∫(g − c)f over it. */
interface Part extends Stretch {
  readonly lo: number;
  readonly hi: number;
  readonly defined: Defined;
}

/**
 * The mean of the quantity under the density; `tape` is the density's, null for straight lines.
 * Guarantee: the true mean lies between atLeast and atMost.
 * @throws {InputError} at `where` when the quantity is undefined or has no bound where the density is above 0.
 */
export function expectation(
  envelope: Envelope,
  tape: Tape | null,
  quantity: Tape,
  where: string,
): Expectation {
  return new Expecter(envelope, tape, quantity, where).expect();
}

class Expecter {
  private readonly encloser: Encloser;
  private readonly density: DensityJets;
  private readonly height: (x: number) => number;
  private readonly atA: PointValues;
  private readonly atB: PointValues;
  private readonly atCut: PointValues;
  /** g − c with its slopes, the product with f, and room for single intervals. */
  private readonly g = J.jet();
  private readonly product = J.jet();
  private readonly width = I.interval();
  private readonly cube = I.interval();
  private readonly area = I.interval();
  private readonly moment = I.interval();
  private readonly room = I.interval();
  private readonly span: number;
  private readonly mayTurn: boolean;
  private centre = 0;

  constructor(
    private readonly envelope: Envelope,
    private readonly densityTape: Tape | null,
    private readonly quantity: Tape,
    private readonly where: string,
  ) {
    this.encloser = new Encloser(quantity);
    this.density = densityJets(envelope, densityTape);
    this.height = heightOf(envelope);
    this.atA = this.encloser.pointValues();
    this.atB = this.encloser.pointValues();
    this.atCut = this.encloser.pointValues();
    this.span = envelope.pieces.at(-1)!.to - envelope.pieces[0]!.from;
    this.mayTurn = quantity.steps.some(({ operation }) => operation.turnsOn !== undefined);
  }

  expect(): Expectation {
    const { areaLo, areaHi, pieces, hats } = this.envelope;
    const stretches = pieces
      .map((piece): Stretch => ({ from: piece.from, to: piece.to, piece }))
      .flatMap((stretch) => this.cutAtTurns(stretch));
    const value = evaluator(this.quantity);
    const rough = (f: (x: number) => number): number =>
      stretches.reduce((total, { from, to }) => total + smoothIntegral(f, from, to).value, 0);
    const integral = (weight: (x: number) => number): number =>
      refinedIntegral(
        (x) => weight(x) * this.height(x),
        stretches.map(({ from, to }) => [from, to] as const),
      ) + hats.reduce((sum, hat) => sum + hatIntegral(hat, this.envelope, this.height, weight), 0);
    const { isConstant, value: constant } = this.quantity.steps[this.quantity.root]!;
    this.centre =
      isConstant && constant - constant === 0
        ? constant
        : finite(rough((x) => finite(value(x)) * this.height(x)) / rough(this.height));
    const offset = (x: number): number => finite(value(x) - this.centre);
    const mean = this.centre + integral(offset) / integral(() => 1);
    this.centre = finite(mean);
    const scale = rough((x) => Math.abs(offset(x)) * this.height(x));
    const sides = hats.map((hat) => this.side(hat, scale));
    const within = this.bounds(
      [...stretches, ...sides.flatMap((side) => side.stretches), ...this.slivers()],
      scale,
    );
    const beyond = sides.reduce((sum, side) => addUp(sum, side.most), 0);
    const [lo, hi] = [addDown(within.lo, -beyond), addUp(within.hi, beyond)];
    const atLeast = addDown(this.centre, lo < 0 ? divDown(lo, areaLo) : divDown(lo, areaHi));
    const atMost = addUp(this.centre, hi > 0 ? divUp(hi, areaLo) : divUp(hi, areaHi));
    return { value: Math.min(atMost, Math.max(atLeast, mean)), atLeast, atMost };
  }

  /**
   * A hat over |g|·f and |c|·f from some way out, and the stretches up to there. The
   * most is a bound of what the integral of (g − c)f holds beyond them.
   */
  private side(hat: Hat, scale: number): { most: number; stretches: readonly Stretch[] } {
    const { origin, direction, isBeyond } = hat;
    const beyond = new Beyond(
      hat,
      { tape: this.densityTape!, encloser: this.density.encloser! },
      { tape: this.quantity, encloser: this.encloser },
    );
    let best: { most: number; distance: number } | null = null;
    let isInfinite = false;
    for (let k = 0; k < MOST_DOUBLINGS; k++) {
      const distance = hat.c * powerOfTwo(isBeyond ? k : -k);
      const x = origin + direction * distance;
      if (!Number.isFinite(x) || x === origin) break;
      const most = beyond.most(distance, x, this.centre);
      if (most === 'infinite') isInfinite = true;
      if (typeof most === 'string') continue;
      if (best === null || most < best.most) best = { most, distance };
      if (most <= WANTED_BEYOND * scale) break;
    }
    if (best === null) throw refusedBeyond(hat, isInfinite, this.where);
    const stretches: Stretch[] = [];
    for (let t = hat.c; t !== best.distance; t *= isBeyond ? 2 : 0.5) {
      const [a, b] = [t, isBeyond ? 2 * t : t / 2].map((d) => origin + direction * d);
      stretches.push({ from: Math.min(a!, b!), to: Math.max(a!, b!), piece: null });
    }
    return { most: best.most, stretches: stretches.flatMap((each) => this.cutAtTurns(each)) };
  }

  /** What the envelope leaves out around jumps. */
  private slivers(): Stretch[] {
    const { from, to, pieces, hats } = this.envelope;
    const isUnder = (isLower: boolean): boolean =>
      hats.some((hat) => isLowerHat(hat, this.envelope) === isLower);
    const first = pieces[0]!.from;
    const last = pieces.at(-1)!.to;
    const ends = [isUnder(true) ? first : from, ...pieces.map((piece) => piece.to)];
    const starts = [...pieces.map((piece) => piece.from), isUnder(false) ? last : to];
    return starts.flatMap((start, i) =>
      start > ends[i]! ? [{ from: ends[i]!, to: start, piece: null, isSliver: true }] : [],
    );
  }

  /** Encloses ∫(g − c)f: halves what is undefined or has no bound, then what leaves most open. */
  private bounds(stretches: readonly Stretch[], scale: number): { lo: number; hi: number } {
    const urgent = new FlatQueue<Part>();
    const byGap = new FlatQueue<Part>();
    const parts = new Set<Part>();
    let gap = 0;
    const add = (stretch: Stretch): void => {
      const part = this.examine(stretch);
      parts.add(part);
      if (isOpen(part)) urgent.push(part, part.from - part.to);
      else {
        gap += part.hi - part.lo;
        byGap.push(part, part.lo - part.hi);
      }
    };
    stretches.forEach(add);
    const mostParts = MOST_PARTS + parts.size;
    while (parts.size < mostParts) {
      if (urgent.length === 0 && gap <= WANTED * scale) break;
      const isUrgent = urgent.length > 0;
      const part = urgent.pop() ?? byGap.pop();
      if (!part) break;
      if (part.defined === Defined.Nowhere) this.refuse(part);
      const m = middle(part.from, part.to);
      const isNarrow = part.to - part.from < NARROW * this.span || m === part.from;
      if (isNarrow) {
        if (isUrgent) this.refuse(part);
        continue;
      }
      parts.delete(part);
      if (!isUrgent) gap -= part.hi - part.lo;
      this.cutAtTurns({ ...part, to: m }).forEach(add);
      this.cutAtTurns({ ...part, from: m }).forEach(add);
    }
    const left = urgent.pop();
    if (left) this.refuse(left);
    let [lo, hi] = [0, 0];
    for (const part of parts) {
      lo = addDown(lo, part.lo);
      hi = addUp(hi, part.hi);
    }
    return { lo, hi };
  }

  /** The stretch between the kinks and jumps of the quantity that can be told from its ends. */
  private cutAtTurns(stretch: Stretch): Stretch[] {
    if (!this.mayTurn) return [stretch];
    const done: Stretch[] = [];
    const open = [stretch];
    for (let cuts = 0; open.length > 0;) {
      const next = open.pop()!;
      const { from, to } = next;
      this.encloser.at(from, this.atA);
      this.encloser.at(to, this.atB);
      const { turn } = this.encloser.over(from, to, this.atA, this.atB);
      const crossing =
        turn && cuts < MOST_CUTS ? findCrossing(this.encloser, turn, from, to, this.atCut) : null;
      if (!crossing || (crossing.lo <= from && crossing.hi >= to)) {
        done.push(next);
        continue;
      }
      cuts++;
      const { lo, hi } = crossing;
      if (hi > lo) done.push({ ...next, from: Math.max(from, lo), to: Math.min(to, hi) });
      if (hi < to) open.push({ ...next, from: hi });
      if (lo > from) open.push({ ...next, to: lo });
    }
    return done;
  }

  private examine(stretch: Stretch): Part {
    const { from, to, piece } = stretch;
    const { g, product, width, cube, area, moment, room } = this;
    const { atFrom, atTo, jet: f, isSigned } = this.density.over(from, to, piece);
    if (f.v.hi <= 0) return { ...stretch, lo: 0, hi: 0, defined: Defined.Everywhere };
    this.encloser.at(from, this.atA);
    this.encloser.at(to, this.atB);
    const enclosure = this.encloser.over(from, to, this.atA, this.atB);
    const { defined } = enclosure;
    J.copyJet(g, enclosure.density);
    I.set(room, this.centre, this.centre);
    I.subtract(g.v, g.v, room);
    const gAtFrom = I.interval(
      addDown(this.atA.density.lo, -this.centre),
      addUp(this.atA.density.hi, -this.centre),
    );
    const gAtTo = I.interval(
      addDown(this.atB.density.lo, -this.centre),
      addUp(this.atB.density.hi, -this.centre),
    );
    I.set(width, addDown(to, -from), addUp(to, -from));
    I.multiply(cube, width, width);
    I.multiply(cube, cube, width);
    I.set(room, 1 / 12, 1 / 12);
    // 1/12 is no double: a step outward covers it.
    I.set(room, addDown(room.lo, -1e-17), addUp(room.hi, 1e-17));
    I.multiply(cube, cube, room);
    // The part's own area: its range, and what the curvature says.
    I.multiply(area, f.v, width);
    const isSmooth = !isSigned && defined === Defined.Everywhere;
    if (!isSigned) meetTrapezoid(area, atFrom, atTo, f.h, width, cube);
    I.multiply(moment, g.v, area);
    if (isSmooth) {
      J.multiplyJet(product, g, f);
      I.multiply(atFrom, atFrom, gAtFrom);
      I.multiply(atTo, atTo, gAtTo);
      meetTrapezoid(moment, atFrom, atTo, product.h, width, cube);
    }
    // A sliver's mass is not drawn.
    const isSliver = stretch.isSliver === true;
    const lo = isSliver ? Math.min(0, moment.lo) : moment.lo;
    const hi = isSliver ? Math.max(0, moment.hi) : moment.hi;
    const isInPart = defined !== Defined.Everywhere && to - from >= NEGLIGIBLE * this.span;
    return { ...stretch, lo, hi, defined: isInPart ? defined : Defined.Everywhere };
  }

  private refuse({ from, to }: Part): never {
    this.encloser.at(from, this.atA);
    this.encloser.at(to, this.atB);
    const { defined } = this.encloser.over(from, to, this.atA, this.atB);
    const near = shortNumber(Math.abs(from) < Math.abs(to) ? from : to);
    if (defined === Defined.Everywhere) {
      throw new InputError(
        this.where,
        `it cannot be bounded near x = ${near}`,
        'cap it with MIN or MAX, or give limits that leave the place out',
      );
    }
    const place =
      defined === Defined.Nowhere
        ? `from x = ${shortNumber(from)} to x = ${shortNumber(to)}`
        : `near x = ${near}`;
    throw new InputError(
      this.where,
      `it is undefined ${place}, where ${this.encloser.undefinedReason()}`,
      'give it a value there with IF, or limits that leave the place out',
    );
  }
}

function isOpen({ lo, hi, defined }: Part): boolean {
  return defined !== Defined.Everywhere || !(lo > -Infinity && hi < Infinity);
}

/** A number for sums that a single undefined point must not spoil. */
function finite(x: number): number {
  return x - x === 0 ? x : 0;
}

const sides = I.interval();
const bend = I.interval();

/** out ∩= (left + right)·w/2 − curvature·w³/12, where that says anything. */
function meetTrapezoid(
  out: I.Interval,
  left: I.Interval,
  right: I.Interval,
  curvature: I.Interval,
  width: I.Interval,
  cube: I.Interval,
): void {
  if (!(curvature.lo > -Infinity && curvature.hi < Infinity)) return;
  I.add(sides, left, right);
  I.multiply(sides, sides, width);
  I.set(sides, sides.lo / 2, sides.hi / 2);
  I.multiply(bend, curvature, cube);
  I.subtract(sides, sides, bend);
  if (sides.lo === sides.lo && sides.hi === sides.hi) I.meet(out, sides);
}
