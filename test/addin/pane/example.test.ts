import { exampleAsText, exampleCells } from '../../../addin/pane/example';
import { call } from '../call';

describe('exampleAsText()', () => {
  const lines = exampleAsText().split('\n');

  test('pastes as the cells A1 to B10 with the formula in A10 [law]', () => {
    expect(lines).toHaveLength(10);
    expect(lines[0]).toBe('density\tEXP(-0.5*((x-m)/s)^2)');
    expect(lines[9]).toBe('=UNDERCURVE.DRAW(A1:B8)');
  });

  test('holds no number or formula that another language would read otherwise [law]', () => {
    const typed = exampleCells.flat().filter((value) => typeof value === 'number');
    expect(typed.filter((value) => !Number.isInteger(value))).toEqual([]);
    expect(lines[9]).not.toMatch(/[,;.]\S*[,;]/);
  });

  test('draws what the page promises: 2,000 values around 240 [law]', () => {
    const block = exampleCells.slice(0, 8);
    const column = call('DRAW', block).map(([value]) => Number(value));
    expect(column).toHaveLength(2000);
    const mean = column.reduce((sum, value) => sum + value, 0) / column.length;
    // The normal curve is cut 3.08 and 6.15 standard deviations away, which moves its mean by
    // 78 * 0.0035 < 0.3; six standard errors are 6 * 78 / sqrt(2000) = 10.5. False alarms: 2e-9.
    expect(Math.abs(mean - 240)).toBeLessThan(10.8);
    // "hardly ever above 500": the chance is 0.00043, so 2,000 draws exceed it 9 times or
    // more with probability 3e-7 (Poisson with mean 0.86).
    expect(column.filter((value) => value > 500).length).toBeLessThan(9);
  });
});
