import { beforeAll, describe, expect, it } from 'vitest';

import { momentsOf } from '@/lib/frames/products';
import { AccountSum } from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { accountOfComponent } from '@/lib/mass/place';
import { resultOf } from '@/lib/mass/result';
import { type Sym3, congruence, traceMinus } from '@/lib/numerics/sym3';
import { type Vec3, normVec, subVec } from '@/lib/numerics/vec3';
import { threeBodies } from '@/tests/references/solids';
import { aComponent, declarations, diagonal, geometry, properties } from '@/tests/support/mass';
import { type Compound, type EngineBody, physicsEngine } from '@/tests/support/physics-engine';
import { randomNumbers } from '@/tests/support/random';

/*
 * The roll-up against a physics engine that no one here wrote (MuJoCo): random bodies with full tensors, places and turns as one
 * compound. Measured: 9e-16 of the largest element where the engine is given principal moments. A full tensor it turns into principal
 * axes by an iteration of its own that leaves 1.6e-8 of it, which is then the agreement; sign and order of the products show all the same.
 */

let compound: (bodies: readonly EngineBody[]) => Compound;
beforeAll(async () => {
  compound = await physicsEngine();
});

const frame = geometry({ reference: [0.5, -0.25, 1] });

/** What the roll-up makes of the same bodies as rows of a list. */
function rolledUp(bodies: readonly EngineBody[]): Compound {
  const sum = new AccountSum();
  for (const { mass, place, turn, tensor } of bodies) {
    const [yaw, pitch, roll] = turn;
    const row: Component = aComponent({
      mass,
      position: place,
      orientation: { yaw, pitch, roll },
      moments: 'xx' in tensor ? momentsOf(tensor) : diagonal(tensor),
    });
    sum.add(accountOfComponent(row, declarations(), frame));
  }
  const result = resultOf(sum.account, frame);
  const { cg, tensor } = properties(result);
  return { mass: result.mass, cg, tensor };
}

/** Seeded bodies, each with moments that a body of its mass can have; the first is not turned. */
function bodies(count: number, seed: number, kind: 'full' | 'principal'): EngineBody[] {
  const random = randomNumbers(seed);
  const between = (low: number, high: number): number => low + (high - low) * random();
  const vector = (reach: number): Vec3 => [
    between(-reach, reach),
    between(-reach, reach),
    between(-reach, reach),
  ];
  return Array.from({ length: count }, (_, i) => {
    const mass = 10 ** between(-2, 3);
    const uniform: Sym3 = { xx: mass, yy: mass, zz: mass, xy: 0, xz: 0, yz: 0 };
    const full = traceMinus(congruence([vector(1), vector(1), vector(1)], uniform));
    const [a, b, c] = vector(1).map((part) => mass * part * part);
    const straight = traceMinus({ ...uniform, xx: a ?? NaN, yy: b ?? NaN, zz: c ?? NaN });
    return {
      mass,
      place: vector(12),
      turn: i === 0 ? [0, 0, 0] : [between(-3, 3), between(-1.5, 1.5), between(-3, 3)],
      tensor: kind === 'full' ? full : [straight.xx, straight.yy, straight.zz],
    };
  });
}

const KEYS = ['xx', 'yy', 'zz', 'xy', 'xz', 'yz'] as const;

/** Largest difference of two tensors by elements over the largest element. */
function apart(a: Sym3, b: Sym3): number {
  const size = Math.max(...KEYS.map((key) => Math.abs(b[key])));
  return Math.max(...KEYS.map((key) => Math.abs(a[key] - b[key]))) / size;
}

function expectAgreement(some: readonly EngineBody[], tolerance: number): void {
  const [ours, theirs] = [rolledUp(some), compound(some)];
  expect(Math.abs(ours.mass / theirs.mass - 1)).toBeLessThanOrEqual(1e-14);
  expect(normVec(subVec(ours.cg, theirs.cg)) / 12).toBeLessThanOrEqual(1e-14);
  expect(apart(ours.tensor, theirs.tensor)).toBeLessThanOrEqual(tolerance);
}

describe('the roll-up against a physics engine', () => {
  it.each([2, 5, 20, 60])('agrees on %i turned bodies, given by principal moments, to rounding', (count) => {
    for (let seed = 1; seed <= 5; seed += 1)
      expectAgreement(bodies(count, 100 * count + seed, 'principal'), 1e-14);
  });

  it.each([2, 5, 20, 60])('agrees on %i turned bodies with full tensors', (count) => {
    for (let seed = 1; seed <= 5; seed += 1) expectAgreement(bodies(count, 100 * count + seed, 'full'), 5e-8);
  });

  it('agrees on the three bodies of the references', () => {
    const some = threeBodies.bodies.map(({ mass, place, tensor, yawDegrees }): EngineBody => {
      const [xx, yy, zz, xy, xz, yz] = tensor;
      const yaw = (yawDegrees * Math.PI) / 180;
      return { mass, place, turn: [yaw, 0, 0], tensor: { xx, yy, zz, xy, xz, yz } };
    });
    expectAgreement(some, 5e-8);
  });

  it('would notice a turned sign of the products or another order of the angles', () => {
    const some = bodies(5, 7, 'full').map((body) => {
      const { tensor } = body;
      if (!('xx' in tensor)) throw new Error('The bodies have full tensors.');
      // With its trace added to each moment a tensor stays possible when a product changes its sign.
      const more = tensor.xx + tensor.yy + tensor.zz;
      return {
        ...body,
        tensor: { ...tensor, xx: tensor.xx + more, yy: tensor.yy + more, zz: tensor.zz + more },
      };
    });
    const { tensor } = rolledUp(some);
    expect(apart(compound(some).tensor, tensor)).toBeLessThanOrEqual(5e-8);
    const sign = some.map((body) => ({ ...body, tensor: { ...body.tensor, xz: -body.tensor.xz } }));
    const order = some.map((body) => ({
      ...body,
      turn: [body.turn[2], body.turn[1], body.turn[0]] as const,
    }));
    for (const wrong of [sign, order]) expect(apart(compound(wrong).tensor, tensor)).toBeGreaterThan(1e-4);
  });
});
