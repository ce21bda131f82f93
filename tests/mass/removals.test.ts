import fc from 'fast-check';
import { describe, expect, it } from 'vitest';

import { type Moments, momentsOf, tensorOf } from '@/lib/frames/products';
import {
  type Account,
  NOTHING,
  accountOfBody,
  addAccounts,
  readAccount,
  scaleAccount,
} from '@/lib/mass/account';
import { checkOwnMoments, removalHasPositiveMoments } from '@/lib/mass/physical';
import { accountOfComponent } from '@/lib/mass/place';
import { halfTraceMinus } from '@/lib/numerics/sym3';
import { type Vec3 } from '@/lib/numerics/vec3';
import { fromSi, toSi } from '@/lib/units/convert';
import { GTM_BASELINE, GTM_REMOVALS, GTM_VERTICAL_TAIL } from '@/tests/references/gtm';
import { aComponent, declarations, geometry } from '@/tests/support/mass';
import { anyComponent } from '@/tests/support/arbitrary';

const inSlugs = (m: Moments): Moments => ({
  ixx: toSi(m.ixx, 'slug.ft2'),
  iyy: toSi(m.iyy, 'slug.ft2'),
  izz: toSi(m.izz, 'slug.ft2'),
  ixy: toSi(m.ixy, 'slug.ft2'),
  ixz: toSi(m.ixz, 'slug.ft2'),
  iyz: toSi(m.iyz, 'slug.ft2'),
});

/** The whole model about its own CG, if it weighs `weight` lb. */
const before = (weight: number): Account =>
  accountOfBody(toSi(weight, 'lb'), [0, 0, 0], halfTraceMinus(tensorOf(inSlugs(GTM_BASELINE.inertia))));

/** The model after a removal, from its published changes, about the CG it had before. */
function after(weight: number, removal: (typeof GTM_REMOVALS)[number]): Account {
  const { inertia } = GTM_BASELINE;
  const { change } = removal;
  const left: Moments = inSlugs({
    ixx: inertia.ixx + change.ixx,
    iyy: inertia.iyy + change.iyy,
    izz: inertia.izz + change.izz,
    ixy: inertia.ixy + change.ixy,
    ixz: inertia.ixz + change.ixz,
    iyz: inertia.iyz + change.iyz,
  });
  const [x, y, z] = removal.cg;
  const cg: Vec3 = [toSi(x, 'in'), toSi(y, 'in'), toSi(z, 'in')];
  return accountOfBody(toSi(weight + removal.weight, 'lb'), cg, halfTraceMinus(tensorOf(left)));
}

/** The part that was removed: what is missing between the two. */
function removedPart(
  weight: number,
  removal: (typeof GTM_REMOVALS)[number],
): {
  readonly mass: number;
  readonly place: Vec3;
  readonly moments: Moments;
} {
  const part = readAccount(addAccounts(before(weight), scaleAccount(-1, after(weight, removal))));
  if (part === null) throw new Error('Nothing was removed.');
  return { mass: part.mass, place: part.place, moments: momentsOf(part.tensor) };
}

describe('removals from the NASA GTM T2 (GTM_DesignSim, DamageModels_T2.m)', () => {
  const tail = GTM_REMOVALS[1];

  it('imply a vertical tail at its place, with the moments of a thin upright surface', () => {
    const { mass, place, moments } = removedPart(GTM_BASELINE.weight, tail);
    expect(fromSi(mass, 'lb')).toBeCloseTo(-tail.weight, 12);
    const feet = place.map((part) => fromSi(part, 'ft'));
    GTM_VERTICAL_TAIL.place.forEach((part, k) =>
      expect(Math.abs((feet[k] ?? NaN) - part)).toBeLessThanOrEqual(6e-4),
    );
    const own = [moments.ixx, moments.iyy, moments.izz].map((part) => fromSi(part, 'slug.ft2'));
    GTM_VERTICAL_TAIL.own.forEach((part, k) =>
      expect(Math.abs((own[k] ?? NaN) - part)).toBeLessThanOrEqual(6e-6),
    );
    expect(checkOwnMoments(mass, moments, toSi(1e-3, 'slug.ft2')).verdict).not.toBe('impossible');
  });

  it.each(GTM_REMOVALS)('stated as an adjustment row, $name gives the published changes', (removal) => {
    const { mass, place, moments } = removedPart(GTM_BASELINE.weight, removal);
    const row = aComponent({
      mass: -mass,
      position: place,
      moments: momentsOf(tensorOf(negated(moments))),
      status: 'approved',
    });
    const left = readAccount(
      addAccounts(
        before(GTM_BASELINE.weight),
        accountOfComponent(row, declarations({ kind: 'adjustments' }), geometry()),
      ),
    );
    if (left === null) throw new Error('Nothing is left.');
    expect(fromSi(left.mass, 'lb')).toBeCloseTo(GTM_BASELINE.weight + removal.weight, 12);
    removal.cg.forEach((part, k) => expect(fromSi(left.place[k] ?? NaN, 'in')).toBeCloseTo(part, 10));
    const { inertia } = GTM_BASELINE;
    const now = momentsOf(left.tensor);
    for (const key of ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const)
      expect(fromSi(now[key], 'slug.ft2') - inertia[key]).toBeCloseTo(removal.change[key], 10);
  });

  it('taken from the gross weight instead of the reference weight imply a part that cannot be', () => {
    const { mass, moments } = removedPart(GTM_BASELINE.grossWeight, tail);
    expect(fromSi(moments.iyy, 'slug.ft2')).toBeCloseTo(-0.195, 3);
    expect(checkOwnMoments(mass, moments, toSi(1e-3, 'slug.ft2')).verdict).toBe('impossible');
    // As an adjustment: both signs turned, the same verdict; its moments are positive, which a removal's never are.
    expect(checkOwnMoments(-mass, negated(moments), toSi(1e-3, 'slug.ft2')).verdict).toBe('impossible');
    expect(removalHasPositiveMoments(-mass, negated(moments))).toBe(true);
  });
});

function negated(m: Moments): Moments {
  return { ixx: -m.ixx, iyy: -m.iyy, izz: -m.izz, ixy: -m.ixy, ixz: -m.ixz, iyz: -m.iyz };
}

describe('a removal', () => {
  it('is the inverse of adding, to the last bit', () => {
    fc.assert(
      fc.property(anyComponent, (row) => {
        const added = accountOfComponent(row, declarations(), geometry());
        const removed = accountOfComponent(
          { ...row, mass: -row.mass, moments: negated(row.moments) },
          declarations({ kind: 'adjustments' }),
          geometry(),
        );
        const rest = addAccounts(added, removed);
        expect(rest.mass).toBe(0);
        for (const part of [...rest.first, ...Object.values(rest.second)]) expect(part + 0).toBe(0);
      }),
    );
  });

  it('with negative mass and positive moments is told, beyond rounding', () => {
    const moments = { ixx: -2, iyy: -3, izz: 1, ixy: 0, ixz: 0, iyz: 0 };
    expect(removalHasPositiveMoments(-1, moments)).toBe(true);
    expect(removalHasPositiveMoments(-1, { ...moments, izz: -4 })).toBe(false);
    expect(removalHasPositiveMoments(-1, { ...moments, izz: 1e-7 })).toBe(false);
    expect(removalHasPositiveMoments(-1, { ...moments, izz: 1e-3 }, 1e-2)).toBe(false);
    expect(removalHasPositiveMoments(1, { ...moments, izz: 4 })).toBe(false);
  });

  it('of everything leaves nothing, and nothing has no CG', () => {
    expect(readAccount(NOTHING)).toBeNull();
  });
});
