import { DriverChoices } from '@/components/drivers/driver-choices';
import { DriversStation } from '@/components/drivers/drivers-station';
import {
  CONTRIBUTION_WORDS,
  kindOf,
  NumberName,
  unitOf,
  type TenUnits,
} from '@/components/drivers/number-words';
import { countWords } from '@/components/lists/list-words';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { Section } from '@/components/ui/section';
import { type Drivers, type DriversAsked } from '@/lib/drivers/drivers';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';

interface DriversSectionProps {
  /** Null where there is no mass above zero. */
  readonly drivers: Drivers | null;
  readonly asked: DriversAsked;
  readonly units: TenUnits;
  readonly hrefOf: (asked: DriversAsked) => string;
  readonly listsHref: string;
  /** What the whole is, e.g. "Take-off, without growth". */
  readonly of: string;
}

/** For one of the ten numbers the rows or groups that contribute most; not printed. */
export function DriversSection({ drivers, asked, units, hrefOf, listsHref, of }: DriversSectionProps) {
  return (
    <div id="drivers" className="no-print grid min-w-0">
      <Section title="What drives it" aside={of} lead={CONTRIBUTION_WORDS[kindOf(asked.number)]}>
        <DriverChoices asked={asked} hrefOf={hrefOf} />
        {drivers === null ? (
          <p className="text-ink-2">There is no mass above zero here, and so no CG that parts could drive.</p>
        ) : (
          <>
            <DriversStation
              key={`${of} ${asked.number} ${asked.by} ${units.mass}`}
              {...{ drivers, units, listsHref }}
            />
            <Sums drivers={drivers} units={units} />
          </>
        )}
      </Section>
    </div>
  );
}

function Sums({ drivers, units }: { readonly drivers: Drivers; readonly units: TenUnits }) {
  const { number, by, of, parts, sum, gross, geometry } = drivers;
  const unit = unitOf(number, units);
  const decimals = sharedDecimals([fromSi(gross, unit)]);
  // What is left of levers that balance is rounding.
  const all = Math.abs(sum) <= 1e-9 * gross ? 0 : sum;
  const cancels = Math.abs(gross - all) > 1e-9 * gross;
  const what = by === 'rows' ? 'parts' : 'groups';
  return (
    <p className="measure text-note text-ink-2">
      {parts.length < of ? `The first ${parts.length} of ${countWords(of)} ${what}. ` : ''}
      All {countWords(of)} {what} add up to <NumberName number={number} axes={geometry.axes} />{' '}
      <Num value={all} unit={unit} decimals={decimals} /> {unitLabel(unit)}
      {cancels ? (
        <>
          , without their signs to <Num value={gross} unit={unit} decimals={decimals} /> {unitLabel(unit)}:
          shares are of the latter, so that what cancels shows.
        </>
      ) : (
        ': shares are of that.'
      )}
    </p>
  );
}
