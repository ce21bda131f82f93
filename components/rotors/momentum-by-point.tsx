import { MomentumTable } from '@/components/mass/momentum-table';
import { GyroPlate } from '@/components/rotors/gyro-plate';
import { MomentumSummary } from '@/components/rotors/momentum-summary';
import { classes } from '@/components/ui/classes';
import { type AngularMomentum } from '@/lib/rotors/momentum';
import { rpm } from '@/lib/units/convert';
import { statedSigma } from '@/components/rotors/stated-sigma';
import { type MomentumUncertainty } from '@/lib/rotors/uncertainty';
import { type AngularMomentumUnit } from '@/lib/units/table';

export interface PointOnPage {
  readonly code: string;
  readonly title: string;
  /** Null where a shaft has no speed. */
  readonly momentum: AngularMomentum | null;
  /** Absent in results that were stored before it was kept. */
  readonly uncertainty?: MomentumUncertainty | null;
  readonly href: string;
}

interface MomentumByPointProps {
  readonly points: readonly PointOnPage[];
  /** The point that the address asks for; the first one otherwise. */
  readonly asked: string | null;
  readonly unit: AngularMomentumUnit;
  /** The matrix beneath the table, where the page gives them less than its width. */
  readonly stacked?: boolean;
}

/** Angular momentum of every operating point, and one of them by rotor with its gyroscopic matrix. */
export function MomentumByPoint({ points, asked, unit, stacked = false }: MomentumByPointProps) {
  const shown = points.find(({ code }) => code === asked) ?? points[0];
  const momentum = shown?.momentum ?? null;
  return (
    <div className="grid min-w-0 gap-6">
      <MomentumSummary
        points={points.map((point) => ({
          ...point,
          total: point.momentum?.total ?? null,
          sigma: statedSigma(point.uncertainty ?? null),
        }))}
        shown={shown?.code ?? null}
        unit={unit}
      />
      {shown === undefined || momentum === null ? null : (
        <div className={classes('grid min-w-0 items-start gap-6', !stacked && 'lg:grid-cols-2')}>
          <MomentumTable
            operatingPoint={shown.title}
            rotors={momentum.rotors.map((part) => ({
              rotor: part.rotor,
              rpm: rpm(part.speed),
              ...named(part.momentum),
            }))}
            total={named(momentum.total)}
            sigma={statedSigma(shown.uncertainty ?? null)}
            unit={unit}
          />
          <GyroPlate matrix={momentum.gyroMatrix} unit={unit} of={shown.title} />
        </div>
      )}
    </div>
  );
}

function named([hx, hy, hz]: readonly [number, number, number]) {
  return { hx, hy, hz };
}
