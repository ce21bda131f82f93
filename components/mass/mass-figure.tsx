import { type ReactNode } from 'react';
import { Num } from '@/components/mass/num';
import { decimalsFor } from '@/components/mass/number-text';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type MassUnit } from '@/lib/units/table';

interface MassFigureProps {
  /** Of what, e.g. "Basic mass". */
  readonly label: string;
  /** kg. */
  readonly mass: number;
  /** With growth allowance, kg. */
  readonly predicted?: number | null;
  /** 1 sigma, kg. */
  readonly sigma?: number;
  /** 1 sigma of the predicted mass, kg. */
  readonly predictedSigma?: number;
  readonly unit?: MassUnit;
  readonly children?: ReactNode;
}

/** The one large number of a page: total mass, predicted beneath. */
export function MassFigure({
  label,
  mass,
  predicted,
  sigma,
  predictedSigma,
  unit = 'kg',
  children,
}: MassFigureProps) {
  const decimals = sigma ? decimalsFor(fromSi(sigma, unit), 2) : decimalsFor(fromSi(mass, unit), 6);
  return (
    <div className="grid content-start gap-1">
      <p className="text-ink-2">{label}</p>
      <p className="flex flex-wrap items-baseline gap-x-2">
        <Num value={mass} unit={unit} decimals={decimals} className="text-total" />
        <span className="text-lead">{unitLabel(unit)}</span>
        {sigma ? (
          <span className="text-ink-2">
            ± <Num value={sigma} unit={unit} decimals={decimals} />
          </span>
        ) : null}
      </p>
      {predicted === undefined || predicted === null ? null : (
        <p className="text-lead">
          <Num value={predicted} unit={unit} decimals={decimals} /> {unitLabel(unit)} predicted, with growth
          {predictedSigma ? (
            <span className="text-ink-2">
              {' '}
              ±&nbsp;
              <Num value={predictedSigma} unit={unit} decimals={decimals} />
            </span>
          ) : null}
        </p>
      )}
      {children}
    </div>
  );
}
