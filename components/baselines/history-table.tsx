import { type CgLimits } from '@/components/baselines/condition-sheet';
import { StateWord } from '@/components/baselines/state-word';
import { Num } from '@/components/mass/num';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { Day } from '@/components/ui/day';
import { SeverityWord } from '@/components/ui/severity';
import { TextLink } from '@/components/ui/text-link';
import { type BaselineState } from '@/lib/baselines/states';
import { unitLabel } from '@/lib/units/names';
import { type MassUnit } from '@/lib/units/table';

interface HistoryLine {
  readonly number: number;
  readonly title: string;
  readonly buildTitle: string;
  readonly state: BaselineState;
  readonly signedAt: Date;
  /** kg; null where the baseline does not have the condition. */
  readonly mass: number | null;
  readonly predicted: number | null;
  readonly percentMac: number | null;
}

interface HistoryTableProps {
  readonly home: string;
  readonly lines: readonly HistoryLine[];
  readonly unit: MassUnit;
  /** kg */
  readonly massLimit: number | null;
  readonly cgLimits: CgLimits;
}

/** Mass and CG of every baseline of a program in one condition, with the room to the mass limit. */
export function HistoryTable({ home, lines, unit, massLimit, cgLimits }: HistoryTableProps) {
  const label = unitLabel(unit);
  return (
    <Table caption="Mass and CG of every signed baseline" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Baseline</ColumnHead>
          <ColumnHead>Build</ColumnHead>
          <ColumnHead>State</ColumnHead>
          <ColumnHead>Signed</ColumnHead>
          <ColumnHead side="right" unit={label}>
            Mass
          </ColumnHead>
          <ColumnHead side="right" unit={label}>
            Predicted
          </ColumnHead>
          <ColumnHead side="right" unit={label}>
            Below the limit
          </ColumnHead>
          <ColumnHead side="right" unit="% MAC">
            CG
          </ColumnHead>
        </tr>
      </thead>
      <tbody>
        {lines.map((line) => (
          <tr key={line.number}>
            <RowHead>
              <TextLink href={`${home}/${line.number}`}>{`${line.number}. ${line.title}`}</TextLink>
            </RowHead>
            <Cell>{line.buildTitle}</Cell>
            <Cell>
              <StateWord state={line.state} />
            </Cell>
            <Cell>
              <Day at={line.signedAt} />
            </Cell>
            <Cell side="right">
              <Num value={line.mass} unit={unit} decimals={1} />
            </Cell>
            <Cell side="right">
              <Num value={line.predicted} unit={unit} decimals={1} />
            </Cell>
            <Cell side="right">
              <Num
                value={massLimit === null || line.mass === null ? null : massLimit - line.mass}
                unit={unit}
                decimals={1}
              />
            </Cell>
            <Cell side="right">
              {isOutside(line.percentMac, cgLimits) ? (
                <SeverityWord severity="blocker" word="outside" />
              ) : null}{' '}
              <Num value={line.percentMac} decimals={2} />
            </Cell>
          </tr>
        ))}
      </tbody>
    </Table>
  );
}

function isOutside(cg: number | null, { forward, aft }: CgLimits): boolean {
  return cg !== null && ((forward !== null && cg < forward) || (aft !== null && cg > aft));
}
