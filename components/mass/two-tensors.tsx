import { PrincipalNotes } from '@/components/mass/principal-notes';
import { PrincipalTable } from '@/components/mass/principal-table';
import { TensorPlate } from '@/components/mass/tensor-plate';
import { type Moments } from '@/lib/frames/products';
import { type Vec3 } from '@/lib/numerics/vec3';
import { type InertiaUnit } from '@/lib/units/table';

interface Tensor {
  /** About its own CG in body axes, kg.m2, products as positive integrals. */
  readonly inertia: Moments;
  readonly principal: { readonly moments: Vec3; readonly axes: readonly [Vec3, Vec3, Vec3] };
}

/** One standard deviation of each, kg.m2; `principal` is null where it was not stored. */
export interface Deviation {
  readonly inertia: Moments;
  readonly principal: Vec3 | null;
}

interface TwoTensorsProps {
  readonly basic: Tensor;
  readonly predicted: Tensor | null;
  readonly sigma: { readonly basic: Deviation | null; readonly predicted: Deviation | null };
  readonly unit: InertiaUnit;
}

/** The tensor without growth beside the one with it, each about its own CG, and their principal axes. On paper too. */
export function TwoTensors({ basic, predicted, sigma, unit }: TwoTensorsProps) {
  const both = [
    { name: 'Basic', tensor: basic, deviation: sigma.basic },
    ...(predicted === null ? [] : [{ name: 'Predicted', tensor: predicted, deviation: sigma.predicted }]),
  ];
  return (
    <div className="grid items-start gap-x-6 gap-y-4 xl:grid-cols-2">
      {both.map(({ name, tensor, deviation }) => (
        <TensorPlate
          key={name}
          moments={tensor.inertia}
          unit={unit}
          title={`${name} inertia about the ${name.toLowerCase()} CG, body axes`}
          {...(deviation === null ? {} : { sigma: deviation.inertia })}
        />
      ))}
      {both.map(({ name, tensor, deviation }) => (
        <div key={name} className="col-span-full min-w-0">
          <PrincipalTable
            of={name}
            moments={tensor.principal.moments}
            axes={tensor.principal.axes}
            sigma={deviation?.principal ?? null}
            unit={unit}
          />
        </div>
      ))}
      <div className="col-span-full">
        <PrincipalNotes basic={basic.principal} predicted={predicted?.principal ?? null} />
      </div>
    </div>
  );
}
