import Link from 'next/link';
import { Num } from '@/components/mass/num';
import { fillOf } from '@/components/three-views/mark-layer';
import { onSeries } from '@/components/three-views/view-labels';
import { type GroupKey } from '@/lib/three-views/group-key';
import { markRadius } from '@/lib/three-views/mark-size';
import { niceBelow } from '@/lib/three-views/ticks';
import { fromSi, toSi } from '@/lib/units/convert';
import { type MassUnit } from '@/lib/units/table';

/** The marks of the groups, each with its letter and name: a link that shows the group alone. */
export function GroupsKey({
  groups,
  chosen,
  hrefOf,
}: {
  readonly groups: readonly GroupKey[];
  /** The top group that alone is shown; null: all. */
  readonly chosen: string | null;
  readonly hrefOf: (group: string | null) => string;
}) {
  return (
    <ul className="flex flex-wrap gap-x-5 gap-y-1" aria-label="Groups">
      {groups.map(({ group, title, letter, series }) => (
        <li key={group}>
          <Link
            href={hrefOf(group === chosen ? null : group)}
            scroll={false}
            aria-current={group === chosen ? 'true' : undefined}
            className={`flex items-center gap-2 border-b-2 pointer-coarse:py-2 ${group === chosen ? 'border-spin' : 'border-transparent hover:border-rule'}`}
          >
            <svg width="18" height="18" aria-hidden="true" className="shrink-0">
              <circle cx="9" cy="9" r="8.5" fill={fillOf(series)} className="stroke-ink" />
              <text
                x="9"
                y="13"
                textAnchor="middle"
                fill={series === null ? 'var(--ink)' : onSeries(series)}
                className="text-note"
              >
                {letter}
              </text>
            </svg>
            {title}
          </Link>
        </li>
      ))}
    </ul>
  );
}

/** Three round masses at the scale of a view that is `width` metres wide and as wide as this. */
export function MassScale({
  radiusOfOne,
  heaviest,
  width,
  unit,
}: {
  readonly radiusOfOne: number;
  /** kg */
  readonly heaviest: number;
  /** m */
  readonly width: number;
  readonly unit: MassUnit;
}) {
  if (!(heaviest > 0)) return null;
  const top = niceBelow(fromSi(heaviest, unit));
  const masses = [top, top / 10, top / 100].map((shown) => ({
    shown,
    radius: markRadius(toSi(shown, unit), radiusOfOne),
  }));
  const height = 2.2 * (masses[0]?.radius ?? 0);
  return (
    <div className="grid gap-1">
      <svg
        width="100%"
        viewBox={`0 0 ${width} ${height}`}
        aria-hidden="true"
        className="block overflow-visible"
      >
        {masses.map(({ shown, radius }, index) => (
          <circle
            key={shown}
            cx={(masses[0]?.radius ?? 0) * (1.1 + 2.2 * index)}
            cy={height / 2}
            r={radius}
            vectorEffect="non-scaling-stroke"
            className="fill-none stroke-ink"
          />
        ))}
      </svg>
      <p className="text-note text-ink-2">
        Area goes with mass:{' '}
        {masses.map(({ shown }, index) => (
          <span key={shown}>
            {index > 0 ? ', ' : ''}
            <Num value={toSi(shown, unit)} unit={unit} showUnit digits={1} />
          </span>
        ))}
        .
      </p>
    </div>
  );
}
