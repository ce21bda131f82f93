import { Num } from '@/components/mass/num';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';
import { type Moments } from '@/lib/frames/products';
import { type MassResult } from '@/lib/mass/result';

interface Side {
  readonly rows: number;
  readonly basic: MassResult;
}

export interface GroupChangeLine {
  /** '' for the whole list. */
  readonly group: string;
  readonly before: Side | null;
  readonly after: Side | null;
}

interface GroupChangeTableProps {
  readonly whole: GroupChangeLine;
  readonly groups: readonly GroupChangeLine[];
  readonly hrefOf: (group: string) => string;
}

const MOMENTS = ['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const satisfies readonly (keyof Moments)[];
const AXES = ['x', 'y', 'z'] as const;

/** What a change did to mass, CG and tensor, basic: the whole first, then the groups that it touched. */
export function GroupChangeTable({ whole, groups, hrefOf }: GroupChangeTableProps) {
  return (
    <Table caption="Differences by group, after less before" captionHidden>
      <thead>
        <tr>
          <ColumnHead>Group</ColumnHead>
          <ColumnHead side="right">Rows</ColumnHead>
          <ColumnHead side="right">Mass before, kg</ColumnHead>
          <ColumnHead side="right">Mass after, kg</ColumnHead>
          <ColumnHead side="right">Mass, kg</ColumnHead>
          {AXES.map((axis) => (
            <ColumnHead key={axis} side="right">{`CG ${axis}, m`}</ColumnHead>
          ))}
          {MOMENTS.map((moment) => (
            <ColumnHead key={moment} side="right">{`I${moment.slice(1)}, kg·m²`}</ColumnHead>
          ))}
        </tr>
      </thead>
      <tbody>
        <Line line={whole} name="Whole list" />
        {groups.map((line) => (
          <Line
            key={line.group}
            line={line}
            name={<TextLink href={hrefOf(line.group)}>{line.group}</TextLink>}
          />
        ))}
      </tbody>
    </Table>
  );
}

function Line({
  line: { before, after },
  name,
}: {
  readonly line: GroupChangeLine;
  readonly name: React.ReactNode;
}) {
  const [old, now] = [before?.basic ?? null, after?.basic ?? null];
  const cg = (k: 0 | 1 | 2): number | null => difference(old?.properties?.cg[k], now?.properties?.cg[k]);
  return (
    <tr>
      <RowHead>{name}</RowHead>
      <Difference value={(after?.rows ?? 0) - (before?.rows ?? 0)} digits={9} />
      <Cell side="right">
        <Num value={old?.mass ?? null} />
      </Cell>
      <Cell side="right">
        <Num value={now?.mass ?? null} />
      </Cell>
      <Difference value={(now?.mass ?? 0) - (old?.mass ?? 0)} />
      <Difference value={cg(0)} />
      <Difference value={cg(1)} />
      <Difference value={cg(2)} />
      {MOMENTS.map((moment) => (
        <Difference
          key={moment}
          value={difference(old?.properties?.inertia[moment], now?.properties?.inertia[moment])}
        />
      ))}
    </tr>
  );
}

/** Null where one of the two has none: a group that is new or gone has no CG to compare. */
function difference(before: number | undefined, after: number | undefined): number | null {
  return before === undefined || after === undefined ? null : after - before;
}

function Difference({ value, digits = 4 }: { readonly value: number | null; readonly digits?: number }) {
  return (
    <Cell side="right">
      <Num value={value} digits={digits} plus={value !== null && value !== 0} />
    </Cell>
  );
}
