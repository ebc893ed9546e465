/**
 * The mean of a quantity g under a counted density, with proved bounds.
 *
 * As in expect.ts the quantity is taken less a number c near its mean: E g = c + Σ(g − c)f / Σf.
 * At every point g and f are enclosed and their products added with outward rounding; beyond the
 * points the growth of g·f proves a hat over it, which holds for the sum as it does for the
 * integral, and begins further out where it leaves too much open.
 * The value is the sum in doubles, held within the bounds.
 */
import type { Hat } from '../envelope/hat';
import { InputError } from '../errors';
import { Encloser } from '../formula/enclose';
import { evaluator } from '../formula/evaluate';
import { Defined } from '../formula/operation';
import type { Side } from '../formula/side';
import type { Tape } from '../formula/tape';
import { addDown, addUp, divDown, divUp } from '../numeric/float';
import * as I from '../numeric/interval';
import { shortNumber } from '../numeric/text';
import { Beyond, refusedBeyond, WANTED_BEYOND } from './beyond';
import type { Expectation } from './expect';
import type { PointShares } from './points';

/** Points beyond those of the envelope that are looked at on one side. */
const MOST_MORE = 65_536;

/** A formula as it stands, and as a curve through the points (formula/compile.ts). */
export interface PointTape {
  readonly tape: Tape;
  readonly smooth: Tape;
}

/**
 * The mean of the quantity under the density, whose curve through the points is `smooth`; null for a table.
 * Guarantee: the true mean lies between atLeast and atMost.
 * @throws {InputError} at `where` when the quantity is undefined or has no bound where the density is above 0.
 */
export function pointExpectation(
  shares: PointShares,
  smooth: Tape | null,
  quantity: PointTape,
  where: string,
): Expectation {
  return new PointExpecter(shares, smooth, quantity, where).expect();
}

class PointExpecter {
  private readonly encloser: Encloser;
  private readonly point;
  private readonly g = I.interval();
  private readonly f = I.interval();
  private centre = 0;
  private lo = 0;
  private hi = 0;

  constructor(
    private readonly shares: PointShares,
    private readonly smooth: Tape | null,
    private readonly quantity: PointTape,
    private readonly where: string,
  ) {
    this.encloser = new Encloser(quantity.tape);
    this.point = this.encloser.pointValues();
  }

  expect(): Expectation {
    const { sums } = this.shares;
    const { envelope } = sums;
    const at = evaluator(this.quantity.tape);
    const value = (x: number): number => {
      const g = at(x);
      return g - g === 0 ? g : 0;
    };
    const total = sums.sum(() => 1);
    const rough = sums.sum(value) / total;
    this.centre = rough - rough === 0 ? rough : 0;
    const mean = this.centre + sums.sum((x) => value(x) - this.centre) / total;
    this.centre = mean - mean === 0 ? mean : this.centre;
    const scale = sums.sum((x) => Math.abs(value(x) - this.centre));
    const { least, most } = envelope.heights;
    least.forEach((low, i) => this.add(envelope.lattice.at(sums.first + i), low, most[i]!));
    const beyond = envelope.hats.reduce((sum, hat) => addUp(sum, this.beyond(hat, scale)), 0);
    const [lo, hi] = [addDown(this.lo, -beyond), addUp(this.hi, beyond)];
    const { areaLo, areaHi } = envelope;
    const atLeast = addDown(this.centre, lo < 0 ? divDown(lo, areaLo) : divDown(lo, areaHi));
    const atMost = addUp(this.centre, hi > 0 ? divUp(hi, areaLo) : divUp(hi, areaHi));
    return { value: Math.min(atMost, Math.max(atLeast, mean)), atLeast, atMost };
  }

  /** Adds (g − c)·f at a point. */
  private add(x: number, low: number, high: number): void {
    if (high === 0) return;
    const { encloser, point, g, f } = this;
    encloser.at(x, point);
    if (point.defined[this.quantity.tape.root] !== Defined.Everywhere) {
      encloser.over(x, x, null, null);
      throw new InputError(
        this.where,
        `it is undefined at x = ${shortNumber(x)}, where ${encloser.undefinedReason()}`,
        'give it a value there with IF, or limits that leave the place out',
      );
    }
    I.set(g, addDown(point.density.lo, -this.centre), addUp(point.density.hi, -this.centre));
    I.set(f, low, high);
    I.multiply(g, g, f);
    this.lo = addDown(this.lo, g.lo);
    this.hi = addUp(this.hi, g.hi);
  }

  /** Adds points under a hat until little is left; a bound of that. */
  private beyond(hat: Hat, scale: number): number {
    const { lattice, exponent, densityAt } = this.shares.sums.envelope;
    const { at, step } = lattice;
    const { direction } = hat;
    const begin = direction > 0 ? this.shares.sums.last : this.shares.sums.first;
    const side: Side = { origin: 0, direction, isBeyond: true };
    const bound = new Beyond(
      side,
      { tape: this.smooth!, encloser: new Encloser(this.smooth!, exponent) },
      { tape: this.quantity.smooth, encloser: new Encloser(this.quantity.smooth) },
    );
    let best: { most: number; more: number } | null = null;
    let isInfinite = false;
    for (let more = 0; more <= MOST_MORE; more = more === 0 ? 64 : 2 * more) {
      const x = at(begin + direction * more);
      const most = bound.most(direction * x, x, this.centre);
      if (most === 'infinite') isInfinite = true;
      if (typeof most === 'string') continue;
      const sum = divUp(most, step);
      if (best === null || sum < best.most) best = { most: sum, more };
      if (sum <= WANTED_BEYOND * scale) break;
    }
    if (best === null) throw refusedBeyond(side, isInfinite, this.where);
    for (let j = 1; j <= best.more; j++) {
      const x = at(begin + direction * j);
      densityAt(x, this.f);
      this.add(x, Math.max(0, this.f.lo), Math.max(0, this.f.hi));
    }
    return best.most;
  }
}
