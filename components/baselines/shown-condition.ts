import { type ShownCondition } from '@/components/baselines/condition-sheet';
import { type HandoffDocument } from '@/lib/baselines/handoff-document';
import { type ConditionResult } from '@/lib/loading/configuration';
import { type Vec3 } from '@/lib/numerics/vec3';

/** A condition of a result as it was submitted. */
export function shownOfResult({ title, rollUp }: ConditionResult): ShownCondition {
  return {
    title,
    mass: rollUp.basic.mass,
    predictedMass: rollUp.predicted.mass,
    properties: rollUp.basic.properties,
  };
}

/** A condition of a signed document, with the very numbers that its digest covers. */
export function shownOfDocument(condition: HandoffDocument['conditions'][number]): ShownCondition {
  const { title, mass, predictedMass } = condition;
  if (!('cg' in condition)) return { title, mass, predictedMass, properties: null };
  const { cg, inertia, principal } = condition;
  const [first, second, third] = principal.axes;
  return {
    title,
    mass,
    predictedMass,
    properties: {
      cg: [cg.airframe.x, cg.airframe.y, cg.airframe.z],
      percentMac: cg.percentMac ?? null,
      inertia,
      principal: {
        moments: triple(principal.moments),
        axes: [triple(first), triple(second), triple(third)],
      },
    },
  };
}

function triple(numbers: readonly number[] | undefined): Vec3 {
  const [x, y, z] = numbers ?? [];
  if (x === undefined || y === undefined || z === undefined)
    throw new RangeError('a stored axis or set of moments has three numbers');
  return [x, y, z];
}
