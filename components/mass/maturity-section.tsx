import { maturityLines } from '@/components/mass/maturity-lines';
import { MaturityTable } from '@/components/mass/maturity-table';
import { Section } from '@/components/ui/section';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type GrowthAllowances, type RollUp } from '@/lib/mass/roll-up';
import { type MassUnit } from '@/lib/units/table';

interface MaturitySectionProps {
  readonly condition: { readonly title: string; readonly rollUp: RollUp };
  readonly geometry: AirframeGeometry;
  readonly allowances: GrowthAllowances;
  readonly unit: MassUnit;
}

/** The share of mass by maturity per group of one condition, as it was rolled up. */
export function MaturitySection({ condition, geometry, allowances, unit }: MaturitySectionProps) {
  const { title, rollUp } = condition;
  const lines = maturityLines(rollUp, geometry, allowances);
  const { groups, byMaturity } = rollUp;
  return (
    <Section
      title="Maturity"
      aside={title}
      lead="Of the lists, without the items on board. Predicted is with growth: what a row states, or else the allowance named beside its group."
    >
      {lines === null || byMaturity === undefined ? (
        <p className="text-ink-2">
          Shares by maturity were not kept when this was rolled up. Results of today have them.
        </p>
      ) : (
        <MaturityTable
          lines={lines}
          whole={{
            basic: groups.reduce((sum, group) => sum + group.basic.mass, 0),
            predicted: groups.reduce((sum, group) => sum + group.predicted.mass, 0),
            byMaturity,
          }}
          unit={unit}
        />
      )}
    </Section>
  );
}
