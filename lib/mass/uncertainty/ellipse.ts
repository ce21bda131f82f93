/** Two quantities that vary together: their variances and covariance. The CG in a plane, or the CG along the chord and the mass. */
export interface PlaneCovariance {
  readonly uu: number;
  readonly vv: number;
  readonly uv: number;
}

/** Where an error lies within k σ: semi-axes in the unit of u and v, the angle of the long one from u towards v, rad. */
export interface Ellipse {
  readonly semiMajor: number;
  readonly semiMinor: number;
  /** In (-π/2, π/2]; 0 for a circle. */
  readonly angle: number;
}

/**
 * The share of normally distributed errors inside the ellipse of k σ: (d/σ)² has the chi-square distribution with two degrees of
 * freedom, 1 - exp(-k²/2). 39 % at 1 σ, 86 % at 2 σ, not the 68 % and 95 % of a single quantity.
 */
export function shareWithin(k: number): number {
  return -Math.expm1((-k * k) / 2);
}

/** The ellipse of k σ (eigenvalues of the covariance matrix). u and v must have one unit. */
export function ellipse({ uu, vv, uv }: PlaneCovariance, k: number): Ellipse {
  const [mean, half] = [(uu + vv) / 2, (uu - vv) / 2];
  const radius = Math.hypot(half, uv);
  return {
    semiMajor: k * Math.sqrt(mean + radius),
    semiMinor: k * Math.sqrt(Math.max(0, mean - radius)),
    angle: radius === 0 ? 0 : Math.atan2(2 * uv, uu - vv) / 2,
  };
}

/**
 * Points around the same ellipse about a centre, the first not repeated: centre + k L (cos t, sin t), L Lᵀ the covariance matrix
 * (Cholesky). Good for two different units too, where an ellipse has no axes to speak of.
 */
export function ellipseOutline(
  [u, v]: readonly [number, number],
  { uu, vv, uv }: PlaneCovariance,
  k: number,
  count = 72,
): [number, number][] {
  const across = Math.sqrt(uu);
  const shear = across === 0 ? 0 : uv / across;
  const rest = Math.sqrt(Math.max(0, vv - shear * shear));
  return Array.from({ length: count }, (_, i) => {
    const [cos, sin] = [Math.cos((2 * Math.PI * i) / count), Math.sin((2 * Math.PI * i) / count)];
    return [u + k * across * cos, v + k * (shear * cos + rest * sin)];
  });
}
