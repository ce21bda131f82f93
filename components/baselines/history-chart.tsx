import { chartScale } from '@/components/baselines/chart-scale';

export interface HistoryPoint {
  readonly number: number;
  readonly build: string;
  /** As shown. */
  readonly mass: number;
  readonly predicted: number;
}

interface HistoryChartProps {
  readonly label: string;
  readonly unit: string;
  /** By number. */
  readonly points: readonly HistoryPoint[];
  /** As shown. */
  readonly limits: readonly HistoryLimit[];
}

export interface HistoryLimit {
  readonly value: number;
  /** As in "contract, at most". */
  readonly words: string;
}

const [TOP, HEIGHT, FOOT] = [24, 200, 48];
/** Okabe and Ito's colours for those who see some alike; the build's name stands at its line. */
const COLOURS = ['#0072b2', '#e69f00', '#009e73', '#cc79a7', '#56b4e9', '#d55e00'];
const percent = (share: number): string => `${100 * share}%`;

/**
 * Mass over all baselines of a program, a line for each build, against its limits. The scale is that of the masses: a limit farther
 * from them than they lie apart is told at the edge, with its figure.
 */
export function HistoryChart({ label, unit, points, limits }: HistoryChartProps) {
  const masses = points.flatMap(({ mass, predicted }) => [mass, predicted]);
  const near = limits.filter(({ value }) => isNear(value, masses));
  const scale = chartScale([...masses, ...near.map(({ value }) => value)], 4);
  const above = limits.filter(({ value }) => value > scale.to);
  const below = limits.filter(({ value }) => value < scale.from);
  const y = (value: number): number => TOP + HEIGHT * (1 - scale.place(value));
  const x = (index: number): number => 0.12 + (0.88 * (index + 0.5)) / points.length;
  const builds = [...new Set(points.map(({ build }) => build))];
  return (
    <svg
      width="100%"
      height={TOP + HEIGHT + FOOT}
      role="img"
      aria-label={label}
      className="block max-w-240 overflow-visible"
    >
      {scale.ticks.map((tick) => (
        <g key={tick}>
          <line x1="12%" x2="100%" y1={y(tick)} y2={y(tick)} className="stroke-rule" />
          <text x="11%" y={y(tick) + 4} textAnchor="end" className="num fill-ink-2 text-note">
            {tick.toFixed(scale.decimals)}
          </text>
        </g>
      ))}
      <text x="0" y="12" className="fill-ink-2 text-note">
        {unit}
      </text>
      {limits
        .filter(({ value }) => value >= scale.from && value <= scale.to)
        .map(({ value, words }) => (
          <g key={`${words} ${value}`}>
            <line x1="12%" x2="100%" y1={y(value)} y2={y(value)} className="stroke-limit" strokeWidth="2" />
            <text x="100%" y={y(value) - 5} textAnchor="end" className="fill-ink text-note">
              {words} {value.toFixed(scale.decimals)} {unit}
            </text>
          </g>
        ))}
      <AtTheEdge limits={above} edge={TOP} side={1} {...{ unit }} decimals={scale.decimals} />
      <AtTheEdge limits={below} edge={TOP + HEIGHT} side={-1} {...{ unit }} decimals={scale.decimals} />
      {builds.map((build, at) => (
        <BuildLine
          key={build}
          build={build}
          colour={COLOURS[at % COLOURS.length] ?? '#0072b2'}
          marks={points.flatMap((point, index) =>
            point.build === build
              ? [{ number: point.number, x: x(index), mass: y(point.mass), predicted: y(point.predicted) }]
              : [],
          )}
          end={1}
        />
      ))}
      {points.map((point, index) => (
        <text
          key={point.number}
          x={percent(x(index))}
          y={TOP + HEIGHT + 40}
          textAnchor="middle"
          className="num fill-ink text-note"
        >
          {point.number}
        </text>
      ))}
    </svg>
  );
}

/** Near enough to be drawn: no farther from the masses than they lie apart. */
function isNear(value: number, masses: readonly number[]): boolean {
  const [low, high] = [Math.min(...masses), Math.max(...masses)];
  return masses.length > 0 && value >= low - (high - low) && value <= high + (high - low);
}

/** Limits beyond the drawing: a mark at its edge that points to where they lie, and their figures. */
function AtTheEdge({
  limits,
  edge,
  side,
  unit,
  decimals,
}: {
  readonly limits: readonly HistoryLimit[];
  readonly edge: number;
  /** 1 above the drawing, -1 below it. */
  readonly side: 1 | -1;
  readonly unit: string;
  readonly decimals: number;
}) {
  if (limits.length === 0) return null;
  return (
    <g>
      <line x1="12%" x2="100%" y1={edge} y2={edge} className="stroke-limit" strokeDasharray="2 6" />
      {limits.map(({ value, words }, index) => (
        <svg
          key={`${words} ${value}`}
          x="100%"
          y={edge + side * (6 + 16 * index)}
          className="overflow-visible"
        >
          <path
            d={side === 1 ? 'M-12 8 L-6 -2 L0 8 Z' : 'M-12 -8 L-6 2 L0 -8 Z'}
            className="fill-limit stroke-ink"
          />
          <text x="-18" y={side === 1 ? 9 : 1} textAnchor="end" className="fill-ink text-note">
            {words} {value.toFixed(decimals)} {unit}, {side === 1 ? 'above' : 'below'} this drawing
          </text>
        </svg>
      ))}
    </g>
  );
}

interface Mark {
  readonly number: number;
  readonly x: number;
  readonly mass: number;
  readonly predicted: number;
}

function BuildLine({
  build,
  colour,
  marks,
  end,
}: {
  readonly build: string;
  readonly colour: string;
  readonly marks: readonly Mark[];
  readonly end: number;
}) {
  const first = marks[0];
  return (
    <g>
      {marks.map((mark, index) => {
        const next = marks[index + 1];
        const until = percent(next?.x ?? end);
        return (
          <g key={mark.number}>
            <line
              x1={percent(mark.x)}
              x2={until}
              y1={mark.mass}
              y2={mark.mass}
              className="stroke-ink"
              strokeWidth="4"
            />
            <line
              x1={percent(mark.x)}
              x2={until}
              y1={mark.mass}
              y2={mark.mass}
              stroke={colour}
              strokeWidth="2"
            />
            {next === undefined ? null : (
              <line x1={until} x2={until} y1={mark.mass} y2={next.mass} className="stroke-ink" />
            )}
            <line
              x1={percent(mark.x)}
              x2={until}
              y1={mark.predicted}
              y2={mark.predicted}
              className="stroke-ink-2"
              strokeDasharray="4 3"
            />
            <circle cx={percent(mark.x)} cy={mark.mass} r="5" fill={colour} className="stroke-ink" />
          </g>
        );
      })}
      {first === undefined ? null : (
        <>
          <text x={percent(first.x)} y={first.mass + 18} className="fill-ink text-note">
            {build}
          </text>
          <text x={percent(first.x)} y={first.predicted - 5} className="fill-ink-2 text-note">
            predicted
          </text>
        </>
      )}
    </g>
  );
}
