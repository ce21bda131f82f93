import { type ShownCondition, type ShownProperties } from '@/components/baselines/condition-sheet';
import { tensorDeviation } from '@/components/mass/tensor-deviation';
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
    predicted: rollUp.predicted.properties,
    sigma: sigmaOfResult(condition),
  };
}

function sigmaOfResult({ rollUp, uncertainty }: StoredCondition): ShownCondition['sigma'] {
  if (uncertainty === undefined) return null;
  const { mass, massShare, properties } = uncertainty.basic;
  if (properties === null || massShare === null || massShare === 0) return null;
  const { cg, percentMac, inertia } = properties;
  return {
    mass,
    massShare,
    cg: [cg.x, cg.y, cg.z],
    percentMac,
    inertia,
    principal: tensorDeviation(rollUp.basic.properties, properties)?.principal ?? null,
    predicted: predictedSigma({ rollUp, uncertainty }),
  };
}

function predictedSigma({
  rollUp,
  uncertainty,
}: Pick<StoredCondition, 'rollUp' | 'uncertainty'>): NonNullable<ShownCondition['sigma']>['predicted'] {
  if (uncertainty === undefined) return null;
  const { mass, properties } = uncertainty.predicted;
  const tensor = tensorDeviation(rollUp.predicted.properties, properties);
  if (properties === null || tensor === null) return null;
  const { cg, percentMac } = properties;
  return { mass, cg: [cg.x, cg.y, cg.z], percentMac, ...tensor };
}

/**
 * A condition of a signed document, with the very numbers that its digest covers. What the document does not state of the deviations, that of
 * the CG in per cent of the chord, of the principal moments and of the predicted figures, is in `submitted`, the result it was made from.
 */
export function shownOfDocument(
  condition: HandoffDocument['conditions'][number],
  submitted: StoredCondition | undefined,
): ShownCondition {
  const { title, mass, predictedMass } = condition;
  const stored = submitted === undefined ? null : sigmaOfResult(submitted);
  return {
    title,
    mass,
    predictedMass,
    properties: propertiesOf(condition),
    predicted: propertiesOf(condition.predicted),
    sigma:
      'sigma' in condition
        ? {
            ...condition.sigma,
            cg: [condition.sigma.cg.x, condition.sigma.cg.y, condition.sigma.cg.z],
            percentMac: stored?.percentMac ?? null,
            principal: stored?.principal ?? null,
            predicted: stored?.predicted ?? null,
          }
        : null,
  };
}

type StoredProperties =
  HandoffDocument['conditions'][number] | HandoffDocument['conditions'][number]['predicted'];

function propertiesOf(stored: StoredProperties): ShownProperties | null {
  const { cg, inertia, principal } = { cg: undefined, inertia: undefined, principal: undefined, ...stored };
  if (cg === undefined || inertia === undefined || principal === undefined) return null;
  const [first, second, third] = principal.axes;
  return {
    cg: [cg.airframe.x, cg.airframe.y, cg.airframe.z],
    percentMac: cg.percentMac ?? null,
    inertia,
    principal: { moments: triple(principal.moments), axes: [triple(first), triple(second), triple(third)] },
  };
}

function triple(numbers: readonly number[] | undefined): Vec3 {
  const [x, y, z] = numbers ?? [];
  if (x === undefined || y === undefined || z === undefined)
    throw new RangeError('a stored axis or set of moments has three numbers');
  return [x, y, z];
}
