import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type MassResult } from '@/lib/mass/result';
import { groupBranches, type RollUp } from '@/lib/mass/roll-up';
import { fromSi } from '@/lib/units/convert';
import { type OutputUnits } from '@/lib/units/names';

interface GroupTableProps {
  readonly rollUp: RollUp;
  readonly geometry: AirframeGeometry;
  readonly units: OutputUnits;
  /** Every level of the groups' paths, not only the first. */
  readonly all: boolean;
}

/** Mass by group: basic, share of the whole, predicted, CG. A group holds everything below it. */
export function GroupTable({ rollUp, geometry, units, all }: GroupTableProps) {
  const groups = groupBranches(rollUp.groups, geometry)
    .map((group) => ({ ...group, path: group.group.split('/') }))
    .filter(({ path }) => all || path.length === 1);
  const whole = rollUp.basic.mass;
  const masses = [rollUp.basic.mass, rollUp.predicted.mass].map((mass) => fromSi(mass, units.mass));
  const shared = {
    whole,
    units,
    massDecimals: sharedDecimals(masses),
    decimals: sharedDecimals(
      (rollUp.basic.properties?.cg ?? []).map((value) => fromSi(value, units.length)),
      [],
      5,
    ),
  };
  const hasItems = rollUp.onBoard.mass !== 0;
  return (
    <Table caption="A group holds everything below it. CG in airframe axes from the datum" tall={all}>
      <thead>
        <tr>
          <ColumnHead>Group</ColumnHead>
          <ColumnHead side="right">Rows</ColumnHead>
          <ColumnHead side="right" unit={units.mass}>
            Basic
          </ColumnHead>
          <ColumnHead side="right" unit="%">
            Share
          </ColumnHead>
          <ColumnHead side="right" unit={units.mass}>
            Predicted
          </ColumnHead>
          <ColumnHead side="right" unit="%">
            Growth
          </ColumnHead>
          {(['x', 'y', 'z'] as const).map((letter, index) => (
            <ColumnHead key={letter} side="right" unit={units.length}>
              {letter} {geometry.axes[index]}
            </ColumnHead>
          ))}
        </tr>
      </thead>
      <tbody>
        {groups.map(({ group, path, rows, basic, predicted }) => (
          <tr key={group}>
            <RowHead>
              <Indent levels={path.length - 1} />
              {path.at(-1)}
            </RowHead>
            <Figures rows={rows} {...{ basic, predicted }} {...shared} />
          </tr>
        ))}
        {hasItems ? (
          <tr>
            <RowHead>Items on board</RowHead>
            <Figures rows={null} basic={rollUp.onBoard} predicted={rollUp.onBoard} {...shared} />
          </tr>
        ) : null}
      </tbody>
      <tfoot>
        <tr>
          <RowHead>All</RowHead>
          <Figures rows={rollUp.rows} basic={rollUp.basic} predicted={rollUp.predicted} {...shared} />
        </tr>
      </tfoot>
    </Table>
  );
}

function Indent({ levels }: { readonly levels: number }) {
  return Array.from({ length: levels }, (_, level) => (
    <span key={level} aria-hidden="true" className="inline-block w-4" />
  ));
}

interface FiguresProps {
  readonly rows: number | null;
  readonly basic: MassResult;
  readonly predicted: MassResult;
  readonly whole: number;
  readonly units: OutputUnits;
  readonly massDecimals: number;
  readonly decimals: number;
}

function Figures({ rows, basic, predicted, whole, units, massDecimals, decimals }: FiguresProps) {
  const growth = basic.mass === 0 ? null : 100 * (predicted.mass / basic.mass - 1);
  return (
    <>
      <Cell side="right">
        <Num value={rows} decimals={0} />
      </Cell>
      <Cell side="right">
        <Num value={basic.mass} unit={units.mass} decimals={massDecimals} />
      </Cell>
      <Cell side="right">
        <Num value={whole > 0 ? (100 * basic.mass) / whole : null} decimals={1} />
      </Cell>
      <Cell side="right">
        <Num value={predicted.mass} unit={units.mass} decimals={massDecimals} />
      </Cell>
      <Cell side="right">
        <Num value={growth === null || Math.abs(growth) < 1e-9 ? growth && 0 : growth} decimals={1} />
      </Cell>
      {[0, 1, 2].map((index) => (
        <Cell key={index} side="right">
          <Num value={basic.properties?.cg[index] ?? null} unit={units.length} decimals={decimals} />
        </Cell>
      ))}
    </>
  );
}
