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

interface TwoTensorsProps {
  readonly basic: Tensor;
  readonly predicted: Tensor | null;
  readonly sigma: { readonly basic: Moments | null; readonly predicted: Moments | null };
  readonly unit: InertiaUnit;
}

/** The tensor without growth beside the one with it: each about its own CG. On paper too. */
export function TwoTensors({ basic, predicted, sigma, unit }: TwoTensorsProps) {
  return (
    <div className="grid items-start gap-x-6 gap-y-4 2xl:grid-cols-2">
      <Plate
        title="Basic inertia about the basic CG, body axes"
        tensor={basic}
        sigma={sigma.basic}
        unit={unit}
      />
      {predicted === null ? null : (
        <Plate
          title="Predicted inertia about the predicted CG, body axes"
          tensor={predicted}
          sigma={sigma.predicted}
          unit={unit}
        />
      )}
    </div>
  );
}

function Plate({
  title,
  tensor,
  sigma,
  unit,
}: {
  readonly title: string;
  readonly tensor: Tensor;
  readonly sigma: Moments | null;
  readonly unit: InertiaUnit;
}) {
  return (
    <div className="grid min-w-0 content-start gap-4">
      <TensorPlate
        moments={tensor.inertia}
        unit={unit}
        title={title}
        {...(sigma === null ? {} : { sigma })}
      />
      <PrincipalTable moments={tensor.principal.moments} axes={tensor.principal.axes} unit={unit} />
    </div>
  );
}
