import { expect, it } from 'vitest';
import { listFileName } from '@/lib/export/list-file-name';
import { declarations } from '@/tests/support/mass';

it('says units, sign of products and axes, which a list of the contract does not carry itself', () => {
  const named = { program: 'dunlin-40', list: 'wing', revision: 4 };
  const us = declarations({
    massUnit: 'lb',
    lengthUnit: 'in',
    inertiaUnit: 'lb.in2',
    products: 'negative',
    axes: ['forward', 'left', 'up'],
  });
  expect(listFileName({ ...named, isPart: false, declarations: us })).toBe(
    'dunlin-40-wing-revision-4_lb_in_lb.in2_products-negative_forward-left-up.csv',
  );
  expect(listFileName({ ...named, isPart: true, declarations: us })).toContain('revision-4-part_');
});
