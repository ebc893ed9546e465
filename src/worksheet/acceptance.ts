/** ACCEPTANCE: how exactly the draws of DRAW with the same arguments came about. */
import type { Range } from '../density/cells';
import { CURRENT_METHOD } from '../density/givens';
import { endCell } from '../density/limits';
import type { PlainShape } from '../density/kinds';
import type { Lattice } from '../density/lattice';
import type { Column } from '../draw/rejection';
import type { Envelope } from '../envelope/envelope';
import type { PointEnvelope } from '../envelope/points';
import { promisedAcceptance } from '../envelope/envelope';
import { waitingPValue } from '../evidence/proportion';
import { sharesOfPointTerms, sharesOfTerms } from '../exact/terms';
import { compile } from '../formula/compile';
import { termsOf } from '../formula/terms';
import type { Proved } from './proved';
import { drawColumn, prove } from './proved';
import type { ColumnRequest, DrawRequest } from './request';
import { readAnyDrawRequest } from './request';
import { diagnoseSeveral } from './severalacceptance';
import {
  CAUTION,
  densityLines,
  givenLines,
  intervalLines,
  joined,
  type Line,
  shortened,
} from './lines';

/**
 * The diagnostics of a draw, its inputs as read first.
 * Shapes: lines of item | value, with one column of values per label or line of a shape list.
 * Units: areas and heights × 2^-exponent, the line `scale exponent`; acceptances and shares as fractions of 1.
 * @throws {InputError} @throws {CellErrorPassed} as DRAW does.
 */
export function acceptance(
  density: Range | null,
  limits: Range | null,
  rows: Range | null,
  seed: Range | null,
  label: Range | null,
  givens: readonly Range[],
): Range {
  const { several, plain: request } = readAnyDrawRequest(
    density,
    limits,
    rows,
    seed,
    label,
    givens,
  );
  if (several) return diagnoseSeveral(several);
  const tables = request.columns.map((column) => diagnose(column, request));
  return joined(tables);
}

function diagnose(
  request: ColumnRequest,
  { firstRow, nRows, notes }: DrawRequest,
): readonly Line[] {
  const proved = prove(request.shape);
  const column = drawColumn(proved, request.key, firstRow, nRows);
  const allNotes = [...notes, ...proved.envelope.notes];
  return [
    ...asRead(request.shape),
    ['seed', request.seed],
    ['label', request.label],
    ['first row', firstRow],
    ['rows', nRows],
    ...proofLines(proved),
    ...termLines(request.shape, proved),
    ...drawLines(proved, column, nRows),
    ['method', CURRENT_METHOD],
    ['notes', allNotes.length === 0 ? 'none' : allNotes.join('; ')],
    ['caution', CAUTION],
  ];
}

/** The inputs as they were understood. */
function asRead(shape: PlainShape): readonly Line[] {
  const { limits, lattice } = shape;
  const ends = (variable: string): readonly Line[] => [
    [`${variable} from`, endCell(limits.from)],
    [`${variable} to`, endCell(limits.to)],
    ...(lattice ? latticeLines(variable, lattice) : []),
  ];
  if (shape.kind === 'table') {
    const name = shape.heading === '' ? '' : ` "${shape.heading}"`;
    const nLines = shape.polyline.x.length / 2;
    const lines = `${nLines} straight line${nLines === 1 ? '' : 's'}`;
    return [['density', `table of points${name}, ${lines}`], ...ends('x')];
  }
  const { sources, variable, givens } = shape;
  return [...densityLines(sources), ...ends(variable), ...givenLines(givens)];
}

/** The step, and the last point, which `to` need not be. */
function latticeLines(variable: string, { step, last, at }: Lattice): readonly Line[] {
  const end = Number.isFinite(last) ? at(last) : 'unbounded';
  return [
    [`${variable} step`, step],
    [`${variable} last point`, end],
  ];
}

function proofLines(proved: Proved): readonly Line[] {
  return proved.kind === 'points'
    ? pointProofLines(proved.envelope)
    : curveProofLines(proved.envelope);
}

function pointProofLines(envelope: PointEnvelope): readonly Line[] {
  const hatArea = envelope.hats.reduce((sum, { area }) => sum + area, 0);
  return [
    [
      'proof',
      envelope.hats.length === 0
        ? 'proved: the height at every point lies between the lower and the upper bound'
        : 'proved: the height at every point lies between the lower and the upper bound, and under a falling curve beyond them',
    ],
    ['points', envelope.heights.most.length],
    ['pieces', envelope.pieces.length],
    ['share of proposals beyond the pieces', hatArea / envelope.upperArea],
    ['sum at least', envelope.areaLo],
    ['sum at most', envelope.areaHi],
    ['scale exponent', envelope.exponent],
  ];
}

function curveProofLines(envelope: Envelope): readonly Line[] {
  const isTable = envelope.densityAt === null;
  const hatArea = envelope.hats.reduce((sum, { area }) => sum + area, 0);
  return [
    [
      'proof',
      isTable
        ? 'nothing to prove: the envelope is the table itself'
        : 'proved: the density lies between the lower and the upper bound everywhere within the limits',
    ],
    ['pieces', envelope.pieces.length],
    ['share of proposals beyond the pieces', hatArea / envelope.upperArea],
    ['area at least', envelope.areaLo],
    ['area at most', envelope.areaHi],
    ['scale exponent', envelope.exponent],
  ];
}

/** What share of the area each term of a sum holds, which is seldom the number in front of it. */
function termLines(shape: PlainShape, proved: Proved): readonly Line[] {
  if (shape.kind === 'table') return [];
  const { sources, variable, givens } = shape;
  const sums = sources.filter((source) => termsOf(source).length > 0);
  if (sums.length !== 1) return [];
  const others = sources.filter((source) => source !== sums[0]);
  const terms = termsOf(sums[0]!);
  const tapes = terms.map((term) => compile([term, ...others], [variable], givens));
  const shares =
    proved.kind === 'points'
      ? sharesOfPointTerms(proved.shares.sums, tapes)
      : sharesOfTerms(proved.envelope, tapes);
  return (shares ?? []).map((share, i): Line => [
    `share of area, term ${i + 1}: ${shortened(terms[i]!.text)}`,
    share,
  ]);
}

function drawLines({ envelope, area }: Proved, column: Column, nRows: number): readonly Line[] {
  const { proposals, settledAtOnce, longestWait, nearTies } = column;
  const isTable = envelope.densityAt === null;
  const expected = isTable ? 1 : Math.min(1, area / envelope.upperArea);
  return [
    ...intervalLines(nRows, proposals),
    ['acceptance promised by the proof', isTable ? 1 : promisedAcceptance(envelope)],
    ['acceptance expected from the areas', expected],
    ['p-value of observed against expected', waitingPValue(nRows, proposals, expected)],
    ['share of rows settled by the lower bound', settledAtOnce / nRows],
    ['longest wait, in proposals', longestWait],
    ['near-ties', nearTies],
    // A breach throws while drawing, so a column that is shown has none.
    ['breaches', 0],
  ];
}
