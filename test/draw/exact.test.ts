import { goodnessOfFit, FALSE_ALARM } from './statistics';
import {
  binsOf,
  blendTarget,
  countsOf,
  EMPTY_STRETCH,
  drawInParts,
  sideTargets,
  targets,
  twoHumpsBelow,
} from './targets';

/** The long version draws 10^8 (test/long/exact.test.ts). */
const ROWS = 200_000;
const BINS = 500;

describe('Drawer.column', () => {
  test.each([...targets, ...sideTargets, blendTarget])(
    'draws of $name follow the exact bin shares [law]',
    (target) => {
      const bins = binsOf(target, BINS);
      const counts = countsOf(target, ROWS, bins);
      const filled = bins.shares.flatMap((share, i) => (share > 0 ? [i] : []));
      expect(filled.length).toBeGreaterThan(450);
      expect(
        goodnessOfFit(
          filled.map((i) => counts[i]!),
          filled.map((i) => bins.shares[i]!),
        ),
      ).toBeGreaterThan(FALSE_ALARM);
    },
  );

  test('no draw falls into the empty stretch of a table [law]', () => {
    const [from, to] = EMPTY_STRETCH;
    for (const { values } of drawInParts(targets[4]!, ROWS))
      expect(values.filter((x) => x > from && x < to)).toHaveLength(0);
  });

  // χ² is then larger by about n · 0.23 · (0.1/0.5)² = 1,840, fifty-eight of its standard deviations.
  test('a density whose second hump is shifted by 0.1 is told apart [law]', () => {
    const target = targets[0]!;
    const shifted = binsOf(target, BINS, (x) => twoHumpsBelow(x, 7.1));
    expect(goodnessOfFit(countsOf(target, ROWS, shifted), shifted.shares)).toBeLessThan(
      FALSE_ALARM,
    );
  });
});
