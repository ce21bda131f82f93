import Link from 'next/link';
import { type Momentum } from '@/components/mass/momentum-table';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { Cell, ColumnHead, RowHead, Table } from '@/components/ui/table';
import { LINK_CLASS } from '@/components/ui/text-link';
import { normVec, type Vec3 } from '@/lib/numerics/vec3';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type AngularMomentumUnit } from '@/lib/units/table';

export interface MomentumPoint {
  readonly code: string;
  readonly title: string;
  /** kg.m2/s in body axes; null where a shaft has no speed. */
  readonly total: Vec3 | null;
  /** One standard deviation of each component, where one is stated: it sets the figures shown. */
  readonly sigma: Momentum | null;
  readonly href: string;
}

interface MomentumSummaryProps {
  readonly points: readonly MomentumPoint[];
  /** Code of the point that the page shows in full. */
  readonly shown: string | null;
  readonly unit: AngularMomentumUnit;
}

/** Total angular momentum at every operating point; each leads to its rotors. */
export function MomentumSummary({ points, shown, unit }: MomentumSummaryProps) {
  const all = points.flatMap(({ total }) => (total ?? []).map((part) => fromSi(part, unit)));
  const deviations = points.flatMap(({ sigma }) => (sigma === null ? [] : [sigma.hx, sigma.hy, sigma.hz]));
  const decimals = sharedDecimals(
    all,
    deviations.map((part) => fromSi(part, unit)),
  );
  return (
    <Table caption="Angular momentum of all rotors relative to the airframe, in body axes by the right-hand rule">
      <thead>
        <tr>
          <ColumnHead>Operating point</ColumnHead>
          {['x', 'y', 'z'].map((letter) => (
            <ColumnHead key={letter} side="right" unit={unitLabel(unit)}>
              h<sub className="text-[0.83em]">{letter}</sub>
            </ColumnHead>
          ))}
          <ColumnHead side="right" unit={unitLabel(unit)}>
            Size
          </ColumnHead>
        </tr>
      </thead>
      <tbody>
        {points.map(({ code, title, total, href }) => (
          <tr key={code}>
            <RowHead>
              <Link
                href={href}
                scroll={false}
                aria-current={code === shown ? 'true' : undefined}
                className={code === shown ? 'font-semibold text-ink no-underline' : LINK_CLASS}
              >
                {title}
              </Link>
            </RowHead>
            {total === null ? (
              <Cell colSpan={4}>A shaft has no speed here, so there is no angular momentum.</Cell>
            ) : (
              [...total, normVec(total)].map((part, index) => (
                <Cell key={index} side="right">
                  <Num value={part} unit={unit} decimals={decimals} plus={index < 3} />
                </Cell>
              ))
            )}
          </tr>
        ))}
      </tbody>
    </Table>
  );
}
