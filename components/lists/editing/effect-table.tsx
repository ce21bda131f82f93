'use client';

import { memo } from 'react';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type EffectFigures } from '@/lib/editing/effect-figures';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { unitLabel } from '@/lib/units/names';

interface EffectTableProps {
  readonly before: EffectFigures;
  readonly after: EffectFigures;
  /** The revision that the edits are made from. */
  readonly base: number;
  readonly declarations: ListDeclarations;
}

/** What the edits do to the sums of the list, before anything is saved. */
export const EffectTable = memo(function EffectTable(props: EffectTableProps) {
  const { before, after, base, declarations } = props;
  const { massUnit, lengthUnit, inertiaUnit, axes } = declarations;
  const lines: Line[] = [
    { name: 'Mass', unit: unitLabel(massUnit), before: before.mass, after: after.mass },
    ...([0, 1, 2] as const).map((at) => ({
      name: `CG ${'xyz'[at] ?? ''} ${axes[at]}`,
      unit: unitLabel(lengthUnit),
      before: before.cg?.[at] ?? null,
      after: after.cg?.[at] ?? null,
    })),
    ...(['ixx', 'iyy', 'izz', 'ixy', 'ixz', 'iyz'] as const).map((name) => ({
      name: `I${name.slice(1)}`,
      unit: unitLabel(inertiaUnit),
      before: before.inertia?.[name] ?? null,
      after: after.inertia?.[name] ?? null,
    })),
  ];
  return (
    <div className="grid gap-2">
      <Table caption="What the edits do to the list" captionHidden>
        <thead>
          <tr>
            <ColumnHead>Sum</ColumnHead>
            <ColumnHead side="right">{`Revision ${base}`}</ColumnHead>
            <ColumnHead side="right">As edited</ColumnHead>
            <ColumnHead side="right">Difference</ColumnHead>
          </tr>
        </thead>
        <tbody>
          {lines.map((line) => (
            <EffectLine key={line.name} {...line} />
          ))}
        </tbody>
      </Table>
      <p className="measure text-note text-ink-2">
        Without growth. CG in the axes of the list; inertia about that CG in body axes (x forward, y right, z
        down), products: positive integrals.
      </p>
    </div>
  );
});

interface Line {
  readonly name: string;
  readonly unit: string;
  readonly before: number | null;
  readonly after: number | null;
}

function EffectLine({ name, unit, before, after }: Line) {
  const decimals = sharedDecimals([before ?? 0, after ?? 0]);
  const difference = before === null || after === null ? null : after - before;
  return (
    <tr>
      <RowHead>
        {name} <span className="text-ink-2">{unit}</span>
      </RowHead>
      <Cell side="right">
        <Num value={before} decimals={decimals} />
      </Cell>
      <Cell side="right">
        <Num value={after} decimals={decimals} />
      </Cell>
      <Cell side="right" className={difference === 0 ? 'text-ink-2' : 'font-semibold'}>
        {difference === 0 ? 'none' : <Num value={difference} decimals={decimals} plus />}
      </Cell>
    </tr>
  );
}
