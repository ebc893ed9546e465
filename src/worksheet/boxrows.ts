/** The boxes of a proof in several variables as rows of cells. */
import type { Cell, Range } from '../density/cells';
import type { BoxEnvelope, ProvedBox } from '../envelope/boxes';

/**
 * A heading row, then boxes: from and to of every variable, the upper bound at the box's middle,
 * the slopes of its logarithm along every variable (0: constant; left out when all are), the
 * share of it that the density surely reaches everywhere, the share of proposals, and the
 * acceptance that the proof promises in the box.
 * Units: places as in the limits; heights × 2^-exponent.
 */
export function boxRows(envelope: BoxEnvelope): Range {
  const { axes, boxes, upperMass, space } = envelope;
  const hasPlanes = boxes.some(({ plane }) => plane !== null);
  const slopesOf = ({ plane }: ProvedBox): readonly number[] =>
    hasPlanes ? (plane?.slopes ?? axes.map(() => 0)) : [];
  const headings = [
    ...axes.flatMap(({ name }) => [`${name} from`, `${name} to`]),
    'upper',
    ...(hasPlanes ? axes.map(({ name }) => `slope of LN(upper) along ${name}`) : []),
    'lower, share of upper',
    'share of proposals',
    'acceptance',
  ];
  const rows = boxes.map((box): readonly Cell[] => {
    const { lo, hi } = space.corners(box);
    return [
      ...lo.flatMap((from, i) => [from, hi[i]!]),
      box.upper,
      ...slopesOf(box),
      box.sure,
      box.upperMass / upperMass,
      box.lowerMass / box.upperMass,
    ];
  });
  return [headings, ...rows];
}
