import { type DriverLine } from '@/components/drivers/driver-lines';
import { NumberName, unitOf, type TenUnits } from '@/components/drivers/number-words';
import { Num } from '@/components/mass/num';
import { sharedDecimals } from '@/components/mass/number-text';
import { classes } from '@/components/ui/classes';
import { Cell, ColumnHead } from '@/components/ui/table';
import { type Drivers } from '@/lib/drivers/drivers';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';

interface DriverTableProps {
  readonly drivers: Pick<Drivers, 'number' | 'by' | 'geometry'>;
  readonly lines: readonly DriverLine[];
  readonly units: TenUnits;
  readonly picked: string | null;
  readonly onPick: (key: string) => void;
}

/** The parts, largest contribution first; one of them can be picked. */
export function DriverTable({ drivers, lines, units, picked, onPick }: DriverTableProps) {
  const { number, by, geometry } = drivers;
  const unit = unitOf(number, units);
  const decimals = sharedDecimals(
    lines.map(({ value }) => fromSi(value, unit)),
    [],
    5,
  );
  const massDecimals = sharedDecimals(
    lines.map(({ mass }) => fromSi(mass, units.mass)),
    [],
    5,
  );
  const widest = Math.max(...lines.map(({ share }) => Math.abs(share)), 1e-9);
  const ofRows = by === 'rows';
  return (
    <div
      role="region"
      aria-label="What contributes most"
      tabIndex={0}
      className="relative max-h-90 overflow-auto border-b border-ink-2"
    >
      <table className="ruled w-full border-separate border-spacing-0">
        <caption className="sr-only">What contributes most, largest first</caption>
        <thead>
          <tr>
            <ColumnHead>{ofRows ? 'Row' : 'Group'}</ColumnHead>
            <ColumnHead side="right" unit={unitLabel(unit)}>
              <NumberName number={number} axes={geometry.axes} />
            </ColumnHead>
            <ColumnHead side="right" unit="%">
              Share
            </ColumnHead>
            <th scope="col" className="max-sm:hidden">
              <span className="sr-only">Share drawn</span>
            </th>
            {number === 'mass' ? null : (
              <th scope="col" className="text-right max-sm:hidden">
                Mass <span className="font-normal text-ink-2">{unitLabel(units.mass)}</span>
              </th>
            )}
            <th scope="col" className={classes('max-sm:hidden', ofRows ? 'text-left' : 'text-right')}>
              {ofRows ? 'Group' : 'Rows'}
            </th>
          </tr>
        </thead>
        <tbody>
          {lines.map(({ part, mass, value, share }) => (
            <tr key={part.key}>
              <th scope="row" className="max-w-40 text-left font-normal sm:max-w-72">
                <label className="flex cursor-pointer gap-2">
                  <input
                    type="radio"
                    name="driver"
                    checked={picked === part.key}
                    onChange={() => onPick(part.key)}
                    className="mt-0.5 size-4 shrink-0 accent-(--spin)"
                  />
                  <span className="grid min-w-0">
                    <span className="wrap-anywhere">{part.name}</span>
                    {part.description === null ? null : (
                      <span className="truncate text-note text-ink-2">{part.description}</span>
                    )}
                  </span>
                </label>
              </th>
              <Cell side="right">
                <Num value={value} unit={unit} decimals={decimals} plus={number !== 'mass'} />
              </Cell>
              <Cell side="right">
                <Num value={100 * share} decimals={1} plus={number !== 'mass'} />
              </Cell>
              <td className="w-28 max-sm:hidden">
                <ShareBar share={share / widest} />
              </td>
              {number === 'mass' ? null : (
                <Cell side="right" className="max-sm:hidden">
                  <Num value={mass} unit={units.mass} decimals={massDecimals} />
                </Cell>
              )}
              {ofRows ? (
                <Cell className="max-sm:hidden">
                  <span className="block max-w-56 truncate" title={part.group ?? 'Items on board'}>
                    {part.group ?? 'Items on board'}
                  </span>
                </Cell>
              ) : (
                <Cell side="right" className="max-sm:hidden">
                  <Num value={part.rows} decimals={0} />
                </Cell>
              )}
            </tr>
          ))}
        </tbody>
      </table>
    </div>
  );
}

/** From the middle to the right for what adds, to the left for what takes away; the number beside it says the same. */
function ShareBar({ share }: { readonly share: number }) {
  const half = 50 * Math.min(1, Math.abs(share));
  return (
    <svg aria-hidden="true" className="h-3.5 w-full" preserveAspectRatio="none" viewBox="0 0 100 14">
      <rect
        x={share < 0 ? 50 - half : 50}
        y="2.5"
        width={half}
        height="9"
        className={share < 0 ? 'fill-minus stroke-ink' : 'fill-plus stroke-ink'}
        vectorEffect="non-scaling-stroke"
      />
      <line x1="50" x2="50" y1="0" y2="14" className="stroke-ink-2" vectorEffect="non-scaling-stroke" />
    </svg>
  );
}
