import { useMemo } from 'react';
import { RIM } from '@/components/three-views/landmarks';
import { type Sheet } from '@/components/three-views/sheet';
import { type GroupKey, topGroup } from '@/lib/three-views/group-key';
import { type Box, placeLabels } from '@/lib/three-views/labels';
import { markRadius } from '@/lib/three-views/mark-size';
import { type NamedPlace, type Piece } from '@/lib/three-views/picture';
import { type AirframeVec } from '@/lib/frames/tags';

interface LabelsProps {
  readonly sheet: Sheet;
  readonly pieces: readonly Piece[];
  readonly keys: ReadonlyMap<string, GroupKey>;
  readonly radiusOfOne: number;
  /** Pixels per metre on a desk screen: what has no room there is left out, and is named in the key. */
  readonly scale: number;
  /** Kept free around it. */
  readonly cg: AirframeVec | null;
  /** Named too, before the groups. */
  readonly points: readonly NamedPlace[];
  readonly chord: readonly AirframeVec[];
}

/** A letter needs a mark of this many pixels' radius. */
const LETTER = 8;
/** And on a narrow screen, which is about 0.4 of the scale. */
const LETTER_NARROW = 20;

/** With more groups than these in sight, those without a colour of their own are named in the key alone. */
const FEW = 7;

/** Letters in marks that are large enough to hold one. */
export function Letters({
  sheet,
  pieces,
  keys,
  radiusOfOne,
  scale,
}: Omit<LabelsProps, 'cg' | 'points' | 'chord'>) {
  const large = useMemo(
    () =>
      pieces
        .map((piece) => ({ piece, radius: scale * markRadius(piece.mass, radiusOfOne) }))
        .filter(({ radius }) => radius >= LETTER),
    [pieces, radiusOfOne, scale],
  );
  return (
    <g aria-hidden="true" className="pointer-events-none">
      {large.map(({ piece, radius }, index) => {
        const key = keys.get(topGroup(piece.row.group));
        const { x, y } = sheet.percent(piece.place);
        const hollow = piece.mass < 0 || key === undefined || key.series === null;
        return (
          <text
            key={index}
            x={`${x}%`}
            y={`${y}%`}
            dy="4"
            textAnchor="middle"
            fill={hollow ? 'var(--ink)' : onSeries(key.series)}
            className={`text-note ${radius >= LETTER_NARROW ? '' : 'max-md:hidden'}`}
          >
            {key?.letter}
          </text>
        );
      })}
    </g>
  );
}

/** Ink that reads on a colour of the series. */
export function onSeries(series: number | null): string {
  return series === 1 || series === 7 ? `var(--on-series-${series})` : 'var(--on-series)';
}

/** The names of reference points, and of each group beside its heaviest mark, where there is room. */
export function ViewLabels({ sheet, pieces, keys, radiusOfOne, scale, cg, points, chord }: LabelsProps) {
  const labels = useMemo(() => {
    const px = (place: AirframeVec) => {
      const { x, y } = sheet.at(place);
      return { x: scale * x, y: scale * y };
    };
    const around = (place: AirframeVec, left: number, right: number): Box => {
      const { x, y } = px(place);
      return { left: x - left, right: x + right, top: y - 12, bottom: y + 12 };
    };
    const taken = [
      ...(cg === null ? [] : [{ ...around(cg, 24, 40), top: px(cg).y - 26, bottom: px(cg).y + 24 }]),
      ...chord.map((place, index) => (index === 0 ? around(place, 48, 4) : around(place, 4, 34))),
      ...points.map(({ place }) => around(place, 6, 6)),
    ];
    const named = points.map(({ code, place }) => ({
      key: `point ${code}`,
      ...px(place),
      clear: 5,
      width: 7.4 * code.length,
    }));
    const heaviest = heaviestOfGroups(pieces);
    const groups = heaviest.flatMap(([group, piece]) => {
      const key = keys.get(group);
      if (key === undefined || (key.series === null && heaviest.length > FEW)) return [];
      const clear = scale * markRadius(piece.mass, radiusOfOne);
      return [{ key: `group ${key.title}`, ...px(piece.place), clear, width: 7 * key.title.length }];
    });
    const size = { width: scale * sheet.width, height: scale * sheet.height };
    return placeLabels([...named, ...groups], taken, size);
  }, [sheet, pieces, keys, radiusOfOne, scale, cg, points, chord]);
  return (
    <g aria-hidden="true" className="pointer-events-none max-md:hidden">
      {labels.map(({ key, x, y, anchor }) => (
        <text
          key={key}
          x={`${(100 * x) / (scale * sheet.width)}%`}
          y={`${(100 * y) / (scale * sheet.height)}%`}
          textAnchor={anchor}
          style={RIM}
          className={`fill-ink text-note ${key.startsWith('group ') ? 'font-semibold' : ''}`}
        >
          {key.replace(/^(group|point) /, '')}
        </text>
      ))}
    </g>
  );
}

function heaviestOfGroups(pieces: readonly Piece[]): (readonly [string, Piece])[] {
  const heaviest = new Map<string, Piece>();
  for (const piece of pieces) {
    const group = topGroup(piece.row.group);
    const known = heaviest.get(group);
    if (piece.mass > 0 && (known === undefined || piece.mass > known.mass)) heaviest.set(group, piece);
  }
  return [...heaviest].sort(([, a], [, b]) => b.mass - a.mass);
}
