import { type ReactNode } from 'react';
import { Num } from '@/components/mass/num';
import { decimalsFor } from '@/components/mass/number-text';
import { InertiaSymbol } from '@/components/mass/tensor-plate';
import { PRODUCT_ORDER } from '@/components/mass/tensor-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type Change, type ConditionChange, type PointChange } from '@/lib/baselines/compare';
import { INCLINATION_SENSES } from '@/lib/mass/inclination';
import { degrees, fromSi } from '@/lib/units/convert';
import { type OutputUnits, unitLabel } from '@/lib/units/names';

interface Line {
  readonly key: string;
  readonly name: ReactNode;
  readonly unit: string;
  /** As it is to be shown. */
  readonly change: Change;
  /** What a plus and a minus mean, where the number alone does not tell. */
  readonly signs?: readonly [string, string];
}

interface ChangeTableProps {
  readonly change: ConditionChange;
  readonly units: OutputUnits;
  readonly before: string;
  readonly after: string;
}

const converted = ({ before, after, delta }: Change, by: (value: number) => number): Change => ({
  before: before === null ? null : by(before),
  after: after === null ? null : by(after),
  delta: delta === null ? null : by(delta),
});

/** What changed in one condition: mass, CG, each moment and product, the principal axis. */
export function ChangeTable({ change, units, before, after }: ChangeTableProps) {
  const mass = (value: number) => fromSi(value, units.mass);
  const length = (value: number) => fromSi(value, units.length);
  const inertia = (value: number) => fromSi(value, units.inertia);
  const lines: Line[] = [
    { key: 'mass', name: 'Mass', unit: unitLabel(units.mass), change: converted(change.mass, mass) },
    {
      key: 'predicted',
      name: 'Predicted mass',
      unit: unitLabel(units.mass),
      change: converted(change.predictedMass, mass),
    },
    ...(['x', 'y', 'z'] as const).map((axis) => ({
      key: `cg${axis}`,
      name: `CG ${axis}`,
      unit: unitLabel(units.length),
      change: converted(change.cg[axis], length),
    })),
    { key: 'mac', name: 'CG', unit: '% MAC', change: change.percentMac },
    ...PRODUCT_ORDER.map((symbol) => ({
      key: symbol,
      name: <InertiaSymbol symbol={symbol} />,
      unit: unitLabel(units.inertia),
      change: converted(change.inertia[symbol], inertia),
    })),
    {
      key: 'inclination',
      name: 'Principal axis',
      unit: 'degrees',
      change: converted(change.inclination, degrees),
      signs: INCLINATION_SENSES,
    },
  ];
  return (
    <Changes
      caption={`${change.title}: CG in airframe axes, inertia about the CG in body axes, products as positive integrals`}
      lines={lines}
      before={before}
      after={after}
    />
  );
}

interface MomentumChangeTableProps {
  readonly points: readonly PointChange[];
  readonly units: OutputUnits;
  readonly before: string;
  readonly after: string;
}

/** What changed in the angular momentum of the rotors, at each operating point. */
export function MomentumChangeTable({ points, units, before, after }: MomentumChangeTableProps) {
  const lines = points.flatMap(({ code, title, h }) =>
    (['x', 'y', 'z'] as const).map((axis) => ({
      key: `${code}-${axis}`,
      name: (
        <>
          {title}, h<sub className="text-[0.83em]">{axis}</sub>
        </>
      ),
      unit: unitLabel(units.angularMomentum),
      change: converted(h[axis], (value) => fromSi(value, units.angularMomentum)),
    })),
  );
  return (
    <Changes
      caption="Spin angular momentum of all rotors in body axes, right-hand rule"
      lines={lines}
      before={before}
      after={after}
    />
  );
}

function Changes({
  caption,
  lines,
  before,
  after,
}: {
  readonly caption: string;
  readonly lines: readonly Line[];
  readonly before: string;
  readonly after: string;
}) {
  const decimals = lines.map(({ change }) =>
    Math.min(6, decimalsFor(Math.max(Math.abs(change.before ?? 0), Math.abs(change.after ?? 0)), 6)),
  );
  const padTo = Math.max(0, ...decimals);
  return (
    <Table caption={caption}>
      <thead>
        <tr>
          <ColumnHead>Quantity</ColumnHead>
          <ColumnHead side="right">Change</ColumnHead>
          <ColumnHead side="right">{before}</ColumnHead>
          <ColumnHead side="right">{after}</ColumnHead>
        </tr>
      </thead>
      <tbody>
        {lines.map(({ key, name, unit, change, signs }, index) => {
          const shown = { decimals: decimals[index] ?? 0, padTo };
          return (
            <tr key={key}>
              <RowHead>
                {name} <span className="text-ink-2">{unit}</span>
              </RowHead>
              <Cell side="right" className="whitespace-nowrap">
                {change.delta === 0 ? (
                  <span className="text-ink-2">no change</span>
                ) : (
                  <Signed value={change.delta} signs={signs} shown={{ ...shown, plus: true }} />
                )}
              </Cell>
              {[change.before, change.after].map((value, side) => (
                <Cell key={side} side="right" className="whitespace-nowrap">
                  <Signed value={value} signs={signs} shown={shown} />
                </Cell>
              ))}
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}

/** A number with its sign, or its size with the sign in words. */
function Signed({
  value,
  signs,
  shown,
}: {
  readonly value: number | null;
  readonly signs: readonly [string, string] | undefined;
  readonly shown: { readonly decimals: number; readonly padTo: number; readonly plus?: boolean };
}) {
  if (signs === undefined || value === null || value === 0) return <Num value={value} {...shown} />;
  return (
    <>
      <span className="text-note text-ink-2">{value > 0 ? signs[0] : signs[1]}</span>{' '}
      <Num value={Math.abs(value)} decimals={shown.decimals} padTo={shown.padTo} />
    </>
  );
}
