import { fromSi } from '@/lib/units/convert';

import { TRAITS } from '../columns/traits';
import { type RowFacts } from '../row-facts';
import { type RowRule } from '../rule';
import { FIRST_ROWS, counted, eachRow, shown } from '../watch';

const PSEUDO_INERTIA =
  'First principles: S = ∫ρρᵀdm is positive semidefinite (Wensing, Kim and Slotine 2018, IEEE RA-L 3(1), pseudo-inertia)';

function leastMoment(row: RowFacts): string {
  const { inertiaUnit } = row.declarations;
  const { least } = row.ownCheck;
  return `least principal second moment ${shown(fromSi(least, inertiaUnit))} ${inertiaUnit}`;
}

/** A removal's own moments are judged with the sign turned, so the words are the same for both. */
export const impossibleTensor: RowRule = {
  id: 'impossible-tensor',
  severity: 'blocker',
  sees: 'A counted row whose own moments and products no body can have: a principal moment exceeds the sum of the other two.',
  why: 'Such a tensor comes from a slip: a digit, a unit, a product sign, two columns exchanged, or moments that are not about the CG.',
  remedy:
    'Check the moments, the order of the columns, the inertia unit and the product sign that the list declares.',
  source: PSEUDO_INERTIA,
  keeps: FIRST_ROWS,
  watch: eachRow(
    (row) => (row.isCounted && row.ownCheck.verdict === 'impossible' ? leastMoment(row) : null),
    (count) =>
      counted(count, 'row states moments that no body can have', 'rows state moments that no body can have'),
    { traits: TRAITS.tensor },
  ),
};

export const tensorWithinRounding: RowRule = {
  id: 'tensor-within-rounding',
  severity: 'note',
  sees: 'A counted row whose own moments are just short of possible, by no more than the rounding of their printed digits or 1e-6 of them.',
  why: 'Thin plates and rods lie on the limit, and printed digits can push them over it. The effect on a result is as small.',
  remedy: 'Nothing needs doing; more digits from the source would settle it.',
  source: PSEUDO_INERTIA,
  keeps: FIRST_ROWS,
  watch: eachRow(
    (row) => (row.isCounted && row.ownCheck.verdict === 'within-rounding' ? leastMoment(row) : null),
    (count) =>
      counted(
        count,
        'row states moments that are possible only within rounding',
        'rows state moments that are possible only within rounding',
      ),
    { traits: TRAITS.tensor },
  ),
};

export const productBounds: RowRule = {
  id: 'product-bounds',
  severity: 'blocker',
  sees: 'A counted row with 2|Ixy| > Izz, 2|Ixz| > Iyy or 2|Iyz| > Ixx.',
  why: '(x ± y)² integrated over a body is never negative. A product beyond this bound stands in the wrong column or unit.',
  remedy: 'Check the order of the product columns and their unit.',
  source: 'First principles: 2|∫xy dm| ≤ ∫(x² + y²) dm, and cyclic',
  keeps: FIRST_ROWS,
  watch: eachRow(
    (row) => {
      if (!row.isCounted || row.ownCheck.verdict !== 'impossible') return null;
      const { inertiaUnit } = row.declarations;
      const { ixx, iyy, izz, ixy, ixz, iyz } = row.component.moments;
      const sign = row.component.mass < 0 ? -1 : 1;
      const pairs: readonly (readonly [string, number, string, number])[] = [
        ['Ixy', ixy, 'Izz', izz],
        ['Ixz', ixz, 'Iyy', iyy],
        ['Iyz', iyz, 'Ixx', ixx],
      ];
      const beyond = pairs.find(
        ([, product, , moment]) =>
          product !== 0 && 2 * Math.abs(product) - sign * moment > 2 * row.ownCheck.tolerance,
      );
      if (beyond === undefined) return null;
      const [productName, product, momentName, moment] = beyond;
      return (
        `2|${productName}| is ${shown(fromSi(2 * Math.abs(product), inertiaUnit))} and ` +
        `${momentName} ${shown(fromSi(moment, inertiaUnit))} ${inertiaUnit}`
      );
    },
    (count) =>
      counted(
        count,
        'row has a product larger than its moment allows',
        'rows have a product larger than its moment allows',
      ),
    { traits: TRAITS.tensor },
  ),
};
