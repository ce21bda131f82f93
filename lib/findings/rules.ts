import { LIMIT_RULES, limitNotJudged } from './limits/rules';
import { REMOVAL_RULES } from './removals/rules';
import { axisWithoutTwin } from './rotors/axis';
import { carrierMissing, polarBeyondCarrier, withoutCarrier } from './rotors/carrier';
import { neverTurns, shaftWithoutSpeed, twoBlades } from './rotors/rules';
import { assemblyNotCounted, assemblyTotalDiffers, parentCountedWithChildren } from './rows/assemblies';
import {
  actualWithGrowth,
  adjustmentsLeftOut,
  estimatedWithoutGrowth,
  sigmaBeyondValue,
  withoutGroup,
  withoutMaturity,
} from './rows/bookkeeping';
import { changedByInertiaUnit, changedByLengthUnit, changedByMassUnit, movedAcross } from './rows/changes';
import { memoRows, pairInHalfList } from './rows/counting';
import { duplicateRow, nearDuplicate, pairEnteredTwice, sameMassAndPlace } from './rows/duplicates';
import { listLengthSlip, listMassSlip, massJump } from './rows/former';
import { unknownGroup } from './rows/groups';
import { heavyPoint, masslessRow, masslessTensor, negativeMassOutsideAdjustments } from './rows/mass';
import { inertiaScale, largerThanGroup } from './rows/group-sizes';
import { outsideGroup, placeSlip } from './rows/neighbours';
import { omittedInertia } from './rows/omitted';
import { farOutside, onDatum, outsideAircraft } from './rows/place';
import { axesMirrored, halfOnOtherSide, mirroredOnPlane, sideAgainstName } from './rows/sides';
import { denserThanMetal, largerThanAircraft, momentsAboutDatum } from './rows/size';
import { impossibleTensor, productBounds, tensorWithinRounding } from './rows/tensor';
import { inertiaUnitSlip, massUnitSlip, mirrorProducts, samePartDiffers } from './rows/twins';
import { type RotorRule, type RowRule, type Rule, type WholeRule } from './rule';
import { groupWithoutMass, growthUnknown, massNotPositive } from './whole/mass';
import { beyondSpanOrLength, radiiOutsideClass, totalAboutDatum, totalUnitSlip } from './whole/radii';
import { flatness, izzNotLargest } from './whole/shape';
import { ixzAgainstLayout, ixzNegative, lateralCg, lateralProducts } from './whole/symmetry';
import { impossibleGroup, impossibleTotal, totalWithinRounding } from './whole/tensor';

/*
 * All rules, in the order in which findings of equal severity are shown. To add one, write it beside its kind (rows/, whole/,
 * rotors/), name it here, and give it a test that makes it fire and one that keeps it quiet.
 */

export const ROW_RULES: readonly RowRule[] = [
  impossibleTensor,
  productBounds,
  largerThanAircraft,
  masslessTensor,
  farOutside,
  negativeMassOutsideAdjustments,
  heavyPoint,
  denserThanMetal,
  momentsAboutDatum,
  massUnitSlip,
  inertiaUnitSlip,
  inertiaScale,
  largerThanGroup,
  listMassSlip,
  listLengthSlip,
  massJump,
  changedByMassUnit,
  changedByLengthUnit,
  changedByInertiaUnit,
  axesMirrored,
  sideAgainstName,
  mirrorProducts,
  outsideAircraft,
  onDatum,
  placeSlip,
  pairInHalfList,
  mirroredOnPlane,
  pairEnteredTwice,
  duplicateRow,
  parentCountedWithChildren,
  assemblyNotCounted,
  unknownGroup,
  sigmaBeyondValue,
  tensorWithinRounding,
  masslessRow,
  omittedInertia,
  outsideGroup,
  sameMassAndPlace,
  nearDuplicate,
  samePartDiffers,
  halfOnOtherSide,
  movedAcross,
  memoRows,
  assemblyTotalDiffers,
  withoutMaturity,
  withoutGroup,
  actualWithGrowth,
  estimatedWithoutGrowth,
  adjustmentsLeftOut,
];

export const WHOLE_RULES: readonly WholeRule[] = [
  massNotPositive,
  impossibleTotal,
  beyondSpanOrLength,
  impossibleGroup,
  izzNotLargest,
  flatness,
  totalUnitSlip,
  totalAboutDatum,
  totalWithinRounding,
  radiiOutsideClass,
  ixzNegative,
  ixzAgainstLayout,
  lateralCg,
  lateralProducts,
  groupWithoutMass,
  growthUnknown,
];

export const ROTOR_RULES: readonly RotorRule[] = [
  shaftWithoutSpeed,
  polarBeyondCarrier,
  carrierMissing,
  neverTurns,
  withoutCarrier,
  axisWithoutTwin,
  twoBlades,
];

const ALL: readonly Rule[] = [
  ...ROW_RULES,
  ...WHOLE_RULES,
  ...ROTOR_RULES,
  ...REMOVAL_RULES,
  ...Object.values(LIMIT_RULES),
  limitNotJudged,
];

/** The rule a finding came from; null for one that is no longer made. */
export function ruleOf(id: string): Rule | null {
  return ALL.find((rule) => rule.id === id) ?? null;
}
