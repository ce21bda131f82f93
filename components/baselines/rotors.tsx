import { type ReactNode } from 'react';
import { type Momentum, MomentumTable, type RotorMomentum } from '@/components/mass/momentum-table';
import { statedSigma } from '@/components/rotors/stated-sigma';
import { Section } from '@/components/ui/section';
import { type PointResult } from '@/lib/loading/configuration';
import { rpm } from '@/lib/units/convert';
import { type AngularMomentumUnit } from '@/lib/units/table';

/** Angular momentum of the rotors at one operating point, as it was submitted; `choice` leads to the other points. */
export function Rotors({
  point,
  choice,
  unit,
}: {
  readonly point: PointResult | null;
  readonly choice: ReactNode;
  readonly unit: AngularMomentumUnit;
}) {
  return (
    <RotorSection
      unit={unit}
      choice={choice}
      points={(point === null ? [] : [point]).map(({ title, momentum, uncertainty }) => ({
        title,
        sigma: statedSigma(uncertainty ?? null),
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
  readonly total: Momentum;
  /** One standard deviation of the sum, where one is stated. */
  readonly sigma: Momentum | null;
}

export function RotorSection({
  points,
  unit,
  choice,
}: {
  readonly choice?: ReactNode;
  readonly points: readonly ShownPoint[];
  readonly unit: AngularMomentumUnit;
}) {
  if (points.length === 0) return null;
  return (
    <Section
      title="Rotor momenta"
      lead="The tensor counts each rotor as if locked to the airframe; this is the extra."
    >
      {choice}
      {points.map((point) => (
        <div key={point.title} className="keep-together">
          <MomentumTable
            operatingPoint={point.title}
            rotors={point.rotors}
            total={point.total}
            sigma={point.sigma}
            unit={unit}
          />
        </div>
      ))}
    </Section>
  );
}
