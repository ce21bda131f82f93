import { Num } from '@/components/mass/num';
import { decimalsFor, typedDecimals } from '@/components/mass/number-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { TextLink } from '@/components/ui/text-link';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type Rotor } from '@/lib/rotors/rotor';
import { axisAsGiven, bodySpin, senseInWords } from '@/lib/rotors/words';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type InertiaUnit } from '@/lib/units/table';

interface RotorTableProps {
  readonly rotors: readonly Rotor[];
  readonly geometry: Pick<AirframeGeometry, 'axes' | 'incidence'>;
  readonly unit: InertiaUnit;
  /** Code of the program, for the way to the rows that carry the mass. */
  readonly program: string;
  /** The form of a rotor; null where it cannot be changed. */
  readonly editHref: string | null;
}

/** The rotors with their axes as given and as the spin that they mean in body axes. */
export function RotorTable({ rotors, geometry, unit, program, editHref }: RotorTableProps) {
  const inertias = rotors.map(({ polarInertia }) => fromSi(polarInertia, unit));
  const decimals = decimalsFor(Math.min(...inertias), 3);
  const ratioDecimals = Math.max(...rotors.map(({ gearRatio }) => Math.min(6, typedDecimals(gearRatio))));
  return (
    <Table caption="A positive speed turns by the right-hand rule about the spin direction, a unit arrow in body axes: x forward, y right, z down">
      <thead>
        <tr>
          <ColumnHead>Rotor</ColumnHead>
          <ColumnHead side="right" unit={unitLabel(unit)}>
            Polar inertia
          </ColumnHead>
          <ColumnHead>Sense</ColumnHead>
          <ColumnHead side="right">Spin x</ColumnHead>
          <ColumnHead side="right">y</ColumnHead>
          <ColumnHead side="right">z</ColumnHead>
          <ColumnHead>Axis as given</ColumnHead>
          <ColumnHead>Shaft</ColumnHead>
          <ColumnHead side="right">Gear ratio</ColumnHead>
          <ColumnHead side="right">Blades</ColumnHead>
          <ColumnHead>Mass in</ColumnHead>
          {editHref === null ? null : (
            <ColumnHead>
              <span className="sr-only">Change</span>
            </ColumnHead>
          )}
        </tr>
      </thead>
      <tbody>
        {rotors.map((rotor) => {
          const spin = bodySpin(rotor.axis, geometry);
          return (
            <tr key={rotor.rotor}>
              <RowHead>
                {rotor.rotor}
                <Remarks rotor={rotor} />
              </RowHead>
              <Cell side="right">
                <Num value={rotor.polarInertia} unit={unit} decimals={decimals} />
              </Cell>
              <Cell className="min-w-28">{senseInWords(spin)}</Cell>
              {spin.map((part, index) => (
                <Cell key={index} side="right">
                  <Num value={part} decimals={4} plus />
                </Cell>
              ))}
              <Cell className="min-w-32">{axisAsGiven(rotor.axis)}</Cell>
              <Cell>{rotor.shaft}</Cell>
              <Cell side="right">
                <Num value={rotor.gearRatio} decimals={ratioDecimals} />
              </Cell>
              <Cell side="right">
                <Num value={rotor.blades} decimals={0} />
              </Cell>
              <Cell className="min-w-28">
                {rotor.component === null ? '' : <Carrier component={rotor.component} program={program} />}
              </Cell>
              {editHref === null ? null : (
                <Cell>
                  <TextLink href={`${editHref}?rotor=${encodeURIComponent(rotor.rotor)}`}>
                    Change<span className="sr-only"> {rotor.rotor}</span>
                  </TextLink>
                </Cell>
              )}
            </tr>
          );
        })}
      </tbody>
    </Table>
  );
}

/** Group and note beneath the name: a column of their own would not fit a desk screen. */
function Remarks({ rotor: { group, note } }: { readonly rotor: Rotor }) {
  const words = [group, note].filter(Boolean).join(': ');
  return words === '' ? null : <div className="max-w-72 text-note text-ink-2">{words}</div>;
}

/** `list/item`, as a link to that row of the list. */
function Carrier({ component, program }: { readonly component: string; readonly program: string }) {
  const at = component.indexOf('/');
  const [list, item] = [component.slice(0, at), component.slice(at + 1)];
  const query = new URLSearchParams({ find: item });
  return (
    <TextLink href={`/programs/${program}/lists/${list}?${query.toString()}#rows`}>{component}</TextLink>
  );
}
