import { describe, expect, it } from 'vitest';

import { type PlaneCovariance, ellipse, ellipseOutline, shareWithin } from '@/lib/mass/uncertainty/ellipse';
import { CHI_SQUARE_TWO } from '@/tests/references/uncertainty';
import { normalNumbers } from '@/tests/support/random';

const TILTED: PlaneCovariance = { uu: 4, vv: 1, uv: 1.2 };

/** (d/σ)² of a point: dᵀ C⁻¹ d. */
function squaredDistance([u, v]: readonly [number, number], { uu, vv, uv }: PlaneCovariance): number {
  return (vv * u * u - 2 * uv * u * v + uu * v * v) / (uu * vv - uv * uv);
}

describe('the ellipse of k σ', () => {
  it('holds the share that the chi-square distribution with two degrees of freedom says (tables)', () => {
    for (const { share, value } of CHI_SQUARE_TWO)
      expect(shareWithin(Math.sqrt(value))).toBeCloseTo(share, 5);
    expect(shareWithin(1)).toBeCloseTo(0.39, 2);
    expect(shareWithin(2)).toBeCloseTo(0.86, 2);
  });

  it('holds that share of errors drawn at random, within sampling error', () => {
    const normal = normalNumbers(7);
    const [across, shear] = [Math.sqrt(TILTED.uu), TILTED.uv / Math.sqrt(TILTED.uu)];
    const rest = Math.sqrt(TILTED.vv - shear ** 2);
    const distances = Array.from({ length: 20000 }, () => {
      const [a, b] = [normal(), normal()];
      return squaredDistance([across * a, shear * a + rest * b], TILTED);
    });
    for (const k of [1, 2]) {
      const within = distances.filter((distance) => distance <= k * k).length / distances.length;
      expect(Math.abs(within - shareWithin(k))).toBeLessThanOrEqual(3 * Math.sqrt(0.25 / distances.length));
    }
  });

  it('has its axes where u and v, turned, vary on their own', () => {
    const { semiMajor, semiMinor, angle } = ellipse(TILTED, 2);
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    const { uu, vv, uv } = TILTED;
    expect((vv - uu) * c * s + uv * (c * c - s * s)).toBeCloseTo(0, 14);
    expect((semiMajor / 2) ** 2).toBeCloseTo(uu * c * c + 2 * uv * c * s + vv * s * s, 13);
    expect((semiMajor * semiMinor) / 4).toBeCloseTo(Math.sqrt(uu * vv - uv * uv), 13);
  });

  it('is a circle without a direction, or a line, where the errors are', () => {
    expect(ellipse({ uu: 9, vv: 9, uv: 0 }, 1)).toEqual({ semiMajor: 3, semiMinor: 3, angle: 0 });
    expect(ellipse({ uu: 0, vv: 4, uv: 0 }, 1)).toEqual({ semiMajor: 2, semiMinor: 0, angle: Math.PI / 2 });
    expect(ellipse({ uu: 0, vv: 0, uv: 0 }, 1)).toEqual({ semiMajor: 0, semiMinor: 0, angle: 0 });
  });

  it('has an outline of points at k σ about its centre, in two units too', () => {
    // CG in m against mass in kg.
    const cgAndMass: PlaneCovariance = { uu: 1e-4, vv: 2500, uv: 0.3 };
    const outline = ellipseOutline([4.2, 15000], cgAndMass, 2, 36);
    expect(outline).toHaveLength(36);
    for (const [u, v] of outline) expect(squaredDistance([u - 4.2, v - 15000], cgAndMass)).toBeCloseTo(4, 9);
    expect(Math.max(...outline.map(([u]) => u))).toBeCloseTo(4.22, 12);
    for (const [u] of ellipseOutline([1, 2], { uu: 0, vv: 1, uv: 0 }, 1)) expect(u).toBe(1);
  });
});
