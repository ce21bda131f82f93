import { Num } from '@/components/mass/num';
import { axisName } from '@/components/three-views/ruled-edge';
import { type Picture, type Piece } from '@/lib/three-views/picture';
import { sumsOf } from '@/lib/three-views/sums';
import { type OutputUnits } from '@/lib/units/names';

interface RegionSumsProps {
  readonly picture: Picture;
  readonly pieces: readonly Piece[];
  readonly everything: number;
  readonly units: OutputUnits;
}

/** Mass, share and CG of what is brushed. */
export function RegionSums({ picture, pieces, everything, units }: RegionSumsProps) {
  const { geometry, total } = picture;
  const { mass, cg } = sumsOf(pieces, geometry.reference);
  const facts = [
    {
      term: 'Mass',
      value: <Num value={mass} unit={units.mass} showUnit digits={7} />,
    },
    {
      term: 'Share of the condition',
      value:
        total.mass > 0 ? (
          <span>
            <Num value={(100 * mass) / total.mass} decimals={2} /> %
          </span>
        ) : (
          <Num value={null} />
        ),
    },
    ...([0, 1, 2] as const).map((k) => ({
      term: `CG, ${axisName(geometry.axes, k).toLowerCase()}`,
      value: (
        <Num
          value={cg === null ? null : cg[k]}
          unit={units.length}
          showUnit
          decimals={units.length === 'in' ? 2 : 4}
        />
      ),
    })),
    { term: 'Marks', value: <span className="num">{`${pieces.length} of ${everything}`}</span> },
  ];
  return (
    <dl className="flex flex-wrap gap-x-8 gap-y-2">
      {facts.map(({ term, value }) => (
        <div key={term}>
          <dt className="text-note text-ink-2">{term}</dt>
          <dd>{value}</dd>
        </div>
      ))}
    </dl>
  );
}
