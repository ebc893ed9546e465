import { readShapes } from '../../src/density/shape';
import { checkPoints, wideFuzz } from './wideFuzz';
import { provedCurve } from './proved';

describe('proveEnvelope on random formulas of the whole vocabulary', () => {
  test('refuses in words or proves lines that no point passes [law]', () => {
    const report = wideFuzz('orchard', 150, 300);
    expect(report.faults).toEqual([]);
    expect(report.points).toBeGreaterThan(15_000);
  });

  test('a piece lowered by a millionth is noticed [law]', () => {
    const places = { density: 'density', limits: 'limits', givens: 3 };
    const [shape] = readShapes([['PHI(x)']], [[-2, 2]], [], places).shapes;
    const envelope = provedCurve(shape!);
    const lowered = envelope.pieces.map((p) => ({
      ...p,
      upperLeft: p.lowerLeft * (1 - 1e-6),
      upperRight: p.lowerRight * (1 - 1e-6),
    }));
    const faults: string[] = [];
    checkPoints(
      { ...envelope, pieces: lowered },
      () => 0.5,
      100,
      (what) => faults.push(what),
    );
    expect(faults.length).toBeGreaterThan(0);
  });
});
