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
  /** As shown; null where none is set. */
  readonly limit: number | null;
}

const [TOP, HEIGHT, FOOT] = [24, 200, 48];
/** Okabe and Ito's colours for those who see some alike; the build's name stands at its line. */
const COLOURS = ['#0072b2', '#e69f00', '#009e73', '#cc79a7', '#56b4e9', '#d55e00'];
const percent = (share: number): string => `${100 * share}%`;

/** Mass over all baselines of a program, a line for each build, against its limit. */
export function HistoryChart({ label, unit, points, limit }: HistoryChartProps) {
  const scale = chartScale(
    [...points.flatMap(({ mass, predicted }) => [mass, predicted]), ...(limit === null ? [] : [limit])],
    4,
  );
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
      {limit === null ? null : (
        <>
          <line x1="12%" x2="100%" y1={y(limit)} y2={y(limit)} className="stroke-limit" strokeWidth="2" />
          <text x="100%" y={y(limit) - 5} textAnchor="end" className="fill-ink text-note">
            maximum mass {limit.toFixed(scale.decimals)} {unit}
          </text>
        </>
      )}
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
