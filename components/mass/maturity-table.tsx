'use client';

import { useState } from 'react';
import { type MaturityLine } from '@/components/mass/maturity-lines';
import { Num } from '@/components/mass/num';
import { decimalsFor } from '@/components/mass/number-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type MassByMaturity } from '@/lib/mass/roll-up';
import { fromSi } from '@/lib/units/convert';
import { type MassUnit } from '@/lib/units/table';

interface MaturityTableProps {
  readonly lines: readonly MaturityLine[];
  /** All lists together. */
  readonly whole: {
    readonly basic: number;
    readonly predicted: number;
    readonly byMaturity: MassByMaturity;
  };
  readonly unit: MassUnit;
}

const COLUMNS = [
  ['E', 'E, estimated'],
  ['C', 'C, calculated'],
  ['A', 'A, actual'],
  ['none', 'not stated'],
] as const;

const levelOf = (path: string): number => path.split('/').length - 1;
const above = (path: string): string => path.split('/').slice(0, -1).join('/');

/** How sure the mass of each group is: kg and share by maturity, the groups below one folded under it. */
export function MaturityTable({ lines, whole, unit }: MaturityTableProps) {
  const [open, setOpen] = useState<ReadonlySet<string>>(new Set());
  const parents = new Set(lines.map(({ group }) => above(group)));
  const isShown = (path: string): boolean =>
    levelOf(path) === 0 || (open.has(above(path)) && isShown(above(path)));
  const turn = (path: string): void => {
    const next = new Set(open);
    if (!next.delete(path)) next.add(path);
    setOpen(next);
  };
  const allOpen = [...parents].every((path) => path === '' || open.has(path));
  const decimals = Math.max(1, decimalsFor(fromSi(whole.basic, unit), 5));
  return (
    <div className="grid min-w-0 gap-2">
      {parents.size > 1 ? (
        <div className="no-print">
          <button
            type="button"
            className="cursor-pointer underline decoration-1 underline-offset-4"
            onClick={() => setOpen(allOpen ? new Set() : new Set(parents))}
          >
            {allOpen ? 'Fold all groups' : 'Unfold all groups'}
          </button>
        </div>
      ) : null}
      <Table
        caption="Basic mass by maturity: what it is, and its share of the group. Growth is of rows that state none"
        tall
      >
        <thead>
          <tr>
            <ColumnHead>Group</ColumnHead>
            {COLUMNS.map(([code, words]) => (
              <ColumnHead key={code} side="right" unit={unit}>
                {words}
              </ColumnHead>
            ))}
            <ColumnHead side="right" unit={unit}>
              Basic
            </ColumnHead>
            <ColumnHead side="right" unit={unit}>
              Predicted
            </ColumnHead>
            <ColumnHead>Growth allowance and its rule</ColumnHead>
          </tr>
        </thead>
        <tbody>
          {lines
            .filter(({ group }) => isShown(group))
            .map((line) => (
              <tr key={line.group}>
                <RowHead>
                  <span style={{ paddingInlineStart: `${levelOf(line.group)}rem` }}>
                    {parents.has(line.group) ? (
                      <button
                        type="button"
                        aria-expanded={open.has(line.group)}
                        className="cursor-pointer text-left"
                        onClick={() => turn(line.group)}
                      >
                        <span aria-hidden="true" className="num inline-block w-4 text-ink-2">
                          {open.has(line.group) ? '\u2212' : '+'}
                        </span>
                        {line.group.split('/').at(-1)}
                      </button>
                    ) : (
                      <span className="pl-4">{line.group.split('/').at(-1)}</span>
                    )}
                  </span>
                </RowHead>
                <Figures {...line} {...{ unit, decimals }} />
                <Cell className="text-note text-ink-2">{line.rule}</Cell>
              </tr>
            ))}
        </tbody>
        <tfoot>
          <tr>
            <RowHead>All lists</RowHead>
            <Figures {...whole} {...{ unit, decimals }} />
            <Cell />
          </tr>
        </tfoot>
      </Table>
    </div>
  );
}

function Figures({
  basic,
  predicted,
  byMaturity,
  unit,
  decimals,
}: MaturityTableProps['whole'] & { readonly unit: MassUnit; readonly decimals: number }) {
  return (
    <>
      {COLUMNS.map(([code]) => (
        <Cell key={code} side="right">
          <Num value={byMaturity[code] === 0 ? null : byMaturity[code]} unit={unit} decimals={decimals} />
          <span className="block text-note text-ink-2">
            {basic > 0 && byMaturity[code] !== 0 ? (
              <>
                <Num value={(100 * byMaturity[code]) / basic} decimals={1} /> %
              </>
            ) : null}
          </span>
        </Cell>
      ))}
      <Cell side="right">
        <Num value={basic} unit={unit} decimals={decimals} />
      </Cell>
      <Cell side="right">
        <Num value={predicted} unit={unit} decimals={decimals} />
      </Cell>
    </>
  );
}
