import { shaftWithoutSpeed, twoBlades } from './rotors/rules';
import { memoRows, pairInHalfList } from './rows/counting';
import { heavyPoint, masslessRow, masslessTensor, negativeMassOutsideAdjustments } from './rows/mass';
import { impossibleTensor, productBounds, tensorWithinRounding } from './rows/tensor';
import { type RotorRule, type RowRule, type Rule, type WholeRule } from './rule';
import { groupWithoutMass, growthUnknown, massNotPositive } from './whole/mass';
import { impossibleTotal, totalWithinRounding } from './whole/tensor';

/*
 * All rules, in the order in which findings of equal severity are shown. To add one, write it beside its kind (rows/, whole/,
 * rotors/), name it here, and give it a test that makes it fire and one that keeps it quiet.
 */

export const ROW_RULES: readonly RowRule[] = [
  impossibleTensor,
  productBounds,
  masslessTensor,
  negativeMassOutsideAdjustments,
  heavyPoint,
  pairInHalfList,
  tensorWithinRounding,
  masslessRow,
  memoRows,
];

export const WHOLE_RULES: readonly WholeRule[] = [
  massNotPositive,
  impossibleTotal,
  totalWithinRounding,
  groupWithoutMass,
  growthUnknown,
];

export const ROTOR_RULES: readonly RotorRule[] = [shaftWithoutSpeed, twoBlades];

const ALL: readonly Rule[] = [...ROW_RULES, ...WHOLE_RULES, ...ROTOR_RULES];

/** The rule a finding came from; null for one that is no longer made. */
export function ruleOf(id: string): Rule | null {
  return ALL.find((rule) => rule.id === id) ?? null;
}
