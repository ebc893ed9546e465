/**
 * The density cut into cells whose areas are known to nearly all digits: the base of
 * every share, quantile and mean.
 *
 * The pieces of the envelope are halved until each cell's area is sure to about 14
 * digits of the smaller of the two areas, up to and from the cell on, that it is part
 * of: so a far tail, summed from its own end, keeps its digits. A cell at an end of
 * the density that halving does not help (a root or pole there) takes the double
 * exponential rule. All areas lie within the proved lines of their piece.
 * Not handled: proofs of the last digits; budgets stop waves without end, and then
 * the proved lines are what holds.
 */
import type { Envelope } from '../envelope/envelope';
import type { Piece } from '../envelope/piece';
import { middle } from '../numeric/float';
import { heightOf } from './height';
import type { Estimate } from './quadrature';
import { endpointIntegral, smoothIntegral } from './quadrature';
import { hatCell, isLowerHat } from './side';

/**
 * A stretch of the limits with its area; areas are those of the scaled density. Places
 * in it are told by a parameter that rises with x from `start` to `end`: x itself
 * within the pieces, another one under a hat.
 */
export interface Cell {
  readonly from: number;
  readonly to: number;
  readonly start: number;
  readonly end: number;
  readonly area: number;
  /** The area over a part of the cell that shares one end with it; the two are parameters. */
  readonly areaOver: (a: number, b: number) => number;
  /** The area for one unit of the parameter. */
  readonly slopeAt: (u: number) => number;
  readonly placeAt: (u: number) => number;
  readonly parameterOf: (x: number) => number;
}

/** Wanted error of a cell, relative to the area on its smaller side. */
const PRECISE = 2e-15;
/** Shares below this are not told apart from 0. */
const LEAST_SHARE = 1e-315;
/** Halvings before a cell at the very end is taken for one with a root or pole there. */
const HALVINGS_BEFORE_ENDPOINT = 8;
const MOST_HALVINGS = 48;
/** Cells beyond four for each piece. */
const MORE_CELLS = 3000;

type Height = (x: number) => number;

interface Draft {
  readonly piece: Piece;
  readonly cell: Cell & { readonly error: number };
  readonly halvings: number;
}

/** The cells of an envelope in order, those under hats included; those without area are left out. */
export function cellsOf(envelope: Envelope): readonly Cell[] {
  const { pieces, hats } = envelope;
  if (envelope.densityAt === null) return pieces.map(straightCell).filter(hasArea);
  const height = heightOf(envelope);
  const sides = hats.map((hat) => ({
    isLower: isLowerHat(hat, envelope),
    cell: hatCell(hat, envelope, height),
  }));
  const beyond = (isLower: boolean): readonly Cell[] =>
    sides.flatMap((side) => (side.isLower === isLower ? [side.cell] : []));
  const [lower, upper] = [beyond(true), beyond(false)];
  const within = pieceCells(pieces, height, areaOf(lower), areaOf(upper));
  return [...lower, ...within, ...upper].filter(hasArea);
}

function areaOf(cells: readonly Cell[]): number {
  return cells.reduce((sum, { area }) => sum + area, 0);
}

/** The cells of the pieces, with these areas before and after them. */
function pieceCells(
  pieces: readonly Piece[],
  height: Height,
  before: number,
  after: number,
): readonly Cell[] {
  let drafts = pieces.map((piece): Draft => {
    const cell = smoothCell(height, piece, piece.from, piece.to);
    return { piece, cell, halvings: 0 };
  });
  const mostCells = 4 * drafts.length + MORE_CELLS;
  for (const isRelative of [false, true]) {
    for (let isDone = false; !isDone && drafts.length < mostCells;) {
      const allowed = allowedErrors(drafts, before, after, isRelative);
      const finer: Draft[] = [];
      drafts.forEach((draft, i) => {
        const room = mostCells - finer.length - (drafts.length - i);
        if (draft.cell.error <= allowed[i]!.error || room <= 0) finer.push(draft);
        else finer.push(...refined(draft, height, allowed[i]!.isEnd));
      });
      isDone = finer.length === drafts.length && finer.every((draft, i) => draft === drafts[i]);
      drafts = finer;
    }
  }
  return withinPieces(drafts);
}

function hasArea({ area }: Cell): boolean {
  return area > 0;
}

/** What each cell's error may be, and whether the cell is the first or last with any area. */
function allowedErrors(
  drafts: readonly Draft[],
  areaBefore: number,
  areaAfter: number,
  isRelative: boolean,
): readonly { error: number; isEnd: boolean }[] {
  const width = drafts.at(-1)!.cell.to - drafts[0]!.cell.from;
  const total = drafts.reduce((sum, { cell }) => sum + cell.area, areaBefore + areaAfter);
  const least = Math.max(LEAST_SHARE * total, 5e-324 * width);
  const after = new Float64Array(drafts.length + 1);
  after[drafts.length] = areaAfter;
  for (let i = drafts.length - 1; i >= 0; i--) after[i] = after[i + 1]! + drafts[i]!.cell.area;
  let before = areaBefore;
  return drafts.map(({ cell: { area } }, i) => {
    const isEnd = area > 0 && (before === 0 || after[i + 1] === 0);
    before += area;
    const side = isRelative ? Math.min(before, after[i]!) : total;
    return { error: Math.max(PRECISE * side, least), isEnd };
  });
}

/** The draft in two halves, or as one cell for a root or pole at its end, or as it is. */
function refined(draft: Draft, height: Height, isEnd: boolean): readonly Draft[] {
  const { piece, halvings } = draft;
  const { from, to, error } = draft.cell;
  const m = middle(from, to);
  if (halvings > MOST_HALVINGS || m === from) return [draft];
  if (isEnd && halvings >= HALVINGS_BEFORE_ENDPOINT) {
    const cell = endpointCell(height, piece, from, to);
    if (cell.error <= 10 * PRECISE * cell.area && cell.error < error) return [{ ...draft, cell }];
  }
  return [
    { piece, cell: smoothCell(height, piece, from, m), halvings: halvings + 1 },
    { piece, cell: smoothCell(height, piece, m, to), halvings: halvings + 1 },
  ];
}

function smoothCell(height: Height, piece: Piece, from: number, to: number): Draft['cell'] {
  return cellBy((a, b) => smoothIntegral(height, a, b), height, piece, from, to);
}

function endpointCell(height: Height, piece: Piece, from: number, to: number): Draft['cell'] {
  const integral = (a: number, b: number): Estimate => endpointIntegral(height, a, b, PRECISE);
  return cellBy(integral, height, piece, from, to);
}

function cellBy(
  integral: (a: number, b: number) => Estimate,
  height: Height,
  piece: Piece,
  from: number,
  to: number,
): Draft['cell'] {
  const { value, error } = integral(from, to);
  return {
    ...placed(from, to),
    area: withinLines(piece, from, to, value),
    error,
    areaOver: (a, b) => withinLines(piece, a, b, integral(a, b).value),
    slopeAt: height,
  };
}

/** A cell whose parameter is x. */
function placed(
  from: number,
  to: number,
): Pick<Cell, 'from' | 'to' | 'start' | 'end' | 'placeAt' | 'parameterOf'> {
  const same = (x: number): number => x;
  return { from, to, start: from, end: to, placeAt: same, parameterOf: same };
}

/** A piece whose density is its own straight line. */
function straightCell(piece: Piece): Cell {
  const { from, to } = piece;
  const areaOver = (a: number, b: number): number => lineArea(piece, a, b, 'upper');
  const slopeAt = (x: number): number => lineHeight(piece, x, 'upper');
  return { ...placed(from, to), area: areaOver(from, to), areaOver, slopeAt };
}

function lineHeight(p: Piece, x: number, line: 'upper' | 'lower'): number {
  const [left, right] =
    line === 'upper' ? [p.upperLeft, p.upperRight] : [p.lowerLeft, p.lowerRight];
  const width = p.to - p.from;
  // From the nearer end, so that a line that comes down to 0 keeps its digits.
  return x - p.from <= p.to - x
    ? left + (right - left) * ((x - p.from) / width)
    : right + (left - right) * ((p.to - x) / width);
}

function lineArea(piece: Piece, a: number, b: number, line: 'upper' | 'lower'): number {
  return (lineHeight(piece, a, line) / 2 + lineHeight(piece, b, line) / 2) * (b - a);
}

function withinLines(piece: Piece, a: number, b: number, area: number): number {
  const most = lineArea(piece, a, b, 'upper');
  const least = lineArea(piece, a, b, 'lower');
  return Math.max(0, Math.min(most, Math.max(least, area)));
}

/** Cells whose sums lie within the proved areas of their pieces. */
function withinPieces(drafts: readonly Draft[]): readonly Cell[] {
  const sums = new Map<Piece, number>();
  for (const { piece, cell } of drafts) sums.set(piece, (sums.get(piece) ?? 0) + cell.area);
  return drafts.map(({ piece, cell }) => {
    const sum = sums.get(piece)!;
    const proved = Math.min(piece.areaHi, Math.max(piece.areaLo, sum));
    if (proved === sum || sum === 0) return cell;
    const factor = proved / sum;
    return {
      ...cell,
      area: cell.area * factor,
      areaOver: (a, b) => cell.areaOver(a, b) * factor,
      slopeAt: (u) => cell.slopeAt(u) * factor,
    };
  });
}
