/** Heights in a gap are mostly settled by the bounds inside a piece: the draws may not depend on it. */
import type { Column } from '../../src/draw/rejection';
import { Drawer } from '../../src/draw/column';
import type { Envelope } from '../../src/envelope/envelope';
import type { Inside } from '../../src/envelope/piece';
import { keyOf } from '../../src/random/key';
import { proved } from '../envelope/proved';
import { drawnForms, limitsOf } from '../forms/forms';

const ROWS = 20_000;

function withInside(envelope: Envelope, change: (inside: Inside) => Inside | null): Envelope {
  const pieces = envelope.pieces.map((p) => ({ ...p, inside: p.inside && change(p.inside) }));
  return { ...envelope, pieces };
}

function column(envelope: Envelope): Column {
  return new Drawer(envelope).column(keyOf('plan-2027', 'inside'), 1, ROWS);
}

describe('Drawer.column', () => {
  test.each(drawnForms.map((form) => ({ ...form, title: `${form.number}, ${form.density}` })))(
    'form $title is drawn the same with every height settled by the density [law]',
    (form) => {
      const envelope = proved(form.density, ...limitsOf(form));
      const [own, plain] = [column(envelope), column(withInside(envelope, () => null))];
      expect(own.values).toEqual(plain.values);
      expect(own.proposals).toBe(plain.proposals);
    },
  );

  test('bounds inside that are off by a tenth change the draws [law]', () => {
    const envelope = proved('EXP(-0.5*x^2)', -5, 5);
    const wrong = withInside(envelope, ([middle, ...bounds]) => [
      middle!,
      ...bounds.map((bound) => bound * 1.1),
    ]);
    expect(column(wrong).values).not.toEqual(column(envelope).values);
  });
});
