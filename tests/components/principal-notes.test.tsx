import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';

import { PrincipalNotes } from '@/components/mass/principal-notes';
import { TwoTensors } from '@/components/mass/two-tensors';
import { momentsOf } from '@/lib/frames/products';
import { principalOf } from '@/lib/mass/principal';
import { rotation } from '@/lib/numerics/rotation';
import { type Sym3, congruence } from '@/lib/numerics/sym3';
import { radians } from '@/lib/units/convert';

const diagonal = (xx: number, yy: number, zz: number): Sym3 => ({ xx, yy, zz, xy: 0, xz: 0, yz: 0 });
const text = (of: Sym3, predicted: Sym3 | null = null): string =>
  renderToStaticMarkup(
    <PrincipalNotes basic={principalOf(of)} predicted={predicted && principalOf(predicted)} />,
  ).replace(/<[^>]*>/g, '');

/* F-16 with Ixz of +982 slug.ft2 in body axes (NESC F16_inertia.dml): 1.05 degrees nose down by the plane formula. */
const F16: Sym3 = { xx: 9496, yy: 55814, zz: 63100, xy: 0, xz: -982, yz: 0 };

describe('beside the principal axes', () => {
  it('stands the inclination with its sign, the sense of the sign in words and what it is of', () => {
    expect(text(F16)).toContain('basic -1.049°, nose down.');
    expect(text(F16)).toContain('positive with the principal x axis above body x, nose up');
    expect(text({ ...F16, xz: 982 }, F16)).toContain('basic 1.049°, nose up; predicted -1.049°, nose down.');
  });

  it('an inclination of nothing, but for rounding, has no sense', () => {
    expect(text(diagonal(1, 2, 3))).toContain('basic 0.000°.');
    expect(text(congruence(rotation(0, 1e-12, 0), diagonal(1, 2, 3)))).toContain('basic 0.000°.');
  });

  it('equal moments are told, with whose they are', () => {
    expect(text(diagonal(1, 8, 8))).toContain('The moments about y and z are equal');
    expect(text(F16, diagonal(8, 8, 1))).toContain('Predicted: The moments about x and y are equal');
    expect(text(F16)).not.toContain('equal');
  });

  it('axes that are as near to either body axis are told', () => {
    const turned = congruence(rotation(0, radians(45), 0), diagonal(3, 5, 7));
    expect(text(turned)).toContain('as near to body x as to body z');
  });

  it('all of it stands on the page with the tensors', () => {
    const tensor = (of: Sym3) => ({ inertia: momentsOf(of), principal: principalOf(of) });
    const page = renderToStaticMarkup(
      <TwoTensors
        basic={tensor(diagonal(1, 8, 8))}
        predicted={null}
        sigma={{ basic: null, predicted: null }}
        unit="kg.m2"
      />,
    );
    expect(page).toContain('Inclination of the principal x axis');
    expect(page).toContain('The moments about y and z are equal');
  });
});
