'use client';

import { type FormEvent, useState } from 'react';
import { axisName } from '@/components/three-views/ruled-edge';
import { Button } from '@/components/ui/button';
import { NumberField } from '@/components/ui/text-field';
import { type AxisTriple } from '@/lib/frames/axes';
import { isEverywhere, rangeOf, type Region } from '@/lib/three-views/region';
import { fromSi, toSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type LengthUnit } from '@/lib/units/table';

interface RegionFormProps {
  readonly axes: AxisTriple;
  readonly unit: LengthUnit;
  readonly region: Region;
  readonly onRegion: (region: Region) => void;
}

const ENDS = ['from', 'to'] as const;

/** The region in figures: what the pointer draws, and what the keyboard can. */
export function RegionForm({ axes, unit, region, onRegion }: RegionFormProps) {
  const [wrong, setWrong] = useState<ReadonlySet<string>>(new Set());
  const shown = (k: 0 | 1 | 2, end: 0 | 1): string => {
    const value = region[k]?.[end];
    return value === undefined || !Number.isFinite(value)
      ? ''
      : String(Number(fromSi(value, unit).toFixed(unit === 'in' ? 2 : 3)));
  };
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const data = new FormData(event.currentTarget);
    const typed = (name: string): string => String(data.get(name) ?? '').trim();
    const names = ([0, 1, 2] as const).flatMap((k) => ENDS.map((end) => `${k} ${end}`));
    const bad = names.filter((name) => typed(name) !== '' && rangeOf(`${typed(name)}..`) === null);
    setWrong(new Set(bad));
    if (bad.length > 0) return;
    const range = (k: 0 | 1 | 2) => {
      const si = ENDS.map((end) => {
        const text = typed(`${k} ${end}`);
        return text === '' ? '' : String(Number(toSi(Number(text), unit).toFixed(6)));
      });
      return rangeOf(si.join('..'));
    };
    onRegion([range(0), range(1), range(2)]);
  };
  return (
    <form
      key={`${JSON.stringify(region)} ${unit}`}
      onSubmit={submit}
      noValidate
      className="no-print grid content-start gap-3"
    >
      {([0, 1, 2] as const).map((k) => (
        <fieldset key={k} className="grid grid-cols-2 gap-x-4 gap-y-1">
          <legend className="sr-only">{axisName(axes, k)}</legend>
          {ENDS.map((end, index) => (
            <NumberField
              key={end}
              name={`${k} ${end}`}
              label={index === 0 ? `${axisName(axes, k)}, from` : 'to'}
              unit={unitLabel(unit)}
              defaultValue={shown(k, index === 0 ? 0 : 1)}
              error={
                wrong.has(`${k} ${end}`) ? 'This is not a number. Write it as 2.5, or leave it blank.' : null
              }
            />
          ))}
        </fieldset>
      ))}
      <div className="flex flex-wrap gap-3">
        <Button type="submit">Show this region</Button>
        {isEverywhere(region) ? null : (
          <Button kind="quiet" onClick={() => onRegion([null, null, null])}>
            Clear the region
          </Button>
        )}
      </div>
    </form>
  );
}
