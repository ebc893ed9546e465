/** The formulas of the README's page for planners, evaluated in the grid as they stand there. */
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { prepareLibrary } from '../../../addin/page/library';
import { draw, quantile } from '../../../src/index';
import { percentile } from '../../../src/evidence/percentile';
import { sampleOf } from '../../../src/evidence/sample';
import { gridOf } from './grid';

const log = prepareLibrary();
const readme = readFileSync(resolve(__dirname, '../../../README.md'), 'utf8');
const [, block = ''] = /<!-- planners -->\n```\n([^]+?)\n```/.exec(readme) ?? [];
const formulas = Object.fromEntries(
  block.split('\n').map((line) => [line.slice(0, line.indexOf(' ')), line.replace(/^\S+\s+/, '')]),
);

describe('README.md, from draws to a decision', () => {
  const cells = {
    A2: 'strike',
    A3: 'work',
    B2: '0.1',
    B3: '0.9',
    C2: '0',
    C3: '60',
    L1: '17',
    ...formulas,
  };
  const sheet = { id: 's', name: 'Plan', colNumber: 14, rowNumber: 520, cells };
  const grid = gridOf({ sheets: [sheet] }, log);
  const column = (address: string) => grid.readSpill('Plan', address).map(([cell]) => cell);
  const hours = column('F2').map(Number);

  it('has a lump of 10 % at 12 hours, and draws elsewhere [law]', () => {
    expect(hours).toHaveLength(500);
    const words = column('D2');
    const draws = column('E2').map(Number);
    hours.forEach((value, i) => expect(value).toBe(words[i] === 'strike' ? 12 : draws[i]));
    // 50 of 500, give or take 4.9 standard deviations of 6.7.
    const strikes = words.filter((word) => word === 'strike').length;
    expect(strikes).toBeGreaterThan(50 - 33);
    expect(strikes).toBeLessThan(50 + 33);
  });

  it('has an IF that decides row by row, and a MAX that does not [law]', () => {
    expect(column('G2')).toEqual(hours.map((value) => (value > 45 ? value - 45 : 0)));
    expect(column('H2')).toEqual([hours.reduce((a, b) => Math.max(a, b)) - 45]);
  });

  it('has the chance of an overrun, and the row that is asked for [law]', () => {
    const figures = new Map(grid.readSpill('Plan', 'I2').map(([item, value]) => [item, value]));
    expect(figures.get('chance above')).toBe(hours.filter((value) => value > 45).length / 500);
    expect(grid.read('Plan', 'L2')).toBe(hours[16]);
  });

  // The table was made with 1,000 seeds a line; 300 of them are enough to catch a wrong one: the
  // 95th percentile of the distances varies by 7 % then, 4 % with 1,000, and four times both is 32 %.
  it('has the measured distances of a P95 from the exact one [pinned]', () => {
    const shapes = [
      ['EXP(-0.5*((x-4)/1.3)^2)', [0, 12]],
      ['EXP(-x/30)', [0, 400]],
    ] as const;
    const lines = [...readme.matchAll(/^\| ([\d,]+) \| ([\d.]+) \(.*\) \| ([\d.]+) \(.*\) \|$/gm)];
    expect(lines).toHaveLength(3);
    for (const [, rows, ...stated] of lines.slice(0, 2)) {
      const n = Number(rows!.replace(',', ''));
      shapes.forEach(([shape, limits], j) => {
        const exact = quantile([[shape]], [limits], [[0.95]], null, [])[0]![0] as number;
        const off = Float64Array.from({ length: 300 }, (_, i) => {
          const drawn = draw([[shape]], [limits], [[n]], [[`plan ${i + 1}`]], [['p95']], []);
          const values = Float64Array.from(drawn, ([x]) => x as number);
          return Math.abs(percentile(sampleOf(values, null), 0.95) - exact);
        });
        const measured = percentile(sampleOf(off, null), 0.95);
        expect(Math.abs(measured / Number(stated[j]) - 1)).toBeLessThan(0.32);
      });
    }
  });
});
