import { type Limit, limitStandings, type LimitStanding } from '@/lib/loading/limits';
import { type Category } from '@/lib/mass/component';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type GrowthAllowances, type OnBoardItem, type RollUp, rollUp } from '@/lib/mass/roll-up';
import { type Subtotal } from '@/lib/mass/subtotals';
import { type UncertaintySubtotal } from '@/lib/mass/uncertainty/book';
import { combineUncertainty } from '@/lib/mass/uncertainty/combine';
import { type MassUncertainty, uncertaintyOf } from '@/lib/mass/uncertainty/uncertainty-of';
import { type AngularMomentum, angularMomentum, shaftsWithoutSpeed } from '@/lib/rotors/momentum';
import { type OperatingPoint, type Rotor } from '@/lib/rotors/rotor';
import { type MomentumUncertainty, momentumUncertainty } from '@/lib/rotors/uncertainty';

/** One loading: the list rows of some categories, and named items. */
export interface Condition {
  readonly code: string;
  readonly title: string;
  readonly categories: readonly Category[];
  readonly items: readonly OnBoardItem[];
}

export interface ConfigurationInput {
  readonly geometry: AirframeGeometry;
  readonly allowances: GrowthAllowances;
  /** The subtotals of every pinned list revision, about the geometry's reference point. */
  readonly subtotals: readonly (Subtotal & { readonly uncertainty: UncertaintySubtotal })[];
  readonly conditions: readonly Condition[];
  readonly rotors: readonly Rotor[];
  readonly points: readonly OperatingPoint[];
  readonly limits?: readonly Limit[];
  readonly frameIssue?: number;
}

export interface ConditionResult {
  readonly code: string;
  readonly title: string;
  readonly categories: readonly Category[];
  readonly items: readonly OnBoardItem[];
  readonly rollUp: RollUp;
  readonly uncertainty: { readonly basic: MassUncertainty; readonly predicted: MassUncertainty };
}

export interface PointResult {
  readonly code: string;
  readonly title: string;
  readonly momentum: AngularMomentum;
  readonly uncertainty: MomentumUncertainty;
}

/** Everything a configuration says: SI, CG in airframe components, inertia and angular momentum in body axes. */
export interface ConfigurationResult {
  readonly geometry: AirframeGeometry;
  readonly allowances: GrowthAllowances;
  readonly conditions: readonly ConditionResult[];
  readonly operatingPoints: readonly PointResult[];
  /** Limits and targets in force on the day of evaluation. Absent in results stored before they were kept. */
  readonly limits?: readonly Limit[];
  /** The number of the frame issue that all this stands on. Absent in results stored before it was kept. */
  readonly frameIssue?: number;
}

/**
 * Evaluates a configuration from its subtotals; approved adjustments only. An operating point that leaves a shaft without a speed
 * has no angular momentum and is left out: the findings name it.
 */
export function evaluateConfiguration(input: ConfigurationInput): ConfigurationResult {
  const { geometry, allowances, conditions, rotors, points, limits, frameIssue } = input;
  return {
    geometry,
    allowances,
    conditions: conditions.map((condition) => evaluateCondition(condition, input)),
    operatingPoints: points
      .filter((point) => shaftsWithoutSpeed(rotors, point).length === 0)
      .map((point) => ({
        code: point.code,
        title: point.title,
        momentum: angularMomentum(rotors, point, geometry),
        uncertainty: momentumUncertainty(rotors, point, geometry),
      })),
    ...(limits === undefined ? {} : { limits }),
    ...(frameIssue === undefined ? {} : { frameIssue }),
  };
}

function evaluateCondition(
  condition: Condition,
  { subtotals, geometry, allowances }: Pick<ConfigurationInput, 'subtotals' | 'geometry' | 'allowances'>,
): ConditionResult {
  const options = { categories: condition.categories };
  const total = rollUp(subtotals, condition.items, geometry, allowances, options);
  const { basic, predicted } = combineUncertainty(
    subtotals.map(({ uncertainty }) => uncertainty),
    condition.items,
    allowances,
    options,
  );
  return {
    ...condition,
    rollUp: total,
    uncertainty: {
      basic: uncertaintyOf(basic, total.basicAccount, geometry),
      predicted: uncertaintyOf(predicted, total.predictedAccount, geometry),
    },
  };
}

/** How every condition stands to the limits that were in force, as a result holds them. */
export function standingsOf({
  limits,
  conditions,
  geometry,
  frameIssue,
}: ConfigurationResult): LimitStanding[] {
  return limitStandings(limits ?? [], conditions, geometry, frameIssue ?? null);
}
