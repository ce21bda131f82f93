import { type Sym3 } from '@/lib/numerics/sym3';

import { type AxisTriple } from './axes';
import { type AirframeVec, type In } from './tags';

/** Which airframe component is the lateral one. */
export function lateralIndex(axes: AxisTriple): 0 | 1 | 2 {
  if (axes[0] === 'right' || axes[0] === 'left') return 0;
  return axes[1] === 'right' || axes[1] === 'left' ? 1 : 2;
}

/** The mirror image, across the plane lateral = `plane` (m), of a place in airframe components. */
export function mirrorPlace(r: AirframeVec, lateral: 0 | 1 | 2, plane: number): AirframeVec {
  const across = (k: 0 | 1 | 2): number => (k === lateral ? 2 * plane - r[k] : r[k]);
  return [across(0), across(1), across(2)];
}

/** F a Fᵀ, F the reflection: the two products with the lateral axis change sign. */
export function mirrorSym(a: In<'airframe', Sym3>, lateral: 0 | 1 | 2): In<'airframe', Sym3> {
  return {
    ...a,
    xy: lateral === 2 ? a.xy : 0 - a.xy,
    xz: lateral === 1 ? a.xz : 0 - a.xz,
    yz: lateral === 0 ? a.yz : 0 - a.yz,
  };
}
