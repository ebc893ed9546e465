/**
 * Fuzzing the proof in several variables: every random region or density is refused with a
 * message of its own, or proved with no point outside its bounds and draws inside the limits.
 */
import seedrandom from 'seedrandom';
import { BoxDrawer } from '../../src/draw/several';
import { BoxProver, proveBoxes } from '../../src/envelope/boxes';
import type { BoxEnvelope, Joint } from '../../src/envelope/boxes';
import { InputError } from '../../src/errors';
import { keyOf } from '../../src/random/key';
import { joint } from './boxProof';
import { checkBoxes } from './checkBoxes';
import { randomRegion } from './randomRegion';

interface BoxFuzzReport {
  readonly shapes: number;
  readonly proved: number;
  readonly points: number;
  readonly faults: readonly string[];
}

const N_DRAWS = 50;
/** One shape in so many is refined as far as it goes; the others after so many steps are proofs too. */
const FULL_EVERY = 20;
const STEPS = 300_000;

function proofOf(shape: Joint, isFull: boolean): BoxEnvelope {
  if (isFull) return proveBoxes(shape);
  const prover = new BoxProver(shape);
  prover.work(STEPS);
  return prover.result();
}

/** Proves and checks `shapes` random shapes; shape i of a seed is always the same. */
export function boxFuzz(
  seed: string,
  shapes: number,
  points: number,
  make = randomRegion,
): BoxFuzzReport {
  const report = { shapes, proved: 0, points: 0, faults: [] as string[] };
  for (let i = 0; i < shapes; i++) {
    const random = seedrandom(`${seed} ${i}`);
    const region = make(random);
    const { text, axes } = region;
    const limits = axes.map(({ name, from, to, step }) => `${name} ${from}…${to} by ${step}`);
    try {
      const envelope = proofOf(joint(text, axes), i % FULL_EVERY === 0);
      report.proved++;
      const checked = checkBoxes(envelope, region, {
        inBoxes: points,
        anywhere: Math.ceil(points / 20),
        random,
      });
      report.points += checked.points;
      report.faults.push(...checked.faults.map((each) => `${text} on ${limits.join()}: ${each}`));
      const { columns } = new BoxDrawer(envelope).rows(keyOf('plan-2027', text), 1, N_DRAWS);
      axes.forEach(({ from, to }, j) => {
        if (columns[j]!.some((x) => !(x >= from && x <= to)))
          report.faults.push(`${text}: a draw outside the limits`);
      });
    } catch (error) {
      if (!(error instanceof InputError)) report.faults.push(`${text}: ${String(error)}`);
    }
  }
  return report;
}
