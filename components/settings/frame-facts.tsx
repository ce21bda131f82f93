import { Num } from '@/components/mass/num';
import { typedDecimals } from '@/components/mass/number-text';
import { AxesSketch } from '@/components/settings/axes-sketch';
import { Day } from '@/components/ui/day';
import { DefinitionList } from '@/components/ui/definition-list';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { type Vec3 } from '@/lib/numerics/vec3';
import { asTyped, degreesAsTyped } from '@/lib/units/convert';
import { type LengthUnit } from '@/lib/units/table';

interface FrameFactsProps {
  readonly issue: {
    readonly title: string;
    readonly valid_from: string;
    readonly reason: string;
    readonly author: string;
    readonly created_at: Date;
  };
  readonly geometry: AirframeGeometry;
  readonly unit: LengthUnit;
}

/** A frame issue: its axes drawn, its reference geometry in the unit asked for. */
export function FrameFacts({ issue, geometry, unit }: FrameFactsProps) {
  const { axes } = geometry;
  const length = (value: number) => <Length value={value} unit={unit} />;
  return (
    <div className="grid items-start gap-8 md:grid-cols-[1fr_288px]">
      <DefinitionList
        items={[
          { term: 'Title', value: issue.title },
          { term: 'Valid from', value: <span className="num">{issue.valid_from}</span> },
          { term: 'Axes', value: `x ${axes[0]}, y ${axes[1]}, z ${axes[2]}` },
          {
            term: 'LEMAC',
            value: <Coordinates place={geometry.lemac} unit={unit} />,
          },
          { term: 'MAC', value: length(geometry.mac) },
          { term: 'Span', value: length(geometry.span) },
          { term: 'Length', value: length(geometry.length) },
          { term: 'Plane of symmetry at', value: length(geometry.lateralPlane) },
          {
            term: 'Incidence of body x',
            value: (
              <>
                <Num
                  value={degreesAsTyped(geometry.incidence)}
                  decimals={typedDecimals(degreesAsTyped(geometry.incidence))}
                />
                ° nose-up from the reference line
              </>
            ),
          },
          { term: 'Sums are kept about', value: <Coordinates place={geometry.reference} unit={unit} /> },
          { term: 'Reason', value: issue.reason },
          {
            term: 'Issued',
            value: (
              <>
                {issue.author}, <Day at={issue.created_at} />
              </>
            ),
          },
        ]}
      />
      <AxesSketch axes={axes} />
    </div>
  );
}

/** A place in airframe components, each with its letter, the unit once. */
export function Coordinates({ place, unit }: { readonly place: Vec3; readonly unit: LengthUnit }) {
  return (
    <span className="flex flex-wrap gap-x-4">
      {(['x', 'y', 'z'] as const).map((letter, index) => (
        <span key={letter}>
          <span className="text-ink-2">{letter}</span> <Length value={place[index] ?? NaN} unit={unit} />
        </span>
      ))}
    </span>
  );
}

/** A length with the digits it was entered with, as far as the unit allows: no more than a tenth of a micrometre. */
function Length({ value, unit }: { readonly value: number; readonly unit: LengthUnit }) {
  return (
    <Num value={value} unit={unit} decimals={Math.min(7, typedDecimals(asTyped(value, unit)))} showUnit />
  );
}
