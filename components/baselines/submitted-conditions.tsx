import { Num } from '@/components/mass/num';
import { Section } from '@/components/ui/section';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type ConfigurationResult } from '@/lib/loading/configuration';

/** The conditions that a submission freezes, in short. */
export function SubmittedConditions({ result }: { readonly result: ConfigurationResult }) {
  return (
    <Section title="What is submitted">
      <Table caption="Conditions" captionHidden>
        <thead>
          <tr>
            <ColumnHead>Condition</ColumnHead>
            <ColumnHead side="right" unit="kg">
              Mass
            </ColumnHead>
            <ColumnHead side="right" unit="% MAC">
              CG
            </ColumnHead>
          </tr>
        </thead>
        <tbody>
          {result.conditions.map(({ code, title, rollUp }) => (
            <tr key={code}>
              <RowHead>{title}</RowHead>
              <Cell side="right">
                <Num value={rollUp.basic.mass} decimals={2} />
              </Cell>
              <Cell side="right">
                <Num value={rollUp.basic.properties?.percentMac ?? null} decimals={2} />
              </Cell>
            </tr>
          ))}
        </tbody>
      </Table>
      <p className="text-ink-2">
        {result.operatingPoints.length === 0
          ? 'No rotating parts are held.'
          : `Angular momentum at ${result.operatingPoints.length} operating points.`}
      </p>
    </Section>
  );
}
