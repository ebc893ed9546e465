/**
 * Proves the heights of a counted quantity: every point by its own enclosure, what lies beyond
 * on a side without a limit by a hat.
 *
 * All places are numbers of points (density/lattice.ts), a point having the width 1: number k
 * stands for [k − ½, k + ½], and areas are sums of heights. Up to MAX_PIECES points each is a
 * piece by itself; more are joined to runs of neighbours under one upper and over one lower
 * height. A hat h over the density on a side falls outward, so that f at point k lies below h
 * anywhere between points k − 1 and k; moved by half a point it lies over the k-th width.
 *
 *     h ─╮
 *       ─┼─╮        f(k)      the hat, moved: above f(k) from k − ½ to k + ½
 *     ───┼─┼───
 *        k−½ k+½
 *
 * Source: src/METHOD.md, "Counted quantities". Not handled: several variables.
 */
import type { Lattice } from '../density/lattice';
import { MOST_POINTS } from '../density/lattice';
import { Encloser } from '../formula/enclose';
import { Defined } from '../formula/operation';
import type { Side } from '../formula/side';
import { SideEncloser } from '../formula/side';
import type { Tape } from '../formula/tape';
import * as elementary from '../numeric/elementary';
import { addDown, addUp, mulDown, mulUp, powerOfTwo } from '../numeric/float';
import type { Interval } from '../numeric/interval';
import * as I from '../numeric/interval';
import { shortNumber } from '../numeric/text';
import type { Envelope } from './envelope';
import { promisedAcceptance, totalAreas } from './envelope';
import type { Hat } from './hat';
import { hatOver } from './hat';
import type { Piece } from './piece';
import { LEAST_ACCEPTANCE, MAX_PIECES, WANTED_ACCEPTANCE } from './prove';
import type { Reach } from './reach';
import { findReaches } from './reach';
import {
  acceptedTooRarely,
  negativeAt,
  nothingSeen,
  tooManyPoints,
  unboundedNear,
  undefinedAt,
  unproved,
  unsettledSign,
  untold,
  zeroEverywhere,
} from './refusal';
import { untoldArea } from './resolution';

/** An envelope over the points of a lattice; pieces and hats are in numbers of points. */
export interface PointEnvelope extends Pick<
  Envelope,
  'pieces' | 'hats' | 'exponent' | 'upperArea' | 'lowerArea' | 'areaLo' | 'areaHi' | 'notes'
> {
  readonly lattice: Lattice;
  /** The number of the first point with a height of its own, and the heights from there on. */
  readonly first: number;
  readonly heights: Heights;
  /** Encloses the scaled density at a point's x. */
  readonly densityAt: (x: number, out: Interval) => void;
  /** The scaled density at a point's x in doubles. */
  readonly heightAt: (x: number) => number;
  /** The scaled density as a curve through the points, where hats lie over it; null without hats. */
  readonly curveAt: ((x: number) => number) | null;
}

/** Enclosed heights of neighbouring points. */
interface Heights {
  readonly least: Float64Array;
  readonly most: Float64Array;
}

/** What gives out where a density's sign is lost to rounding, as a share of the peak. */
const SIGN_TOLERANCE = 1e-12;
/** Peaks beyond 2^± this are scaled. */
const PLAIN = 300;
const LN_2 = 0.6931471805599453;
/** A hat is moved outward until it holds no more than this share, as long as points are few. */
const WANTED_SHARE = powerOfTwo(-50);
const MOST_MOVES = 40;
/** Points of a run: METHOD.md, "Counted quantities", says why no more. */
const LONGEST_RUN = 512;
/** Points on each side of the peak where a hat cannot begin further out. */
const NEAR_POINTS = 131_072;
const NEGLIGIBLE = powerOfTwo(-42);

/**
 * Proves a formula's density on a lattice. `smooth` agrees with `tape` at the points
 * (formula/compile.ts) and is asked for what happens beyond them.
 * @throws {InputError} when it is negative or undefined at a point, 0 at all, or its sum infinite or not provably finite.
 */
export function provePoints(tape: Tape, smooth: Tape, lattice: Lattice): PointEnvelope {
  return new PointProver(tape, smooth, lattice).prove();
}

/** The envelope of heights that are known, such as those of straight lines; `exponent` is their scale. */
export function knownPoints(
  lattice: Lattice,
  heightAt: (x: number) => number,
  exponent: number,
): PointEnvelope {
  const n = lattice.last - lattice.first + 1;
  const most = Float64Array.from({ length: n }, (_, i) => heightAt(lattice.at(lattice.first + i)));
  const heights = { least: most, most };
  const pieces = piecesOf(heights, lattice.first);
  const areas = totalAreas(pieces);
  if (areas.upperArea === 0) throw zeroEverywhere(endsOf(lattice));
  return {
    lattice,
    first: lattice.first,
    heights,
    pieces,
    hats: [],
    exponent,
    densityAt: (x, out) => {
      const height = heightAt(x);
      I.set(out, height, height);
    },
    heightAt,
    curveAt: null,
    ...areas,
    notes: notesOf(areas, pieces),
  };
}

function endsOf({ at, first, last }: Lattice): { from: number; to: number } {
  return { from: at(first), to: at(last) };
}

class PointProver {
  private encloser: Encloser;
  private curve: Encloser;
  private readonly density = I.interval();

  constructor(
    private readonly tape: Tape,
    private readonly smooth: Tape,
    private readonly lattice: Lattice,
  ) {
    this.encloser = new Encloser(tape);
    this.curve = new Encloser(smooth);
  }

  prove(): PointEnvelope {
    const { at } = this.lattice;
    const reaches = this.reaches();
    let ends = this.endsBy(reaches);
    let found = this.heights(ends.first, ends.last);
    const exponent = exponentOf(found.logPeak);
    if (exponent !== 0) {
      this.encloser = new Encloser(this.tape, exponent);
      this.curve = new Encloser(this.smooth, exponent);
      found = this.heights(ends.first, ends.last);
    }
    if (reaches.length > 0) {
      ends = this.movedOutward(reaches, ends, sumOf(found.most));
      found = this.heights(ends.first, ends.last);
    }
    const { least, most } = this.settled(found, ends.first);
    const pieces = piecesOf({ least, most }, ends.first);
    const hats = reaches.map((reach) => this.hatFrom(reach, ends)).filter(({ area }) => area > 0);
    const areas = totalAreas(pieces, hats);
    if (areas.upperArea === 0) throw zeroEverywhere({ from: at(ends.first), to: at(ends.last) });
    if (promisedAcceptance(areas) < LEAST_ACCEPTANCE) {
      throw acceptedTooRarely(promisedAcceptance(areas), pieces.length, at(ends.first));
    }
    this.settleHats(hats, areas.lowerArea);
    const middle = (encloser: Encloser) => (x: number) => {
      encloser.densityAt(x, this.density);
      return Math.max(0, this.density.lo) / 2 + Math.max(0, this.density.hi) / 2;
    };
    const { encloser, curve, lattice } = this;
    return {
      lattice,
      first: ends.first,
      heights: { least, most },
      pieces,
      hats,
      exponent,
      densityAt: (x, out) => encloser.densityAt(x, out),
      heightAt: middle(encloser),
      curveAt: hats.length === 0 ? null : middle(curve),
      ...areas,
      notes: [...notesOf(areas, pieces), ...found.notes],
    };
  }

  /** The sides without a limit, and how far out a hat proves little enough. */
  private reaches(): readonly Reach[] {
    const { first, last, at, step } = this.lattice;
    const [hasFirst, hasLast] = [Number.isFinite(first), Number.isFinite(last)];
    if (hasFirst && hasLast) return [];
    // The limit itself is a point like any other, which needs no bound nearby.
    const found = findReaches(
      this.smooth,
      this.curve,
      hasFirst ? at(first) + step / 2 : -Infinity,
      hasLast ? at(last) - step / 2 : Infinity,
    );
    if (found === null) throw nothingSeen();
    return found.sides.filter(({ side }) => side.isBeyond);
  }

  /** The points between the places where hats begin. */
  private endsBy(reaches: readonly Reach[]): { first: number; last: number } {
    const { numberOf } = this.lattice;
    let { first, last } = this.lattice;
    for (const { side, c } of reaches) {
      if (side.direction > 0) last = Math.ceil(numberOf(c));
      else first = Math.floor(numberOf(-c));
    }
    const n = last - first + 1;
    if (n <= MOST_POINTS) return { first, last };
    // A hat may begin anywhere: nearer by it is only less tight.
    const near = reaches.length === 1 && this.nearer(reaches[0]!, first, last);
    if (near) return near;
    throw tooManyPoints(n, MOST_POINTS);
  }

  private nearer(
    reach: Reach,
    first: number,
    last: number,
  ): { first: number; last: number } | null {
    const { direction } = reach.side;
    const ends =
      direction > 0 ? { first, last: first + NEAR_POINTS } : { first: last - NEAR_POINTS, last };
    const c = direction * this.lattice.at(direction > 0 ? ends.last : ends.first);
    return c > 0 && this.hatAt(reach.side, c) !== null ? ends : null;
  }

  /** Moves the hats outward as long as that is cheap, so that next to nothing lies under them. */
  private movedOutward(
    reaches: readonly Reach[],
    ends: { first: number; last: number },
    seen: number,
  ): { first: number; last: number } {
    let { first, last } = ends;
    for (let moves = 0; moves < MOST_MOVES; moves++) {
      const heavy = reaches.filter(
        (reach) => !(this.hatFrom(reach, { first, last }).area <= WANTED_SHARE * seen),
      );
      if (heavy.length === 0) break;
      const more = Math.max(8, (last - first) >> 2);
      const next = { first, last };
      for (const { side } of heavy) {
        if (side.direction > 0) next.last += more;
        else next.first -= more;
      }
      if (next.last - next.first >= MAX_PIECES) break;
      ({ first, last } = next);
    }
    return { first, last };
  }

  /** The enclosed heights of points; ln of the peak. */
  private heights(first: number, last: number): Heights & { logPeak: number; notes: string[] } {
    const n = last - first + 1;
    const [least, most] = [new Float64Array(n), new Float64Array(n)];
    const point = this.encloser.pointValues();
    let [peak, logPeak] = [0, -Infinity];
    for (let i = 0; i < n; i++) {
      const x = this.lattice.at(first + i);
      this.encloser.at(x, point);
      const { density, logarithm } = point;
      if (point.defined[this.tape.root] !== Defined.Everywhere) {
        // Asked once more as a stretch, the reason can be had.
        this.encloser.over(x, x, null, null);
        throw undefinedAt(x, this.encloser.undefinedReason());
      }
      if (density.hi < 0)
        throw negativeAt(x, this.encloser.exponent === 0 ? density.hi : undefined);
      if (density.hi === Infinity && !(logarithm.hi < Infinity)) throw unboundedNear(x);
      [least[i], most[i]] = [density.lo, density.hi];
      if (density.hi > peak) peak = density.hi;
      if (logarithm.hi > logPeak && logarithm.hi < Infinity) logPeak = logarithm.hi;
    }
    if (peak > 0 && peak < Infinity) logPeak = Math.max(logPeak, elementary.ln(peak));
    return { least, most, logPeak, notes: [] };
  }

  /** Heights ≥ 0; a sign that only rounding leaves open is noted. */
  private settled({ least, most, notes }: Heights & { notes: string[] }, first: number): Heights {
    const tolerance = -SIGN_TOLERANCE * most.reduce((a, b) => Math.max(a, b), 0);
    for (let i = 0; i < least.length; i++) {
      if (least[i]! >= 0) continue;
      const x = this.lattice.at(first + i);
      if (least[i]! < tolerance) throw unsettledSign(x);
      least[i] = 0;
      if (notes.length > 0) continue;
      notes.push(
        `the sign of the density cannot be settled to the last digit at x = ${shortNumber(x)}; MAX(0, density) is drawn, which differs by less than 10^-12 of its peak`,
      );
    }
    return { least, most };
  }

  /** The hat of a side beyond the points, in numbers of points. */
  private hatFrom({ side }: Reach, ends: { first: number; last: number }): Hat {
    const { at, step } = this.lattice;
    const begin = side.direction > 0 ? ends.last : ends.first;
    const hat = this.hatAt(side, side.direction * at(begin));
    if (hat === null) throw unproved(side, false);
    const c = hat.c / step;
    return {
      ...hat,
      origin: begin + side.direction * (0.5 - c),
      c,
      rate: hat.kind === 'exponential' ? hat.rate * step : hat.rate,
      area: hat.area / step,
    };
  }

  /** The hat beyond distance c; null where none is proved. */
  private hatAt(side: Side, c: number): Hat | null {
    if (!(c > 0)) return null;
    const { curve, density } = this;
    const steps = new SideEncloser(this.smooth, curve, side);
    const factors = steps.factors(c);
    if (factors === null) return null;
    curve.densityAt(steps.pointAt(c), density);
    const scale = curve.exponent < 1000 && curve.exponent > -1000 ? powerOfTwo(-curve.exponent) : 0;
    const verdict = hatOver(side, c, factors, density.hi, scale);
    return typeof verdict === 'string' ? null : verdict.hat;
  }

  /** Refuses a hat under which the density's digits give out. */
  private settleHats(hats: readonly Hat[], lowerArea: number): void {
    const { at } = this.lattice;
    const densityAt = (number: number, out: Interval): void =>
      this.encloser.densityAt(at(Math.round(number)), out);
    for (const hat of hats)
      if (untoldArea(hat, this.encloser.exponent, densityAt) > NEGLIGIBLE * lowerArea)
        throw untold(hat);
  }
}

/** The exponent that brings a peak near 1; 0 where doubles serve as they are. */
function exponentOf(logPeak: number): number {
  const peak = logPeak / LN_2;
  return Math.abs(peak) <= PLAIN || !Number.isFinite(peak) ? 0 : Math.round(peak);
}

function sumOf(numbers: Float64Array): number {
  return numbers.reduce((sum, number) => sum + number, 0);
}

function notesOf(
  areas: Pick<Envelope, 'upperArea' | 'lowerArea'>,
  pieces: readonly Piece[],
): string[] {
  const promised = promisedAcceptance(areas);
  if (promised >= WANTED_ACCEPTANCE) return [];
  return [
    `the proof promises an acceptance of ${shortNumber(promised)} after ${pieces.length} runs of points; the draws are exact all the same`,
  ];
}

/** Points one by one, or in runs when they are many. Guarantee: the same pieces for the same heights. */
function piecesOf(heights: Heights, first: number): readonly Piece[] {
  const n = heights.most.length;
  if (n <= MAX_PIECES) return runsOf(heights, first, -1)!;
  // Gaps of all runs together may be what a wanted acceptance leaves, if that takes few runs enough.
  // Of heights that are hardly above 0 that is none, which would never grow.
  let gap = Math.max(
    ((1 - WANTED_ACCEPTANCE) * sumOf(heights.most)) / MAX_PIECES,
    Number.MIN_VALUE,
  );
  for (;;) {
    const runs = runsOf(heights, first, gap);
    if (runs) return runs;
    gap *= 2;
  }
}

/** Neighbouring points while the gap of their run stays within `gap`; null when there are more than MAX_PIECES. */
function runsOf({ least, most }: Heights, first: number, gap: number): readonly Piece[] | null {
  const runs: Piece[] = [];
  const n = most.length;
  for (let i = 0; i < n;) {
    let [lower, upper] = [least[i]!, most[i]!];
    let [sumLo, sumHi] = [lower, upper];
    let j = i + 1;
    for (; j < n && j - i < LONGEST_RUN; j++) {
      const [low, high] = [Math.min(lower, least[j]!), Math.max(upper, most[j]!)];
      if (!((j + 1 - i) * (high - low) <= gap)) break;
      [lower, upper] = [low, high];
      sumLo = addDown(sumLo, least[j]!);
      sumHi = addUp(sumHi, most[j]!);
    }
    if (runs.length === MAX_PIECES) return null;
    runs.push({ ...level(first + i, j - i, lower, upper), areaLo: sumLo, areaHi: sumHi });
    i = j;
  }
  return runs;
}

/** n points from number k on. */
function level(
  k: number,
  n: number,
  lower: number,
  upper: number,
): Omit<Piece, 'areaLo' | 'areaHi'> {
  return {
    from: k - 0.5,
    to: k + n - 0.5,
    upperLeft: upper,
    upperRight: upper,
    lowerLeft: lower,
    lowerRight: lower,
    upperArea: mulUp(n, upper),
    lowerArea: mulDown(n, lower),
    least: lower,
    inside: null,
  };
}
