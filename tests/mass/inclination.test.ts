import { describe, expect, it } from 'vitest';

import { inclinationSense, pairingTies, principalInclination } from '@/lib/mass/inclination';
import { principalOf } from '@/lib/mass/principal';
import { rotation } from '@/lib/numerics/rotation';
import { type Sym3, congruence } from '@/lib/numerics/sym3';
import { radians } from '@/lib/units/convert';

const diagonal = (xx: number, yy: number, zz: number): Sym3 => ({ xx, yy, zz, xy: 0, xz: 0, yz: 0 });

describe('the inclination of the principal x axis', () => {
  it('is positive and nose up where more mass lies low in front and high behind than the other way', () => {
    // Two masses on a line that rises towards the nose: the axis of least moment is that line, above body x (z is down).
    const [x, z] = [4, -0.5];
    const line = { xx: 2 * z * z, yy: 2 * (x * x + z * z), zz: 2 * x * x, xy: 0, xz: -2 * x * z, yz: 0 };
    const angle = principalInclination(principalOf(line));
    expect(angle).toBeCloseTo(Math.atan2(0.5, 4), 13);
    expect(inclinationSense(angle)).toBe('nose up');
    expect(inclinationSense(-angle)).toBe('nose down');
  });

  it('of the F-16 is 1.05 degrees nose down: half of atan(2 Ixz / (Izz - Ixx)) with its Ixz of +982 slug.ft2 (NESC)', () => {
    const angle = principalInclination(
      principalOf({ xx: 9496, yy: 55814, zz: 63100, xy: 0, xz: -982, yz: 0 }),
    );
    expect(angle).toBeCloseTo(-0.5 * Math.atan2(2 * 982, 63100 - 9496), 13);
    expect((angle * 180) / Math.PI).toBeCloseTo(-1.05, 2);
    expect(inclinationSense(angle)).toBe('nose down');
  });

  it('is none for a body whose principal axes are the body axes', () => {
    const angle = principalInclination(principalOf(diagonal(1, 2, 3)));
    expect(angle).toBe(0);
    expect(inclinationSense(angle)).toBeNull();
  });
});

describe('the pairing of principal with body axes', () => {
  it('has no ties for an ordinary aircraft', () => {
    const turned = congruence(rotation(0.05, 0.3, -0.02), diagonal(9496, 55814, 63100));
    expect(pairingTies(principalOf(turned))).toEqual([]);
  });

  it('names axes about which the moments are equal', () => {
    const [tie, ...others] = pairingTies(principalOf(congruence(rotation(0, 0, 0.7), diagonal(1, 8, 8))));
    expect(others).toEqual([]);
    expect(tie).toMatchObject({ kind: 'equal-moments', axes: ['y', 'z'] });
    expect(tie?.text).toMatch(/y and z are equal/);
    expect(pairingTies(principalOf(diagonal(5, 5, 5)))).toHaveLength(3);
  });

  it('at 45 degrees gives the smaller moment to the earlier axis, whatever rounding says, and tells so', () => {
    for (const slight of [-1e-14, 0, 1e-14])
      for (const [a, b] of [
        [3, 7],
        [7, 3],
      ] as const) {
        const turn = rotation(0, radians(45) + slight, 0);
        const principal = principalOf(congruence(turn, diagonal(a, 5, b)));
        expect(principal.moments.map((moment) => Number(moment.toFixed(9)))).toEqual([3, 5, 7]);
        expect(pairingTies(principal)).toMatchObject([{ kind: 'equally-near', axes: ['x', 'z'] }]);
      }
  });

  it('tells when all three axes could change places', () => {
    // A third of a turn about the diagonal takes x to y to z to x; half of it is as near to either.
    const c = Math.cos(Math.PI / 3);
    const [p, q] = [(1 + 2 * c) / 3, (1 - c) / 3];
    const s = Math.sin(Math.PI / 3) / Math.sqrt(3);
    const turn = [
      [p, q - s, q + s],
      [q + s, p, q - s],
      [q - s, q + s, p],
    ] as const;
    const ties = pairingTies(principalOf(congruence(turn, diagonal(3, 5, 7))));
    expect(ties.length).toBeGreaterThan(0);
  });
});
