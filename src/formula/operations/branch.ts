/** IF, IFS, SWITCH, CHOOSE: chains of choices by settled or unsettled conditions. */
import type { Maker, Row } from '../row';
import { ANY } from '../row';
import { CHOOSE_BY } from './choice';
import { truthOf } from './truth';
import { undefinedBecause } from './undefined';

/** `yes` where the condition holds, `no` elsewhere; only one of them if it is a settled constant. */
function choose(make: Maker, condition: number, yes: number, no: () => number): number {
  const known = make.enclosure(condition);
  if (known?.lo === 1) return yes;
  if (known?.hi === 0) return no();
  return make.apply(CHOOSE_BY, yes, no(), condition);
}

/** The value beside the first condition that holds. */
function firstThatHolds(
  make: Maker,
  conditions: readonly number[],
  values: readonly number[],
  otherwise: () => number,
): number {
  const from = (i: number): number =>
    i === conditions.length
      ? otherwise()
      : choose(make, conditions[i]!, values[i]!, () => from(i + 1));
  return from(0);
}

function ifs(make: Maker, args: readonly number[]): number {
  if (args.length % 2 !== 0) {
    throw make.refuse(
      `IFS with ${args.length} arguments`,
      'give conditions and values in pairs, the last condition TRUE for all the rest',
    );
  }
  const conditions = args.filter((_, i) => i % 2 === 0).map((c) => truthOf(make, c));
  const values = args.filter((_, i) => i % 2 === 1);
  return firstThatHolds(make, conditions, values, () =>
    undefinedBecause(make, 'no condition of IFS holds'),
  );
}

function switchTo(make: Maker, args: readonly number[]): number {
  const [tested, ...rest] = args as [number, ...number[]];
  const nPairs = Math.floor(rest.length / 2);
  const fallback = rest.length % 2 === 1 ? rest.at(-1) : undefined;
  const conditions = Array.from({ length: nPairs }, (_, i) => make.call('=', tested, rest[2 * i]!));
  const values = Array.from({ length: nPairs }, (_, i) => rest[2 * i + 1]!);
  return firstThatHolds(
    make,
    conditions,
    values,
    () => fallback ?? undefinedBecause(make, 'no case of SWITCH fits'),
  );
}

/** CHOOSE cuts its index to a whole number. */
function chooseByIndex(make: Maker, args: readonly number[]): number {
  const [index, ...values] = args as [number, ...number[]];
  const outside = (): number =>
    undefinedBecause(make, `the index of CHOOSE is not from 1 to ${values.length}`);
  const isBelow = (limit: number): number => make.call('<', index, make.number(limit));
  const conditions = [1, ...values.map((_, i) => i + 2)].map(isBelow);
  return firstThatHolds(make, conditions, [outside(), ...values], outside);
}

export const BRANCH_ROWS: readonly Row[] = [
  {
    name: 'IF',
    least: 2,
    most: 3,
    rewrite: (make, [c, a, b]) => choose(make, truthOf(make, c!), a!, () => b ?? make.number(0)),
  },
  { name: 'IFS', least: 2, most: ANY, rewrite: ifs },
  { name: 'SWITCH', least: 3, most: ANY, rewrite: switchTo },
  { name: 'CHOOSE', least: 2, most: ANY, rewrite: chooseByIndex },
];
