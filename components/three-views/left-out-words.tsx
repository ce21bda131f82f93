import { Num } from '@/components/mass/num';
import { isWithin } from '@/lib/three-views/bounds';
import { type Picture, piecesOf } from '@/lib/three-views/picture';
import { type OutputUnits } from '@/lib/units/names';

const counted = (count: number, one: string, more = `${one}s`): string =>
  `${count} ${count === 1 ? one : more}`;

/** What the views do not draw as a mark of its own, said in full. */
export function LeftOutWords({ picture, units }: { readonly picture: Picture; readonly units: OutputUnits }) {
  const { left, rows, bounds } = picture;
  const beyond = piecesOf(rows).filter(({ place }) => !isWithin(place, bounds)).length;
  const removals = rows.filter(({ mass }) => mass < 0).length;
  const lines = [
    'Each mark stands at the CG of a row and holds the mass of all its pieces there, without growth; rows of pairs and of half lists have a mark on either side. The CG is that of the whole condition, also without growth.',
    removals > 0 ? `Hollow marks take mass away: ${counted(removals, 'row')}.` : null,
    beyond > 0
      ? `${counted(beyond, 'mark lies', 'marks lie')} far beyond the airframe and off the views; the table holds ${beyond === 1 ? 'it' : 'them'}.`
      : null,
    left.ashore > 0
      ? `${counted(left.ashore, 'row is', 'rows are')} of a category that is not on board in this condition.`
      : null,
    left.waiting > 0
      ? `${counted(left.waiting, 'adjustment is', 'adjustments are')} not approved and not drawn.`
      : null,
    left.memo > 0 ? `${counted(left.memo, 'memo row is', 'memo rows are')} not summed and not drawn.` : null,
    left.uncategorised > 0
      ? `A signed baseline keeps no category for ${counted(left.uncategorised, 'item')} on board, which this filter leaves out.`
      : null,
  ].filter((line) => line !== null);
  return (
    <div className="measure grid gap-1 text-note text-ink-2">
      <p>{lines.join(' ')}</p>
      {left.inCells === null ? null : (
        <p>
          The heaviest rows are drawn one by one. {counted(left.inCells.rows, 'lighter row')},{' '}
          <Num value={left.inCells.mass} unit={units.mass} showUnit /> together, are drawn as squares, one for
          each group in a cube of <Num value={left.inCells.size} unit={units.length} showUnit digits={2} />.
          Filter to see more of them one by one.
        </p>
      )}
    </div>
  );
}
