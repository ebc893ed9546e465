import { InputError } from '../../src/errors';
import { parse } from '../../src/formula/parse';
import type { Tree } from '../../src/formula/tree';
import { messageOf } from '../message';
import { refusalOf, tapeOf, valueOf } from './formulas';

/** A tree in brackets, operator first, so that shapes can be read. */
function shown(tree: Tree | null): string {
  if (tree === null) return '_';
  switch (tree.kind) {
    case 'number':
      return String(tree.value);
    case 'truth':
      return tree.value ? 'TRUE' : 'FALSE';
    case 'text':
      return `"${tree.value}"`;
    case 'name':
      return tree.isCell ? `[${tree.name}]` : tree.name;
    case 'array':
      return `{${tree.rows.map((row) => row.map(shown).join(',')).join(';')}}`;
    case 'operator':
      return `(${[tree.operator, ...tree.args.map(shown)].join(' ')})`;
    case 'call': {
      const callee = typeof tree.callee === 'string' ? tree.callee : shown(tree.callee);
      return `${callee}(${tree.args.map(shown).join(',')})`;
    }
    case 'lambda':
      return `λ${tree.params.join(',')}.${shown(tree.body)}`;
    case 'let':
      return `let ${tree.bindings.map((b) => `${b.name}=${shown(b.value)}`).join(' ')} in ${shown(tree.body)}`;
  }
}

const read = (text: string): string => shown(parse(text, 'Formula'));

describe('parse', () => {
  it.each([
    ['1+2*3', '(+ 1 (* 2 3))'],
    ['a-b-c', '(- (- a b) c)'],
    ['a/b/c', '(/ (/ a b) c)'],
    ['a^b^c', '(^ (^ a b) c)'],
    ['(a^b)^c', '(^ (^ a b) c)'],
    ['a^(b^c)', '(^ a (^ b c))'],
    ['-a%', '(% (- a))'],
    ['a<=b', '(<= a b)'],
    ['a<>-b', '(<> a (- b))'],
    ['a+b=c*d', '(= (+ a b) (* c d))'],
    ['IF(a,,b)', 'IF(a,_,b)'],
    ['SUM({1,2;3,-4}*x)', 'SUM((* {1,2;3,-4} x))'],
    ['LET(a,1,b,a+1,a*b)', 'let a=1 b=(+ a 1) in (* a b)'],
    ['LAMBDA(x,y,x*y)(2,3)', 'λx,y.(* x y)(2,3)'],
    ['=x', 'x'],
    [' = x + 1 ', '(+ x 1)'],
    ['\n x\t+\r\n1', '(+ x 1)'],
    ['x + 1', '(+ x 1)'],
    ['TRUE', 'TRUE'],
    ['"a""b"', '"a"b"'],
  ])('%j reads as %s [law]', (text, tree) => {
    expect(read(text)).toBe(tree);
  });

  it('";" and "," separate arguments alike, and a text keeps its semicolons [law]', () => {
    expect(read('IF(x>1;2;3)')).toBe(read('IF(x>1,2,3)'));
    expect(read('SUM({1;2})')).toBe('SUM({1;2})');
    expect(read('IF(x>1;SUM({1,2;3,4});3)')).toBe('IF((> x 1),SUM({1,2;3,4}),3)');
    expect(read('f("a;b";2)')).toBe('f("a;b",2)');
  });

  it.each([
    ['c', 'c'],
    ['r', 'r'],
    ['C', 'C'],
    ['r+c', '(+ r c)'],
    ['constructor', 'constructor'],
    ['__proto__', '__proto__'],
    ['mu_1', 'mu_1'],
    ['a.b', 'a.b'],
    ['größe', 'größe'],
    ['ставка', 'ставка'],
    ['x1', '[x1]'],
    ['t2', '[t2]'],
    ['$B$2', '[$B$2]'],
    ['B2', '[B2]'],
    ['Sheet1!B2', '[Sheet1!B2]'],
    ["'Our sheet'!$B$2", "['Our sheet'!$B$2]"],
    ["'it''s'!B2", "['it''s'!B2]"],
    ['A1:B2', '[A1:B2]'],
    ['A:A', '[A:A]'],
    ['Apples[Kilos]', '[Apples[Kilos]]'],
    ['xfd1048576', '[xfd1048576]'],
    ['xfe1', 'xfe1'],
  ])('%j is a name or, in brackets, a cell: %s [law]', (text, tree) => {
    expect(read(text)).toBe(tree);
  });

  it('positions are counted in characters from 1, before and after a leading = [law]', () => {
    const tree = parse('= a + SUM(b, c)', 'Formula');
    expect(tree).toMatchObject({
      at: 3,
      operatorAt: 5,
      args: [{ at: 3 }, { at: 7, args: [{ at: 11 }, { at: 14 }] }],
    });
    const postfix = parse('(a)%', 'Formula');
    expect(postfix).toMatchObject({ operatorAt: 4 });
    const prefix = parse(' -a', 'Formula');
    expect(prefix).toMatchObject({ operatorAt: 2, at: 2 });
  });

  it('−0 reads as 0, and numbers as the doubles they are nearest to [law]', () => {
    expect(parse('-0', 'Formula')).toMatchObject({ value: 0 });
    expect(Object.is((parse('-0', 'Formula') as { value: number }).value, 0)).toBe(true);
    expect(valueOf('0.1')).toBe(0.1);
    expect(valueOf('1.7976931348623157E308')).toBe(Number.MAX_VALUE);
    expect(valueOf('5E-324')).toBe(5e-324);
    expect(valueOf('1E-400')).toBe(0);
    expect(valueOf('9007199254740993')).toBe(9007199254740992);
  });

  it('a refusal is an InputError with its three parts [law]', () => {
    try {
      parse('EXP(x', 'Formula, line 3');
    } catch (error) {
      expect(error).toBeInstanceOf(InputError);
      expect(error).toMatchObject({
        where: 'Formula, line 3, character 4',
        found: '"(" is never closed',
        expected: 'add ")"',
        message: 'Formula, line 3, character 4: "(" is never closed; add ")".',
      });
    }
    expect.assertions(2);
  });
});

describe('limits of a formula', () => {
  it('8,192 characters are read and 8,193 refused [law]', () => {
    const longest = `x${' '.repeat(8191)}`;
    expect(read(longest)).toBe('x');
    expect(refusalOf(`${longest} `)).toBe(
      'Formula: 8193 characters; use at most 8192, or split the formula with givens.',
    );
  });

  it('64 brackets deep are read and 65 refused [law]', () => {
    const nested = (n: number): string => `${'('.repeat(n)}x${')'.repeat(n)}`;
    expect(read(nested(64))).toBe('x');
    expect(refusalOf(nested(65))).toBe(
      'Formula, character 65: brackets 65 deep; use at most 64 levels, or name parts with LET.',
    );
    const calls = (n: number): string => `${'ABS('.repeat(n)}x${')'.repeat(n)}`;
    expect(() => tapeOf(calls(64))).not.toThrow();
    expect(refusalOf(calls(65))).toBe(
      'Formula, character 260: brackets 65 deep; use at most 64 levels, or name parts with LET.',
    );
  });

  it('64 signs in a row are read and 65 refused [law]', () => {
    expect(valueOf(`${'-'.repeat(64)}x`, 3)).toBe(3);
    expect(refusalOf(`2*${'-'.repeat(65)}x`)).toBe(
      'Formula, character 67: 65 signs in a row; write one.',
    );
  });

  it('chains as long as a formula may be are read without recursion [law]', () => {
    expect(valueOf(`x${'+x'.repeat(4095)}`, 1)).toBe(4096);
    expect(valueOf(`x${'-1'.repeat(4095)}`, 4096)).toBe(1);
    expect(valueOf(`x${'*1'.repeat(4095)}`, 7)).toBe(7);
    expect(valueOf(`x${'%'.repeat(150)}`, 1e150)).toBeCloseTo(1e-150, 160);
    expect(valueOf(`LET(f,LAMBDA(a,a${'+a'.repeat(4000)}),f(x))`, 1)).toBe(4001);
  });
});

describe('text that is no formula', () => {
  // Any text must end in an InputError or a tree: never in another error, and soon.
  it('every two-character and many random texts are read or refused in their own words [law]', () => {
    const alphabet = [...'x1.,;()+-*/^%<>=&"\'{}[]!#@: _$\\?|~`\t\nπ√²é😀\u200b'];
    const texts = alphabet.flatMap((a) => alphabet.map((b) => a + b));
    let state = 12345;
    const next = (n: number): number => {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      return Math.floor((state / 2 ** 32) * n);
    };
    const words = ['x', 'SUM(', 'LET(', 'LAMBDA(', 'IF(', '2', '0,5', 'A1', '{1,2}', 'TRUE', '"a"'];
    for (let i = 0; i < 3000; i++) {
      const parts = Array.from({ length: 1 + next(8) }, () =>
        next(2) === 0 ? words[next(words.length)]! : alphabet[next(alphabet.length)]!,
      );
      texts.push(parts.join(''));
    }
    let refused = 0;
    for (const text of texts) {
      try {
        tapeOf(text);
      } catch (error) {
        refused++;
        if (!(error instanceof InputError))
          throw new Error(`${JSON.stringify(text)}: ${String(error)}`);
        expect(error.message).toMatch(/^Formula(, character \d+)?: .+; .+\.$/s);
        const at = /character (\d+)/.exec(error.where)?.[1];
        if (at !== undefined) expect(Number(at)).toBeLessThanOrEqual(Math.max(1, text.length));
      }
    }
    expect(refused).toBeGreaterThan(texts.length / 2);
    expect(refused).toBeLessThan(texts.length);
  });

  it('a text of 8,192 hostile characters is refused at once [law]', () => {
    const start = performance.now();
    for (const text of [
      '(',
      '{',
      '"',
      "'",
      '-',
      '%',
      '^',
      ',',
      'x',
      '1',
      '1e',
      '.',
      '!',
      '[',
      'é',
      '😀',
    ]) {
      expect(
        messageOf(() => parse(text.repeat(8192 / text.length), 'Formula')).length,
      ).toBeLessThan(250);
    }
    // 16 texts; common practice: a cell answers within a tenth of a second.
    expect(performance.now() - start).toBeLessThan(1600);
  });
});
