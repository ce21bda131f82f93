'use client';

import { type ReactNode } from 'react';
import { effectsOf, type State, typedMove } from '@/components/drivers/effects';
import {
  type KindOfNumber,
  kindOf,
  NumberName,
  unitOf,
  type TenUnits,
} from '@/components/drivers/number-words';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { Button } from '@/components/ui/button';
import { Cell, ColumnHead, Table } from '@/components/ui/table';
import { NumberField } from '@/components/ui/text-field';
import { TextLink } from '@/components/ui/text-link';
import { type DriverPart, type Drivers } from '@/lib/drivers/drivers';
import { TEN } from '@/lib/mass/contributions/ten';
import { type Vec3 } from '@/lib/numerics/vec3';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type Unit } from '@/lib/units/table';

interface EffectPanelProps {
  readonly drivers: Pick<Drivers, 'geometry' | 'whole' | 'by'>;
  readonly part: DriverPart;
  readonly units: TenUnits;
  /** The move as it was typed, in the length unit. */
  readonly by: readonly [string, string, string];
  readonly onBy: (by: readonly [string, string, string]) => void;
  readonly onClose: () => void;
  /** The row in its list; null for groups and items on board. */
  readonly href: string | null;
}

/** The whole without one part, and with it moved: the ten numbers and their differences, computed as it is typed. */
export function EffectPanel({ drivers, part, units, by, onBy, onClose, href }: EffectPanelProps) {
  const { axes, mac } = drivers.geometry;
  const metres = by.map((text) => typedMove(text, units.length));
  const [dx, dy, dz] = metres;
  const move: Vec3 | null =
    typeof dx === 'number' && typeof dy === 'number' && typeof dz === 'number' ? [dx, dy, dz] : null;
  const { now, removed, moved } = effectsOf(drivers, part, move);
  const others = [removed, moved];
  const decimals = decimalsByKind([now, ...others], units);
  const head = (words: string) => <ColumnHead side="right">{words}</ColumnHead>;
  return (
    <section
      aria-label={`Effect of ${part.name}`}
      className="grid min-w-0 gap-4 border border-ink-2 bg-sheet p-2 sm:p-4"
    >
      <header className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
        <h3 className="text-lead font-semibold wrap-anywhere">
          {part.name}
          {part.description === null ? null : (
            <span className="ml-2 text-body font-normal text-ink-2">{part.description}</span>
          )}
        </h3>
        <div className="flex flex-wrap items-baseline gap-x-4">
          {href === null ? null : <TextLink href={href}>Show in its list</TextLink>}
          <Button kind="quiet" onClick={onClose}>
            Close
          </Button>
        </div>
      </header>
      <fieldset className="grid gap-2">
        <legend className="mb-1 font-semibold">Move it by, along the airframe axes</legend>
        <div className="grid grid-cols-3 gap-2 sm:gap-3">
          {([0, 1, 2] as const).map((k) => (
            <NumberField
              key={k}
              name={`d${'xyz'.charAt(k)}`}
              label={`${'xyz'.charAt(k)} ${axes[k]}`}
              unit={unitLabel(units.length)}
              value={by[k]}
              placeholder="0"
              error={metres[k] === null ? 'This is not a number. Write one like -0.25.' : null}
              onChange={(event) => {
                const next: [string, string, string] = [...by];
                next[k] = event.target.value;
                onBy(next);
              }}
            />
          ))}
        </div>
        <p className="measure text-note text-ink-2">{moveWords(part, drivers.by)}</p>
      </fieldset>
      <Table caption="The whole as it is, without it, and with it moved; differences beneath. CG in airframe axes from the datum; inertia about the CG that then is, body axes; products as positive integrals.">
        <thead>
          <tr>
            <ColumnHead>Number</ColumnHead>
            {head('Now')}
            {head('Removed')}
            {head('Moved')}
          </tr>
        </thead>
        <tbody aria-live="polite">
          {TEN.map((number) => (
            <Line
              key={number}
              name={<NumberName number={number} axes={axes} />}
              unit={unitOf(number, units)}
              decimals={decimals[kindOf(number)]}
              now={now.ten?.[number] ?? null}
              others={others.map((state) => state?.ten?.[number] ?? null)}
            />
          ))}
          {mac > 0 ? (
            <Line
              name="CG"
              unit={null}
              decimals={2}
              now={now.percentMac}
              others={others.map((state) => state?.percentMac ?? null)}
            />
          ) : null}
        </tbody>
      </Table>
      {removed.ten === null ? (
        <p className="text-note text-ink-2">Without it there is no mass left, and so no CG and no tensor.</p>
      ) : null}
    </section>
  );
}

function moveWords({ image }: DriverPart, by: Drivers['by']): string {
  if (by !== 'rows') return 'A group moves as one, mirror images along with the pieces.';
  return image === null
    ? 'The row moves without turning.'
    : 'The row stands for its mirror image too: across the plane of symmetry the image moves the other way.';
}

/** Numbers of a kind share their decimals: the largest shows seven digits. */
function decimalsByKind(states: readonly (State | null)[], units: TenUnits): Record<KindOfNumber, number> {
  const of = (kinds: readonly KindOfNumber[], digits: number): number =>
    sharedDecimals(
      states.flatMap((state) =>
        TEN.flatMap((number) =>
          state?.ten && kinds.includes(kindOf(number))
            ? [fromSi(state.ten[number], unitOf(number, units))]
            : [],
        ),
      ),
      [],
      digits,
    );
  const inertia = of(['moment', 'product'], 7);
  return { mass: of(['mass'], 6), place: of(['place'], 6), moment: inertia, product: inertia };
}

interface LineProps {
  readonly name: ReactNode;
  /** Null for per cent of the chord. */
  readonly unit: Unit | null;
  readonly decimals: number;
  readonly now: number | null;
  readonly others: readonly (number | null)[];
}

function Line({ name, unit, decimals, now, others }: LineProps) {
  const shown = (value: number | null): number | null =>
    value === null || unit === null ? value : fromSi(value, unit);
  const before = shown(now);
  return (
    <tr>
      <th scope="row" className="text-left font-normal">
        {name}{' '}
        <span className="text-note text-ink-2 max-sm:block">{unit === null ? '% MAC' : unitLabel(unit)}</span>
      </th>
      <Cell side="right">
        <Num value={before} decimals={decimals} className="max-sm:text-note" />
      </Cell>
      {others.map((value, column) => {
        const after = shown(value);
        return (
          <Cell key={column} side="right">
            <Num value={after} decimals={decimals} className="max-sm:text-note" />
            {after === null || before === null ? null : (
              <div className="text-note text-ink-2">
                <Num value={after - before} decimals={decimals} plus />
              </div>
            )}
          </Cell>
        );
      })}
    </tr>
  );
}
