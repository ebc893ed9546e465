/** README, "Heights are not shares": its shapes are read out of it and its figures worked out again. */
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import type { Range } from '../../src/index';
import { acceptance, below, blend, draw } from '../../src/index';

const readme = readFileSync(resolve(__dirname, '../../README.md'), 'utf8');
const section = /## Heights are not shares\n([\s\S]+?)\n## /.exec(readme)![1]!;

/** The two blocks stand side by side. */
const cells = [...section.matchAll(/^\| (density|from|to) \| (.+?) \| \1 \| (.+?) \|$/gm)];
const cell = (text: string): string | number => (/^\d+$/.test(text) ? Number(text) : text);
const [ordinary, strike] = [2, 3].map((column): Range =>
  cells.map((found) => [found[1]!, cell(found[column]!)]),
) as [Range, Range];
const [, sum, shareOfSum] = /^\| `(0\.9\*.+?)` \| ([\d.]+) % \|$/m.exec(section)!;
const [, weights, shareOfBlend] =
  /^\| `UNDERCURVE\.BLEND\(\{(.+?)\}, .+?\)` \| ([\d.]+) % \|$/m.exec(section)!;

const percent = (share: unknown): string => (100 * Number(share)).toFixed(2);
const shareBelow20 = (shape: Range, limits: Range | null): string =>
  percent(below(shape, limits, [[20]], [])[0]![0]);
const pool = blend(
  weights!.split(';').map((share) => [Number(share)]),
  [ordinary, strike],
);

describe('README, "Heights are not shares"', () => {
  test('the sum of heights has the printed share of weeks below 20 hours [law]', () => {
    expect(cells).toHaveLength(3);
    expect(shareBelow20([[sum!]], [[0, 60]])).toBe(shareOfSum);
  });

  test('BLEND has the printed share, and DRAW takes what it spills [law]', () => {
    expect(shareBelow20(pool, null)).toBe(shareOfBlend);
    const n = 4000;
    const values = draw(pool, null, [[n]], [['plan-2027']], [['hours']], []).map(Number);
    const share = values.filter((x) => x < 20).length / n;
    // 4.9 standard deviations of n draws: false alarm 1e-6.
    expect(Math.abs(share - 0.1004)).toBeLessThan(4.9 * Math.sqrt((0.1 * 0.9) / n));
    expect(Math.abs(share - 0.0186)).toBeGreaterThan(0.05);
  });

  test('ACCEPTANCE has the printed shares of area [law]', () => {
    const lines = acceptance([[sum!]], [[0, 60]], [[10]], [['plan-2027']], [['hours']], []);
    const [, share] = lines.find(([item]) => (item as string).startsWith('share of area, term 2'))!;
    expect(section).toContain(`it gets ${percent(share)} %`);
    const rest = 0.9 * Number(below(ordinary, null, [[20]], [])[0]![0]);
    expect(section.replace(/\s+/g, ' ')).toContain(`remaining ${percent(rest)} % below 20 hours`);
  });
});
