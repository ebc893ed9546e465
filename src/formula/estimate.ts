/**
 * A tape at a point, in doubles with a proved bound of their error: a running error analysis.
 * It settles nearly every decision at a fraction of the cost of an enclosure; where the bound
 * is too wide or a step has no rule here, the enclosure is asked.
 *
 * For each step the value v and a bound e of |v − the real value|, from those of the operands
 * (a, α) and (b, β) and the unit U > 2^-53 of rounding:
 *   a ± b   α + β + U|v|          a · b   |a|β + |b|α + αβ + U|v|
 *   a / b   (α + |v|β)/(|b| − β) + U|v|
 *   √a      α/√(a − α) + U|v|     e^a     v(α + α²) + 9U|v|, α ≤ ½     LN a   α/(a − α) + 9U|v|
 * Truths are settled by the sign of a ± α. Bounds grow by GUARD a step for their own rounding.
 * Source: Wilkinson (1963), Rounding Errors in Algebraic Processes; Higham (2002), section 3.3.
 * Not handled: functions beyond these (no estimator is made for a tape that uses them).
 */
import * as elementary from '../numeric/elementary';
import type { Tape } from './tape';

/** A little more than 2^-53. */
const UNIT = 1.2e-16;
/** Elementary functions are within ERROR_ULPS = 4 units of the last place, 8 · 2^-53. */
const ELEMENTARY = 9 * UNIT;
const GUARD = 1 + 1e-14;
/** Added to every bound: products that underflow lose so much at most. */
const TINY = 1e-320;
/** Outside these an exponential may have lost digits. */
const LEAST_EXP = 1e-290;
const MOST_EXP = 1e290;
const MOST_POWER = 16;

const enum Op {
  Negate,
  Add,
  Subtract,
  Multiply,
  Divide,
  Power,
  SquareRoot,
  Exp,
  Ln,
  Abs,
  Min,
  Max,
  Positive,
  NotNegative,
  And,
  Or,
  Not,
  If,
}

const OPS: ReadonlyMap<string, Op> = new Map([
  ['negate', Op.Negate],
  ['add', Op.Add],
  ['subtract', Op.Subtract],
  ['multiply', Op.Multiply],
  ['divide', Op.Divide],
  ['SQRT', Op.SquareRoot],
  ['EXP', Op.Exp],
  ['LN', Op.Ln],
  ['ABS', Op.Abs],
  ['MIN', Op.Min],
  ['MAX', Op.Max],
  ['is positive', Op.Positive],
  ['is not negative', Op.NotNegative],
  ['AND', Op.And],
  ['OR', Op.Or],
  ['NOT', Op.Not],
  ['IF', Op.If],
]);

/** An estimator of a tape; null where a step has no rule here. */
export function estimatorOf(tape: Tape): Estimator | null {
  const isKnown = tape.steps.every(
    ({ operation, nOperands }) =>
      nOperands === 0 || OPS.has(operation.name) || powerOf(operation.name) !== null,
  );
  return isKnown ? new Estimator(tape) : null;
}

/** The exponent of a small whole power; null for any other step. */
function powerOf(name: string): number | null {
  const n = /^power (\d+)$/.exec(name)?.[1];
  return n !== undefined && Number(n) >= 2 && Number(n) <= MOST_POWER ? Number(n) : null;
}

export class Estimator {
  private readonly values: Float64Array;
  private readonly errors: Float64Array;
  /** op, place, a, b, c, power of every step that is worked. */
  private readonly code: Int32Array;
  private readonly variables: readonly number[];
  private readonly root: number;

  constructor({ steps, root, variables }: Tape) {
    this.values = Float64Array.from(steps, ({ value }) => value);
    this.errors = Float64Array.from(steps, ({ enclosure, value }) =>
      enclosure ? Math.max(value - enclosure.lo, enclosure.hi - value) * GUARD : 0,
    );
    this.code = Int32Array.from(
      steps.flatMap(({ operation, a, b, c, nOperands }, place) =>
        nOperands === 0
          ? []
          : [OPS.get(operation.name) ?? Op.Power, place, a, b, c, powerOf(operation.name) ?? 0],
      ),
    );
    this.variables = variables;
    this.root = root;
  }

  /** The value of the last `estimate`; not a number where nothing can be told. */
  value = NaN;
  /** A bound of its error. */
  error = Infinity;

  /** Works the tape at a point, one coordinate a variable. */
  estimate(point: ArrayLike<number>): void {
    const { values, errors, code, variables } = this;
    for (let i = 0; i < variables.length; i++) {
      const place = variables[i]!;
      if (place >= 0) values[place] = point[i]!;
    }
    for (let at = 0; at < code.length; at += 6) {
      const p = code[at + 2]!;
      const q = code[at + 3]!;
      const a = values[p]!;
      const b = values[q]!;
      const ofA = errors[p]!;
      const ofB = errors[q]!;
      let v = NaN;
      let e = 0;
      switch (code[at]! as Op) {
        case Op.Negate:
          v = 0 - a;
          e = ofA;
          break;
        case Op.Add:
          v = a + b;
          e = ofA + ofB + UNIT * Math.abs(v);
          break;
        case Op.Subtract:
          v = a - b;
          e = ofA + ofB + UNIT * Math.abs(v);
          break;
        case Op.Multiply:
          v = a * b;
          e = Math.abs(a) * ofB + Math.abs(b) * ofA + ofA * ofB + UNIT * Math.abs(v);
          break;
        case Op.Divide: {
          v = a / b;
          const least = Math.abs(b) - ofB;
          e = least > 0 ? (ofA + Math.abs(v) * ofB) / least + UNIT * Math.abs(v) : NaN;
          break;
        }
        case Op.Power: {
          v = a;
          e = ofA;
          for (let k = code[at + 5]!; k > 1; k--) {
            const product = v * a;
            e = Math.abs(v) * ofA + Math.abs(a) * e + e * ofA + UNIT * Math.abs(product) + TINY;
            v = product;
          }
          break;
        }
        case Op.SquareRoot:
          v = Math.sqrt(a);
          e = a - ofA > 0 ? ofA / Math.sqrt(a - ofA) + UNIT * v : NaN;
          break;
        case Op.Exp:
          v = elementary.exp(a);
          e =
            ofA <= 0.5 && v > LEAST_EXP && v < MOST_EXP
              ? v * (ofA + ofA * ofA) + ELEMENTARY * v
              : NaN;
          break;
        case Op.Ln:
          v = elementary.ln(a);
          e = a - ofA > LEAST_EXP ? ofA / (a - ofA) + ELEMENTARY * Math.abs(v) : NaN;
          break;
        case Op.Abs:
          v = Math.abs(a);
          e = ofA;
          break;
        case Op.Min:
          v = Math.min(a, b);
          e = Math.max(ofA, ofB);
          break;
        case Op.Max:
          v = Math.max(a, b);
          e = Math.max(ofA, ofB);
          break;
        case Op.Positive:
          v = a - ofA > 0 ? 1 : a + ofA <= 0 ? 0 : NaN;
          break;
        case Op.NotNegative:
          v = a - ofA >= 0 ? 1 : a + ofA < 0 ? 0 : NaN;
          break;
        case Op.And:
          v = Math.min(a, b);
          break;
        case Op.Or:
          v = Math.max(a, b);
          break;
        case Op.Not:
          v = 1 - a;
          break;
        case Op.If: {
          const c = values[code[at + 4]!]!;
          v = c === 1 ? a : c === 0 ? b : NaN;
          e = c === 1 ? ofA : ofB;
          break;
        }
      }
      const place = code[at + 1]!;
      values[place] = v;
      errors[place] =
        v === 0 && e === 0
          ? 0
          : (code[at]! as Op) >= Op.Positive && (code[at]! as Op) <= Op.Not
            ? 0
            : e * GUARD + TINY;
    }
    this.value = values[this.root]!;
    this.error = errors[this.root]!;
  }
}
