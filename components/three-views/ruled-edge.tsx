import { type Sheet } from '@/components/three-views/sheet';
import { type AxisTriple } from '@/lib/frames/axes';
import { type Bounds } from '@/lib/three-views/bounds';
import { type Ticks, ticksWithin } from '@/lib/three-views/ticks';
import { fromSi } from '@/lib/units/convert';
import { unitLabel } from '@/lib/units/names';
import { type LengthUnit } from '@/lib/units/table';

/** What the trade calls coordinates along, across and up an airframe. */
const NAMES: Readonly<Record<string, string>> = {
  aft: 'Station',
  forward: 'Station',
  right: 'Butt line',
  left: 'Butt line',
  up: 'Waterline',
  down: 'Waterline',
};

/** `Station x aft` */
export function axisName(axes: AxisTriple, index: 0 | 1 | 2): string {
  return `${NAMES[axes[index]] ?? ''} ${'xyz'.charAt(index)} ${axes[index]}`;
}

/** The round coordinates of an edge, in the unit shown, each with where it lies along the edge (0 to 1, from the left or the top). */
export function edgeTicks(
  sheet: Sheet,
  edge: 'across' | 'upward',
  bounds: Bounds,
  unit: LengthUnit,
): { readonly ticks: Ticks; readonly share: (value: number) => number } {
  const { index, sign } = sheet.axes[edge];
  const [low, high] = bounds[index].map((end) => fromSi(end, unit)) as [number, number];
  // As far apart on every edge of the picture: the longest gets about ten.
  const longest = Math.max(...bounds.map(([from, to]) => fromSi(to - from, unit)));
  const ticks = ticksWithin(low, high, Math.max(1, (12 * (high - low)) / longest));
  const rising = sign > 0 === (edge === 'across');
  const share = (value: number): number =>
    rising ? (value - low) / (high - low) : (high - value) / (high - low);
  return { ticks, share };
}

interface EdgeProps {
  readonly sheet: Sheet;
  readonly bounds: Bounds;
  readonly axes: AxisTriple;
  readonly unit: LengthUnit;
}

const text = (value: number, decimals: number): string =>
  (value + 0)
    .toFixed(decimals)
    .replace(/^-(?=0(\.0*)?$)/, '')
    .replace('-', '\u2212');

/** Stations or butt lines under a view. */
export function LowerEdge({ sheet, bounds, axes, unit }: EdgeProps) {
  const { ticks, share } = edgeTicks(sheet, 'across', bounds, unit);
  return (
    <svg width="100%" height="40" aria-hidden="true" className="block overflow-visible">
      <line x1="0" x2="100%" y1="0.5" y2="0.5" className="tick" />
      {ticks.between.map((tick) => (
        <line
          key={tick}
          x1={`${100 * share(tick)}%`}
          x2={`${100 * share(tick)}%`}
          y1="0"
          y2="4"
          className="tick"
        />
      ))}
      {ticks.labelled.map((tick) => (
        <g key={tick}>
          <line x1={`${100 * share(tick)}%`} x2={`${100 * share(tick)}%`} y1="0" y2="8" className="tick" />
          <text x={`${100 * share(tick)}%`} y="20" textAnchor="middle" className="num fill-ink-2 text-note">
            {text(tick, ticks.decimals)}
          </text>
        </g>
      ))}
      <text x="100%" y="36" textAnchor="end" className="fill-ink-2 text-note">
        {axisName(axes, sheet.axes.across.index)}, {unitLabel(unit)}
      </text>
    </svg>
  );
}

/** Waterlines or butt lines left of a view. */
export function LeftEdge({ sheet, bounds, unit }: EdgeProps) {
  const { ticks, share } = edgeTicks(sheet, 'upward', bounds, unit);
  return (
    <svg width="100%" height="100%" aria-hidden="true" className="absolute inset-0 overflow-visible">
      <line x1="100%" x2="100%" y1="0" y2="100%" className="tick" />
      {ticks.between.map((tick) => (
        <svg
          key={tick}
          x="100%"
          y={`${100 * share(tick)}%`}
          width="1"
          height="1"
          className="overflow-visible"
        >
          <line x1="-4" x2="0" y1="0" y2="0" className="tick" />
        </svg>
      ))}
      {ticks.labelled.map((tick) => (
        <svg
          key={tick}
          x="100%"
          y={`${100 * share(tick)}%`}
          width="1"
          height="1"
          className="overflow-visible"
        >
          <line x1="-8" x2="0" y1="0" y2="0" className="tick" />
          <text x="-11" y="4" textAnchor="end" className="num fill-ink-2 text-note">
            {text(tick, ticks.decimals)}
          </text>
        </svg>
      ))}
    </svg>
  );
}
