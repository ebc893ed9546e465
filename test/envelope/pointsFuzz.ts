/**
 * Fuzzing the proof of counted quantities: every random shape is either refused with a message
 * of its own or proved, with every height inside its enclosure by 60 decimal digits, every
 * height beyond the points under the hat, runs that hold their points, and draws among them.
 */
import seedrandom from 'seedrandom';
import { latticeOf } from '../../src/density/lattice';
import { PointDrawer } from '../../src/draw/points';
import { placeOn } from '../../src/envelope/hat';
import type { PointEnvelope } from '../../src/envelope/points';
import { provePoints } from '../../src/envelope/points';
import { InputError } from '../../src/errors';
import { compile, compileSmooth } from '../../src/formula/compile';
import { sourceOf } from '../formula/formulas';
import { keyOf } from '../../src/random/key';
import { randomOpenShape, randomShape } from './randomFormula';
import type { Reference } from './reference';
import { Precise, preciseOf, referenceOf } from './reference';

/** Where doubles agree with an enclosure to this, decimals are not asked. */
const CLOSE = 1e-6;
/** MAX(0, f) is drawn where f is below 0 by less than this share of its peak. */
const SIGN_TOLERANCE = 1e-12;
/** Places and heights on hats are worked in several rounded steps. */
const HAT_ROUNDING = 1e-11;
/** What the products behind a hat's height may lose to underflow. */
const LOST = 1e-300;
/** Scaling rounds the last of 60 digits; doubles differ by 10^-16 at least. */
const ALMOST = preciseOf(1).minus('1e-50');
const N_DRAWS = 200;
/** Heights of one shape that are checked. */
const MOST_CHECKED = 40;
/** The number of points of a lattice between two limits. */
const POINTS = [3, 17, 60, 200, 5000];

interface PointsReport {
  proved: number;
  refused: number;
  points: number;
  hats: number;
  readonly faults: string[];
}

/** The envelope of a formula in x on a lattice, as the worksheet functions make it. */
export function provedPoints(text: string, from: number, to: number, step: number): PointEnvelope {
  const source = sourceOf(text);
  const lattice = latticeOf(from, to, step, 'limits');
  const tape = compile([source], ['x'], new Map());
  const smooth = lattice.isWhole ? compileSmooth([source], ['x'], new Map()) : tape;
  return provePoints(tape, smooth, lattice);
}

/** Shape i of a seed is always the same. */
export function pointsFuzz(seed: string, shapes: number): PointsReport {
  const report: PointsReport = { proved: 0, refused: 0, points: 0, hats: 0, faults: [] };
  for (let i = 0; i < shapes; i++) {
    const random = seedrandom(`${seed} ${i}`);
    const { text, from, to } = i % 2 === 0 ? randomShape(random) : randomOpenShape(random);
    const width = Number.isFinite(to - from) ? to - from : 10;
    const step = i % 3 === 0 ? 1 : width / POINTS[Math.floor(random() * POINTS.length)]!;
    const fault = (what: string): void => {
      report.faults.push(`${seed} ${i}, ${text} from ${from} to ${to} step ${step}: ${what}`);
    };
    try {
      const envelope = provedPoints(text, from, to, step);
      report.proved++;
      report.hats += envelope.hats.length;
      report.points += checkPoints(envelope, referenceOf(text), fault);
      checkDraws(envelope, `${seed} ${i}`, fault);
    } catch (error) {
      report.refused++;
      if (!(error instanceof InputError)) fault(String((error as Error).stack));
      else if (/NaN|Infinity/.test(error.message)) fault(error.message);
    }
  }
  return report;
}

/** Checks every height, some under hats, and the runs; returns how many heights. */
export function checkPoints(
  envelope: PointEnvelope,
  reference: Reference,
  fault: (what: string) => void,
): number {
  const { lattice, first, heights, pieces, hats, exponent } = envelope;
  const scale = new Precise(2).pow(-exponent);
  const peak = heights.most.reduce((a, b) => Math.max(a, b));
  const isInside = (x: number, least: number, most: number): boolean => {
    const rough = reference.plain(x) * 2 ** -exponent;
    const room = CLOSE * (most - least);
    // Well inside in doubles, with an enclosure wide enough for their rounding.
    if (exponent === 0 && most - least > 1e-9 * most && rough > least + room && rough < most - room)
      return true;
    for (const value of [reference.precise, reference.veryPrecise]) {
      const height = value(x).times(scale);
      if (!height.isFinite()) return true;
      const cut =
        height.lt(0) && height.gt(preciseOf(-SIGN_TOLERANCE * peak)) ? preciseOf(0) : height;
      if (!cut.lt(preciseOf(least).times(ALMOST)) && !cut.times(ALMOST).gt(preciseOf(most)))
        return true;
    }
    return false;
  };
  const n = heights.most.length;
  const stride = Math.max(1, Math.floor(n / MOST_CHECKED));
  let points = 0;
  for (let i = 0; i < n; i += stride, points++) {
    const x = lattice.at(first + i);
    if (!isInside(x, heights.least[i]!, heights.most[i]!))
      fault(
        `x = ${x}: ${reference.precise(x).times(scale).toPrecision(20)} outside ${heights.least[i]} … ${heights.most[i]}`,
      );
  }
  let next = first - 0.5;
  for (const { from, to, upperLeft, lowerLeft } of pieces) {
    if (from !== next) fault(`a piece begins at ${from} instead of ${next}`);
    next = to;
    for (let k = from + 0.5; k < to; k++) {
      if (heights.most[k - first]! > upperLeft) fault(`point ${k} above its run`);
      if (heights.least[k - first]! < lowerLeft) fault(`point ${k} below its run`);
    }
  }
  if (next !== first + n - 0.5) fault(`the pieces end at ${next}`);
  const at = { x: 0, t: 0, height: 0 };
  for (const hat of hats) {
    for (let s = 1; s > 1e-6; s *= 0.3, points++) {
      placeOn(hat, s, at);
      const number = Math.round(at.x);
      const x = lattice.at(number);
      if (Math.abs(x) > 1e12) break;
      const height = reference.precise(x).times(scale);
      if (
        height.isFinite() &&
        height.gt(
          preciseOf(at.height)
            .times(1 + HAT_ROUNDING)
            .plus(LOST),
        )
      )
        fault(`x = ${x} under a hat: ${height.toPrecision(17)} above ${at.height}`);
    }
  }
  return points;
}

function checkDraws(envelope: PointEnvelope, label: string, fault: (what: string) => void): void {
  const { values } = new PointDrawer(envelope).column(keyOf('fuzz', label), 1, N_DRAWS);
  const { lattice } = envelope;
  for (const x of values) {
    const number = Math.round(lattice.numberOf(x));
    if (!(number >= lattice.first && number <= lattice.last)) fault(`${x} lies beyond the limits`);
    if (Math.abs(number) < 2 ** 50 && lattice.at(number) !== x) fault(`${x} is no point`);
  }
}
