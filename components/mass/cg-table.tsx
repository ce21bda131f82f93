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

interface Deviation {
  readonly cg: Vec3 | null;
  readonly percentMac: number | null;
}

interface CgTableProps {
  readonly basic: Balance;
  readonly predicted: Balance | null;
  /** One standard deviation of the basic CG and of the predicted one, where rows state theirs. */
  readonly sigma: Deviation | null;
  readonly predictedSigma?: Deviation | null;
  /** Where the airframe's axes point. */
  readonly axes: readonly [string, string, string];
  readonly units: OutputUnits;
}

/** The CG without growth and with it, under each other. */
export function CgTable({ basic, predicted, sigma, predictedSigma = null, axes, units }: CgTableProps) {
  const deviation = (name: string, of: Deviation | null) =>
    of === null || of.cg === null ? [] : [{ name, cg: of.cg, percentMac: of.percentMac }];
  const deviations = [
    ...deviation('± of the basic CG', sigma),
    ...(predicted === null ? [] : deviation('± of the predicted CG', predictedSigma)),
  ];
  const rows = [
    { name: 'Basic', ...basic },
    ...(predicted === null ? [] : [{ name: 'Predicted', ...predicted }]),
  ];
  const inUnit = (of: readonly Balance[]): number[] =>
    of.flatMap(({ cg }) => cg.map((place) => fromSi(place, units.length)));
  const decimals = sharedDecimals(inUnit(rows), inUnit(deviations));
  const alongChord = deviations.flatMap(({ percentMac }) => (percentMac === null ? [] : [percentMac]));
  const percentDecimals = alongChord.some((each) => each > 0) ? sharedDecimals([], alongChord) : 2;
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
        {[...rows, ...deviations].map(({ name, cg, percentMac }) => (
          <Line key={name} {...{ name, cg, percentMac, units, decimals, percentDecimals }} />
        ))}
      </tbody>
    </Table>
  );
}

interface LineProps extends Balance {
  readonly name: string;
  readonly units: OutputUnits;
  readonly decimals: number;
  readonly percentDecimals: number;
}

function Line({ name, cg, percentMac, units, decimals, percentDecimals }: LineProps) {
  return (
    <tr>
      <RowHead>{name}</RowHead>
      {cg.map((value, index) => (
        <Cell key={index} side="right">
          <Num value={value} unit={units.length} decimals={decimals} />
        </Cell>
      ))}
      <Cell side="right">
        <Num value={percentMac} decimals={percentDecimals} />
      </Cell>
    </tr>
  );
}
