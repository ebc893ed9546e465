/**
 * Five densities whose cumulative area is known in closed form, for judging draws by exact
 * bin shares: two humps, an infinite slope at an end, a jump, a spike on a floor, and a table
 * of points with a jump and a zero stretch. The numbers are those of test/forms.
 */
import erf from '@stdlib/math-base-special-erf';
import type { Column } from '../../src/draw/rejection';
import { Drawer } from '../../src/draw/column';
import type { Envelope } from '../../src/envelope/envelope';
import { readShapes } from '../../src/density/shape';
import { blend } from '../../src/index';
import { keyOf } from '../../src/random/key';
import { proved, provedCurve, tableEnvelope } from '../envelope/proved';
import { forms } from '../forms/forms';

export interface Target {
  readonly name: string;
  readonly from: number;
  readonly to: number;
  readonly envelope: () => Envelope;
  /** The area below x, up to a constant. */
  readonly areaBelow: (x: number) => number;
  /** Places at which a bin has to end: jumps, kinks, the ends of a spike. */
  readonly bounds: readonly number[];
  /** A quarter of the bins lies between this bound and the next. */
  readonly spike?: number;
}

function form(number: number): Pick<Target, 'name' | 'from' | 'to' | 'envelope'> {
  const { density, from, to } = forms[number - 1]!;
  const [lo, hi] = [from as number, to as number];
  return { name: density, from: lo, to: hi, envelope: () => proved(density, lo, hi) };
}

/** ∫ EXP(-((t − centre)/width)^2) dt up to x, from the centre (A&S 7.1.1). */
function bell(x: number, centre: number, width: number): number {
  return (width * Math.sqrt(Math.PI) * erf((x - centre) / width)) / 2;
}

/** Form 2 with its second hump at `second`. */
export function twoHumpsBelow(x: number, second: number): number {
  return 0.6 * bell(x, 2, Math.SQRT2) + 0.4 * bell(x, second, Math.SQRT1_2);
}

/** ∫ x^1.5 (1−x)^0.5 with x = sin²θ: 2 ∫ sin⁴θ cos²θ dθ, an elementary integral. */
function rootEndBelow(x: number): number {
  const angle = Math.asin(Math.sqrt(x));
  return 2 * (angle / 16 - Math.sin(4 * angle) / 64 - Math.sin(2 * angle) ** 3 / 48);
}

/** Tonnes of apples a day: a jump up at 4, nothing between 6 and 7, a jump down at the end. */
const POINTS: readonly (readonly [number, number])[] = [
  [0, 0],
  [2, 3],
  [4, 1],
  [4, 5],
  [5, 2],
  [6, 0],
  [7, 0],
  [9, 4],
  [12, 0.5],
];

/** The empty stretch of the table. */
export const EMPTY_STRETCH: readonly [number, number] = [6, 7];

function pointsBelow(x: number): number {
  let area = 0;
  for (let i = 1; i < POINTS.length; i++) {
    const [[a, left], [b, right]] = [POINTS[i - 1]!, POINTS[i]!];
    if (x <= a || b === a) continue;
    const t = Math.min(x, b) - a;
    area += left * t + ((right - left) / (b - a)) * (t * t) * 0.5;
  }
  return area;
}

export const targets: readonly Target[] = [
  { ...form(2), areaBelow: (x) => twoHumpsBelow(x, 7), bounds: [] },
  { ...form(3), areaBelow: rootEndBelow, bounds: [] },
  {
    ...form(7),
    areaBelow: (x) => (x < 2 ? x + (x * x) / 2 : 4 - 0.5 * Math.expm1(-(x - 2))),
    bounds: [2],
  },
  {
    ...form(8),
    areaBelow: (x) => x + 2000 * bell(x, 31, 1e-4),
    bounds: [31 - 3e-4, 31 + 3e-4],
    spike: 0,
  },
  {
    name: 'a table of points',
    from: 0,
    to: 12,
    envelope: () => tableEnvelope(POINTS),
    areaBelow: pointsBelow,
    bounds: [2, 4, 5, ...EMPTY_STRETCH, 9],
  },
];

/** (1 + x²/3)^−2 up to x: Student t with 3 degrees of freedom (A&S 26.7.3), times its constant. */
function studentBelow(x: number): number {
  const z = x / Math.sqrt(3);
  const tail = Math.abs(z) > 1e100 ? 1 / z : z / (1 + z * z);
  return (Math.sqrt(3) / 2) * (Math.atan(z) + tail);
}

/** Unbounded sides and poles, with cumulative areas in closed form. */
export const sideTargets: readonly Target[] = [
  {
    name: '(1+x^2/3)^-2',
    from: -Infinity,
    to: Infinity,
    envelope: () => proved('(1+x^2/3)^-2', -Infinity, Infinity),
    areaBelow: studentBelow,
    bounds: [],
  },
  {
    name: 'x^-0.5*(1-x)^2',
    from: 0,
    to: 1,
    envelope: () => proved('x^-0.5*(1-x)^2', 0, 1),
    areaBelow: (x) => Math.sqrt(x) * (2 - x * (4 / 3 - (2 / 5) * x)),
    bounds: [],
  },
  {
    name: 'EXP(-2*(LN(x)-1)^2)/x',
    from: 0,
    to: Infinity,
    envelope: () => proved('EXP(-2*(LN(x)-1)^2)/x', 0, Infinity),
    areaBelow: (x) => bell(Math.log(x), 1, Math.SQRT1_2),
    bounds: [],
  },
];

/** Days of picking: 0.7 of a falling curve, 0.3 evenly from 2 to 5, blended by shares of area. */
function blended(): Envelope {
  const pool = blend(
    [[0.7], [0.3]],
    [
      [
        ['density', 'EXP(-x/3)'],
        ['from', 0],
        ['to', 12],
      ],
      [
        [2, 1],
        [5, 1],
      ],
    ],
  );
  const { shapes } = readShapes(pool, null, [], {
    density: 'density',
    limits: 'limits',
    givens: 3,
  });
  return provedCurve(shapes[0]!);
}

/** A linear pool with two jumps; its cumulative area is elementary. */
export const blendTarget: Target = {
  name: 'a BLEND with jumps',
  from: 0,
  to: 12,
  envelope: blended,
  areaBelow: (x) =>
    (0.7 * Math.expm1(-x / 3)) / Math.expm1(-4) + 0.1 * (Math.min(5, Math.max(2, x)) - 2),
  bounds: [2, 5],
};

interface Bins {
  /** One more than there are bins. */
  readonly edges: Float64Array;
  readonly shares: readonly number[];
}

/** About n bins of equal share, with a bin's end at each bound and a quarter of the bins in a spike. */
export function binsOf(target: Target, n: number, areaBelow = target.areaBelow): Bins {
  const { from, to, bounds, spike } = target;
  const whole = target.areaBelow(to) - target.areaBelow(from);
  const stops = [from, ...bounds, to];
  const edges = [from];
  for (let i = 1; i < stops.length; i++) {
    const [a, b] = [stops[i - 1]!, stops[i]!];
    const [below, area] = [target.areaBelow(a), target.areaBelow(b) - target.areaBelow(a)];
    const nHere = spike === i - 2 ? n / 4 : Math.max(1, Math.round((n * area) / whole));
    for (let k = 1; k < nHere; k++) edges.push(placeOf(target, below + (area * k) / nHere, a, b));
    edges.push(b);
  }
  const total = areaBelow(to) - areaBelow(from);
  const shares = edges.slice(1).map((x, i) => (areaBelow(x) - areaBelow(edges[i]!)) / total);
  return { edges: Float64Array.from(edges), shares };
}

/** Farther out than this an unbounded side holds no bin's end. */
const FAR = 2 ** 60;

/** Where the area below reaches a value, by halving. */
export function placeOf({ areaBelow }: Target, area: number, from: number, to: number): number {
  let [lo, hi] = [Math.max(from, -FAR), Math.min(to, FAR)];
  for (let i = 0; i < 120; i++) {
    const mid = lo / 2 + hi / 2;
    if (areaBelow(mid) < area) lo = mid;
    else hi = mid;
  }
  return lo / 2 + hi / 2;
}

/** Adds the values to the bins' counts; a value on an edge belongs to the bin above it. */
export function count(values: Float64Array, edges: Float64Array, counts: Float64Array): void {
  const nBins = edges.length - 1;
  for (const x of values) {
    let lo = 0;
    let hi = nBins;
    while (hi - lo > 1) {
      const mid = (lo + hi) >> 1;
      if (x >= edges[mid]!) lo = mid;
      else hi = mid;
    }
    counts[lo]!++;
  }
}

const ROWS_AT_ONCE = 1_000_000;

/** Draws n rows, a label for every million so that memory stays as it is. */
export function* drawInParts(target: Target, n: number): Generator<Column> {
  const drawer = new Drawer(target.envelope());
  for (let done = 0, part = 1; done < n; done += ROWS_AT_ONCE, part++) {
    const key = keyOf('plan-2027', `${target.name}, part ${part}`);
    yield drawer.column(key, 1, Math.min(ROWS_AT_ONCE, n - done));
  }
}

/** Counts of n draws in bins. */
export function countsOf(target: Target, n: number, { edges }: Bins): Float64Array {
  const counts = new Float64Array(edges.length - 1);
  for (const { values } of drawInParts(target, n)) count(values, edges, counts);
  return counts;
}
