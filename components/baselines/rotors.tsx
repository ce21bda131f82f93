import { MomentumTable, type RotorMomentum } from '@/components/mass/momentum-table';
import { Section } from '@/components/ui/section';
import { type PointResult } from '@/lib/loading/configuration';
import { rpm } from '@/lib/units/convert';
import { type AngularMomentumUnit } from '@/lib/units/table';

/** Angular momentum of the rotors at each operating point, as it was submitted. */
export function Rotors({
  points,
  unit,
}: {
  readonly points: readonly PointResult[];
  readonly unit: AngularMomentumUnit;
}) {
  return (
    <RotorSection
      unit={unit}
      points={points.map(({ title, momentum }) => ({
        title,
        rotors: momentum.rotors.map(({ rotor, speed, momentum: [hx, hy, hz] }) => ({
          rotor,
          rpm: rpm(speed),
          hx,
          hy,
          hz,
        })),
        total: { hx: momentum.total[0], hy: momentum.total[1], hz: momentum.total[2] },
      }))}
    />
  );
}

export interface ShownPoint {
  readonly title: string;
  readonly rotors: readonly RotorMomentum[];
  readonly total: { readonly hx: number; readonly hy: number; readonly hz: number };
}

export function RotorSection({
  points,
  unit,
}: {
  readonly points: readonly ShownPoint[];
  readonly unit: AngularMomentumUnit;
}) {
  if (points.length === 0) return null;
  return (
    <Section
      title="Rotor momenta"
      lead="The tensor counts each rotor as if it stood still; this is the extra, at each operating point."
    >
      {points.map((point) => (
        <MomentumTable
          key={point.title}
          operatingPoint={point.title}
          rotors={point.rotors}
          total={point.total}
          unit={unit}
        />
      ))}
    </Section>
  );
}
