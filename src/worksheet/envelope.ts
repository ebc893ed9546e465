/** ENVELOPE: the proved pieces or boxes, one a row. */
import type { Cell, Range } from '../density/cells';
import type { PlainShape } from '../density/kinds';
import { readAnyShapes, readShapes } from '../density/shape';
import type { Envelope } from '../envelope/envelope';
import type { Hat } from '../envelope/hat';
import type { Piece } from '../envelope/piece';
import type { PointEnvelope } from '../envelope/points';
import { InputError } from '../errors';
import { boxRows } from './boxrows';
import { prove } from './proved';
import { proveSeveral } from './several';

const HEADINGS = [
  'from',
  'to',
  'upper left',
  'upper right',
  'lower left',
  'lower right',
  'share of proposals',
  'acceptance',
];
const PLACES = { density: 'density (argument 1)', limits: 'limits (argument 2)', givens: 3 };

/**
 * The pieces of the envelope: heights of the two lines at both ends, the share of
 * proposals that fall into the piece and the acceptance its proof promises there.
 * Of a counted quantity the points, each a row by itself or, where they are many, in runs from the
 * first to the last. A side without a limit, or a pole at a limit, has a row of its own: one end `unbounded`, no lower line.
 * Shapes: a heading row, then pieces × 8; for several variables boxes × columns (boxrows.ts).
 * Units: x as in the density; heights × 2^-exponent (ACCEPTANCE tells it).
 * @throws {InputError} @throws {CellErrorPassed} as DRAW does.
 */
export function envelope(
  density: Range | null,
  limits: Range | null,
  givens: readonly Range[],
): Range {
  const [any] = readAnyShapes(density, limits, givens, PLACES).shapes;
  if (any?.kind === 'several') return boxRows(proveSeveral(any).envelope);
  const proved = prove(onlyShape(density, limits, givens, PLACES));
  return proved.kind === 'points' ? pointRows(proved.envelope) : curveRows(proved.envelope);
}

function curveRows(proved: Envelope): Range {
  const { pieces, hats } = proved;
  const first = pieces[0]!.from;
  const isBefore = ({ origin, direction, c }: Hat): boolean => origin + direction * c <= first;
  const hatRows = (wanted: boolean): Row[] =>
    hats.filter((hat) => isBefore(hat) === wanted).map((hat) => hatRow(hat, wanted, proved));
  return [
    HEADINGS,
    ...hatRows(true),
    ...pieces.map((piece) => pieceRow(piece, proved)),
    ...hatRows(false),
  ];
}

/** Points, or runs of them, from the first to the last one. */
function pointRows(proved: PointEnvelope): Range {
  const { pieces, hats, lattice, upperArea } = proved;
  const x = lattice.at;
  const hatRows = (direction: 1 | -1): Row[] =>
    hats
      .filter((hat) => hat.direction === direction)
      .map((hat) => {
        const share = hat.area / upperArea;
        const inner = Math.round(hat.origin + direction * (hat.c + 0.5));
        return direction < 0
          ? ['unbounded', x(inner), 0, hat.height, 0, 0, share, 0]
          : [x(inner), 'unbounded', hat.height, 0, 0, 0, share, 0];
      });
  const rows = pieces.map((piece): Row => {
    const [, , ...heights] = pieceRow(piece, proved);
    return [x(piece.from + 0.5), x(piece.to - 0.5), ...heights];
  });
  return [HEADINGS, ...hatRows(-1), ...rows, ...hatRows(1)];
}

type Row = readonly Cell[];

/** What lies beyond the pieces: a proved curve that falls from `height` towards ±∞ or rises into a pole. */
function hatRow(hat: Hat, isBefore: boolean, { upperArea }: Envelope): Row {
  const { origin, direction, c, height, area, isBeyond } = hat;
  const inner = origin + direction * c;
  const outer = isBeyond ? 'unbounded' : origin;
  const far = isBeyond ? 0 : 'unbounded';
  const share = area / upperArea;
  return isBefore
    ? [outer, inner, far, height, 0, 0, share, 0]
    : [inner, outer, height, far, 0, 0, share, 0];
}

function pieceRow(
  piece: Piece,
  { upperArea, densityAt }: { readonly upperArea: number; readonly densityAt: object | null },
): Row {
  const { from, to, upperLeft, upperRight, lowerLeft, lowerRight } = piece;
  const acceptance =
    densityAt === null || piece.upperArea === 0 ? 1 : piece.lowerArea / piece.upperArea;
  return [
    from,
    to,
    upperLeft,
    upperRight,
    lowerLeft,
    lowerRight,
    piece.upperArea / upperArea,
    acceptance,
  ];
}

/** The shape of a function that shows one. @throws {InputError} for several columns of heights or lines of a list. */
export function onlyShape(
  density: Range | null,
  limits: Range | null,
  givens: readonly Range[],
  places: typeof PLACES,
): PlainShape {
  const { shapes, lines } = readShapes(density, limits, givens, places);
  if (shapes.length > 1) {
    throw new InputError(
      places.density,
      lines ? `a list of ${lines.length} inputs` : `${shapes.length} columns of heights`,
      lines ? 'give one input: the headings and its line' : 'give x and one column of heights',
    );
  }
  return shapes[0]!;
}
