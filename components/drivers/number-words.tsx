import { type ReactNode } from 'react';
import { InertiaSymbol } from '@/components/mass/tensor-plate';
import { type AxisTriple } from '@/lib/frames/axes';
import { type NameOfTen } from '@/lib/mass/contributions/ten';
import { type OutputUnits } from '@/lib/units/names';
import { type Unit } from '@/lib/units/table';

/** The units of the ten numbers. */
export type TenUnits = Omit<OutputUnits, 'angularMomentum'>;

export type KindOfNumber = 'mass' | 'place' | 'moment' | 'product';

export function kindOf(number: NameOfTen): KindOfNumber {
  if (number === 'mass') return 'mass';
  if (number.length === 1) return 'place';
  return number.charAt(1) === number.charAt(2) ? 'moment' : 'product';
}

export function unitOf(number: NameOfTen, units: TenUnits): Unit {
  const kind = kindOf(number);
  if (kind === 'mass') return units.mass;
  return kind === 'place' ? units.length : units.inertia;
}

/** `CG x`, for links and heads that carry plain text. */
export function numberText(number: NameOfTen): string {
  const kind = kindOf(number);
  if (kind === 'mass') return 'mass';
  return kind === 'place' ? `CG ${number}` : `I${number.slice(1)}`;
}

/** The same as it is set, with the axis word of a place. */
export function NumberName({ number, axes }: { readonly number: NameOfTen; readonly axes: AxisTriple }) {
  if (number === 'mass') return 'Mass';
  if (number === 'x' || number === 'y' || number === 'z')
    return (
      <>
        CG {number} <span className="text-ink-2">{axes['xyz'.indexOf(number)]}</span>
      </>
    );
  return <InertiaSymbol symbol={number} />;
}

/** What a contribution to it is, and what all of them add up to. */
export const CONTRIBUTION_WORDS: Readonly<Record<KindOfNumber, ReactNode>> = {
  mass: 'Each part contributes its mass; all parts add up to the mass of the whole.',
  place:
    'Each part contributes its lever about the CG of the whole, m (x - CG)/M, in airframe axes: what pulls the CG one way and what pulls it the other. They add up to zero, for the CG is where they balance.',
  moment:
    'Each part contributes its own inertia and what its distance from the CG of the whole gives it, body axes through that CG; all parts add up to the whole.',
  product:
    'Each part contributes its own product and m times its two distances from the CG of the whole, body axes, as a positive integral; all parts add up to the whole. The tensor element is minus this.',
};
