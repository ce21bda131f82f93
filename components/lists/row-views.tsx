import { CgMark, chordEnds } from '@/components/three-views/landmarks';
import { type Sheet, sheetOf } from '@/components/three-views/sheet';
import { placedRow } from '@/components/lists/row-part';
import { type ListRow } from '@/lib/contracts/list-rows';
import { arrow } from '@/lib/frames/axes';
import { type AirframeVec } from '@/lib/frames/tags';
import { type ListDeclarations } from '@/lib/mass/declarations';
import { type AirframeGeometry } from '@/lib/mass/geometry';
import { Placement } from '@/lib/mass/place';
import { addVec, scaleVec } from '@/lib/numerics/vec3';
import { pictureBounds } from '@/lib/three-views/bounds';
import { placesOf } from '@/lib/three-views/places';
import { SHEET, VIEW_NAMES } from '@/lib/three-views/views';

/** Of the aircraft's longer measure. */
const MARK_ROOM = 0.14;

interface RowViewsProps {
  readonly row: ListRow;
  readonly declarations: ListDeclarations;
  readonly geometry: AirframeGeometry;
  /** Of what the list adds up to; null where it has none. */
  readonly cg: AirframeVec | null;
}

/** Where a row is, small, in side, plan and front: its place, its mirror image, the list's CG, the mean chord. */
export function RowViews({ row, declarations, geometry, cg }: RowViewsProps) {
  const placed = placedRow(row, declarations);
  if (placed === null) return null;
  const places = placesOf(placed, new Placement(declarations, geometry));
  // Room for the marks, which are drawn in pixels whatever the scale.
  const room = MARK_ROOM * Math.max(geometry.length, geometry.span);
  const bounds = pictureBounds(
    [...places, ...(cg === null ? [] : [cg])].map((place) => ({ place, radius: room })),
    airframeEnds(geometry),
    geometry,
  );
  return (
    <section className="grid gap-2">
      <h4 className="font-semibold">In three views</h4>
      <div className="grid grid-cols-3 items-end gap-3">
        {VIEW_NAMES.map((view) => {
          const sheet = sheetOf(view, geometry.axes, bounds);
          return (
            <figure key={view} className="grid gap-1">
              <svg
                role="img"
                aria-label={`${view}, ${SHEET[view].from}`}
                className="w-full overflow-hidden border border-rule bg-sheet"
                style={{ aspectRatio: `${sheet.width} / ${sheet.height}` }}
              >
                <MiddleLines sheet={sheet} geometry={geometry} />
                {cg === null ? null : <CgMark sheet={sheet} cg={cg} />}
                {places.map((place, index) => (
                  <PlaceMark key={index} sheet={sheet} place={place} image={index > 0} />
                ))}
              </svg>
              <figcaption className="text-note text-ink-2">
                {view}, {SHEET[view].from}
              </figcaption>
            </figure>
          );
        })}
      </div>
      <p className="text-note text-ink-2">
        {places.length > 1 ? 'Filled: the row; open: its mirror image. ' : ''}
        The heavy line is the mean chord; the sheets hold the aircraft&apos;s length and span.
      </p>
    </section>
  );
}

/** Ends of a length and a span about r0: how large the aircraft is, not where its nose is. */
function airframeEnds({ axes, reference, length, span }: AirframeGeometry): AirframeVec[] {
  const aft = arrow('aft', axes);
  const right = arrow('right', axes);
  return [-0.5, 0.5].flatMap((half) => [
    addVec(reference, scaleVec(half * length, aft)),
    addVec(reference, scaleVec(half * span, right)),
  ]);
}

function MiddleLines({ sheet, geometry }: { readonly sheet: Sheet; readonly geometry: AirframeGeometry }) {
  const middle = sheet.percent(geometry.reference);
  const [lead, trail] = sheet.view === 'front' ? [] : chordEnds(geometry).map(sheet.percent);
  return (
    <>
      <line x1="0" x2="100%" y1={`${middle.y}%`} y2={`${middle.y}%`} className="stroke-rule" />
      <line x1={`${middle.x}%`} x2={`${middle.x}%`} y1="0" y2="100%" className="stroke-rule" />
      {lead === undefined || trail === undefined ? null : (
        <line
          x1={`${lead.x}%`}
          y1={`${lead.y}%`}
          x2={`${trail.x}%`}
          y2={`${trail.y}%`}
          className="stroke-ink-2"
          strokeWidth="3"
        />
      )}
    </>
  );
}

function PlaceMark({
  sheet,
  place,
  image,
}: {
  readonly sheet: Sheet;
  readonly place: AirframeVec;
  readonly image: boolean;
}) {
  const { x, y } = sheet.percent(place);
  return (
    <>
      <circle cx={`${x}%`} cy={`${y}%`} r="6" className="fill-none stroke-sheet" strokeWidth="3" />
      <circle
        cx={`${x}%`}
        cy={`${y}%`}
        r="4.5"
        className={image ? 'fill-sheet stroke-limit' : 'fill-limit stroke-ink'}
        strokeWidth={image ? 2 : 1}
      />
    </>
  );
}
