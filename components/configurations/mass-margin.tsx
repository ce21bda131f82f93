import { Num } from '@/components/mass/num';
import { decimalsFor } from '@/components/mass/number-text';
import { SeverityMark } from '@/components/ui/severity';
import { fromSi } from '@/lib/units/convert';
import { type MassUnit } from '@/lib/units/table';

interface MassMarginProps {
  /** kg. */
  readonly basic: number;
  readonly predicted: number;
  readonly limit: { readonly value: number; readonly kind: string; readonly source: string };
  readonly unit: MassUnit;
}

/** How far a mass is from the program's maximum; more than it is told in words and by its mark. */
export function MassMargin({ basic, predicted, limit, unit }: MassMarginProps) {
  const decimals = decimalsFor(fromSi(limit.value, unit), 6);
  const [margin, predictedMargin] = [limit.value - basic, limit.value - predicted];
  return (
    <div className="grid gap-0.5 text-note text-ink-2">
      <p title={limit.source}>
        Maximum <Num value={limit.value} unit={unit} decimals={decimals} showUnit />,{' '}
        {limit.kind.toLowerCase()}
      </p>
      {margin < 0 ? (
        <Over words="above it" by={-margin} {...{ unit, decimals }} />
      ) : (
        <p>
          <Num value={margin} unit={unit} decimals={decimals} showUnit /> below it
          {predictedMargin < 0 ? null : (
            <>
              , <Num value={predictedMargin} unit={unit} decimals={decimals} showUnit /> when predicted
            </>
          )}
        </p>
      )}
      {margin >= 0 && predictedMargin < 0 ? (
        <Over words="above it when predicted" by={-predictedMargin} {...{ unit, decimals }} />
      ) : null}
    </div>
  );
}

function Over({
  words,
  by,
  unit,
  decimals,
}: {
  readonly words: string;
  readonly by: number;
  readonly unit: MassUnit;
  readonly decimals: number;
}) {
  return (
    <p className="flex items-center gap-1.5 text-limit">
      <SeverityMark severity="blocker" />
      <span>
        <Num value={by} unit={unit} decimals={decimals} showUnit /> {words}
      </span>
    </p>
  );
}
