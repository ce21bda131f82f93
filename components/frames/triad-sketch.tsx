import { type Vec3 } from '@/lib/numerics/vec3';
import { oblique, type Point, SEEN_FROM, sheetFor } from './oblique';
import { type Triads } from './triads';

/** A datum this many times further than the list is large is drawn nearer, and said to be. */
const FAR = 6;
const LETTERS = ['x', 'y', 'z'] as const;

interface TriadSketchProps {
  readonly triads: Triads;
  /** What the second frame is of: `List`, or `Issue 1`. */
  readonly name?: string;
}

/**
 * The airframe axes at their datum and the axes of a list at its origin, with one of its components, its mirror image and the plane of
 * symmetry; the sentences beneath say the same.
 */
export function TriadSketch({ triads, name = 'List' }: TriadSketchProps) {
  const { airframeAxes, listAxes, bodyX, origin, example, item, image, plane } = triads;
  const { sentences, doubts } = triads;
  const near = [origin, example, image].filter((one) => one !== null);
  const { datum, isMoved } = shownDatum(near);
  const sheet = sheetFor([datum, ...near], 340, 66);
  const [from, listFrom] = [sheet.at(datum), sheet.at(origin)];
  const apart = Math.hypot(from[0] - listFrom[0], from[1] - listFrom[1]) > 3;
  return (
    <figure className="@container">
      <div className="grid items-start gap-x-6 gap-y-2 @2xl:grid-cols-[minmax(0,21rem)_1fr]">
        <div className="grid gap-2">
          <svg
            viewBox={`-58 0 ${sheet.width + 116} ${sheet.height.toFixed(0)}`}
            role="img"
            aria-label={`Airframe axes and the axes of the ${name.toLowerCase()}. ${sentences.join(' ')}`}
            className="block w-full max-w-100"
          >
            <Plane at={sheet.at} plane={plane} about={[...near, datum]} />
            {apart ? <Line from={from} to={listFrom} /> : null}
            {example === null ? null : <Line from={listFrom} to={sheet.at(example)} />}
            {example === null || image === null ? null : (
              <Line from={sheet.at(example)} to={sheet.at(image)} />
            )}
            <Arrow from={from} along={bodyX} length={92} className="stroke-ink-2" dashed label="body x" />
            {airframeAxes.map((axis, k) => (
              <Arrow
                key={LETTERS[k]}
                from={from}
                along={axis}
                length={64}
                className="fill-spin stroke-spin"
                label={`${LETTERS[k] ?? ''} ${pointing(axis)}`}
              />
            ))}
            {listAxes.map((axis, k) => (
              <Arrow
                key={LETTERS[k]}
                from={listFrom}
                along={axis}
                length={apart ? 52 : 38}
                className="fill-sheet stroke-caution"
                label={apart ? `${LETTERS[k] ?? ''} ${pointing(axis)}` : (LETTERS[k] ?? '')}
              />
            ))}
            <circle cx={from[0]} cy={from[1]} r="3" className="fill-spin" />
            <circle
              cx={listFrom[0]}
              cy={listFrom[1]}
              r="3"
              className="fill-sheet stroke-caution"
              strokeWidth="2"
            />
            {example === null ? null : <Mark at={sheet.at(example)} isImage={false} label={item} />}
            {image === null ? null : <Mark at={sheet.at(image)} isImage label="" />}
          </svg>
          <figcaption className="grid gap-1 text-note text-ink-2">
            <span>
              {SEEN_FROM} <span className="text-spin">Filled heads: airframe, at its datum</span>
              {isMoved ? ' (far away, drawn nearer)' : ''}.{' '}
              <span className="text-caution">Open heads: {name.toLowerCase()}, at its origin</span>.
              {example === null ? '' : ' Dot: the example.'}
              {image === null ? '' : ' Ring: its mirror image.'} Shaded: the plane of symmetry.
            </span>
          </figcaption>
        </div>
        <ul className="measure grid gap-0.5">
          {doubts.map((doubt) => (
            <li key={doubt} className="font-semibold text-caution">
              {doubt}
            </li>
          ))}
          {sentences.map((sentence) => (
            <li key={sentence}>{sentence}</li>
          ))}
        </ul>
      </div>
    </figure>
  );
}

/** The datum, or a place on the way to it where it is so far away that the rest would shrink to a dot. */
function shownDatum(near: readonly Vec3[]): { readonly datum: Vec3; readonly isMoved: boolean } {
  const [first = [0, 0, 0] as const] = near;
  const size = Math.max(0, ...near.map((place) => distance(place, first)));
  const away = distance(first, [0, 0, 0]);
  if (size === 0 || away <= FAR * size) return { datum: [0, 0, 0], isMoved: false };
  const share = 1 - (FAR * size) / away;
  return { datum: [share * first[0], share * first[1], share * first[2]], isMoved: true };
}

const distance = (a: Vec3, b: Vec3): number => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2]);

function Line({ from, to }: { readonly from: Point; readonly to: Point }) {
  return (
    <line
      x1={from[0]}
      y1={from[1]}
      x2={to[0]}
      y2={to[1]}
      className="stroke-ink-2"
      strokeDasharray="1 3"
      strokeLinecap="round"
    />
  );
}

interface ArrowProps {
  readonly from: Point;
  /** Forward, right, down. */
  readonly along: Vec3;
  readonly length: number;
  readonly className: string;
  readonly label: string;
  readonly dashed?: boolean;
}

/** An arrow as it is seen; one that points at the eye is short, and a circle says so. */
function Arrow({ from, along, length, className, label, dashed = false }: ArrowProps) {
  const [px, py] = oblique(along);
  const seen = Math.hypot(px, py);
  const [ux, uy] = seen < 0.05 ? [0, -1] : [px / seen, py / seen];
  const [x, y] = [from[0] + length * px, from[1] + length * py];
  const head = dashed ? 5 : 8;
  const side = ux < -0.3 ? 'end' : ux > 0.3 ? 'start' : 'middle';
  return (
    <g>
      {seen < 0.12 ? <circle cx={from[0]} cy={from[1]} r="7" className={className} fillOpacity="0" /> : null}
      <line
        x1={from[0]}
        y1={from[1]}
        x2={x}
        y2={y}
        className={className}
        strokeWidth={dashed ? 1 : 2}
        {...(dashed ? { strokeDasharray: '5 3' } : {})}
      />
      {seen < 0.12 ? null : (
        <path
          d={`M${x + head * ux} ${y + head * uy}L${x - 0.5 * head * uy} ${y + 0.5 * head * ux}L${x + 0.5 * head * uy} ${y - 0.5 * head * ux}Z`}
          className={className}
          strokeWidth="1.5"
          {...(dashed ? { fillOpacity: 0 } : {})}
        />
      )}
      <text
        x={x + (head + 5) * ux}
        y={y + (head + 5) * uy + (uy < -0.3 ? 0 : uy > 0.3 ? 8 : 4)}
        textAnchor={side}
        paintOrder="stroke"
        strokeWidth="4"
        className={`stroke-paper text-note ${dashed ? 'fill-ink-2' : 'fill-ink font-semibold'}`}
      >
        {label}
      </text>
    </g>
  );
}

/** The direction that an arrow comes nearest to; frd. */
function pointing([ahead, right, down]: Vec3): string {
  const size = Math.max(Math.abs(ahead), Math.abs(right), Math.abs(down));
  if (Math.abs(ahead) === size) return ahead > 0 ? 'forward' : 'aft';
  if (Math.abs(right) === size) return right > 0 ? 'right' : 'left';
  return down > 0 ? 'down' : 'up';
}

interface MarkProps {
  readonly at: Point;
  readonly isImage: boolean;
  readonly label: string;
}

function Mark({ at, isImage, label }: MarkProps) {
  return (
    <g>
      <circle
        cx={at[0]}
        cy={at[1]}
        r="5"
        className={isImage ? 'fill-paper stroke-ink' : 'fill-ink stroke-ink'}
        strokeWidth="1.5"
      />
      <text
        x={at[0] + 9}
        y={at[1] - 6}
        paintOrder="stroke"
        strokeWidth="4"
        className="fill-ink stroke-paper text-note"
      >
        {label.length > 20 ? `${label.slice(0, 19)}…` : label}
      </text>
    </g>
  );
}

/** The plane of symmetry, as large as what stands about it. */
function Plane({
  at,
  plane,
  about,
}: {
  readonly at: (v: Vec3) => Point;
  readonly plane: number;
  readonly about: readonly Vec3[];
}) {
  const [ahead, below] = [about.map(([f]) => f), about.map(([, , d]) => d)];
  const size = Math.max(...about.map((place) => Math.abs(place[1] - plane)), 0.5);
  const [f0, f1] = [Math.min(...ahead) - 0.3 * size, Math.max(...ahead) + 0.3 * size];
  const [d0, d1] = [Math.min(...below) - 0.3 * size, Math.max(...below) + 0.3 * size];
  const corners: readonly Vec3[] = [
    [f0, plane, d0],
    [f1, plane, d0],
    [f1, plane, d1],
    [f0, plane, d1],
  ];
  const path = corners.map(at).map(([x, y]) => `${x.toFixed(1)} ${y.toFixed(1)}`);
  return (
    <path
      d={`M${path.join('L')}Z`}
      className="fill-ink-2 stroke-ink-2"
      fillOpacity="0.08"
      strokeDasharray="6 4"
    />
  );
}
