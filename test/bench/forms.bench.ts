/**
 * The forms of test/forms: pieces, the acceptance that is certified, draws a second, and the
 * time of a build (text to proof to guide table) as a multiple of the time of one draw: "cold" in
 * a process of its own that has proved nothing before, "warm" the median of many. Fails where
 * the median warm build of a form on finite limits is more than 25,000 draws' worth.
 */
import { spawnSync } from 'node:child_process';
import { Drawer } from '../../src/draw/column';
import { promisedAcceptance } from '../../src/envelope/envelope';
import type { Envelope } from '../../src/envelope/envelope';
import { keyOf } from '../../src/random/key';
import { proved } from '../envelope/proved';
import type { Form } from '../forms/forms';
import { drawnForms, limitsOf } from '../forms/forms';
import { inTurn, median, printTable, seconds } from './timing';

const ROWS = 1_000_000;
const MOST_DRAWS = 25_000;
/** Later forms have an unbounded side or a pole. */
const LAST_FINITE = 36;

function build(form: Form): { envelope: Envelope; drawer: Drawer } {
  const envelope = proved(form.density, ...limitsOf(form));
  return { envelope, drawer: new Drawer(envelope) };
}

/** Seconds of the first build of a process. */
function coldBuild({ number }: Form): number {
  const run = spawnSync(process.execPath, [__filename, `cold ${number}`], { encoding: 'utf8' });
  return Number(run.stdout);
}

function measure(form: Form): readonly (string | number)[] {
  const cold = median([1, 2, 3].map(() => coldBuild(form)));
  const { envelope, drawer } = build(form);
  for (let i = 0; i < 30; i++) build(form);
  const key = keyOf('plan-2027', `form ${form.number}`);
  const [builds, draws] = inTurn(
    [
      () => {
        for (let i = 0; i < 10; i++) build(form);
      },
      () => drawer.column(key, 1, ROWS),
    ],
    9,
  );
  const [warm, draw] = [median(builds!) / 10, median(draws!) / ROWS];
  const isFinite = form.number <= LAST_FINITE;
  multiples.push({ isFinite, warm: warm / draw, cold: cold / draw });
  return [
    form.number,
    form.density,
    envelope.pieces.length,
    promisedAcceptance(envelope).toFixed(4),
    Math.round(warm / draw),
    Math.round(cold / draw),
    (warm * 1000).toFixed(2),
    (cold * 1000).toFixed(1),
    (1e-6 / draw).toFixed(1),
  ];
}

const multiples: { readonly isFinite: boolean; readonly warm: number; readonly cold: number }[] =
  [];

/** The median of both, as a sentence. */
function medians(of: typeof multiples): string {
  const [warm, first] = [median(of.map((m) => m.warm)), median(of.map((m) => m.cold))];
  return `${Math.round(warm)} draws' worth warm, ${Math.round(first)} cold`;
}

const cold = /^cold (\d+)$/.exec(process.argv[2] ?? '');
if (cold) {
  const form = drawnForms.find(({ number }) => number === Number(cold[1]))!;
  console.log(seconds(() => build(form)));
} else {
  printTable([
    [
      '#',
      'density',
      'pieces',
      'certified',
      'warm build, draws',
      'cold build, draws',
      'warm, ms',
      'cold, ms',
      'million a second',
    ],
    ...drawnForms.map(measure),
  ]);
  const finite = multiples.filter(({ isFinite }) => isFinite);
  const isFast = median(finite.map(({ warm }) => warm)) <= MOST_DRAWS;
  console.log(`\nMedian build on finite limits: ${medians(finite)}`);
  console.log(`Median build of all: ${medians(multiples)}`);
  console.log(`Promised on finite limits: ${MOST_DRAWS} warm: ${isFast ? 'kept' : 'NOT KEPT'}`);
  if (!isFast) process.exitCode = 1;
}
