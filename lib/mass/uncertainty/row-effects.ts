import { type Moments, NO_MOMENTS, tensorOf } from '@/lib/frames/products';
import { mirrorSym } from '@/lib/frames/reflection';
import { type AirframeVec } from '@/lib/frames/tags';
import { type Account, toNumbers } from '@/lib/mass/account';
import { type Component, type ComponentSigma } from '@/lib/mass/component';
import { type Placement, isMirrored } from '@/lib/mass/place';
import {
  type Sym3,
  addSym,
  congruence,
  halfTraceMinus,
  outer,
  scaleSym,
  symmetricProduct,
} from '@/lib/numerics/sym3';
import { ZERO_VEC, addVec, scaleVec } from '@/lib/numerics/vec3';

type Uncertain = Pick<
  Component,
  'mass' | 'position' | 'moments' | 'orientation' | 'quantity' | 'pair' | 'sigma'
>;

const ELEMENTS = ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const;
const COORDINATES = ['x', 'y', 'z'] as const;

/** Own moments per kg of the elements that state no σ and so scale with the mass; zero for the others. */
function scalingWithMass({ mass, moments }: Uncertain, sigma: ComponentSigma): Moments {
  if (mass === 0) return NO_MOMENTS;
  const part = (element: (typeof ELEMENTS)[number]): number =>
    sigma[element] === null ? moments[element] / mass : 0;
  return {
    ixx: part('ixx'),
    iyy: part('iyy'),
    izz: part('izz'),
    ixy: part('ixy'),
    ixz: part('ixz'),
    iyz: part('iyz'),
  };
}

/** A change of an account, or an account, of which rounding is of no interest. */
type Change = Omit<Account, 'rest'>;

/**
 * The mirror image, across lateral = `plane` (m, from r0), of an account, or of a change of one: places are r' = F r + 2 L n, so
 * p' = F p + 2 L m n and Q' = F Q F + 2 L (n (F p)ᵀ + F p nᵀ) + 4 L² m n nᵀ.
 */
function mirrored(a: Change, lateral: 0 | 1 | 2, plane: number): Change {
  const across = (k: 0 | 1 | 2): number => (k === lateral ? -a.first[k] : a.first[k]);
  const flipped: AirframeVec = [across(0), across(1), across(2)];
  const n: AirframeVec = [lateral === 0 ? 1 : 0, lateral === 1 ? 1 : 0, lateral === 2 ? 1 : 0];
  const moved = addSym(symmetricProduct(n, flipped), outer(n), 2 * plane * a.mass);
  return {
    mass: a.mass,
    first: addVec(flipped, scaleVec(2 * plane * a.mass, n)),
    second: addSym(mirrorSym(a.second, lateral), moved, 2 * plane),
  };
}

/**
 * For each value of a row that has a σ, what one σ of it does to the ten numbers of the row's account about r0, to first order:
 * σ ∂(m, p, Q)/∂value. The values are mass, the coordinates in list axes and the own moments in component axes. Each error is shared by
 * all pieces and by the mirror image, so their changes are added before anything is squared.
 */
export function effectsOf(component: Uncertain, placement: Placement): number[][] {
  const { mass, sigma, quantity } = component;
  if (sigma === null) return [];
  const effects: number[][] = [];
  const place = placement.place(component);
  const ownAxes = placement.ownAxes(component);
  const own = (moments: Moments): Sym3 => congruence(ownAxes, halfTraceMinus(tensorOf(moments)));
  const both = isMirrored(component, placement.declarations);
  const note = (deviation: number | null, derivative: () => Change): void => {
    if (deviation === null || deviation === 0) return;
    const piece = derivative();
    const one = toNumbers(piece);
    const image = both ? toNumbers(mirrored(piece, placement.lateral, placement.plane[0])) : null;
    const k = quantity * deviation;
    effects.push(one.map((part, i) => k * (part + (image?.[i] ?? 0))));
  };

  note(sigma.mass, () => ({
    mass: 1,
    first: place,
    second: addSym(own(scalingWithMass(component, sigma)), outer(place)),
  }));
  COORDINATES.forEach((coordinate, k) =>
    note(sigma[coordinate], () => {
      const [x, y, z] = placement.toAirframe;
      const along: AirframeVec = [x[k] ?? NaN, y[k] ?? NaN, z[k] ?? NaN];
      return {
        mass: 0,
        first: scaleVec(mass, along),
        second: scaleSym(mass, symmetricProduct(along, place)),
      };
    }),
  );
  for (const element of ELEMENTS)
    note(sigma[element], () => ({
      mass: 0,
      first: ZERO_VEC,
      second: own({ ...NO_MOMENTS, [element]: 1 }),
    }));
  return effects;
}
