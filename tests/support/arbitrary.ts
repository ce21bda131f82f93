import fc from 'fast-check';

import { momentsOf } from '@/lib/frames/products';
import { type Component } from '@/lib/mass/component';
import { type Mat3 } from '@/lib/numerics/mat3';
import { type Sym3, congruence, traceMinus } from '@/lib/numerics/sym3';
import { type Vec3 } from '@/lib/numerics/vec3';
import { aComponent } from './mass';

const within = (limit: number): fc.Arbitrary<number> => fc.double({ min: -limit, max: limit, noNaN: true });

const vector = (limit: number): fc.Arbitrary<Vec3> => fc.tuple(within(limit), within(limit), within(limit));

/** A second moment matrix that a body can have: M Mᵀ. */
export const anySecondMoment: fc.Arbitrary<Sym3> = fc
  .tuple(vector(3), vector(3), vector(3))
  .map((rows: Mat3) => congruence(rows, { xx: 1, yy: 1, zz: 1, xy: 0, xz: 0, yz: 0 }));

/** A row that a list could have: real moments, any place within 30 m, any turn. */
export const anyComponent: fc.Arbitrary<Component> = fc
  .record({
    mass: fc.double({ min: 1e-3, max: 1e4, noNaN: true }),
    position: vector(30),
    second: anySecondMoment,
    orientation: fc.record({ yaw: within(3), pitch: within(3), roll: within(3) }),
    quantity: fc.integer({ min: 1, max: 12 }),
    pair: fc.boolean(),
    group: fc.constantFrom('Wing/Spars', 'Wing/Ribs', 'Fuselage', 'Wing'),
    maturity: fc.constantFrom('E', 'C', 'A', null),
    growth: fc.option(fc.double({ min: 0, max: 0.5, noNaN: true })),
    counting: fc.constantFrom('counted', 'counted', 'counted', 'memo'),
  })
  .map(({ second, ...row }) => aComponent({ ...row, moments: momentsOf(traceMinus(second)) }));
