import { SpinSketch } from '@/components/rotors/spin-sketch';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { type RotorTexts, rotorFromTexts } from '@/lib/ingest/one-rotor';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { angularMomentum, shaftsWithoutSpeed } from '@/lib/rotors/momentum';
import { type OperatingPoint, type Rotor } from '@/lib/rotors/rotor';
import { bodySpin, senseInWords } from '@/lib/rotors/words';
import { rpm } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';

interface RotorPreviewProps {
  /** Null while something typed is wrong. */
  readonly rotor: Rotor | null;
  readonly texts: RotorTexts;
  readonly points: readonly OperatingPoint[];
  readonly geometry: Pick<AirframeGeometry, 'axes' | 'incidence'>;
}

/** What the typed rotor means: its spin arrow in body axes, the sense in words, its angular momentum at each operating point. */
export function RotorPreview({ rotor, texts, points, geometry }: RotorPreviewProps) {
  const axis = (rotor ?? axisAlone(texts))?.axis;
  const spin = axis && bodySpin(axis, geometry);
  return (
    <section
      aria-label="What it means"
      className="grid min-w-0 content-start gap-4 border-t border-ink-2 pt-3"
    >
      <h2 className="text-section font-semibold">What it means</h2>
      {spin === undefined ? (
        <p className="text-ink-2">Give the axis and the sense, and the arrow is drawn here.</p>
      ) : (
        <>
          <SpinSketch spin={spin} label={`Spin arrow: ${senseInWords(spin).toLowerCase()}`} />
          <p>
            {senseInWords(spin)}. Unit arrow in body axes, x forward, y right, z down, right-hand rule:{' '}
            {spin.map((part, k) => (
              <span key={k} className="whitespace-nowrap">
                {k > 0 ? ', ' : ''}
                <Num value={part} decimals={4} plus />
              </span>
            ))}
            .
          </p>
        </>
      )}
      {rotor === null ? (
        <p className="text-ink-2">Its angular momentum follows once every field can be read.</p>
      ) : (
        <>
          <p className="text-ink-2">
            Polar inertia <Num value={rotor.polarInertia} digits={6} /> kg·m²
          </p>
          <Momenta rotor={rotor} points={points} geometry={geometry} />
        </>
      )}
    </section>
  );
}

/** The axis can be read before the rest is typed. */
function axisAlone({ axis_x, axis_y, axis_z, axis_yaw, axis_pitch, sense }: RotorTexts): Rotor | null {
  const given = { axis_x, axis_y, axis_z, axis_yaw, axis_pitch, sense };
  const texts = Object.fromEntries(Object.entries(given).filter(([, text]) => text !== undefined));
  return rotorFromTexts({ ...texts, rotor: 'axis', polar_inertia: '1' }, 'kg.m2').rotor;
}

function Momenta({
  rotor,
  points,
  geometry,
}: Pick<RotorPreviewProps, 'points' | 'geometry'> & { readonly rotor: Rotor }) {
  if (points.length === 0)
    return <p className="text-ink-2">There is no operating point yet that gives it a speed.</p>;
  const lines = points.map((point) => ({
    point,
    alone: shaftsWithoutSpeed([rotor], point).length > 0 ? null : angularMomentum([rotor], point, geometry),
  }));
  if (lines.every(({ alone }) => alone === null))
    return (
      <p className="text-caution">
        No operating point gives the shaft {rotor.shaft} a speed. Angular momentum needs one at every point.
      </p>
    );
  const decimals = sharedDecimals(lines.flatMap(({ alone }) => [...(alone?.total ?? [])]));
  return (
    <Table caption={`Angular momentum of this rotor alone, body axes, ${unitLabel('kg.m2/s')}`}>
      <thead>
        <tr>
          <ColumnHead>Point</ColumnHead>
          <ColumnHead side="right" unit="rpm">
            Rotor
          </ColumnHead>
          {['x', 'y', 'z'].map((letter) => (
            <ColumnHead key={letter} side="right">
              h<sub className="text-[0.83em]">{letter}</sub>
            </ColumnHead>
          ))}
        </tr>
      </thead>
      <tbody>
        {lines.map(({ point, alone }) => (
          <tr key={point.code}>
            <RowHead>{point.title}</RowHead>
            <Cell side="right">
              <Num value={alone === null ? null : rpm(alone.rotors[0]?.speed ?? NaN)} decimals={1} />
            </Cell>
            {[0, 1, 2].map((k) => (
              <Cell key={k} side="right">
                <Num value={alone?.total[k] ?? null} decimals={decimals} plus />
              </Cell>
            ))}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
