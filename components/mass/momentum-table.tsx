import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type AngularMomentumUnit } from '@/lib/units/table';

/** Spin angular momentum in body axes, kg.m2/s. */
export interface Momentum {
  readonly hx: number;
  readonly hy: number;
  readonly hz: number;
}

export interface RotorMomentum extends Momentum {
  readonly rotor: string;
  readonly rpm: number;
}

interface MomentumTableProps {
  /** The operating point, e.g. "Cruise". */
  readonly operatingPoint: string;
  readonly rotors: readonly RotorMomentum[];
  readonly total: Momentum;
  /** One standard deviation of the sum; null where no rotor and no shaft states one. */
  readonly sigma?: Momentum | null;
  readonly unit?: AngularMomentumUnit;
}

const COMPONENTS = ['hx', 'hy', 'hz'] as const;

/** Angular momentum of each rotor at one operating point, and their sum. */
export function MomentumTable({
  operatingPoint,
  rotors,
  total,
  sigma = null,
  unit = 'kg.m2/s',
}: MomentumTableProps) {
  const inUnit = (rows: readonly Momentum[]): number[] =>
    rows.flatMap((row) => COMPONENTS.map((name) => fromSi(row[name], unit)));
  const decimals = sharedDecimals(inUnit([...rotors, total]), inUnit(sigma === null ? [] : [sigma]));
  const numbers = (row: Momentum, plus = true) =>
    COMPONENTS.map((name) => (
      <Cell key={name} side="right">
        <Num value={row[name]} unit={unit} decimals={decimals} plus={plus} />
      </Cell>
    ));
  return (
    <Table caption={`${operatingPoint}: spin angular momentum in body axes, right-hand rule`}>
      <thead>
        <tr>
          <ColumnHead>Rotor</ColumnHead>
          <ColumnHead side="right" unit="rpm">
            Speed
          </ColumnHead>
          {COMPONENTS.map((name) => (
            <ColumnHead key={name} side="right" unit={unitLabel(unit)}>
              h<sub className="text-[0.83em]">{name.slice(1)}</sub>
            </ColumnHead>
          ))}
        </tr>
      </thead>
      <tbody>
        {rotors.map((rotor) => (
          <tr key={rotor.rotor}>
            <RowHead>{rotor.rotor}</RowHead>
            <Cell side="right">
              <Num value={rotor.rpm} decimals={1} />
            </Cell>
            {numbers(rotor)}
          </tr>
        ))}
      </tbody>
      <tfoot>
        <tr>
          <RowHead>All rotors</RowHead>
          <Cell />
          {numbers(total)}
        </tr>
        {sigma === null ? null : (
          <tr>
            <RowHead>± of all rotors</RowHead>
            <Cell />
            {numbers(sigma, false)}
          </tr>
        )}
      </tfoot>
    </Table>
  );
}
