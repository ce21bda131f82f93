import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { BalanceBar } from '@/components/mass/balance-bar';
import { balanceScale, balanceVerdict } from '@/components/mass/balance-scale';
import { MomentumTable } from '@/components/mass/momentum-table';
import { TensorPlate } from '@/components/mass/tensor-plate';
import { BODY_AXES, tensorElements, tensorTsv } from '@/components/mass/tensor-text';

const moments = { ixx: 10, iyy: 20, izz: 25, ixy: -1.5, ixz: 2.25, iyz: 0 };

describe('the tensor plate', () => {
  const markup = renderToStaticMarkup(<TensorPlate moments={moments} />);

  it('sets off-diagonals as minus the products, a positive Ixz as a negative element', () => {
    const values = tensorElements(moments, 'kg.m2').map((row) => row.map((cell) => cell.value));
    expect(values).toEqual([
      [10, 1.5, -2.25],
      [1.5, 20, 0],
      [-2.25, 0, 25],
    ]);
  });

  it('is the tensor of a body: r1 x the sum of m (r.r 1 - r rT) gives the same nine numbers', () => {
    // Independent: two point masses, tensor by its definition; products by theirs, Ixy = sum of m x y.
    const points = [
      { m: 2, r: [1, 2, -3] },
      { m: 5, r: [-0.5, 4, 1] },
    ] as const;
    const sum = (of: (m: number, x: number, y: number, z: number) => number) =>
      points.reduce((total, { m, r }) => total + of(m, r[0], r[1], r[2]), 0);
    const products = {
      ixx: sum((m, _x, y, z) => m * (y * y + z * z)),
      iyy: sum((m, x, _y, z) => m * (x * x + z * z)),
      izz: sum((m, x, y) => m * (x * x + y * y)),
      ixy: sum((m, x, y) => m * x * y),
      ixz: sum((m, x, _y, z) => m * x * z),
      iyz: sum((m, _x, y, z) => m * y * z),
    };
    const byDefinition = [0, 1, 2].map((i) =>
      [0, 1, 2].map((j) =>
        points.reduce((total, { m, r }) => {
          const square = r[0] * r[0] + r[1] * r[1] + r[2] * r[2];
          return total + m * ((i === j ? square : 0) - (r[i] ?? 0) * (r[j] ?? 0));
        }, 0),
      ),
    );
    expect(tensorElements(products, 'kg.m2').map((row) => row.map((cell) => cell.value))).toEqual(
      byDefinition,
    );
  });

  it('states its convention, its unit once and where its axes point', () => {
    expect(markup).toContain('Tensor elements: off-diagonals are minus the products.');
    expect(markup.match(/>kg·m²</g)).toHaveLength(1);
    for (const word of ['forward', 'right', 'down']) expect(markup).toContain(`>${word}</span>`);
  });

  it('prints the sign of every off-diagonal and tints it alike on both sides', () => {
    expect(markup.match(/bg-plus/g)).toHaveLength(2);
    expect(markup.match(/bg-minus/g)).toHaveLength(2);
    expect(markup).toMatch(/bg-plus.*?class="num[^>]*>\+/);
  });

  it('copies convention, axes and unit with the numbers, in full precision', () => {
    const text = tensorTsv(
      { ...moments, ixx: 10.123456789012 },
      'kg.m2',
      'products',
      'Inertia about the CG',
      BODY_AXES,
    );
    expect(text.split('\n')).toEqual([
      'Inertia about the CG; x forward, y right, z down; kg.m2. Products: positive integrals, Ixy is the integral of x y dm.',
      'ixx\t10.123456789012',
      'iyy\t20',
      'izz\t25',
      'ixy\t-1.5',
      'ixz\t2.25',
      'iyz\t0',
    ]);
  });
});

describe('the balance bar', () => {
  it('holds the whole chord, and what lies off it when it must', () => {
    expect(balanceScale([27, 15, 38])).toMatchObject({ from: 0, to: 100 });
    const wide = balanceScale([-40, 15, 38]);
    expect(wide.place(-40)).toBeGreaterThanOrEqual(0);
    expect(wide.place(0)).toBeLessThan(wide.place(15));
    const far = balanceScale([4000]);
    expect(far.place(4000)).toBeLessThanOrEqual(100);
    expect(far.ticks.length).toBeLessThan(60);
  });

  it('says how far a CG is from each limit, and beyond which it lies', () => {
    expect(balanceVerdict(27, 15, 38)).toEqual({
      inside: true,
      words: 'Margins in % MAC: 12.00 to the forward limit, 11.00 to the aft limit',
    });
    expect(balanceVerdict(12.5, 15, 38)).toEqual({
      inside: false,
      words: '2.50 % MAC ahead of the forward limit',
    });
    expect(balanceVerdict(40, 15, 38)).toEqual({ inside: false, words: '2.00 % MAC behind the aft limit' });
    expect(balanceVerdict(15, 15, null).inside).toBe(true);
  });

  it('names a CG outside its limits in words, not by colour alone', () => {
    const markup = renderToStaticMarkup(<BalanceBar cg={40} forwardLimit={15} aftLimit={38} />);
    expect(markup).toContain('Outside the limits');
    expect(markup).toContain('aria-label="CG at 40.00 % MAC. 2.00 % MAC behind the aft limit."');
  });
});

describe('the momentum table', () => {
  it('states the unit, the axes and the right-hand rule, and prints every sign', () => {
    const total = { hx: 12, hy: 0, hz: -3 };
    const markup = renderToStaticMarkup(
      <MomentumTable
        operatingPoint="Cruise"
        rotors={[{ rotor: 'Left', rpm: 1000, ...total }]}
        total={total}
      />,
    );
    expect(markup).toContain('Cruise: spin angular momentum in body axes, right-hand rule');
    expect(markup.match(/kg·m²\/s<\/span>/g)).toHaveLength(3);
    expect(markup.match(/>\+<span/g)).toHaveLength(2);
    expect(markup.match(/num-minus/g)).toHaveLength(2);
  });
});
