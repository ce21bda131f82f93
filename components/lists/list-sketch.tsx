import { TriadSketch } from '@/components/frames/triad-sketch';
import { type ExampleRow, triadsOf } from '@/components/frames/triads';
import { axesProblem, type AxisTriple, type Direction, DIRECTIONS } from '@/lib/frames/axes';
import { EXTENTS, type Extent, type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { radians, toSi } from '@/lib/units/convert';
import { LENGTH_UNITS, type LengthUnit } from '@/lib/units/table';

export type SketchFrame = Pick<AirframeGeometry, 'axes' | 'lateralPlane' | 'incidence'>;

/** A component as its list states it, places in the list's own unit. */
export interface TypedExample {
  readonly item: string;
  readonly place: readonly [number, number, number];
  readonly pair: boolean;
}

interface ListSketchProps {
  readonly declarations: Pick<ListDeclarations, 'axes' | 'pose' | 'extent' | 'lengthUnit'>;
  readonly frame: SketchFrame;
  readonly example: TypedExample | null;
}

/** How the frame of a list lies in the airframe, with one of its components placed in it. */
export function ListSketch({ declarations, frame, example }: ListSketchProps) {
  const { axes, pose, extent, lengthUnit: unit } = declarations;
  const placed: ExampleRow | null = example && {
    item: example.item,
    position: [toSi(example.place[0], unit), toSi(example.place[1], unit), toSi(example.place[2], unit)],
    pair: example.pair,
  };
  return <TriadSketch triads={triadsOf({ airframe: frame, axes, pose, extent, example: placed, unit })} />;
}

/** What a new list has instead of a component of its own. */
const MADE_UP: TypedExample = { item: 'A made-up part', place: [1, 2, 0.5], pair: false };

const isDirection = (word: string): word is Direction => DIRECTIONS.some((each) => each === word);

/** The same while it is being typed: a field that is no number yet counts as 0, axes that span no space leave it out. */
export function TypedListSketch({
  texts,
  frame,
  example,
}: {
  readonly texts: Readonly<Record<string, string>>;
  readonly frame: SketchFrame;
  readonly example: TypedExample | null;
}) {
  const words = ['axis_x', 'axis_y', 'axis_z'].map((name) => texts[name] ?? '').filter(isDirection);
  const [x, y, z] = words;
  if (x === undefined || y === undefined || z === undefined || axesProblem(words) !== null) return null;
  const axes: AxisTriple = [x, y, z];
  const unit: LengthUnit = LENGTH_UNITS.find((each) => each === texts['length_unit']) ?? 'm';
  const extent: Extent = EXTENTS.find((each) => each === texts['extent']) ?? 'whole';
  const number = (name: string): number => {
    const value = Number(texts[name] ?? '');
    return Number.isFinite(value) ? value : 0;
  };
  const length = (name: string): number => toSi(number(name), unit);
  return (
    <ListSketch
      frame={frame}
      example={example ?? MADE_UP}
      declarations={{
        axes,
        extent,
        lengthUnit: unit,
        pose: {
          origin: [length('origin_x'), length('origin_y'), length('origin_z')],
          yaw: radians(number('yaw')),
          pitch: radians(number('pitch')),
          roll: radians(number('roll')),
        },
      }}
    />
  );
}
