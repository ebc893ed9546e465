/** Functions of many numbers: SUM, PRODUCT, AVERAGE, MIN, MAX, SUMSQ, SUMPRODUCT, MEDIAN. */
import type { Maker, NodeArray, Row } from '../row';
import { ANY } from '../row';
import { ADD, DIVIDE, MULTIPLY } from './arithmetic';
import { greater, lesser } from './choice';
import { square } from './power';

type OfTwo = (make: Maker, a: number, b: number) => number;

const plus: OfTwo = (make, a, b) => make.apply(ADD, a, b);
const times: OfTwo = (make, a, b) => make.apply(MULTIPLY, a, b);

/**
 * Many numbers by a function of two, as a balanced tree: the rounding of a sum of n
 * terms then grows with log n instead of n.
 */
function fold(make: Maker, args: readonly number[], ofTwo: OfTwo): number {
  if (args.length === 1) return args[0]!;
  const half = Math.ceil(args.length / 2);
  return ofTwo(make, fold(make, args.slice(0, half), ofTwo), fold(make, args.slice(half), ofTwo));
}

function folded(name: string, ofTwo: OfTwo): Row {
  return { name, least: 1, most: ANY, rewrite: (make, args) => fold(make, args, ofTwo) };
}

function sum(make: Maker, nodes: readonly number[]): number {
  return fold(make, nodes, plus);
}

/** The sum of the products of elements at the same place. */
function sumProduct(make: Maker, arrays: readonly NodeArray[]): number {
  const [first, ...rest] = arrays as [NodeArray, ...NodeArray[]];
  const size = (array: NodeArray): string => `${array.length} x ${array[0]!.length}`;
  const other = rest.find((array) => size(array) !== size(first));
  if (other) {
    throw make.refuse(
      `SUMPRODUCT of arrays of ${size(first)} and ${size(other)} elements`,
      'use arrays of the same rows and columns',
    );
  }
  if (arrays.some((array) => array.flat().some((node) => make.isTruth(node)))) {
    throw make.refuse(
      'TRUE or FALSE inside SUMPRODUCT, on which spreadsheet programs disagree',
      'multiply the condition by 1 or by another array, as in SUMPRODUCT((a>1)*b)',
    );
  }
  const products = arrays
    .map((array) => array.flat())
    .reduce((a, b) => a.map((node, i) => times(make, node, b[i]!)));
  return sum(make, products);
}

/** Sorts nodes by MIN and MAX of neighbours, the least `n` to the front. */
function leastFirst(make: Maker, nodes: readonly number[], n: number): number[] {
  const sorted = [...nodes];
  for (let i = 0; i < n; i++) {
    for (let j = sorted.length - 1; j > i; j--) {
      const [a, b] = [sorted[j - 1]!, sorted[j]!];
      sorted[j - 1] = lesser(make, a, b);
      sorted[j] = greater(make, a, b);
    }
  }
  return sorted;
}

/** Only constants near the middle can be the median: as many on either side as there are others. */
function median(make: Maker, args: readonly number[]): number {
  const known = (node: number): number => make.exactValue(node)!;
  const constants = args
    .filter((node) => make.exactValue(node) !== undefined)
    .sort((a, b) => known(a) - known(b));
  const others = args.filter((node) => make.exactValue(node) === undefined);
  const half = Math.floor(args.length / 2);
  const isOdd = args.length % 2 === 1;
  const from = Math.max(0, (isOdd ? half : half - 1) - others.length);
  const kept = constants.slice(from, half + 1);
  const nodes = [...kept, ...others];
  const rank = half - from;
  const sorted = others.length === 0 ? kept : leastFirst(make, nodes, rank + 1);
  if (isOdd) return sorted[rank]!;
  const both = make.apply(ADD, sorted[rank - 1]!, sorted[rank]!);
  return make.apply(DIVIDE, both, make.number(2));
}

export const MANY_ROWS: readonly Row[] = [
  folded('SUM', plus),
  folded('PRODUCT', times),
  folded('MIN', lesser),
  folded('MAX', greater),
  {
    name: 'AVERAGE',
    least: 1,
    most: ANY,
    rewrite: (make, args) => make.apply(DIVIDE, sum(make, args), make.number(args.length)),
  },
  {
    name: 'SUMSQ',
    least: 1,
    most: ANY,
    rewrite: (make, args) =>
      sum(
        make,
        args.map((x) => square(make, x)),
      ),
  },
  { name: 'SUMPRODUCT', least: 1, most: ANY, rewriteArrays: sumProduct },
  { name: 'MEDIAN', least: 1, most: ANY, rewrite: median },
];
