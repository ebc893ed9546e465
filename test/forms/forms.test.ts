import seedrandom from 'seedrandom';
import { Drawer } from '../../src/draw/column';
import { promisedAcceptance } from '../../src/envelope/envelope';
import { InputError } from '../../src/errors';
import { waitingPValue } from '../../src/evidence/proportion';
import { keyOf } from '../../src/random/key';
import { checkEnvelope } from '../envelope/checkEnvelope';
import { areaOf, proved } from '../envelope/proved';
import { referenceOf } from '../envelope/reference';
import type { Form } from './forms';
import { drawnForms, forms, limitsOf, refusedForms } from './forms';

const ROWS = 20_000;
/** 33 and 34 have many waves. */
const MANY_PIECES = new Set([33, 34]);
const MOST_PIECES = 150;
/** Beyond the range of doubles, so that every point is worked in decimals. */
const DECIMALS_ONLY = new Set([27, 28]);
/** False-alarm rate of each form's check of its acceptance. */
const FALSE_ALARM = 1e-6;

/** What the reference arithmetic of test/envelope/reference.ts can work; the other functions have tests of their own. */
const REFERENCED =
  /^(?:[^A-Z]|\b(?:ABS|ATAN|COS|EXP|IF|AND|LET|LN|MAX|PRODUCT|SIN|SQRT|SUM|TANH)\b)*$/;

function envelopeOf(form: Form): ReturnType<typeof proved> {
  return proved(form.density, ...limitsOf(form));
}

function drawn(form: Form) {
  const envelope = envelopeOf(form);
  const column = new Drawer(envelope).column(keyOf('plan-2027', `form ${form.number}`), 1, ROWS);
  return { column, expected: Math.min(1, areaOf(envelope) / envelope.upperArea) };
}

const titled = drawnForms.map((form) => ({
  ...form,
  title: `form ${form.number}, ${form.density}`,
}));

describe('proveEnvelope and Drawer on the seventy forms', () => {
  test('all seventy are on file, in order [law]', () => {
    expect(forms.map(({ number }) => number)).toEqual(Array.from({ length: 70 }, (_, i) => i + 1));
  });

  test.each(titled)('$title is promised its acceptance with few pieces [law]', (form) => {
    const envelope = envelopeOf(form);
    expect(promisedAcceptance(envelope)).toBeGreaterThanOrEqual(form.leastAcceptance);
    if (!MANY_PIECES.has(form.number))
      expect(envelope.pieces.length).toBeLessThanOrEqual(MOST_PIECES);
  });

  const referenced = titled.filter(({ density }) => REFERENCED.test(density));

  test('most forms can be worked by the reference arithmetic [law]', () => {
    expect(referenced.length).toBeGreaterThanOrEqual(50);
  });

  test.each(referenced)('$title lies between its lines [law]', (form) => {
    const random = seedrandom(`form ${form.number}`);
    const options = { nPoints: 3000, nPrecise: 30, random };
    const report = checkEnvelope(envelopeOf(form), referenceOf(form.density), options);
    expect(report.violations).toEqual([]);
    expect(report.points).toBeGreaterThanOrEqual(DECIMALS_ONLY.has(form.number) ? 60 : 2500);
  });

  // A breach is an error of the draw itself, so a column that comes back has none.
  test.each(titled)('$title is drawn within its limits, accepted as expected [law]', (form) => {
    const { column, expected } = drawn(form);
    const { values, proposals, settledAtOnce } = column;
    const [from, to] = limitsOf(form);
    expect(values.every((x) => x >= from && x <= to && Number.isFinite(x))).toBe(true);
    expect(waitingPValue(ROWS, proposals, expected)).toBeGreaterThan(FALSE_ALARM);
    // The share of first numbers below the lower line is the promise itself: 4.9 standard
    // deviations of a count, whose two sides together are missed once in 10^6.
    const promised = promisedAcceptance(envelopeOf(form));
    const deviation = Math.sqrt(ROWS * promised * (1 - promised));
    expect(Math.abs(settledAtOnce - ROWS * promised)).toBeLessThanOrEqual(4.9 * deviation + 1);
  });

  test('an expected acceptance that is off by 1 % is noticed [law]', () => {
    const { column, expected } = drawn(drawnForms[0]!);
    expect(waitingPValue(ROWS, column.proposals, expected * 0.99)).toBeLessThan(FALSE_ALARM);
  });

  test.each(refusedForms)('$density is refused: $because [law]', (form) => {
    expect(() => proved(form.density, ...limitsOf(form))).toThrow(InputError);
  });
});
