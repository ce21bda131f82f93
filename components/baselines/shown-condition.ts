import { type ShownCondition } from '@/components/baselines/condition-sheet';
import { type HandoffDocument } from '@/lib/baselines/handoff-document';
import { type ConditionResult } from '@/lib/loading/configuration';
import { type Vec3 } from '@/lib/numerics/vec3';

/** A stored condition: those of before there were uncertainties have none. */
type StoredCondition = Omit<ConditionResult, 'uncertainty'> & Partial<Pick<ConditionResult, 'uncertainty'>>;

/** A condition of a result as it was submitted. */
export function shownOfResult(condition: StoredCondition): ShownCondition {
  const { title, rollUp } = condition;
  return {
    title,
    mass: rollUp.basic.mass,
    predictedMass: rollUp.predicted.mass,
    properties: rollUp.basic.properties,
    sigma: sigmaOfResult(condition),
  };
}

function sigmaOfResult({ uncertainty }: StoredCondition): ShownCondition['sigma'] {
  if (uncertainty === undefined) return null;
  const { mass, massShare, properties } = uncertainty.basic;
  if (properties === null || massShare === null || massShare === 0) return null;
  return { mass, massShare, percentMac: properties.percentMac, inertia: properties.inertia };
}

/**
 * A condition of a signed document, with the very numbers that its digest covers. The document states the deviation of the CG in
 * m; `submitted`, the result it was made from, has it in per cent of the chord too.
 */
export function shownOfDocument(
  condition: HandoffDocument['conditions'][number],
  submitted: StoredCondition | undefined,
): ShownCondition {
  const { title, mass, predictedMass } = condition;
  if (!('cg' in condition)) return { title, mass, predictedMass, properties: null, sigma: null };
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
    sigma:
      'sigma' in condition
        ? {
            ...condition.sigma,
            percentMac: submitted?.uncertainty?.basic.properties?.percentMac ?? null,
          }
        : null,
  };
}

function triple(numbers: readonly number[] | undefined): Vec3 {
  const [x, y, z] = numbers ?? [];
  if (x === undefined || y === undefined || z === undefined)
    throw new RangeError('a stored axis or set of moments has three numbers');
  return [x, y, z];
}
