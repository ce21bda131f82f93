import { Num } from '@/components/mass/num';
import { ON_BOARD } from '@/lib/three-views/group-key';
import { type Picture, type Piece } from '@/lib/three-views/picture';
import { type OutputUnits, unitLabel } from '@/lib/units/names';

/** What the pointer is on. */
export function PieceFacts({
  picture,
  piece,
  units,
}: {
  readonly picture: Picture;
  readonly piece: Piece | null;
  readonly units: OutputUnits;
}) {
  if (piece === null)
    return (
      <p className="no-print min-h-15 text-ink-2">
        Point at a mark to read it. Drag a rectangle to list what is in it; with Shift, to narrow the region.
      </p>
    );
  const { row, place, mass, image } = piece;
  const { axes } = picture.geometry;
  return (
    <div className="no-print min-h-15">
      <p className="truncate">
        <span className="font-semibold">{row.item}</span>
        {row.description === null ? null : ` ${row.description}`}
        {image ? <span className="text-ink-2">, mirror image</span> : null}
      </p>
      <p className="truncate text-ink-2">{row.group === ON_BOARD ? 'On board' : row.group}</p>
      <p className="flex flex-wrap gap-x-4">
        <Num value={mass} unit={units.mass} showUnit digits={5} />
        {axes.map((direction, k) => (
          <span key={direction}>
            <span className="text-ink-2">{`${'xyz'.charAt(k)} `}</span>
            <Num value={place[k] ?? null} unit={units.length} decimals={units.length === 'in' ? 1 : 3} />
          </span>
        ))}
        <span className="text-ink-2">{unitLabel(units.length)}</span>
      </p>
    </div>
  );
}
