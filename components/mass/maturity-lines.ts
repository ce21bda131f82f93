import { allowanceFor } from '@/lib/mass/allowances';
import { MATURITIES } from '@/lib/mass/component';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { groupBranches, type GrowthAllowances, type MassByMaturity, type RollUp } from '@/lib/mass/roll-up';

export interface MaturityLine {
  /** Path of the group. */
  readonly group: string;
  /** kg. */
  readonly basic: number;
  readonly predicted: number;
  readonly byMaturity: MassByMaturity;
  /** Which rule gives growth to rows that state none, in words. */
  readonly rule: string;
}

/** Mass by maturity of every group and of those above; null for results that were stored before it was kept. */
export function maturityLines(
  rollUp: RollUp,
  geometry: AirframeGeometry,
  allowances: GrowthAllowances,
): readonly MaturityLine[] | null {
  if (rollUp.byMaturity === undefined) return null;
  return groupBranches(rollUp.groups, geometry).flatMap(({ group, basic, predicted, byMaturity }) =>
    byMaturity === undefined
      ? []
      : [
          {
            group,
            basic: basic.mass,
            predicted: predicted.mass,
            byMaturity,
            rule: ruleWords(allowances, group),
          },
        ],
  );
}

function ruleWords(allowances: GrowthAllowances, group: string): string {
  const applied = MATURITIES.map((maturity) => ({ maturity, ...allowanceFor(allowances, group, maturity) }));
  const givers = [...new Set(applied.map(({ from }) => from))];
  return givers
    .map((giver) => {
      const figures = applied
        .filter(({ from }) => from === giver)
        .map(({ maturity, fraction }) => `${maturity} ${Number((100 * fraction).toPrecision(6))} %`);
      return `${figures.join(', ')} by ${giver === '' || giver === null ? 'the program' : giver}`;
    })
    .join('; ');
}
