/**
 * Fuzzing the proof: every random shape is either refused with a message of its own or
 * proved, with no point above the upper or below the lower line, finite areas, and draws
 * inside the limits. Anything else is a fault.
 */
import seedrandom from 'seedrandom';
import { Drawer } from '../../src/draw/column';
import type { Envelope } from '../../src/envelope/envelope';
import { InputError } from '../../src/errors';
import { keyOf } from '../../src/random/key';
import { checkEnvelope } from './checkEnvelope';
import { areaOf, proved } from './proved';
import type { RandomShape } from './randomFormula';
import { referenceOf } from './reference';

/** Of the processor, so that a busy machine is not a fault. */
const MOST_SECONDS = 5;
const N_DRAWS = 200;
/** The quadrature of the area takes longer than all the rest: one shape in so many has it. */
const FULL_EVERY = 16;

interface FuzzReport {
  readonly shapes: number;
  readonly proved: number;
  readonly refused: number;
  readonly points: number;
  readonly faults: readonly string[];
}

interface FuzzOptions {
  readonly seed: string;
  readonly shapes: number;
  /** Points checked in each proved envelope. */
  readonly points: number;
  readonly make: (random: () => number) => RandomShape;
}

/** Proves and checks `shapes` random shapes; shape i of a seed is always the same. */
export function fuzz({ seed, shapes, points, make }: FuzzOptions): FuzzReport {
  const report = { shapes, proved: 0, refused: 0, points: 0, faults: [] as string[] };
  for (let i = 0; i < shapes; i++) {
    const random = seedrandom(`${seed} ${i}`);
    const shape = make(random);
    const fault = (what: string): void => {
      report.faults.push(`${seed} ${i}, ${shape.text} from ${shape.from} to ${shape.to}: ${what}`);
    };
    const envelope = proveOrRefuse(shape, fault);
    if (envelope === null) {
      report.refused++;
      continue;
    }
    report.proved++;
    try {
      const checked = checkEnvelope(envelope, referenceOf(shape.text), {
        nPoints: points,
        nPrecise: 20,
        random,
      });
      report.points += checked.points;
      checked.violations.forEach(fault);
      checkDraws(envelope, shape, `${seed} ${i}`, i % FULL_EVERY === 0, fault);
    } catch (error) {
      fault(String(error));
    }
  }
  return report;
}

function proveOrRefuse(
  { text, from, to }: RandomShape,
  fault: (what: string) => void,
): Envelope | null {
  const start = process.cpuUsage();
  try {
    return proved(text, from, to);
  } catch (error) {
    if (!(error instanceof InputError)) fault(String(error));
    else if (/NaN|Infinity/.test(error.message)) fault(error.message);
    return null;
  } finally {
    const { user, system } = process.cpuUsage(start);
    if (user + system > MOST_SECONDS * 1e6) fault(`it took ${(user + system) / 1e6} s`);
  }
}

function checkDraws(
  envelope: Envelope,
  { from, to }: RandomShape,
  label: string,
  isFull: boolean,
  fault: (what: string) => void,
): void {
  const { upperArea, lowerArea, areaLo, areaHi } = envelope;
  const area = isFull ? areaOf(envelope) : areaLo;
  const isOrdered = 0 <= lowerArea && lowerArea <= areaLo && areaLo <= area;
  if (!(isOrdered && area <= areaHi && areaHi <= upperArea && upperArea < Infinity))
    fault(`areas ${[lowerArea, areaLo, area, areaHi, upperArea].join(', ')}`);
  const { values } = new Drawer(envelope).column(keyOf('fuzz', label), 1, N_DRAWS);
  const outside = values.find((x) => !(x >= from && x <= to && Number.isFinite(x)));
  if (outside !== undefined) fault(`a draw of ${outside}`);
}
