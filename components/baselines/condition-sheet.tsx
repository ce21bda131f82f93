import { BalanceBar } from '@/components/mass/balance-bar';
import { CgTable } from '@/components/mass/cg-table';
import { MassFigure } from '@/components/mass/mass-figure';
import { Num } from '@/components/mass/num';
import { TwoTensors } from '@/components/mass/two-tensors';
import { type Moments } from '@/lib/frames/products';
import { type Vec3 } from '@/lib/numerics/vec3';
import { type OutputUnits } from '@/lib/units/names';

export interface ShownProperties {
  readonly cg: Vec3;
  readonly percentMac: number | null;
  readonly inertia: Moments;
  readonly principal: { readonly moments: Vec3; readonly axes: readonly [Vec3, Vec3, Vec3] };
}

/** One condition as it was stored. SI; CG in airframe components, inertia about it in body axes, products positive. */
export interface ShownCondition {
  readonly title: string;
  readonly mass: number;
  readonly predictedMass: number;
  /** Null for a mass of zero or less. */
  readonly properties: ShownProperties | null;
  /** The same with growth. */
  readonly predicted: ShownProperties | null;
  /** One standard deviation of each, where rows state theirs. */
  readonly sigma: {
    readonly mass: number;
    /** Airframe components, m; null where it was not stored. */
    readonly cg: Vec3 | null;
    readonly percentMac: number | null;
    readonly inertia: Moments;
    /** kg.m2; null where it was not stored. */
    readonly principal: Vec3 | null;
    /** Of the predicted mass, CG and moments; null where it was not stored. */
    readonly predicted: {
      readonly mass: number;
      readonly cg: Vec3 | null;
      readonly percentMac: number | null;
      readonly inertia: Moments;
      readonly principal: Vec3 | null;
    } | null;
    /** The share of the mass, 0 to 1, whose standard deviation is stated. */
    readonly massShare: number;
  } | null;
}

export interface CgLimits {
  readonly forward: number | null;
  readonly aft: number | null;
}

interface ConditionSheetProps {
  readonly condition: ShownCondition;
  readonly limits: CgLimits;
  readonly axes: readonly [string, string, string];
  readonly units: OutputUnits;
}

/** Mass, balance and inertia of one condition. */
export function ConditionSheet({ condition, limits, axes, units }: ConditionSheetProps) {
  const { title, mass, predictedMass, properties, predicted, sigma } = condition;
  return (
    <div className="grid gap-6">
      <MassFigure
        label={`${title}, basic mass`}
        mass={mass}
        predicted={predictedMass}
        unit={units.mass}
        {...(sigma === null ? {} : { sigma: sigma.mass })}
        {...(sigma?.predicted ? { predictedSigma: sigma.predicted.mass } : {})}
      >
        {sigma === null ? null : (
          <p className="text-ink-2">
            ± is 1 sigma, stated for <Num value={100 * sigma.massShare} decimals={0} /> % of the mass; the
            rest counts as certain.
          </p>
        )}
      </MassFigure>
      {properties === null ? (
        <p>A mass of zero or less has no CG and no inertia about it.</p>
      ) : (
        <>
          {properties.percentMac === null ? null : (
            <BalanceBar
              cg={properties.percentMac}
              forwardLimit={limits.forward}
              aftLimit={limits.aft}
              {...(sigma?.percentMac ? { sigma: sigma.percentMac } : {})}
            />
          )}
          <CgTable
            basic={properties}
            predictedSigma={sigma?.predicted ?? null}
            {...{ predicted, sigma, axes, units }}
          />
          <TwoTensors
            basic={properties}
            predicted={predicted}
            sigma={{ basic: sigma, predicted: sigma?.predicted ?? null }}
            unit={units.inertia}
          />
        </>
      )}
    </div>
  );
}
