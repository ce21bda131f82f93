import { type Vec3 } from '@/lib/numerics/vec3';

/*
 * G1. The law of propagation of uncertainty: u²(y) = Σ (∂f/∂x_i)² u²(x_i) for independent x_i, JCGM 100:2008, 5.1.2, equation (10);
 * for correlated ones 5.2.2, equation (13). Status: read in the text that ISO publishes (iso.org/sites/JCGM/GUM, clause 5).
 */

/**
 * JCGM 100:2008, 5.2.2, example: ten resistors of 1000 ohm, each compared with one standard of u = 0.1 ohm, in series. Their errors
 * are one error, so u(10 kohm) = 10 x 0.1 = 1 ohm; the root of the sum of squares, 0.32 ohm, is wrong. Status: numbers from memory.
 */
export const TEN_RESISTORS = { each: 1000, sigma: 0.1, together: 1, wrongly: 0.32 };

/** JCGM 100:2008, 7.2.6: y = 10,057 62 ohm with u = 27 milliohm is rounded to 10,058 ohm. Status: read in its text. */
export const ROUNDED = { value: 10.05762, sigma: 0.027, text: '10.058' };

/*
 * G2. Derivatives for a roll-up about its own CG, d = r - c, worked out and checked by a million samples outside this project:
 * ∂C/∂m = d/M, ∂C/∂x = m/M, ∂Ixx/∂m = dy² + dz², ∂Ixx/∂y = 2 m dy, ∂Ixx/∂z = 2 m dz, ∂Ixy/∂m = dx dy, ∂Ixy/∂x = m dy,
 * ∂Ixy/∂y = m dx, Ixy the positive integral. The terms of the moving CG cancel to first order, because Σ m d = 0.
 */

/** A point mass whose mass and coordinates are uncertain by themselves. */
export interface UncertainPoint {
  readonly mass: number;
  readonly place: Vec3;
  readonly massSigma: number;
  readonly placeSigma: Vec3;
}

/** Variances of the mass, the CG, Ixx and Ixy of points, from G1 and G2. */
export function variancesByHand(points: readonly UncertainPoint[]) {
  const total = points.reduce((sum, { mass }) => sum + mass, 0);
  const centre = [0, 1, 2].map(
    (k) => points.reduce((sum, { mass, place }) => sum + mass * (place[k] ?? NaN), 0) / total,
  );
  const sum = (term: (point: UncertainPoint, d: Vec3, sm: number, s: Vec3) => number): number =>
    points.reduce((so, point) => {
      const [x = NaN, y = NaN, z = NaN] = point.place.map((part, k) => part - (centre[k] ?? NaN));
      return so + term(point, [x, y, z], point.massSigma, point.placeSigma);
    }, 0);
  return {
    mass: sum((_, __, sm) => sm ** 2),
    cx: sum(({ mass }, [x], sm, [sx]) => (sm * x) ** 2 + (mass * sx) ** 2) / total ** 2,
    massAndCx: sum((_, [x], sm) => sm ** 2 * x) / total,
    ixx: sum(
      ({ mass }, [, y, z], sm, [, sy, sz]) =>
        (sm * (y ** 2 + z ** 2)) ** 2 + (2 * mass * y * sy) ** 2 + (2 * mass * z * sz) ** 2,
    ),
    ixy: sum(
      ({ mass }, [x, y], sm, [sx, sy]) => (sm * x * y) ** 2 + (mass * y * sx) ** 2 + (mass * x * sy) ** 2,
    ),
  };
}

/**
 * Chi-square with two degrees of freedom: the value below which that share of it lies. Source: any table of quantiles, as in
 * Birolini, Reliability Engineering (2007), table A9.2, or NIST/SEMATECH e-Handbook of Statistical Methods, 1.3.6.7.4.
 */
export const CHI_SQUARE_TWO = [
  { share: 0.5, value: 1.38629 },
  { share: 0.9, value: 4.60517 },
  { share: 0.95, value: 5.99146 },
  { share: 0.99, value: 9.21034 },
] as const;
