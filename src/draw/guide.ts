/**
 * From an envelope to a table that turns one uniform number into a proposal.
 *
 * Segments stand in the order lower₁, gap₁, lower₂, gap₂ …: the trapezoid under a
 * piece's lower line and the one between its two lines. A number u in [0, 1) falls
 * into the segment whose share of the whole area it meets; what is left of u places
 * x in that trapezoid by inversion, which needs a root and nothing else.
 * Source: guide tables, Chen and Asau (1974); trapezoid inversion is elementary.
 *
 *     upper ──────╮          u in lower: x is a draw at once
 *       gap       │          u in gap:   x is a draw if the height drawn there
 *     lower ──────╯                      lies under the density
 */
import type { Envelope } from '../envelope/envelope';
import { N_INSIDE } from '../envelope/piece';
import { prev } from '../numeric/float';

/** Numbers of one segment in `Guide.segments`, in this order. */
export const STRIDE = 6;
export const START = 0;
export const INVERSE_SHARE = 1;
export const LEFT = 2;
export const WIDTH = 3;
/** Left height over mean height, p in [0, 2], and its square. */
const SLANT = 4;
const SLANT_SQUARED = 5;

export interface Guide {
  /** STRIDE numbers a segment, then one closing START of 1. */
  readonly segments: Float64Array;
  /** For each segment the piece whose gap it is, −1 for the area under a lower line, the number of pieces + j for hat j. */
  readonly gapOf: Int32Array;
  /** Cell ⌊u · cells⌋ names the segment to begin the search at. */
  readonly cells: Int32Array;
  /**
   * The pieces at LINES_STRIDE numbers each: from, 1/width, lower left, lower rise, gap left, gap
   * rise, to; then what is known inside (envelope/piece.ts).
   */
  readonly lines: Float64Array;
}

const LINES_STRIDE = 16;

/** One segment before it is laid out: a trapezoid, or a hat (without a place of its own). */
interface Segment {
  readonly from: number;
  readonly width: number;
  readonly slant: number;
  readonly area: number;
  readonly gapOf: number;
}

interface Trapezoid {
  readonly piece: number;
  readonly isGap: boolean;
  readonly left: number;
  readonly right: number;
}

/** What of an envelope is laid end to end. */
type Stacked = Pick<Envelope, 'pieces' | 'hats'> & {
  /** Null where upper and lower line are the density itself. */
  readonly densityAt: object | null;
};

/** The guide table of an envelope. */
export function guideOf(envelope: Stacked): Guide {
  const { pieces } = envelope;
  const trapezoids: Trapezoid[] = [];
  let tallest = 0;
  pieces.forEach((p, piece) => {
    tallest = Math.max(tallest, p.upperLeft, p.upperRight);
    trapezoids.push({ piece, isGap: false, left: p.lowerLeft, right: p.lowerRight });
    if (envelope.densityAt === null) return;
    trapezoids.push({
      piece,
      isGap: true,
      left: Math.max(0, p.upperLeft - p.lowerLeft),
      right: Math.max(0, p.upperRight - p.lowerRight),
    });
  });
  // Areas relative to the whole box neither overflow nor underflow.
  const first = pieces[0]!.from;
  const box = pieces.at(-1)!.to - first;
  const areaOf = ({ piece, left, right }: Trapezoid): number =>
    ((pieces[piece]!.to - pieces[piece]!.from) / box) * (left / tallest / 2 + right / tallest / 2);
  const segmentsOf = (lies: 'before' | 'after'): Segment[] =>
    envelope.hats.flatMap(({ area, c, origin, direction }, j) => {
      const isBefore = origin + direction * c < first + box / 2;
      const hat = {
        from: 0,
        width: 0,
        slant: 1,
        area: area / box / tallest,
        gapOf: pieces.length + j,
      };
      return isBefore === (lies === 'before') ? [hat] : [];
    });
  const inside = trapezoids.map((t): Segment => {
    const { from, to } = pieces[t.piece]!;
    const slant = (2 * (t.left / tallest)) / (t.left / tallest + t.right / tallest);
    return {
      from,
      width: widthOf(from, to),
      slant,
      area: areaOf(t),
      gapOf: t.isGap ? t.piece : -1,
    };
  });
  const used = [...segmentsOf('before'), ...inside, ...segmentsOf('after')].filter(
    ({ area }) => area > 0,
  );
  const total = used.reduce((sum, { area }) => sum + area, 0);
  const segments = new Float64Array(used.length * STRIDE + 1);
  let start = 0;
  used.forEach(({ from, width, slant, area }, i) => {
    const share = area / total;
    const at = i * STRIDE;
    segments[at + START] = start;
    segments[at + INVERSE_SHARE] = 1 / share;
    segments[at + LEFT] = from;
    segments[at + WIDTH] = width;
    segments[at + SLANT] = slant;
    segments[at + SLANT_SQUARED] = slant * slant;
    start += share;
  });
  segments[used.length * STRIDE] = 1;
  return {
    segments,
    gapOf: Int32Array.from(used, ({ gapOf }) => gapOf),
    cells: cellsOf(segments, used.length),
    lines: linesOf(envelope),
  };
}

/** The widest that does not lead beyond the end: from + (to − from) may round to more than `to`. */
function widthOf(from: number, to: number): number {
  const width = to - from;
  return from + width > to ? prev(width) : width;
}

function cellsOf(segments: Float64Array, n: number): Int32Array {
  let size = 4;
  while (size < 2 * n) size *= 2;
  const cells = new Int32Array(size);
  for (let cell = 0, i = 0; cell < size; cell++) {
    while (i + 1 < n && segments[(i + 1) * STRIDE + START]! <= cell / size) i++;
    cells[cell] = i;
  }
  return cells;
}

function linesOf({ pieces }: Stacked): Float64Array {
  const lines = new Float64Array(pieces.length * LINES_STRIDE);
  pieces.forEach((p, i) => {
    const at = i * LINES_STRIDE;
    const gapLeft = p.upperLeft - p.lowerLeft;
    lines[at] = p.from;
    lines[at + 1] = 1 / (p.to - p.from);
    lines[at + 2] = p.lowerLeft;
    lines[at + 3] = p.lowerRight - p.lowerLeft;
    lines[at + 4] = gapLeft;
    lines[at + 5] = p.upperRight - p.lowerRight - gapLeft;
    lines[at + 6] = p.to;
    // Where nothing is known inside, NaN settles nothing.
    for (let k = 0; k < N_INSIDE; k++) lines[at + 7 + k] = p.inside ? p.inside[k]! : NaN;
  });
  return lines;
}
