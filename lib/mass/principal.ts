import { type BodyVec, type In } from '@/lib/frames/tags';
import { eigenSym } from '@/lib/numerics/eigen';
import { determinant } from '@/lib/numerics/mat3';
import { type Sym3 } from '@/lib/numerics/sym3';
import { type Vec3, addVec, scaleVec } from '@/lib/numerics/vec3';

/**
 * Principal moments (kg.m2) in the order of the body axes that their axes are nearest to; row i of `axes` is principal axis i in
 * body components. The three rows are right-handed. `pairingTies` tells where the order is a matter of choice.
 */
export interface Principal {
  readonly moments: Vec3;
  readonly axes: readonly [BodyVec, BodyVec, BodyVec];
}

type Order = readonly [0 | 1 | 2, 0 | 1 | 2, 0 | 1 | 2];

/** Which vector stands with body x, y and z. Where several are equally near the first counts: the smaller moment, the earlier axis. */
const ORDERS: readonly Order[] = [
  [0, 1, 2],
  [0, 2, 1],
  [1, 0, 2],
  [1, 2, 0],
  [2, 0, 1],
  [2, 1, 0],
];

/** Moments closer than this share of the largest are equal: any pair of axes in their plane is principal. */
export const EQUAL_MOMENTS = 1e-12;

/** Orders whose nearness differs by less are equally near, so that rounding does not choose between them. */
export const TIE = 1e-9;

/** How near vectors in some order stand to the body axes: Σ cos² of the three angles, 3 at best. */
export function nearnessOf(vectors: readonly [Vec3, Vec3, Vec3], [a, b, c]: Order): number {
  return vectors[a][0] ** 2 + vectors[b][1] ** 2 + vectors[c][2] ** 2;
}

/** Each axis along, not against, the body axis it is paired with; then the one that says least is turned if the set is left-handed. */
function rightHanded(axes: readonly [Vec3, Vec3, Vec3]): [Vec3, Vec3, Vec3] {
  const along = (axis: Vec3, k: 0 | 1 | 2): Vec3 => (axis[k] < 0 ? scaleVec(-1, axis) : axis);
  const set: [Vec3, Vec3, Vec3] = [along(axes[0], 0), along(axes[1], 1), along(axes[2], 2)];
  if (determinant(set) > 0) return set;
  const diagonal = [set[0][0], set[1][1], set[2][2]];
  const weakest = diagonal.indexOf(Math.min(...diagonal));
  return [
    weakest === 0 ? scaleVec(-1, set[0]) : set[0],
    weakest === 1 ? scaleVec(-1, set[1]) : set[1],
    weakest === 2 ? scaleVec(-1, set[2]) : set[2],
  ];
}

/** Turns axes i and j in their plane to where they are nearest to body axes i and j: used where their moments are equal. */
function settle(axes: [Vec3, Vec3, Vec3], i: 0 | 1 | 2, j: 0 | 1 | 2): void {
  const [u, v] = [axes[i], axes[j]];
  const angle = Math.atan2(v[i] - u[j], u[i] + v[j]);
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  axes[i] = addVec(scaleVec(c, u), scaleVec(s, v));
  axes[j] = addVec(scaleVec(c, v), scaleVec(-s, u));
}

/** Principal moments and axes of an inertia tensor in body axes. */
export function principalOf(tensor: In<'body', Sym3>): Principal {
  const { values, vectors } = eigenSym(tensor);
  const [a, b, c] = ORDERS.reduce((best, order) =>
    nearnessOf(vectors, order) > nearnessOf(vectors, best) + TIE ? order : best,
  );
  const moments: Vec3 = [values[a], values[b], values[c]];
  const scale = EQUAL_MOMENTS * Math.max(...values.map(Math.abs));
  if (Math.abs(values[2] - values[0]) <= scale)
    return {
      moments,
      axes: [
        [1, 0, 0],
        [0, 1, 0],
        [0, 0, 1],
      ],
    };
  const axes = rightHanded([vectors[a], vectors[b], vectors[c]]);
  for (const [i, j] of [
    [0, 1],
    [1, 2],
    [2, 0],
  ] as const)
    if (Math.abs(moments[i] - moments[j]) <= scale) settle(axes, i, j);
  return { moments, axes };
}
