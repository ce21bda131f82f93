import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type Vec3 } from '@/lib/numerics/vec3';
import { fromSi } from '@/lib/units/convert';
import { type OutputUnits } from '@/lib/units/names';

interface Balance {
  /** Airframe components from the datum, m. */
  readonly cg: Vec3;
  readonly percentMac: number | null;
}

interface CgTableProps {
  readonly basic: Balance;
  readonly predicted: Balance | null;
  /** One standard deviation of the basic CG, where rows state theirs. */
  readonly sigma: { readonly cg: Vec3 | null; readonly percentMac: number | null } | null;
  /** Where the airframe's axes point. */
  readonly axes: readonly [string, string, string];
  readonly units: OutputUnits;
}

/** The CG without growth and with it, under each other. */
export function CgTable({ basic, predicted, sigma, axes, units }: CgTableProps) {
  const rows = [
    { name: 'Basic', ...basic },
    ...(predicted === null ? [] : [{ name: 'Predicted', ...predicted }]),
  ];
  const decimals = sharedDecimals(rows.flatMap(({ cg }) => cg.map((place) => fromSi(place, units.length))));
  return (
    <Table caption="CG in airframe axes from the datum">
      <thead>
        <tr>
          <ColumnHead>CG</ColumnHead>
          {(['x', 'y', 'z'] as const).map((letter, index) => (
            <ColumnHead key={letter} side="right" unit={units.length}>
              {letter} {axes[index]}
            </ColumnHead>
          ))}
          <ColumnHead side="right">% MAC</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {rows.map(({ name, cg, percentMac }) => (
          <Line key={name} {...{ name, cg, percentMac, units, decimals }} />
        ))}
        {sigma?.cg ? (
          <Line
            name="± of the basic CG"
            cg={sigma.cg}
            percentMac={sigma.percentMac}
            {...{ units, decimals }}
          />
        ) : null}
      </tbody>
    </Table>
  );
}

interface LineProps extends Balance {
  readonly name: string;
  readonly units: OutputUnits;
  readonly decimals: number;
}

function Line({ name, cg, percentMac, units, decimals }: LineProps) {
  return (
    <tr>
      <RowHead>{name}</RowHead>
      {cg.map((value, index) => (
        <Cell key={index} side="right">
          <Num value={value} unit={units.length} decimals={decimals} />
        </Cell>
      ))}
      <Cell side="right">
        <Num value={percentMac} decimals={2} />
      </Cell>
    </tr>
  );
}
