/**
 * A checker of proved envelopes, independent of the interval code: the pieces tile the
 * limits, and at many points the upper line is at or above and the lower line at or below
 * the density. Doubles screen the points; 60 decimal digits decide, on exact lines. A share
 * of the points goes to the decimals whatever the doubles say.
 */
import type { Decimal } from 'decimal.js';
import type { Envelope } from '../../src/envelope/envelope';
import type { Hat } from '../../src/envelope/hat';
import { heightOn, placeOn } from '../../src/envelope/hat';
import type { Piece } from '../../src/envelope/piece';
import { next, prev } from '../../src/numeric/float';
import { integral } from './quadrature';
import type { Reference } from './reference';
import { Precise, preciseOf } from './reference';

/** Pieces may leave out slivers of the limits up to this share in all: 2^-42 each, around jumps. */
const LEFT_OUT = 1e-10;
/** MAX(0, f) is drawn where f is below 0 by less than this share of its peak. */
const SIGN_TOLERANCE = 1e-12;
/** Pieces of an envelope whose area is found by quadrature. */
const MOST_AREAS = 20;
/** How well two quadratures have to agree, relative to the area. */
const QUADRATURE = 1e-11;
/** After these the rest is not looked for. */
const MOST_VIOLATIONS = 3;
/** Doubles that differ less than this may do so by their own rounding. */
const CLOSE = 1e-13;

/** Places and heights on hats are worked in several rounded steps. */
const HAT_ROUNDING = 1e-11;

interface Options {
  readonly nPoints: number;
  /** How many of these are worked in decimals in any case, and half as many as where doubles cannot tell. */
  readonly nPrecise: number;
  readonly random: () => number;
}

interface Report {
  readonly points: number;
  /** Points decided in decimals. */
  readonly decided: number;
  /** Points at which the density itself is undefined or beyond what decimals reach. */
  readonly undefinedPoints: number;
  /** Pieces whose area was found by quadrature and lay within its enclosure. */
  readonly areas: number;
  readonly violations: readonly string[];
}

/** Checks an envelope of the density that `reference` states. */
export function checkEnvelope(envelope: Envelope, reference: Reference, options: Options): Report {
  return new Checker(envelope, reference, options).check();
}

class Checker {
  private readonly violations: string[] = [];
  private readonly scale: Decimal;
  private readonly down: number;
  private readonly least: Decimal;
  private points = 0;
  private areas = 0;
  private decided = 0;
  private undefinedPoints = 0;
  private unsure = 0;

  constructor(
    private readonly envelope: Envelope,
    private readonly reference: Reference,
    private readonly options: Options,
  ) {
    this.scale = new Precise(2).pow(-envelope.exponent);
    this.down = Math.pow(2, -envelope.exponent);
    const peak = Math.max(...envelope.pieces.map((p) => Math.max(p.upperLeft, p.upperRight)));
    this.least = preciseOf(-SIGN_TOLERANCE * peak);
  }

  check(): Report {
    const { pieces } = this.envelope;
    this.checkTiling();
    pieces.forEach((piece) => this.checkPiece(piece));
    const { nPoints, nPrecise, random } = this.options;
    for (const piece of pieces) {
      this.at(piece, piece.from, false);
      this.at(piece, piece.to, false);
    }
    const preciseEvery = Math.max(1, Math.floor(nPoints / nPrecise));
    for (let i = 0; i < nPoints && this.violations.length < MOST_VIOLATIONS; i++) {
      const piece = pieces[Math.floor(random() * pieces.length)]!;
      this.at(piece, this.pointIn(piece), i % preciseEvery === 0);
    }
    for (let i = 0; i < MOST_AREAS; i++)
      this.checkArea(pieces[Math.floor(random() * pieces.length)]!);
    for (const hat of this.envelope.hats) this.checkHat(hat);
    this.checkBeyond();
    const { points, decided, undefinedPoints, areas, violations } = this;
    return { points, decided, undefinedPoints, areas, violations };
  }

  private fault(text: string): void {
    if (this.violations.length < MOST_VIOLATIONS) this.violations.push(text);
  }

  private checkTiling(): void {
    const { pieces } = this.envelope;
    const [from, to] = withoutHats(this.envelope);
    // Without a hat there has to be nothing on an unbounded side, which checkBeyond looks into.
    let reached = from === -Infinity ? pieces[0]!.from : from;
    const end = to === Infinity ? pieces.at(-1)!.to : to;
    let leftOut = 0;
    for (const piece of pieces) {
      if (piece.from < reached) this.fault(`piece at ${piece.from} begins before ${reached}`);
      if (!(piece.to > piece.from)) this.fault(`piece ${piece.from} … ${piece.to} is empty`);
      leftOut += this.stretch(reached, piece.from);
      reached = piece.to;
    }
    if (reached > end) this.fault(`the last piece ends at ${reached}, after ${end}`);
    leftOut += this.stretch(reached, end);
    if (!(leftOut <= LEFT_OUT * (end - pieces[0]!.from)))
      this.fault(`${leftOut} of the limits is left out`);
  }

  /** The length of what lies between two pieces; none where the density is below all doubles, or too far below for decimals. */
  private stretch(from: number, to: number): number {
    if (to <= from) return 0;
    const height = this.reference.precise(from / 2 + to / 2).times(this.scale);
    return height.abs().gt(5e-324) ? to - from : 0;
  }

  private checkPiece(piece: Piece): void {
    const { upperLeft, upperRight, lowerLeft, lowerRight } = piece;
    const where = `piece ${piece.from} … ${piece.to}`;
    const isFine = (low: number, high: number): boolean =>
      low >= 0 && low <= high && high < Infinity;
    if (!isFine(lowerLeft, upperLeft) || !isFine(lowerRight, upperRight))
      this.fault(`${where}: heights ${[upperLeft, upperRight, lowerLeft, lowerRight].join(', ')}`);
    const width = preciseOf(piece.to).minus(preciseOf(piece.from));
    const area = (left: number, right: number): Decimal =>
      preciseOf(left).plus(preciseOf(right)).times(width).div(2);
    if (area(upperLeft, upperRight).gt(preciseOf(piece.upperArea)))
      this.fault(`${where}: upper area ${piece.upperArea} is too small`);
    if (area(lowerLeft, lowerRight).lt(preciseOf(piece.lowerArea)))
      this.fault(`${where}: lower area ${piece.lowerArea} is too large`);
    if (!(
      piece.areaLo >= piece.lowerArea &&
      piece.areaHi <= piece.upperArea &&
      piece.areaLo <= piece.areaHi
    ))
      this.fault(
        `${where}: areas ${[piece.lowerArea, piece.areaLo, piece.areaHi, piece.upperArea].join(', ')}`,
      );
  }

  /** The area under a piece by quadrature in doubles, where two of them agree. */
  private checkArea({ from, to, areaLo, areaHi }: Piece): void {
    // Among neighbouring doubles the nodes themselves are rounded.
    if (!(to - from > Math.max(Math.abs(from), Math.abs(to)) * 1e-6)) return;
    if (!this.areDoublesGood(from + (to - from) * 0.37)) return;
    const height = (x: number): number => Math.max(0, this.reference.plain(x) * this.down);
    const [once, twice] = [integral(height, from, to, 1), integral(height, from, to, 2)];
    if (!(Math.abs(once - twice) <= QUADRATURE * twice)) return;
    this.areas++;
    const slack = 2 * QUADRATURE * twice;
    if (twice < areaLo - slack || twice > areaHi + slack)
      this.fault(`piece ${from} … ${to}: its area ${twice} is not in ${areaLo} … ${areaHi}`);
  }

  /** Whether doubles have not lost their digits on the way, and hold the scaled density at all. */
  private areDoublesGood(x: number): boolean {
    const height = this.reference.plain(x) * this.down;
    const precise = this.reference.precise(x).times(this.scale);
    return (
      Number.isFinite(height) &&
      precise
        .minus(height)
        .abs()
        .lt(precise.times(QUADRATURE / 10))
    );
  }

  /** Nothing that doubles can hold may lie beyond the pieces of an unbounded side without a hat. */
  private checkBeyond(): void {
    const [from, to] = withoutHats(this.envelope);
    const { pieces } = this.envelope;
    const sides = [
      { end: pieces[0]!.from, limit: from, direction: -1 },
      { end: pieces.at(-1)!.to, limit: to, direction: 1 },
    ];
    for (const { end, limit, direction } of sides) {
      if (Number.isFinite(limit)) continue;
      for (let k = -40; k < 300; k++) {
        const x = end + direction * Math.pow(2, k) * (1 + this.options.random());
        if (!Number.isFinite(x) || this.reference.plain(x) === 0) continue;
        const height = this.reference.precise(x).times(this.scale);
        if (height.gt(5e-324))
          this.fault(`x = ${x} lies beyond the pieces and has height ${height.toPrecision(17)}`);
      }
    }
  }

  /** Evenly by the hat's own area, and far out. */
  private checkHat(hat: Hat): void {
    const { nPoints, random } = this.options;
    const at = { x: 0, t: 0, height: 0 };
    for (let i = 0; i < nPoints / 10; i++) {
      placeOn(hat, i % 2 === 0 ? random() : Math.pow(2, -60 * random()), at);
      if (at.x === hat.origin || !Number.isFinite(at.x)) continue;
      // The place is rounded, which is much of the distance from a pole: the hat counts where x is.
      at.height = heightOn(hat, at.x);
      this.points++;
      const height = this.reference.plain(at.x) * this.down;
      if (height <= at.height || (!Number.isFinite(height) && i % 10 > 0)) continue;
      this.decided++;
      const precise = this.reference.veryPrecise(at.x).times(this.scale);
      // What doubles make of the place and of the height there is rounded.
      if (
        precise.isFinite() &&
        precise.gt(
          preciseOf(at.height)
            .times(1 + HAT_ROUNDING)
            .plus(5e-324),
        )
      )
        this.fault(`x = ${at.x} under a hat: ${precise.toPrecision(17)} above ${at.height}`);
    }
  }

  /** Anywhere in the piece; now and then close to an end, in doubles or on a geometric scale. */
  private pointIn({ from, to }: Piece): number {
    const { random } = this.options;
    const kind = random();
    if (kind < 0.05) return Math.min(to, next(from));
    if (kind < 0.1) return Math.max(from, prev(to));
    const share = kind < 0.3 ? Math.pow(2, -50 * random()) : random();
    const x = random() < 0.5 ? from + (to - from) * share : to - (to - from) * share;
    return Math.min(to, Math.max(from, x));
  }

  private at(piece: Piece, x: number, mustBePrecise: boolean): void {
    this.points++;
    const { from, to } = piece;
    const t = (x - from) / (to - from);
    const upper = piece.upperLeft + (piece.upperRight - piece.upperLeft) * t;
    const lower = piece.lowerLeft + (piece.lowerRight - piece.lowerLeft) * t;
    const height = this.reference.plain(x) * this.down;
    const isInside = height <= upper && height >= lower;
    if (isInside && !mustBePrecise) return;
    // Lines touch the density at their ends, where doubles cannot tell, and doubles can
    // overflow on the way: a quota of either is worked in decimals.
    const isClose = height <= upper * (1 + CLOSE) && height >= lower * (1 - CLOSE);
    const isUnsure = isClose || !Number.isFinite(height);
    if (isInside || !isUnsure || this.unsure++ < 2 * this.options.nPrecise) this.decide(piece, x);
    else this.points--;
  }

  private decide(piece: Piece, x: number): void {
    this.decided++;
    let fault = this.faultAt(piece, x, this.reference.precise(x).times(this.scale));
    // The difference may be what 60 digits have cancelled.
    if (fault) fault = this.faultAt(piece, x, this.reference.veryPrecise(x).times(this.scale));
    if (fault) this.fault(fault);
  }

  private faultAt(piece: Piece, x: number, height: Decimal): string | null {
    if (!height.isFinite()) {
      this.undefinedPoints++;
      return null;
    }
    const [from, to] = [preciseOf(piece.from), preciseOf(piece.to)];
    const at = preciseOf(x);
    const [before, after] = [at.minus(from), to.minus(at)];
    const line = (left: number, right: number): Decimal =>
      preciseOf(left).times(after).plus(preciseOf(right).times(before)).div(to.minus(from));
    const upper = line(piece.upperLeft, piece.upperRight);
    const lower = line(piece.lowerLeft, piece.lowerRight);
    const where = `x = ${x} in ${piece.from} … ${piece.to}`;
    if (height.gt(upper))
      return `${where}: ${height.toPrecision(17)} above ${upper.toPrecision(17)}`;
    if (height.lt(lower) && (height.gt(0) || lower.gt(0)))
      return `${where}: ${height.toPrecision(17)} below ${lower.toPrecision(17)}`;
    if (height.lt(this.least)) return `${where}: ${height.toPrecision(17)} is negative`;
    return null;
  }
}

/** Where the pieces have to begin and to end: hats cover the rest. */
function withoutHats({ from, to, hats }: Envelope): readonly [number, number] {
  let [first, last] = [from, to];
  for (const { origin, direction, c, isBeyond } of hats) {
    const start = origin + direction * c;
    if (isBeyond === direction < 0) first = start;
    else last = start;
  }
  return [first, last];
}
