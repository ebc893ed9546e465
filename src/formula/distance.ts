/**
 * A tape of x rewritten as one of t, the distance from a limit: x = origin ± t. Doubles
 * near 1 are 10^-16 apart, so x cannot tell how near it is to a pole there; t can.
 * A difference of x and the limit becomes ± t itself, whatever its rounding was; all
 * else sees origin ± t.
 * Not handled: distances that are written in another way, as in x^2 − 1; they are told
 * no better than by x.
 */
import { ADD, NEGATE, SUBTRACT } from './operations/arithmetic';
import type { Side } from './side';
import { Steps } from './steps';
import type { Tape } from './tape';

/** The tape by the distance t > 0 from the side's origin. Same values in real numbers. */
export function byDistance(tape: Tape, { origin, direction }: Side): Tape {
  const steps = new Steps();
  const t = steps.variable(0);
  const away = direction > 0 ? t : steps.apply(NEGATE, [t]);
  const x = origin === 0 ? away : steps.apply(ADD, [steps.number(origin), away]);
  const variable = tape.variables[0]!;
  const isEnd = (place: number, sign: 1 | -1): boolean => {
    const { enclosure } = tape.steps[place]!;
    return enclosure?.lo === sign * origin && enclosure.hi === sign * origin;
  };
  const moved: number[] = [];
  tape.steps.forEach(({ operation, a, b, c, nOperands, value, enclosure }, place) => {
    const isOf = (one: number, other: number, sign: 1 | -1): boolean =>
      one === variable && isEnd(other, sign);
    const write = (): number => {
      if (place === variable) return x;
      if (enclosure) return steps.constant(value, enclosure);
      if (operation.name === SUBTRACT.name) {
        if (isOf(a, b, 1)) return away;
        if (isOf(b, a, 1)) return steps.apply(NEGATE, [away]);
      }
      if (operation.name === ADD.name && (isOf(a, b, -1) || isOf(b, a, -1))) return away;
      return steps.apply(
        operation,
        [a, b, c].slice(0, nOperands).map((operand) => moved[operand]!),
      );
    };
    moved.push(write());
  });
  return steps.tape(moved[tape.root]!, [t]);
}
