import { listToAirframe } from '@/lib/frames/pose';
import { type Moments } from '@/lib/frames/products';
import { type Account } from '@/lib/mass/account';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { resultOf } from '@/lib/mass/result';
import { applyMat, transpose } from '@/lib/numerics/mat3';
import { subVec, type Vec3 } from '@/lib/numerics/vec3';
import { fromSi } from '@/lib/units/convert';

/** What a list comes to, in its own units. */
export interface EffectFigures {
  readonly mass: number;
  /** In the list's axes; null where there is no mass above zero. */
  readonly cg: Vec3 | null;
  /** About the CG in body axes, products as positive integrals. */
  readonly inertia: Moments | null;
}

/** Reads an account about the geometry's r0 in the units and axes in which a list is edited. */
export function effectFigures(
  account: Account,
  declarations: ListDeclarations,
  geometry: AirframeGeometry,
): EffectFigures {
  const { massUnit, lengthUnit, inertiaUnit, axes, pose } = declarations;
  const { mass, properties } = resultOf(account, geometry);
  if (properties === null) return { mass: fromSi(mass, massUnit), cg: null, inertia: null };
  const toList = transpose(listToAirframe(axes, pose, geometry.axes));
  const [x, y, z] = applyMat(toList, subVec(properties.cg, pose.origin));
  const { ixx, iyy, izz, ixy, ixz, iyz } = properties.inertia;
  const moment = (value: number): number => fromSi(value, inertiaUnit);
  return {
    mass: fromSi(mass, massUnit),
    cg: [fromSi(x, lengthUnit), fromSi(y, lengthUnit), fromSi(z, lengthUnit)],
    inertia: {
      ixx: moment(ixx),
      iyy: moment(iyy),
      izz: moment(izz),
      ixy: moment(ixy),
      ixz: moment(ixz),
      iyz: moment(iyz),
    },
  };
}
