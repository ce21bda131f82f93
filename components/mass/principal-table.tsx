import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type InertiaUnit } from '@/lib/units/table';

type Triple = readonly [number, number, number];

interface PrincipalTableProps {
  /** Which results they are of, as in "Predicted". */
  readonly of?: string;
  /** kg.m2, in the order of the body axes that their axes are nearest to. */
  readonly moments: Triple;
  /** Row i is principal axis i in body components. */
  readonly axes: readonly [Triple, Triple, Triple];
  /** One standard deviation of each moment, kg.m2, where rows state theirs. */
  readonly sigma?: Triple | null;
  readonly unit?: InertiaUnit;
}

const NEAREST = ['x', 'y', 'z'] as const;

/** Principal moments and the direction cosines of their axes in body axes. */
export function PrincipalTable({ of, moments, axes, sigma = null, unit = 'kg.m2' }: PrincipalTableProps) {
  const inUnit = (values: readonly number[]): number[] => values.map((value) => fromSi(value, unit));
  const decimals = sharedDecimals(inUnit(moments), inUnit(sigma ?? []));
  return (
    <Table
      caption={`${of === undefined ? 'Principal' : `${of} principal`} axes about the CG: direction cosines in body axes, right-handed`}
    >
      <thead>
        <tr>
          <ColumnHead>Axis</ColumnHead>
          <ColumnHead side="right" unit={unitLabel(unit)}>
            Moment
          </ColumnHead>
          {sigma === null ? null : (
            <ColumnHead side="right" unit={unitLabel(unit)}>
              ±
            </ColumnHead>
          )}
          {NEAREST.map((letter) => (
            <ColumnHead key={letter} side="right">
              {letter}
            </ColumnHead>
          ))}
        </tr>
      </thead>
      <tbody>
        {NEAREST.map((letter, index) => (
          <tr key={letter}>
            <RowHead>Nearest {letter}</RowHead>
            <Cell side="right">
              <Num value={moments[index] ?? null} unit={unit} decimals={decimals} />
            </Cell>
            {sigma === null ? null : (
              <Cell side="right">
                <Num value={sigma[index] ?? null} unit={unit} decimals={decimals} />
              </Cell>
            )}
            {NEAREST.map((component, column) => (
              <Cell key={component} side="right">
                <Num value={axes[index]?.[column] ?? null} decimals={6} />
              </Cell>
            ))}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
