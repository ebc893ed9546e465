/**
 * A tape at a point, in doubles: for tables, charts and near-ties.
 * Proofs and decisions use enclose.ts.
 */
import type { Tape } from './tape';

/** A function that gives the tape's value at a point; NaN where it is undefined. */
export function evaluator(tape: Tape): (...point: readonly number[]) => number {
  const { steps, root, variables } = tape;
  const values = Float64Array.from(steps, (step) => step.value);
  const active = steps.flatMap((step, place) => (step.nOperands > 0 ? [{ ...step, place }] : []));
  return (...point) => {
    variables.forEach((place, i) => {
      if (place >= 0) values[place] = point[i]!;
    });
    for (const { operation, a, b, c, place } of active) {
      values[place] = operation.point(values[a]!, values[b]!, values[c]!);
    }
    return values[root]!;
  };
}
