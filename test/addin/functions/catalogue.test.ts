import { catalogue, namespace } from '../../../addin/functions/catalogue';
import * as functions from '../../../addin/functions/functions';
import metadata from '../../../addin/functions/functions.json';
import { acceptance, draw, envelope, profile } from '../../../src/index';

const DENSITY = [['EXP(-0.5*((x-m)/s)^2)']];
const LIMITS = [[0, 12]];
const ROWS = [[50]];
const SEED = [['plan-2027']];
const LABEL = [['downtime']];
const GIVENS = [[['m', 4]], [['s', 1.3]]];

const entry = (name: string) => {
  const found = catalogue.find((candidate) => candidate.name === name);
  if (found === undefined) throw new Error(`no ${name}`);
  return found;
};

describe('catalogue', () => {
  test('has every function of functions.json, with its help [law]', () => {
    expect(namespace).toBe('UNDERCURVE');
    expect(catalogue.map(({ name, description }) => [name, description])).toEqual(
      metadata.functions.map(({ name, description }) => [name, description]),
    );
  });

  test('has every function of functions.ts [law]', () => {
    expect(
      Object.keys(functions)
        .map((name) => name.toUpperCase())
        .sort(),
    ).toEqual(catalogue.map(({ name }) => name).sort());
  });

  test('says which parameters may be left out and which repeats [law]', () => {
    expect(
      entry('DRAW').parameters.map(({ name, optional, repeating }) => [name, optional, repeating]),
    ).toEqual([
      ['density', false, false],
      ['limits', true, false],
      ['rows', true, false],
      ['seed', true, false],
      ['label', true, false],
      ['givens', true, true],
    ]);
  });
});

describe('call(args)', () => {
  test('hands each argument to its place, the trailing ones as givens [law]', () => {
    expect(entry('DRAW').call([DENSITY, LIMITS, ROWS, SEED, LABEL, ...GIVENS])).toEqual(
      draw(DENSITY, LIMITS, ROWS, SEED, LABEL, GIVENS),
    );
    expect(entry('ACCEPTANCE').call([DENSITY, LIMITS, ROWS, SEED, LABEL, ...GIVENS])).toEqual(
      acceptance(DENSITY, LIMITS, ROWS, SEED, LABEL, GIVENS),
    );
    expect(entry('ENVELOPE').call([DENSITY, LIMITS, ...GIVENS])).toEqual(
      envelope(DENSITY, LIMITS, GIVENS),
    );
    expect(entry('PROFILE').call([DENSITY, LIMITS, [[20]], ...GIVENS])).toEqual(
      profile(DENSITY, LIMITS, [[20]], GIVENS),
    );
  });

  test('takes missing trailing arguments and empty givens as left out [law]', () => {
    const table = [
      [0, 1],
      [4, 3],
    ];
    expect(entry('ENVELOPE').call([table])).toEqual(envelope(table, null, []));
    expect(entry('ENVELOPE').call([table, null, null])).toEqual(envelope(table, null, []));
  });
});
