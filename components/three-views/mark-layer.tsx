import { memo, useMemo } from 'react';
import { type Sheet } from '@/components/three-views/sheet';
import { type GroupKey, topGroup } from '@/lib/three-views/group-key';
import { markRadius } from '@/lib/three-views/mark-size';
import { type Mark, outlinesOf } from '@/lib/three-views/outlines';
import { type Piece } from '@/lib/three-views/picture';

/** Radius of the least mark, as a share of the longer side of the sheets: about a pixel on a desk screen. */
const LEAST = 0.0015;
/** Below this share the outline lies under the fill and scales with it: else little colour would be left, none on a narrow screen. */
const SMALL = 0.008;
/** Width of that outline as a share of the largest such mark's radius; half of it shows. */
const RIM = 0.28;

interface MarkLayerProps {
  readonly sheet: Sheet;
  readonly pieces: readonly Piece[];
  readonly keys: ReadonlyMap<string, GroupKey>;
  readonly radiusOfOne: number;
  readonly faded?: boolean;
}

/** How a group's marks are filled. */
export function fillOf(series: number | null): string {
  return series === null ? 'var(--rule)' : `var(--series-${series})`;
}

/** Marks of one view in a few paths: circles for rows and items, squares for cells of light rows, hollow where mass is taken away. */
export const MarkLayer = memo(function MarkLayer(props: MarkLayerProps) {
  const { sheet, pieces, keys, radiusOfOne, faded = false } = props;
  const outlines = useMemo(() => {
    const marks = pieces.map(({ row, place, mass }): Mark => {
      const series = keys.get(topGroup(row.group))?.series ?? null;
      return {
        ...sheet.at(place),
        radius: markRadius(mass, radiusOfOne),
        shape: row.cell ? 'square' : 'circle',
        look: `${mass < 0 ? 'hollow' : fillOf(series)}`,
      };
    });
    return outlinesOf(marks, LEAST * Math.max(sheet.width, sheet.height));
  }, [sheet, pieces, keys, radiusOfOne]);
  const small = SMALL * Math.max(sheet.width, sheet.height);
  return (
    <g opacity={faded ? 0.22 : 1}>
      {outlines.map(({ look, radius, d }, index) => (
        <path
          key={index}
          d={d}
          fill={look === 'hollow' ? 'none' : look}
          fillOpacity="0.9"
          {...(radius > small || look === 'hollow'
            ? { strokeWidth: look === 'hollow' ? 1.5 : 1, vectorEffect: 'non-scaling-stroke' }
            : { strokeWidth: RIM * small, paintOrder: 'stroke' })}
          className="stroke-ink"
        />
      ))}
    </g>
  );
});
