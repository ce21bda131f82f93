import { chartScale, type ChartScale } from '@/components/baselines/chart-scale';
import { ON_BOARD } from '@/lib/baselines/mass-account';
import { decimalsFor, numberText, plainText } from '@/components/mass/number-text';

/** A group as it stands at its step; the items on board have no path. */
export const groupName = (group: string): string => (group === ON_BOARD ? 'Items on board' : group);

export interface ChartStep {
  readonly key: string;
  readonly name: string;
  /** What opens the rows behind it; null where there are none to open. */
  readonly href: string | null;
  /** As shown. */
  readonly from: number;
  readonly to: number;
}

interface StepChartProps {
  /** What the chart tells, for those who do not see it. */
  readonly label: string;
  readonly unit: string;
  readonly before: { readonly name: string; readonly value: number };
  readonly after: { readonly name: string; readonly value: number };
  readonly steps: readonly ChartStep[];
}

const HEAD = 40;
const ROW = 44;
/** Words keep a rim of paper, so that a line that passes behind them does not strike them out. */
const RIM = { paintOrder: 'stroke', stroke: 'var(--paper)', strokeWidth: 5 } as const;
const percent = (share: number): string => `${100 * share}%`;

/** From one value to another a step at a time, each on its own line, tied to the next by a plumb line. Drawn to the ruled scale. */
export function StepChart({ label, unit, before, after, steps }: StepChartProps) {
  const values = [before.value, after.value, ...steps.flatMap(({ from, to }) => [from, to])];
  const scale = chartScale(values);
  const decimals = decimalsFor(Math.max(...steps.map(({ from, to }) => Math.abs(to - from)), 0), 4);
  const height = HEAD + (steps.length + 2) * ROW;
  return (
    <div className="px-3">
      <svg width="100%" height={height} role="group" aria-label={label} className="block overflow-visible">
        <Rule scale={scale} unit={unit} height={height} />
        <End
          y={HEAD}
          at={scale.place(before.value)}
          {...before}
          decimals={scale.decimals + 1}
          unit={unit}
          tied="below"
        />
        {steps.map((step, index) => (
          <Step
            key={step.key}
            y={HEAD + (index + 1) * ROW}
            step={step}
            scale={scale}
            decimals={decimals}
            unit={unit}
          />
        ))}
        <End
          y={HEAD + (steps.length + 1) * ROW}
          at={scale.place(after.value)}
          {...after}
          decimals={scale.decimals + 1}
          unit={unit}
          tied="above"
        />
      </svg>
    </div>
  );
}

function Rule({
  scale,
  unit,
  height,
}: {
  readonly scale: ChartScale;
  readonly unit: string;
  readonly height: number;
}) {
  return (
    <g aria-hidden="true">
      <line x1="0" x2="100%" y1="24.5" y2="24.5" className="tick" />
      {scale.ticks.map((tick, index) => {
        const x = percent(scale.place(tick));
        const labelled = scale.ticks.length <= 6 || index % 2 === 0;
        const last = index === scale.ticks.length - 1;
        return (
          <g key={tick}>
            <line x1={x} x2={x} y1="24" y2="32" className="tick" />
            <line x1={x} x2={x} y1="32" y2={height} className="stroke-rule" />
            {labelled ? (
              <text
                x={x}
                y="16"
                textAnchor={index === 0 ? 'start' : last ? 'end' : 'middle'}
                className={`num fill-ink-2 text-note ${index === 0 || last ? '' : 'max-sm:hidden'}`}
              >
                {tick.toFixed(scale.decimals)}
                {index === 0 ? ` ${unit}` : ''}
              </text>
            ) : null}
          </g>
        );
      })}
    </g>
  );
}

function End({
  y,
  at,
  name,
  value,
  unit,
  decimals,
  tied,
}: {
  readonly y: number;
  readonly at: number;
  readonly name: string;
  readonly value: number;
  readonly unit: string;
  readonly decimals: number;
  readonly tied: 'above' | 'below';
}) {
  const x = percent(at);
  return (
    <g>
      <Words y={y} name={name} strong value={`${plainText(numberText(value, decimals))} ${unit}`} />
      <line x1="0" x2={x} y1={y + 29} y2={y + 29} className="stroke-ink" strokeWidth="1" />
      <line x1={x} x2={x} y1={y + 22} y2={y + 36} className="stroke-ink" strokeWidth="3" />
      {tied === 'below' ? (
        <line x1={x} x2={x} y1={y + 36} y2={y + ROW + 22} className="stroke-ink-2" />
      ) : null}
    </g>
  );
}

function Step({
  y,
  step,
  scale,
  decimals,
  unit,
}: {
  readonly y: number;
  readonly step: ChartStep;
  readonly scale: ChartScale;
  readonly decimals: number;
  readonly unit: string;
}) {
  const [from, to] = [scale.place(step.from), scale.place(step.to)];
  const change = step.to - step.from;
  const content = (
    <>
      <rect x="0" y={y} width="100%" height={ROW} fill="transparent" />
      <Words
        y={y}
        name={step.name}
        linked={step.href !== null}
        value={`${plainText(numberText(change, decimals, true))} ${unit}`}
      />
      <rect
        x={percent(Math.min(from, to))}
        y={y + 22}
        width={percent(Math.abs(to - from))}
        height="14"
        strokeWidth="1"
        className={`stroke-ink ${change < 0 ? 'fill-minus' : 'fill-plus'}`}
      />
    </>
  );
  return (
    <g>
      <line x1={percent(to)} x2={percent(to)} y1={y + 36} y2={y + ROW + 22} className="stroke-ink-2" />
      {step.href === null ? content : <a href={step.href}>{content}</a>}
    </g>
  );
}

function Words({
  y,
  name,
  value,
  linked = false,
  strong = false,
}: {
  readonly y: number;
  readonly name: string;
  readonly value: string;
  readonly linked?: boolean;
  readonly strong?: boolean;
}) {
  return (
    <>
      <text
        x="0"
        y={y + 15}
        style={RIM}
        className={`text-body ${linked ? 'fill-spin underline underline-offset-2' : 'fill-ink'} ${strong ? 'font-semibold' : ''}`}
      >
        {name}
      </text>
      <text x="100%" y={y + 15} textAnchor="end" style={RIM} className="num fill-ink text-body">
        {value.replace(/^-/, '\u2212')}
      </text>
    </>
  );
}
