'use client';

import { useMemo } from 'react';
import { DriverTable } from '@/components/drivers/driver-table';
import { driverLines } from '@/components/drivers/driver-lines';
import { EffectPanel } from '@/components/drivers/effect-panel';
import { type TenUnits } from '@/components/drivers/number-words';
import { usePicked } from '@/components/drivers/use-picked';
import { type Drivers } from '@/lib/drivers/drivers';

interface DriversStationProps {
  readonly drivers: Drivers;
  readonly units: TenUnits;
  /** Where the lists of the program are. */
  readonly listsHref: string;
}

/** The parts that contribute most; picking one shows the whole without it and with it moved. */
export function DriversStation({ drivers, units, listsHref }: DriversStationProps) {
  const lines = useMemo(() => driverLines(drivers), [drivers]);
  const [picked, setPicked] = usePicked();
  const part = lines.find((line) => line.part.key === picked.key)?.part;
  return (
    <div className="grid min-w-0 gap-4">
      <DriverTable
        drivers={drivers}
        lines={lines}
        units={units}
        picked={part?.key ?? null}
        onPick={(key) => setPicked({ ...picked, key })}
      />
      {part === undefined ? (
        <p className="text-ink-2">
          Choose a {drivers.by === 'rows' ? 'row' : 'group'} to see the whole without it, or with it moved.
        </p>
      ) : (
        <EffectPanel
          key={part.key}
          drivers={drivers}
          part={part}
          units={units}
          by={picked.by}
          onBy={(by) => setPicked({ ...picked, by })}
          onClose={() => setPicked({ key: null, by: ['', '', ''] })}
          href={rowHref(part, listsHref)}
        />
      )}
    </div>
  );
}

function rowHref({ list, name }: Drivers['parts'][number], listsHref: string): string | null {
  if (list === null) return null;
  const query = new URLSearchParams({ revision: String(list.revision), find: name, row: name });
  return `${listsHref}/${list.code}?${query.toString()}#rows`;
}
