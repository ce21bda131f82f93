'use client';

import { TriadSketch } from '@/components/frames/triad-sketch';
import { triadsOf } from '@/components/frames/triads';
import { frameDoubts } from '@/components/settings/frame-doubts';
import { FieldRow } from '@/components/ui/form-grid';
import { NumberField } from '@/components/ui/text-field';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type AxisTriple } from '@/lib/frames/axes';
import { type Pose } from '@/lib/frames/pose';
import { radians, toSi } from '@/lib/units/convert';
import { type LengthUnit } from '@/lib/units/table';

/** The issue before, as the form of the next one shows it. */
export interface FormerFrame {
  readonly number: number;
  readonly geometry: AirframeGeometry;
  /** A point of it, drawn as an example. */
  readonly example: { readonly item: string; readonly place: readonly [number, number, number] };
}

interface FormerFieldsProps {
  readonly former: FormerFrame;
  readonly unit: LengthUnit;
  readonly field: (name: string) => {
    readonly name: string;
    readonly defaultValue: string;
    readonly error: readonly string[] | undefined;
  };
  /** The fields as they are now. */
  readonly texts: Readonly<Record<string, string>>;
  /** The new issue's axes; null while they span no space. */
  readonly axes: AxisTriple | null;
}

/** Where the frame of the issue before lies in the new one, drawn as it is typed. */
export function FormerFields({ former, unit, field, texts, axes }: FormerFieldsProps) {
  const number = (name: string): number => {
    const value = Number(texts[name] ?? '');
    return Number.isFinite(value) ? value : 0;
  };
  const length = (name: string): number => toSi(number(name), unit);
  const place = (name: string) => [length(`${name}_x`), length(`${name}_y`), length(`${name}_z`)] as const;
  const lies: Pose = {
    origin: place('former'),
    yaw: radians(number('former_yaw')),
    pitch: radians(number('former_pitch')),
    roll: radians(number('former_roll')),
  };
  const hasReference = ['x', 'y', 'z'].every((letter) => (texts[`reference_${letter}`] ?? '') !== '');
  // The form that only says how the former frame lies has no chord to hold against it.
  const doubts =
    axes === null || texts['lemac_x'] === undefined
      ? []
      : frameDoubts(
          former,
          lies,
          {
            axes,
            lateralPlane: length('lateral_plane'),
            incidence: radians(number('incidence')),
            lemac: place('lemac'),
            mac: length('mac'),
            span: length('span'),
            length: length('length'),
            reference: hasReference ? place('reference') : null,
          },
          unit,
        );
  return (
    <fieldset className="grid gap-4">
      <legend className="mb-1 text-lead font-semibold">{`Where issue ${former.number} lies in this one`}</legend>
      <p className="measure -mt-1 text-ink-2">
        What is stated in issue {former.number} is converted by this. Give the coordinates of its datum in the
        new frame: where the new datum lies 2.5 {unit} ahead of the old one, the old one is at station 2.5.
        Turn it only where the reference line itself was laid anew; axes that merely point the other way are
        known already. A fuselage made longer is no matter of the frame: there parts move, in their lists.
      </p>
      <FieldRow>
        {(['x', 'y', 'z'] as const).map((letter) => (
          <NumberField
            key={letter}
            {...field(`former_${letter}`)}
            label={`Its datum at ${letter}`}
            unit={unit}
            placeholder="0"
          />
        ))}
      </FieldRow>
      <FieldRow>
        {(['yaw', 'pitch', 'roll'] as const).map((angle) => (
          <NumberField
            key={angle}
            {...field(`former_${angle}`)}
            label={`Turned by ${angle}`}
            unit="deg"
            placeholder="0"
          />
        ))}
      </FieldRow>
      {axes === null ? null : (
        <TriadSketch
          name={`Issue ${former.number}`}
          triads={{
            ...triadsOf({
              airframe: {
                axes,
                lateralPlane: length('lateral_plane'),
                incidence: radians(number('incidence')),
              },
              subject: `Issue ${former.number}`,
              axes: former.geometry.axes,
              pose: lies,
              extent: 'whole',
              example: { item: former.example.item, position: former.example.place, pair: false },
              unit,
            }),
            doubts,
          }}
        />
      )}
    </fieldset>
  );
}
