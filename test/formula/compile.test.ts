import { compile, functionNames } from '../../src/formula/compile';
import { nameKey } from '../../src/formula/names';
import { evaluator } from '../../src/formula/evaluate';
import { parse } from '../../src/formula/parse';
import { refusalOf, tapeOf, valueOf } from './formulas';

/** The steps that are worked at every look: those on x. */
const nSteps = (text: string, givens = {}): number =>
  tapeOf(text, givens).steps.filter((step) => step.nOperands > 0).length;

describe('LET', () => {
  it.each([
    ['LET(a,2,a*x)', 6],
    ['LET(a,2,b,a+1,a*b*x)', 18],
    ['LET(a,x,LET(a,a+1,a*10))', 40],
    ['LET(a,1,LET(a,2,a)+a*10)', 12],
    ['LET(x,5,x)', 5],
    ['LET(c,2,r,3,c*r*x)', 18],
    ['LET(constructor,2,__proto__,3,constructor*__proto__*x)', 18],
    ['LET(A,2,a*x)', 6],
    ['let(a,2,A*x)', 6],
    ['LET(π,3,π*x)', 9],
    ['LET(SUM,2,SUM*x)', 6],
    ['LET(v,{1,2,3},SUM(v*x)+MAX(v))', 21],
    ['LET(f,LAMBDA(a,b,a-b),f(10,x))', 7],
    ['LET(f,LAMBDA(a,a+1),g,LAMBDA(a,f(f(a))),g(x))', 5],
    ['LET(f,LAMBDA(a,a+1),LET(f,LAMBDA(a,f(a)*10),f(x)))', 40],
  ])('%s at 3 is %d [law]', (text, value) => {
    expect(valueOf(text, 3)).toBe(value);
  });

  it('a name is not known before its own place, nor outside [law]', () => {
    expect(refusalOf('LET(a,b,b,1,a+b)')).toBe(
      'Formula, character 7: "b" is not a known name; add it to the givens, or use one of: x.',
    );
    expect(refusalOf('LET(a,1,a)+a')).toBe(
      'Formula, character 12: "a" is not a known name; add it to the givens, or use one of: x.',
    );
  });
});

describe('LAMBDA', () => {
  it.each([
    ['LAMBDA(t,t^2)', 9],
    ['LAMBDA(x,x+1)', 4],
    ['=LAMBDA(t,LET(u,t+1,u*t))', 12],
    ['LAMBDA(a,b,a/b)(x,2)', 1.5],
    ['LAMBDA(a,LAMBDA(b,a*10+b))(x)(7)', 37],
    ['LET(a,100,f,LAMBDA(b,a+b),LET(a,5,f(x)))', 103],
    ['LAMBDA(f,f(x))(LAMBDA(a,a*2))', 6],
    ['LET(twice,LAMBDA(f,v,f(f(v))),twice(LAMBDA(a,a*a),x))', 81],
    ['LAMBDA(a,b,IF(a>b,a,b))(x,)', 3],
    ['LAMBDA(5)()*x', 15],
  ])('%s at 3 is %d [law]', (text, value) => {
    expect(valueOf(text, 3)).toBe(value);
  });

  it.each([
    [
      'LET(f,LAMBDA(n,IF(n<1,1,n*f(n-1))),f(x))',
      'Formula, character 5: f calls itself; recursion is not part of the formula language; write the steps out.',
    ],
    [
      'LET(f,LAMBDA(g,n,IF(n<1,1,n*g(g,n-1))),f(f,x))',
      'Formula, character 29: LAMBDAs that use one another more than 100 deep; recursion is not part of the formula language; write the steps out.',
    ],
    [
      'LAMBDA(f,f(f))(LAMBDA(f,f(f)))*x',
      'Formula, character 25: LAMBDAs that use one another more than 100 deep; recursion is not part of the formula language; write the steps out.',
    ],
  ])('%s is refused as recursion [law]', (text, message) => {
    expect(refusalOf(text)).toBe(message);
  });

  it('a name that shadows an outer function may use it [law]', () => {
    expect(valueOf('LET(f,LAMBDA(a,a+1),g,LET(f,LAMBDA(a,f(a)+10),f(x)),g)', 3)).toBe(14);
  });
});

describe('arrays', () => {
  it.each([
    ['SUM({1,2,3})*x', 18],
    ['SUM({1,2,3}*x)', 18],
    ['SUM({1,2;3,4}*x,1)', 31],
    ['PRODUCT({1,2,3}+x)', 120],
    ['MAX({1,7,3},x)', 7],
    ['MIN({4,7},x)', 3],
    ['AVERAGE({1,2,3},x-x)', 1.5],
    ['SUM({1,2,3}*{10;20})*x', 540],
    ['SUM({1,2;3,4}*{10;100})*x', 2190],
    ['SUM(-{1,2}+x)', 3],
    ['SUM(IF({1,0,1},x,10))', 16],
    ['SUM(({1,2,3,4}>2)*x)', 6],
    ['AND(x>{0,1,2})*1', 1],
    ['OR(x>{3,4})*1', 0],
    ['SUM(SQRT({1,4,9}))*x', 18],
    ['SUM(POWER(x,{0,1,2}))', 13],
    ['SUM({TRUE,FALSE}*x)', 3],
  ])('%s at 3 is %d [law]', (text, value) => {
    expect(valueOf(text, 3)).toBe(value);
  });

  it.each([
    [
      '{1,2}*x',
      'Formula, character 1: an array where a single number belongs; put it inside SUM, PRODUCT or another function that takes many numbers.',
    ],
    [
      'SUM({1,2}*{1,2,3}*x)',
      'Formula, character 10: arrays of different sizes; use arrays with the same number of elements.',
    ],
    [
      'EXP({1,2})*x',
      'Formula, character 1: an array where a single number belongs; put it inside SUM, PRODUCT or another function that takes many numbers.',
    ],
  ])('%s is refused [law]', (text, message) => {
    expect(refusalOf(text)).toBe(message);
  });
});

describe('givens', () => {
  const givens = {
    m: 4,
    $B$2: 2,
    "'Our sheet'!$C$3": 10,
    constructor: 6,
    __proto__x: 1,
    obs: { kind: 'list', values: [1, 2, 3], fingerprint: 'f' },
  } as const;

  it.each([
    ['m*x', 12],
    ['M*x', 12],
    ['B2*x', 6],
    ['$b$2*x', 6],
    ["'our sheet'!C3*x", 30],
    ['constructor*x', 18],
    ['SUM(obs*x)', 18],
    ['SUM((obs-m)^2)*x', 42],
    ['LET(m,1,m*x)', 3],
  ])('%s at 3 is %d [law]', (text, value) => {
    expect(valueOf(text, 3, givens)).toBe(value);
  });

  it('nameKey folds case, $ and quotes around a sheet, and nothing else [law]', () => {
    expect(nameKey('$b$2')).toBe('B2');
    expect(nameKey("'it''s'!$b2")).toBe("IT'S!B2");
    expect(nameKey('Sheet1!b2')).toBe(nameKey("'SHEET1'!$B$2"));
    expect(nameKey('a.b')).not.toBe(nameKey('ab'));
  });
});

describe('compile', () => {
  it('equal parts are worked once, and constants at once [law]', () => {
    expect(nSteps('EXP(x)+EXP(x)*2')).toBe(3);
    expect(nSteps('SIN(x+1)*SIN(x+1)*SIN(x+1)')).toBe(4);
    expect(nSteps('EXP(2)*LN(3)/m*x', { m: 7 })).toBe(1);
    expect(nSteps('IF(1>2,SQRT(-1),x)')).toBeLessThanOrEqual(5);
    expect(nSteps('LET(unused,EXP(SIN(x)),x+1)')).toBe(1);
  });

  it('x − x is 0 and undefined constants stay undefined [law]', () => {
    expect(valueOf('EXP(x)-EXP(x)', 5)).toBe(0);
    expect(valueOf('LN(-1)+x', 5)).toBeNaN();
    expect(valueOf('1E308*10*x', 1)).toBe(Infinity);
  });

  it('several formulas are multiplied, each with its own place in messages [law]', () => {
    const source = (text: string, where: string) => ({ text, where, tree: parse(text, where) });
    const sources = [source('x+1', 'Formula, line 1'), source('x^2', 'Formula, line 2')];
    expect(evaluator(compile(sources, ['x'], new Map()))(3)).toBe(36);
    const broken = [...sources, source('2*q', 'Formula, line 4')];
    expect(() => compile(broken, ['x'], new Map())).toThrow(
      'Formula, line 4, character 3: "q" is not a known name; add it to the givens, or use one of: x.',
    );
  });

  it('variables may have any name and win over functions and cells [law]', () => {
    for (const name of ['t', 'x1', 'c', 'r', 'sum', 'constructor']) {
      const text = `${name}^2+1`;
      const tree = parse(text, 'Formula');
      const tape = compile([{ text, where: 'Formula', tree }], [name], new Map());
      expect(evaluator(tape)(3)).toBe(10);
    }
  });

  it('a LAMBDA as the whole formula names the variable [law]', () => {
    expect(refusalOf('LAMBDA(a,b,a+b)')).toBe(
      'Formula, character 1: LAMBDA has 2 names; give it 1, one for each variable (x).',
    );
  });

  it('an unknown function is answered with those that begin alike [law]', () => {
    expect(refusalOf('NORMDIST(x,1,2,FALSE)')).toBe(
      'Formula, character 1: "NORMDIST" is not a known function; use a known one (NOT, NORM.S.DIST, NORM.DIST begin with N).',
    );
    expect(refusalOf('KURT(x)')).toMatch(/; use one of: POWER, AND, .*YEAR.*\.$/);
  });

  it('functionNames() are all names that may be called [law]', () => {
    expect(functionNames()).toContain('TANH');
    expect(functionNames().every((name) => /^[A-Z][A-Z0-9.]*$/.test(name))).toBe(true);
  });
});

describe('limits of the work', () => {
  const doubling = (n: number, start: string): string => {
    let text = `LET(f0z,LAMBDA(v,${start})`;
    for (let i = 1; i <= n; i++) text += `,f${i}z,LAMBDA(v,f${i - 1}z(f${i - 1}z(v)))`;
    return `${text},f${n}z(x))`;
  };

  it('2^13 steps are compiled and 2^14 refused [law]', () => {
    expect(nSteps(doubling(13, 'v*x'))).toBe(8192);
    expect(refusalOf(doubling(14, 'v*x'))).toBe(
      'Formula: 16384 operations on x, each element of a list counted; use at most 10000: shorten the formula or the lists, or work out beforehand what does not depend on x.',
    );
  });

  it('exponential growth is refused before it takes time or memory [law]', () => {
    const start = performance.now();
    expect(refusalOf(doubling(60, 'v+x'))).toMatch(
      /^Formula, character \d+: more than 200000 operations once LET, LAMBDA and lists are written out; shorten the formula or the lists\.$/,
    );
    // 200,000 operations; ten times what a slow machine takes.
    expect(performance.now() - start).toBeLessThan(5000);
  });

  it('growth that shares its steps is no growth [law]', () => {
    let text = 'LET(b0z,x';
    for (let i = 1; i <= 40; i++) text += `,b${i}z,b${i - 1}z+b${i - 1}z`;
    expect(valueOf(`${text},b40z)`, 1)).toBe(2 ** 40);
  });

  it('outer products of arrays are counted [law]', () => {
    const line = Array.from({ length: 600 }, (_, i) => i).join(',');
    const column = line.replace(/,/g, ';');
    expect(refusalOf(`SUM(({${line}}+x)*{${column}})`)).toBe(
      'Formula, character 2300: more than 200000 operations once LET, LAMBDA and lists are written out; shorten the formula or the lists.',
    );
  });
});
