/**
 * The area from a cell's start to each of many rising places in it, far more quickly than one
 * integral a place: the density as a polynomial, integrated term by term, over parts of the
 * cell that are halved until it fits.
 *
 * Source: Clenshaw & Curtis (1960), Numerische Mathematik 2 (Chebyshev series and their
 * integrals); sums by Clenshaw (1955). A part where no polynomial fits after MOST_HALVINGS,
 * or with few places, is integrated place by place.
 * Guarantee: within 1e-12 of the cell's area where its integrals are.
 */
import { cos } from '../numeric/elementary';
import type { Cell } from './cells';

const DEGREE = 24;
const PI = 3.141592653589793;
/** Coefficients that may be left out, as a share of the largest. */
const FITS = 1e-13;
const MOST_HALVINGS = 14;
/** So many places are integrated one by one. */
const FEW = 4;

/** cos(jkπ/DEGREE). */
const WAVES = Float64Array.from({ length: 2 * DEGREE }, (_, i) => cos((PI * i) / DEGREE));

/** Writes the areas between the cell's start and `places[first … last − 1]`, parameters that rise, into `areas`. */
export function areasUpTo(
  cell: Cell,
  places: Float64Array,
  first: number,
  last: number,
  areas: Float64Array,
): void {
  new Cumulation(cell, places, areas).over(cell.start, cell.end, first, last, 0);
}

class Cumulation {
  private readonly heights = new Float64Array(DEGREE + 1);
  private readonly series = new Float64Array(DEGREE + 2);

  constructor(
    private readonly cell: Cell,
    private readonly places: Float64Array,
    private readonly areas: Float64Array,
  ) {}

  /** Fills the areas of the places of this part. */
  over(a: number, b: number, first: number, last: number, halvings: number): void {
    if (first === last) return;
    const { cell, places, areas } = this;
    const m = a / 2 + b / 2;
    if (last - first <= FEW || halvings > MOST_HALVINGS || !(m > a && m < b)) {
      for (let i = first; i < last; i++) areas[i] = cell.areaOver(cell.start, places[i]!);
      return;
    }
    if (this.fit(a, b)) {
      const before = a === cell.start ? 0 : cell.areaOver(cell.start, a);
      for (let i = first; i < last; i++) areas[i] = before + this.areaFrom(a, b, places[i]!);
      return;
    }
    let half = first;
    while (half < last && places[half]! <= m) half++;
    this.over(a, m, first, half, halvings + 1);
    this.over(m, b, half, last, halvings + 1);
  }

  /** Finds the series of the integral over [a, b]; false when the density is no such polynomial. */
  private fit(a: number, b: number): boolean {
    const { heights, series, cell } = this;
    const [half, centre] = [b / 2 - a / 2, a / 2 + b / 2];
    for (let k = 0; k <= DEGREE; k++) {
      const u = k === 0 ? b : k === DEGREE ? a : centre + half * WAVES[k]!;
      const height = cell.slopeAt(u);
      if (!(height >= 0 && height < Infinity)) return false;
      heights[k] = k === 0 || k === DEGREE ? height / 2 : height;
    }
    const coefficients = new Float64Array(DEGREE + 3);
    let most = 0;
    for (let j = 0; j <= DEGREE; j++) {
      let sum = 0;
      for (let k = 0; k <= DEGREE; k++) sum += heights[k]! * WAVES[(j * k) % (2 * DEGREE)]!;
      coefficients[j] = (sum * 2) / DEGREE;
      most = Math.max(most, Math.abs(coefficients[j]!));
    }
    coefficients[DEGREE] = coefficients[DEGREE]! / 2;
    const left = [0, 1, 2].map((k) => Math.abs(coefficients[DEGREE - k]!));
    if (Math.max(...left) > FITS * most) return false;
    let atStart = 0;
    for (let j = 1; j <= DEGREE + 1; j++) {
      series[j] = (half * (coefficients[j - 1]! - coefficients[j + 1]!)) / (2 * j);
      atStart += j % 2 === 0 ? series[j]! : -series[j]!;
    }
    series[0] = -atStart;
    return true;
  }

  private areaFrom(a: number, b: number, u: number): number {
    const { series } = this;
    const t = (2 * (u - a)) / (b - a) - 1;
    let [next, last] = [0, 0];
    for (let j = DEGREE + 1; j > 0; j--) {
      const now = 2 * t * next - last + series[j]!;
      last = next;
      next = now;
    }
    return Math.max(0, t * next - last + series[0]!);
  }
}
