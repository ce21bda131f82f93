import { describe, expect, it } from 'vitest';

import { momentsOf, withProductSign } from '@/lib/frames/products';
import { type Account, AccountSum, readAccount } from '@/lib/mass/account';
import { type Component } from '@/lib/mass/component';
import { accountOfComponent } from '@/lib/mass/place';
import { principalOf } from '@/lib/mass/principal';
import { resultOf } from '@/lib/mass/result';
import { type Sym3, traceMinus } from '@/lib/numerics/sym3';
import { type Vec3 } from '@/lib/numerics/vec3';
import { radians } from '@/lib/units/convert';
import {
  box,
  cubeCorner,
  ellipsoid,
  hemisphere,
  hollowCylinder,
  hollowSphere,
  rod,
  rodAndSphere,
  solidCone,
  solidCylinder,
  solidSphere,
  thinCone,
  thinDisc,
  thinEllipse,
  thinPlate,
  thinRod,
  thinSphere,
  thinTube,
  threeBodies,
  torus,
} from '@/tests/references/solids';
import {
  NO_TURN,
  aComponent,
  declarations,
  diagonal,
  geometry,
  properties,
  relativeDifference,
} from '@/tests/support/mass';

function together(rows: readonly Partial<Component>[]): Account {
  const sum = new AccountSum();
  for (const row of rows) sum.add(accountOfComponent(aComponent(row), declarations(), geometry()));
  return sum.account;
}

function aboutCg(account: Account): { readonly cg: Vec3; readonly tensor: Sym3 } {
  const reading = readAccount(account);
  if (reading === null) throw new Error('no mass');
  return { cg: reading.place, tensor: reading.tensor };
}

/** The tensor about the fixed point r0. */
const aboutPoint = (account: Account): Sym3 => traceMinus(account.second);

const body = (mass: number, x: number, perMass: Vec3): Partial<Component> => ({
  mass,
  position: [x, 0, 0],
  moments: diagonal(perMass, mass),
});

function expectDiagonal(tensor: Sym3, perMass: Vec3, mass: number): void {
  const [xx, yy, zz] = perMass;
  const expected = { xx: mass * xx, yy: mass * yy, zz: mass * zz, xy: 0, xz: 0, yz: 0 };
  expect(relativeDifference(tensor, expected)).toBeLessThanOrEqual(2e-14);
}

/** Boole's rule: exact for polynomials up to degree 5, which is all that slices of cones and spheres need. */
function slices(from: number, to: number, slice: (x: number) => { mass: number; perMass: Vec3 }): Account {
  const weights = [7, 32, 12, 32, 7];
  return together(
    weights.map((weight, i) => {
      const x = from + ((to - from) * i) / 4;
      const { mass, perMass } = slice(x);
      return body((mass * weight * (to - from)) / 90, x, perMass);
    }),
  );
}

describe('closed-form solids (handbook formulas, see the reference)', () => {
  it('eight boxes make a box', () => {
    const [a, b, c] = [2, 3, 5];
    const eighth = box(a / 2, b / 2, c / 2);
    const signs = [-1, 1];
    const rows = signs.flatMap((i) =>
      signs.flatMap((j) =>
        signs.map((k) => ({
          mass: 1.5,
          position: [(i * a) / 4, (j * b) / 4, (k * c) / 4] as const,
          moments: diagonal(eighth, 1.5),
        })),
      ),
    );
    expectDiagonal(aboutCg(together(rows)).tensor, box(a, b, c), 12);
  });

  it('a solid cylinder less its core is a hollow one', () => {
    const [ri, ro, l] = [0.4, 0.7, 3];
    const [core, full] = [ri ** 2 * 10, ro ** 2 * 10];
    const { tensor } = aboutCg(
      together([body(full, 2, solidCylinder(ro, l)), body(-core, 2, solidCylinder(ri, l))]),
    );
    expectDiagonal(tensor, hollowCylinder(ri, ro, l), full - core);
  });

  it('a solid sphere less its core is a hollow one', () => {
    const [ri, ro] = [0.9, 1.1];
    const [core, full] = [ri ** 3, ro ** 3];
    const { tensor } = aboutCg(together([body(full, 0, solidSphere(ro)), body(-core, 0, solidSphere(ri))]));
    expectDiagonal(tensor, hollowSphere(ri, ro), full - core);
  });

  it('two hemispheres make a sphere', () => {
    const r = 2;
    const half = hemisphere(r);
    const { tensor, cg } = aboutCg(together([body(3, (3 * r) / 8, half), body(3, (-3 * r) / 8, half)]));
    expectDiagonal(tensor, solidSphere(r), 6);
    expect(cg).toEqual([0, 0, 0]);
  });

  it('two rods end to end make a rod, and discs along a line a cylinder', () => {
    expectDiagonal(
      aboutCg(together([body(2, 0.5, thinRod(1)), body(2, 1.5, thinRod(1))])).tensor,
      thinRod(2),
      4,
    );
    const cylinder = slices(-1.5, 1.5, () => ({ mass: 4, perMass: thinDisc(0.8) }));
    expectDiagonal(aboutCg(cylinder).tensor, solidCylinder(0.8, 3), 12);
  });

  it('thin discs make a cone with its CG a quarter of the height from the base', () => {
    const [r, h] = [1.2, 4];
    const cone = slices(0, h, (x) => {
      const radius = r * (1 - x / h);
      return { mass: radius ** 2, perMass: thinDisc(radius) };
    });
    const { tensor, cg } = aboutCg(cone);
    expect(cg[0]).toBeCloseTo(h / 4, 14);
    expectDiagonal(tensor, solidCone(r, h), cone.mass);
  });

  it('a wide tube of no thickness is what remains of two cylinders as they come together', () => {
    const [r, l, t] = [0.7, 3, 1e-6];
    const [full, core] = [(r + t / 2) ** 2 * l, (r - t / 2) ** 2 * l];
    const { tensor } = aboutCg(
      together([body(full, 1, solidCylinder(r + t / 2, l)), body(-core, 1, solidCylinder(r - t / 2, l))]),
    );
    const [xx, yy, zz] = thinTube(r, l).map((k) => k * (full - core));
    // Of what is left of two equal numbers 1e-6 apart, ten digits are known.
    expect(
      relativeDifference(tensor, { xx: xx ?? NaN, yy: yy ?? NaN, zz: zz ?? NaN, xy: 0, xz: 0, yz: 0 }),
    ).toBeLessThan(1e-9);
  });

  it('hoops make a tube, a shell of a sphere and one of a cone', () => {
    const hoop = (radius: number): Vec3 => [radius ** 2, radius ** 2 / 2, radius ** 2 / 2];
    const [r, h] = [1.2, 4];
    const tube = slices(-1.5, 1.5, () => ({ mass: 2, perMass: hoop(0.8) }));
    expectDiagonal(aboutCg(tube).tensor, thinTube(0.8, 3), 6);
    // Archimedes: equal slices of a sphere have equal surface.
    const sphere = slices(-r, r, (x) => ({ mass: 1, perMass: hoop(Math.sqrt(r ** 2 - x ** 2)) }));
    expectDiagonal(aboutCg(sphere).tensor, thinSphere(r), sphere.mass);
    const cone = slices(0, h, (x) => {
      const radius = r * (1 - x / h);
      return { mass: radius, perMass: hoop(radius) };
    });
    const { tensor, cg } = aboutCg(cone);
    expect(cg[0]).toBeCloseTo(h / 3, 14);
    expectDiagonal(tensor, thinCone(r, h), cone.mass);
  });

  it('rods make a plate', () => {
    const plate = together(
      [7, 32, 12, 32, 7].map((weight, i) => ({
        mass: (weight * 6) / 90,
        position: [0, -1 + i / 2, 0] as const,
        moments: diagonal([1.5 ** 2 / 12, 1.5 ** 2 / 12, 0], (weight * 6) / 90),
      })),
    );
    expectDiagonal(aboutCg(plate).tensor, thinPlate(2, 1.5), 6);
  });

  it('discs set around a circle make a ring', () => {
    // The arc grows outward with 1 + ρ/R, so that the CG of a slice lies r²/(4R) outside the middle circle.
    const [R, r, n] = [2, 0.5, 24];
    const ring = together(
      Array.from({ length: n }, (_, i) => {
        const phi = (2 * Math.PI * i) / n;
        const out = r ** 2 / (4 * R);
        // S of the slice about its own CG: r²/4 along the axis, r²/4 less the shift outward, nothing along the arc.
        const own = { xx: r ** 2 / 4 / n, yy: (r ** 2 / 4 - out ** 2) / n, zz: 0, xy: 0, xz: 0, yz: 0 };
        return {
          mass: 1 / n,
          position: [0, (R + out) * Math.cos(phi), (R + out) * Math.sin(phi)] as const,
          moments: momentsOf(traceMinus(own)),
          orientation: { ...NO_TURN, roll: phi },
        };
      }),
    );
    const [xx, yy, zz] = torus(R, r);
    expect(relativeDifference(aboutCg(ring).tensor, { xx, yy, zz, xy: 0, xz: 0, yz: 0 })).toBeLessThan(1e-14);
  });

  it('thin elliptic discs make an ellipsoid', () => {
    const [a, b, c] = [3, 2, 1];
    const solid = slices(-a, a, (x) => {
      const k = 1 - (x / a) ** 2;
      const s = Math.sqrt(k);
      return { mass: k, perMass: thinEllipse(b * s, c * s) };
    });
    expectDiagonal(aboutCg(solid).tensor, ellipsoid(a, b, c), solid.mass);
  });
});

describe('worked examples', () => {
  it('a cube about its corner (UCSD Physics 110B, node 28)', () => {
    const tensor = aboutPoint(
      together([{ mass: 1, position: [0.5, 0.5, 0.5], moments: diagonal(box(1, 1, 1)) }]),
    );
    const { diagonal: d, offDiagonal: o } = cubeCorner;
    expect(relativeDifference(tensor, { xx: d, yy: d, zz: d, xy: o, xz: o, yz: o })).toBeLessThanOrEqual(
      1e-15,
    );
    const { moments, axes } = principalOf(tensor);
    expect([...moments].sort((a, b) => a - b)).toEqual(
      cubeCorner.principal.map((moment) => expect.closeTo(moment, 14)),
    );
    const least = axes[moments.indexOf(Math.min(...moments))] ?? [];
    const sign = Math.sign(least[0] ?? NaN);
    expect([...least].map((part) => sign * part)).toEqual(
      cubeCorner.leastAxis.map((part) => expect.closeTo(part, 14)),
    );
  });

  it('a rod about its end and its centre (Young and Freedman 13e, 9.31)', () => {
    const { mass, length, aboutEnd, aboutCentre } = rod;
    const account = together([body(mass, length / 2, thinRod(length))]);
    expect(aboutPoint(account).zz).toBeCloseTo(aboutEnd, 3);
    expect(aboutCg(account).tensor.zz).toBeCloseTo(aboutCentre, 3);
  });

  it('a rod with a sphere at its end (OpenStax, University Physics 1, 10.5)', () => {
    const { rod: bar, sphere, aboutEnd } = rodAndSphere;
    const account = together([
      body(bar.mass, bar.length / 2, thinRod(bar.length)),
      body(sphere.mass, bar.length + sphere.radius, solidSphere(sphere.radius)),
    ]);
    expect(aboutPoint(account).zz).toBeCloseTo(aboutEnd, 3);
  });

  it('three bodies with full tensors, one of them turned (two independent engines)', () => {
    const account = together(
      threeBodies.bodies.map(({ mass, place, tensor: [ixx, iyy, izz, ixy, ixz, iyz], yawDegrees }) => ({
        mass,
        position: place,
        moments: withProductSign({ ixx, iyy, izz, ixy, ixz, iyz }, 'negative'),
        orientation: { ...NO_TURN, yaw: radians(yawDegrees) },
      })),
    );
    const sym = ([xx, yy, zz, xy, xz, yz]:
      typeof threeBodies.aboutCg | typeof threeBodies.aboutOrigin): Sym3 => ({
      xx,
      yy,
      zz,
      xy,
      xz,
      yz,
    });
    const result = properties(resultOf(account, geometry()));
    expect(account.mass).toBe(threeBodies.mass);
    expect([...result.cg]).toEqual(threeBodies.cg.map((part) => expect.closeTo(part, 14)));
    expect(relativeDifference(result.tensor, sym(threeBodies.aboutCg))).toBeLessThanOrEqual(1e-14);
    expect(relativeDifference(aboutPoint(account), sym(threeBodies.aboutOrigin))).toBeLessThanOrEqual(1e-14);
    expect(result.inertia).toEqual(momentsOf(result.tensor));
    expect(result.inertia.ixz).toBeCloseTo(-threeBodies.aboutCg[4], 13);
    expect([...result.principal.moments].sort((a, b) => a - b)).toEqual(
      threeBodies.principal.map((moment) => expect.closeTo(moment, 12)),
    );
  });
});
