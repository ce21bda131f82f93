import { type AxisTriple, type Direction, handedness } from '@/lib/frames/axes';

export type Point = readonly [number, number];

/** Where a metre in each direction goes on the sheet: seen from above, ahead and to the left. */
const GROUND: Readonly<Record<Direction, Point>> = {
  forward: [-0.78, 0.36],
  aft: [0.78, -0.36],
  right: [-0.7, -0.32],
  left: [0.7, 0.32],
  up: [0, -0.86],
  down: [0, 0.86],
};

/** forward, right, up -> sheet. */
export function onSheet(forward: number, right: number, up: number): Point {
  const sum = (k: 0 | 1): number => forward * GROUND.forward[k] + right * GROUND.right[k] + up * GROUND.up[k];
  return [120 + sum(0), 104 + sum(1)];
}

export const path = (...points: readonly Point[]): string =>
  `M${points.map(([x, y]) => `${x.toFixed(1)} ${y.toFixed(1)}`).join('L')}`;

/** An aircraft in a few lines, seen from above, ahead and to the left. */
export const AIRFRAME = [
  path(
    onSheet(74, 0, 0),
    onSheet(60, 0, 7),
    onSheet(20, 0, 9),
    onSheet(-74, 0, 6),
    onSheet(60, 0, -7),
    onSheet(74, 0, 0),
  ),
  path(onSheet(18, 0, 8), onSheet(10, 82, 12), onSheet(-4, 82, 12), onSheet(-8, 0, 8)),
  path(onSheet(18, 0, 8), onSheet(10, -82, 12), onSheet(-4, -82, 12), onSheet(-8, 0, 8)),
  path(onSheet(-56, 0, 7), onSheet(-74, 0, 34), onSheet(-84, 0, 34), onSheet(-74, 0, 6)),
  path(onSheet(-66, 28, 8), onSheet(-66, -28, 8)),
];

/** The directions of +x, +y, +z drawn on an airframe. The place of the datum is not drawn to scale. */
export function AxesSketch({
  axes,
  of = 'Airframe axes',
}: {
  readonly axes: AxisTriple;
  readonly of?: string;
}) {
  const hand = handedness(axes) === 1 ? 'right-handed' : 'left-handed';
  const origin = onSheet(40, 0, 0);
  return (
    <figure className="grid content-start gap-1">
      <svg
        viewBox={`-28 40 284 ${axes.includes('down') ? 164 : 116}`}
        role="img"
        aria-label={`${of}: x ${axes[0]}, y ${axes[1]}, z ${axes[2]}; ${hand}`}
        className="block w-full max-w-72 overflow-visible"
      >
        {AIRFRAME.map((line) => (
          <path key={line} d={line} className="fill-none stroke-ink-2" strokeLinejoin="round" />
        ))}
        {axes.map((direction, index) => (
          <Axis key={direction} from={origin} direction={direction} letter={'xyz'[index] ?? ''} />
        ))}
        <circle cx={origin[0]} cy={origin[1]} r="2.5" className="fill-spin" />
      </svg>
      <figcaption className="text-note text-ink-2">
        Directions only, seen from above, ahead and to the left.{' '}
        {hand === 'right-handed' ? 'Right-handed' : 'Left-handed'}.
      </figcaption>
    </figure>
  );
}

function Axis({
  from,
  direction,
  letter,
}: {
  readonly from: Point;
  readonly direction: Direction;
  readonly letter: string;
}) {
  const [dx, dy] = GROUND[direction];
  const length = Math.hypot(dx, dy);
  const [ux, uy] = [dx / length, dy / length];
  const [x, y] = [from[0] + 54 * ux, from[1] + 54 * uy];
  const side = ux < -0.2 ? 'end' : ux > 0.2 ? 'start' : 'middle';
  return (
    <g>
      <line x1={from[0]} y1={from[1]} x2={x} y2={y} className="stroke-spin" strokeWidth="2" />
      <path
        d={`M${x + 7 * ux} ${y + 7 * uy}L${x - 4 * uy} ${y + 4 * ux}L${x + 4 * uy} ${y - 4 * ux}Z`}
        className="fill-spin"
      />
      <text
        x={x + 12 * ux}
        y={y + 12 * uy + (uy < -0.2 ? -2 : uy > 0.2 ? 10 : 4)}
        textAnchor={side}
        paintOrder="stroke"
        strokeWidth="4"
        className="fill-ink stroke-paper text-note"
      >
        <tspan className="font-semibold">{letter}</tspan> {direction}
      </text>
    </g>
  );
}
