import { useId } from 'react';
import { balanceScale, type BalanceScale, balanceVerdict } from '@/components/mass/balance-scale';
import { SeverityWord } from '@/components/ui/severity';

interface BalanceBarProps {
  /** CG, % of the mean aerodynamic chord behind its leading edge. */
  readonly cg: number;
  /** 1 sigma of it, % MAC. */
  readonly sigma?: number;
  readonly forwardLimit: number | null;
  readonly aftLimit: number | null;
}

const BAR = 58;

/** The mean chord with its limits and the CG on it. Drawn to scale, leading edge at the left; what lies beyond a limit is hatched. */
export function BalanceBar({ cg, sigma, forwardLimit, aftLimit }: BalanceBarProps) {
  const limits = [forwardLimit, aftLimit].filter((limit) => limit !== null);
  const spread = sigma ?? 0;
  const scale = balanceScale([cg - spread, cg + spread, ...limits]);
  const verdict = balanceVerdict(cg, forwardLimit, aftLimit);
  const label = `CG at ${cg.toFixed(2)} % MAC. ${verdict.words}.`;
  return (
    <figure className="keep-together grid gap-1">
      <div className="px-3">
        <svg width="100%" height="124" role="img" aria-label={label} className="block overflow-visible">
          <Chord scale={scale} />
          <Beyond scale={scale} forward={forwardLimit} aft={aftLimit} />
          {forwardLimit === null ? null : <Limit scale={scale} at={forwardLimit} word="forward" />}
          {aftLimit === null ? null : <Limit scale={scale} at={aftLimit} word="aft" />}
          <CgMark scale={scale} cg={cg} sigma={spread} inside={verdict.inside} />
        </svg>
      </div>
      <figcaption className="flex flex-wrap gap-x-4 text-note text-ink-2">
        {verdict.inside ? null : <SeverityWord severity="blocker" word="Outside the limits" />}
        <span className={verdict.inside ? '' : 'leading-5 text-ink'}>{verdict.words}.</span>
      </figcaption>
    </figure>
  );
}

const percent = (at: number) => `${at}%`;

function Chord({ scale }: { readonly scale: BalanceScale }) {
  const [leading, trailing] = [scale.place(0), scale.place(100)];
  return (
    <g>
      <line x1="0" x2="100%" y1={BAR} y2={BAR} className="stroke-rule" />
      <rect
        x={percent(leading)}
        y={BAR - 3}
        width={percent(trailing - leading)}
        height="6"
        className="fill-sheet stroke-ink"
      />
      {scale.ticks.map((tick) => (
        <g key={tick}>
          <line
            x1={percent(scale.place(tick))}
            x2={percent(scale.place(tick))}
            y1={BAR + 3}
            y2={BAR + (tick % 25 === 0 ? 11 : 7)}
            className="tick"
          />
          {tick % 25 === 0 ? (
            <text
              x={percent(scale.place(tick))}
              y={BAR + 24}
              textAnchor="middle"
              className="num fill-ink-2 text-note"
            >
              {tick}
            </text>
          ) : null}
        </g>
      ))}
    </g>
  );
}

function Beyond({
  scale,
  forward,
  aft,
}: {
  readonly scale: BalanceScale;
  readonly forward: number | null;
  readonly aft: number | null;
}) {
  const id = useId();
  const parts = [
    forward === null ? null : { from: 0, to: scale.place(forward) },
    aft === null ? null : { from: scale.place(aft), to: 100 },
  ].filter((part) => part !== null);
  return (
    <g>
      <pattern id={id} width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
        <line x1="0.5" x2="0.5" y1="0" y2="6" className="stroke-limit" />
      </pattern>
      {parts.map((part) => (
        <rect
          key={part.from}
          x={percent(part.from)}
          y={BAR - 11}
          width={percent(part.to - part.from)}
          height="8"
          fill={`url(#${id})`}
          opacity="0.55"
        />
      ))}
    </g>
  );
}

/** A limit and its label, on the side away from the other limit. */
function Limit({
  scale,
  at,
  word,
}: {
  readonly scale: BalanceScale;
  readonly at: number;
  readonly word: 'forward' | 'aft';
}) {
  const x = percent(scale.place(at));
  const side =
    word === 'forward' ? { textAnchor: 'end' as const, dx: -5 } : { textAnchor: 'start' as const, dx: 5 };
  return (
    <g>
      <line x1={x} x2={x} y1="16" y2={BAR + 5} className="stroke-limit" strokeWidth="2" />
      <text x={x} y="26" {...side} className="fill-ink text-note">
        {word}
        <tspan className="max-sm:hidden"> limit</tspan>
      </text>
      <text x={x} y="41" {...side} className="num fill-ink text-note">
        {at.toFixed(1).replace('-', '\u2212')}
      </text>
    </g>
  );
}

/** The trade's mark of a centre of gravity, its 1 sigma as a whisker, its value beneath. */
function CgMark({
  scale,
  cg,
  sigma,
  inside,
}: {
  readonly scale: BalanceScale;
  readonly cg: number;
  readonly sigma: number;
  readonly inside: boolean;
}) {
  const at = scale.place(cg);
  const anchor = at < 18 ? 'start' : at > 82 ? 'end' : 'middle';
  const ink = inside ? 'stroke-spin' : 'stroke-limit';
  const fill = inside ? 'fill-spin' : 'fill-limit';
  return (
    <g>
      {sigma > 0 ? (
        <line
          x1={percent(scale.place(cg - sigma))}
          x2={percent(scale.place(cg + sigma))}
          y1={BAR}
          y2={BAR}
          strokeWidth="4"
          className={ink}
        />
      ) : null}
      <line x1={percent(at)} x2={percent(at)} y1={BAR + 8} y2={BAR + 38} className={ink} strokeWidth="2" />
      <svg x={percent(at)} y={BAR} width="1" height="1" className="overflow-visible">
        <circle r="8" className={`fill-sheet ${ink}`} strokeWidth="2" />
        <path d="M0 0V-7A7 7 0 0 1 7 0ZM0 0V7A7 7 0 0 1 -7 0Z" className={fill} />
      </svg>
      <text x={percent(at)} y={BAR + 54} textAnchor={anchor} className="fill-ink text-body font-semibold">
        CG <tspan className="num">{cg.toFixed(2).replace('-', '\u2212')}</tspan> % MAC
        {sigma > 0 ? (
          <>
            {' ± '}
            <tspan className="num">{sigma.toFixed(2)}</tspan>
          </>
        ) : null}
      </text>
    </g>
  );
}
