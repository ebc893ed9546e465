/** ACCEPTANCE for a shape of several variables. */
import type { Range } from '../density/cells';
import { CURRENT_METHOD } from '../density/givens';
import type { Axis } from '../density/limits';
import type { SeveralShape } from '../density/kinds';
import type { Rows } from '../draw/several';
import type { BoxEnvelope } from '../envelope/boxes';
import { BoxProver } from '../envelope/boxes';
import { waitingPValue } from '../evidence/proportion';
import type { Line } from './lines';
import { CAUTION, densityLines, givenLines, intervalLines, shortened } from './lines';
import type { DrawRequest } from './request';
import { drawRows, proveSeveral } from './several';

/** Steps of formulas spent on what one condition alone cuts off. */
const WORK_FOR_A_CONDITION = 400_000;

/**
 * Lines of item | value.
 * Units: volumes and sums × 2^-exponent; acceptances and shares as fractions of 1.
 */
export function diagnoseSeveral(request: DrawRequest<SeveralShape>): Range {
  const { columns, firstRow, nRows, notes } = request;
  const { shape, seed, label, key } = columns[0]!;
  const proved = proveSeveral(shape);
  const { envelope } = proved;
  const rows = drawRows(proved, key, firstRow, nRows);
  const allNotes = [...notes, ...envelope.notes];
  return [
    ...densityLines(shape.sources),
    ...shape.axes.flatMap(axisLines),
    ...givenLines(shape.givens),
    ['seed', seed],
    ['label', label],
    ['first row', firstRow],
    ['rows', nRows],
    ...proofLines(envelope),
    ...conditionLines(envelope),
    ...drawLines(envelope, rows, nRows),
    ['method', CURRENT_METHOD],
    ['notes', allNotes.length === 0 ? 'none' : allNotes.join('; ')],
    ['caution', CAUTION],
  ];
}

function axisLines({ name, from, to, step }: Axis): readonly Line[] {
  const ends: readonly Line[] = [
    [`${name} from`, from],
    [`${name} to`, to],
  ];
  return step > 0 ? [...ends, [`${name} step`, step]] : ends;
}

function proofLines({ boxes, lowerMass, upperMass, exponent, axes }: BoxEnvelope): readonly Line[] {
  const nCounted = axes.filter(({ step }) => step > 0).length;
  const what =
    nCounted === 0 ? 'volume' : nCounted === axes.length ? 'sum of heights' : 'volume and sum';
  return [
    [
      'proof',
      'proved: in every box the density lies between the lower and the upper bound, and it is 0 outside the boxes',
    ],
    ['boxes', boxes.length],
    [`${what} at least`, lowerMass],
    [`${what} at most`, upperMass],
    ['scale exponent', exponent],
  ];
}

/** What share of all that is within the limits each condition alone leaves out: the largest one binds. */
function conditionLines({ conditions, axes, space }: BoxEnvelope): readonly Line[] {
  if (conditions.length < 2) return [];
  const whole = space.measure(space.whole());
  return conditions.flatMap((condition): readonly Line[] => {
    const prover = new BoxProver({ axes, conditions: [condition], rest: null });
    prover.work(WORK_FOR_A_CONDITION);
    const { lower, upper } = prover.bounds();
    const text = shortened(condition.text);
    return [
      [`share of the limits that ${text} alone cuts, at least`, Math.max(0, 1 - upper / whole.lo)],
      [`share of the limits that ${text} alone cuts, at most`, Math.min(1, 1 - lower / whole.hi)],
    ];
  });
}

function drawLines(envelope: BoxEnvelope, rows: Rows, nRows: number): readonly Line[] {
  const { proposals, settledAtOnce, longestWait, nearTies } = rows;
  const promised = envelope.lowerMass / envelope.upperMass;
  // More than is promised is no surprise: only a lower acceptance speaks against the proof.
  const isAsPromised = nRows / proposals >= promised;
  return [
    ...intervalLines(nRows, proposals),
    ['acceptance promised by the proof', promised],
    [
      'p-value of observed against promised',
      isAsPromised ? 1 : waitingPValue(nRows, proposals, promised),
    ],
    ['share of rows settled by the lower bound', settledAtOnce / nRows],
    ['longest wait, in proposals', longestWait],
    ['near-ties', nearTies],
    // A breach throws while drawing, so rows that are shown have none.
    ['breaches', 0],
  ];
}
