import { BalanceBar } from '@/components/mass/balance-bar';
import { MassFigure } from '@/components/mass/mass-figure';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { PrincipalTable } from '@/components/mass/principal-table';
import { TensorPlate } from '@/components/mass/tensor-plate';
import { inclinationWords } from '@/components/baselines/inclination-words';
import { type Moments } from '@/lib/frames/products';
import { principalInclination } from '@/lib/mass/inclination';
import { type Vec3 } from '@/lib/numerics/vec3';
import { fromSi } from '@/lib/units/convert';
import { unitLabel, type OutputUnits } from '@/lib/units/names';

/** One condition as it was stored. SI; CG in airframe components, inertia about it in body axes, products positive. */
export interface ShownCondition {
  readonly title: string;
  readonly mass: number;
  readonly predictedMass: number;
  /** Null for a mass of zero or less. */
  readonly properties: {
    readonly cg: Vec3;
    readonly percentMac: number | null;
    readonly inertia: Moments;
    readonly principal: { readonly moments: Vec3; readonly axes: readonly [Vec3, Vec3, Vec3] };
  } | null;
  /** One standard deviation of each, where rows state theirs. */
  readonly sigma: {
    readonly mass: number;
    readonly percentMac: number | null;
    readonly inertia: Moments;
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
  const { title, mass, predictedMass, properties, sigma } = condition;
  const cgDecimals = sharedDecimals((properties?.cg ?? []).map((place) => fromSi(place, units.length)));
  return (
    <div className="grid gap-6">
      <MassFigure
        label={`${title}, basic mass`}
        mass={mass}
        predicted={predictedMass}
        unit={units.mass}
        {...(sigma === null ? {} : { sigma: sigma.mass })}
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
          <div className="grid gap-2">
            {properties.percentMac === null ? null : (
              <BalanceBar
                cg={properties.percentMac}
                forwardLimit={limits.forward}
                aftLimit={limits.aft}
                {...(sigma?.percentMac ? { sigma: sigma.percentMac } : {})}
              />
            )}
            <p className="flex flex-wrap gap-x-6 gap-y-1">
              <span className="text-ink-2">CG from the datum, {unitLabel(units.length)}</span>
              {(['x', 'y', 'z'] as const).map((letter, index) => (
                <span key={letter}>
                  {letter} <span className="text-ink-2">{axes[index]}</span>{' '}
                  <Num value={properties.cg[index] ?? null} unit={units.length} decimals={cgDecimals} />
                </span>
              ))}
            </p>
          </div>
          <TensorPlate
            moments={properties.inertia}
            unit={units.inertia}
            {...(sigma === null ? {} : { sigma: sigma.inertia })}
          />
          <div className="grid gap-2">
            <PrincipalTable
              moments={properties.principal.moments}
              axes={properties.principal.axes}
              unit={units.inertia}
            />
            <p>
              The principal axis nearest x is inclined by{' '}
              {inclinationWords(principalInclination(properties.principal))}.
            </p>
          </div>
        </>
      )}
    </div>
  );
}
